// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/writeCertificate.h"

#include "core/certificate/CertificateXml.h"
#include "core/evaluate/KeyFigures.h"
#include "core/session/SessionJson.h"
#include "core/session/TextMark.h"
#include "ui/certificate/CertificatePages.h"
#include "ui/certificate/CertificateText.h"
#include "ui/certificate/Paper.h"

#include <QCoreApplication>
#include <QFileInfo>
#include <QSaveFile>

namespace spanwright {

namespace {

struct Writing {
    Q_DECLARE_TR_FUNCTIONS(Writing)
};

Error fileError(ErrorCode code, const QString& path, const QString& reason) {
    return Error(code, {{"file", path.toStdString()}, {"reason", reason.toStdString()}});
}

} // namespace

QStringList blockingGaps(const Record& record, const Evaluation& evaluation) {
    QStringList gaps;
    for (const ChecklistItem& item : checklist(record, evaluation))
        if (item.level == GapLevel::Block)
            gaps << gapText(item, record, evaluation);
    return gaps;
}

CertificateContext certificateContext(const Record& record, const Evaluation& evaluation, const QString& date) {
    const std::string session = writeSession(record, {SPANWRIGHT_VERSION, keyFigures(evaluation)});
    constexpr std::string_view key = "\"seal\": \"";
    const auto at = session.rfind(key);
    const auto from = at + key.size();
    const std::string seal = at == std::string::npos ? std::string() : session.substr(from, session.find('"', from) - from);
    return {"Spanwright " SPANWRIGHT_VERSION, date.toStdString(), seal};
}

Pages layOutCertificate(const Record& record, const Evaluation& evaluation, const CertificateContext& context) {
    return certificatePages(buildCertificate(record, evaluation, context), blockingGaps(record, evaluation));
}

Result<void> writeCertificatePdf(const Record& record, const Evaluation& evaluation, const QString& path,
                                 const CertificateContext& context, WithGaps withGaps) {
    const QStringList gaps = blockingGaps(record, evaluation);
    if (withGaps == WithGaps::Refuse && !gaps.isEmpty()) {
        Error error(ErrorCode::CertificateIncomplete);
        for (const QString& gap : gaps)
            error.facts.push_back({"missing", gap.toStdString()});
        return error;
    }
    return writePdf(layOutCertificate(record, evaluation, context),
                    {Writing::tr("Calibration certificate %1 (draft)").arg(QString::fromStdString(record.job.certificateNumber)), QString::fromStdString(context.program)}, path);
}

Result<void> writeCertificateXml(const Record& record, const Evaluation& evaluation, const QString& path, const XmlWishes& wishes,
                                 const CertificateContext& context) {
    const Certificate certificate = buildCertificate(record, evaluation, context);
    CertificateXmlParts parts;
    for (const auto& lines : {certificate.notices, certificate.statements})
        for (const StatementLine& line : lines)
            parts.statements.push_back(statementText(line).toStdString());
    if (record.limits.stated)
        parts.decisionRule = (limitsText(record.limits, record.item) + QStringLiteral("; ") + decisionText(record.limits)).toStdString();
    if (certificate.function)
        parts.functionForm = equationForm(*certificate.function).toStdString();
    if (!wishes.country.empty())
        parts.countryCode = wishes.country;
    if (!wishes.pdfPath.isEmpty()) {
        QFile pdf(wishes.pdfPath);
        if (!pdf.open(QIODevice::ReadOnly))
            return fileError(ErrorCode::FileNotReadable, wishes.pdfPath, pdf.errorString());
        parts.pdfName = QFileInfo(wishes.pdfPath).fileName().toStdString();
        parts.pdfBase64 = pdf.readAll().toBase64().toStdString();
    }
    QSaveFile file(path);
    if (!file.open(QIODevice::WriteOnly))
        return fileError(ErrorCode::FileNotWritable, path, file.errorString());
    const std::string xml = withMark(certificateXml(certificate, parts), {"<!-- ", " -->"});
    if (file.write(xml.data(), static_cast<qint64>(xml.size())) != static_cast<qint64>(xml.size()) || !file.commit())
        return fileError(ErrorCode::FileWriteFailed, path, file.errorString());
    return {};
}

} // namespace spanwright
