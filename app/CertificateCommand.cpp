// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Arguments.h"
#include "app/Commands.h"
#include "app/PaperApplication.h"
#include "app/RecordFile.h"
#include "app/ResultFile.h"
#include "core/evaluate/evaluate.h"
#include "core/session/SameNumber.h"
#include "ui/certificate/CertificateText.h"
#include "ui/certificate/writeCertificate.h"

#include <QDate>

#include <algorithm>
#include <filesystem>
#include <ostream>

namespace spanwright {

namespace {

constexpr OptionSpec known[] = {{"--to"}, {"--xml"}, {"--country"}, {"--incomplete", OptionKind::Flag}, {"--replace", OptionKind::Flag}};

/// Two capital letters (ISO 3166-1).
bool isCountryCode(const std::string& text) {
    return text.size() == 2 && std::all_of(text.begin(), text.end(), [](char c) { return c >= 'A' && c <= 'Z'; });
}

bool sameFile(const std::string& a, const std::string& b) {
    std::error_code unknown;
    return std::filesystem::equivalent(a, b, unknown) ||
           std::filesystem::absolute(a, unknown).lexically_normal() == std::filesystem::absolute(b, unknown).lexically_normal();
}

/// The files that the options name.
struct Documents {
    std::string pdf;
    std::optional<std::string> xml;
};

/// They may be written: neither over the session, nor one over the other.
Result<Documents> freeDocuments(const Arguments& arguments, const std::string& session) {
    const auto pdf = documentName(arguments, "--to");
    if (!pdf)
        return pdf.error();
    Documents documents{*pdf, {}};
    if (arguments.has("--xml")) {
        const auto xml = documentName(arguments, "--xml");
        if (!xml)
            return xml.error();
        if (sameFile(*pdf, *xml))
            return Error(ErrorCode::UsageValueBad, {{"option", "--xml"}, {"text", *xml}});
        documents.xml = *xml;
    }
    auto free = resultFree(documents.pdf, {session}, arguments, isOwnCertificate);
    if (free && documents.xml)
        free = resultFree(*documents.xml, {session}, arguments, isOwnCertificateXml);
    return free ? Result<Documents>(documents) : free.error();
}

/// Every gap on a line of its own: each is something to enter.
int refuseGaps(Console console, const std::string& file, const Error& error) {
    std::size_t count = 0;
    for (const Fact& fact : error.facts)
        if (fact.name == "missing") {
            console.err << "spanwright: " << file << ": " << fact.value << '\n';
            ++count;
        }
    console.err << "spanwright: " << file << ": " << count
                << (count == 1 ? " item blocks" : " items block") << " the certificate, and none was written; --incomplete prints it marked as incomplete\n";
    return CertificateBlocked;
}

/// A certificate stands on the readings as they were entered, not on what somebody made of the file since.
int refuseBroken(Console console, const std::string& file, const std::vector<Warning>& broken) {
    refuseFile(console, file, broken);
    console.err << "spanwright: " << file
                << ": no certificate was written, because it is not known what was changed; spanwright check names the results that differ\n";
    return Refused;
}

int writeXml(Console console, const Documents& documents, const std::string& country, const Record& record, const Evaluation& evaluation,
             const CertificateContext& context) {
    if (country.empty())
        console.err << "spanwright: " << *documents.xml << ": no country is stated, so it stands as ZZ, not stated; give it with --country\n";
    const XmlWishes wishes{QString::fromStdString(documents.pdf), country};
    const auto written = writeCertificateXml(record, evaluation, QString::fromStdString(*documents.xml), wishes, context);
    if (!written)
        return refuse(console, written.error());
    console.out << *documents.xml << '\n';
    return Done;
}

Result<Arguments> argumentsOf(const Words& words) {
    auto arguments = parseArguments(words, known);
    if (!arguments)
        return arguments;
    if (const auto only = onlyFile(*arguments, "certificate"); !only)
        return only.error();
    if (const auto country = arguments->value("--country"); country && !isCountryCode(*country))
        return Error(ErrorCode::UsageValueBad, {{"option", "--country"}, {"text", *country}});
    return arguments;
}

} // namespace

int certificateCommand(const Words& words, Console console) {
    const auto arguments = argumentsOf(words);
    if (!arguments)
        return refuse(console, arguments.error());
    const std::string& file = arguments->files.front();
    const auto documents = freeDocuments(*arguments, file);
    if (!documents)
        return refuse(console, documents.error());
    const auto loaded = loadSessionFile(file);
    if (!loaded)
        return refuse(console, loaded.error());
    if (!loaded->broken.empty())
        return refuseBroken(console, file, loaded->broken);
    const Record& record = loaded->record;
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", file));

    const PaperApplication paper;
    const CertificateContext context = certificateContext(record, *evaluation, QDate::currentDate().toString(Qt::ISODate));
    const WithGaps withGaps = arguments->has("--incomplete") ? WithGaps::MarkIncomplete : WithGaps::Refuse;
    const auto written = writeCertificatePdf(record, *evaluation, QString::fromStdString(documents->pdf), context, withGaps);
    if (!written)
        return written.error().code == ErrorCode::CertificateIncomplete ? refuseGaps(console, file, written.error())
                                                                        : refuse(console, written.error());
    console.out << documents->pdf << '\n';
    const std::string& number = record.job.certificateNumber;
    if (const std::string other = sessionWithNumber(file, number); !other.empty())
        console.err << "spanwright: " << file << ": " << gapText(numberUsedElsewhere(number, other), record, *evaluation).toStdString() << '\n';
    const auto country = arguments->value("--country");
    if (documents->xml)
        return writeXml(console, *documents, country.value_or(std::string()), record, *evaluation, context);
    if (country)
        console.err << "spanwright: " << file << ": --country changes nothing here: it belongs to --xml\n";
    return Done;
}

} // namespace spanwright
