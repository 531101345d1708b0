// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/CertificatePages.h"

#include "ui/certificate/CertificateSections.h"
#include "ui/certificate/Paper.h"

#include <QCoreApplication>

#include <algorithm>

namespace spanwright {

namespace {

constexpr double HeadEnd = 31; // mm

struct CertificatePages {
    Q_DECLARE_TR_FUNCTIONS(CertificatePages)
};

QString text(const std::string& from) {
    return QString::fromStdString(from);
}

/// The style in the largest size in which the words fit; cut words are stated in full on the first page (addIdentification).
TextStyle shrunk(const QString& words, TextStyle style, double width) {
    constexpr double smallest = 7;
    const double needed = textWidth(words, style);
    if (needed > width)
        style.points = std::max(smallest, style.points * width / needed * 0.99);
    return style;
}

void addHead(Page& page, const Certificate& certificate, const QString& number) {
    const TextStyle small{8, false, PageInk::Quiet};
    const QString laboratory = certificate.job.laboratory.empty() ? CertificatePages::tr("Laboratory not named") : text(certificate.job.laboratory);
    const QString certificateNumber = CertificatePages::tr("Certificate %1").arg(orDash(certificate.job.certificateNumber));
    const auto put = [&page](double x, double baseline, const QString& words, const TextStyle& style, Qt::Alignment end = Qt::AlignLeft) {
        if (!words.isEmpty())
            page.blocks.push_back(textBlock(x, baseline, words, style, end));
    };
    // The number identifies every page, so it has the first claim on the width.
    constexpr double gap = 6, mostForNumber = 110;
    const TextStyle right = shrunk(certificateNumber, {9.5, true, PageInk::Text}, mostForNumber);
    const double rest = PaperContent.width() - gap - std::min(mostForNumber, textWidth(certificateNumber, right));
    const TextStyle left = shrunk(laboratory, {11, true, PageInk::Text}, rest);
    put(PaperContent.left(), 17.5, fitting(laboratory, left, rest), left);
    put(PaperContent.left(), 22, fitting(text(certificate.job.laboratoryAddress), small, PaperContent.width() - 30), small);
    put(PaperContent.right(), 17.5, fitting(certificateNumber, right, mostForNumber), right, Qt::AlignRight);
    put(PaperContent.right(), 22, number, small, Qt::AlignRight);
    page.blocks.push_back({QRectF(PaperContent.left(), 26, PaperContent.width(), 0), Rule{0.4, PageInk::Text}});
}

QString stateWord(DraftState state) {
    switch (state) {
    case DraftState::Incomplete: return CertificatePages::tr("INCOMPLETE DRAFT");
    case DraftState::Draft: return CertificatePages::tr("DRAFT");
    case DraftState::SignedOff: return {};
    }
    return {};
}

/// The first 16 digits of the digest in groups of four.
QString digestText(const std::string& digest) {
    const auto colon = digest.find(':');
    const QString hex = text(digest.substr(colon == std::string::npos ? 0 : colon + 1, 16));
    QStringList groups;
    for (qsizetype i = 0; i < hex.size(); i += 4)
        groups << hex.mid(i, 4);
    return groups.join(QLatin1Char(' '));
}

QString footText(const Certificate& certificate) {
    QStringList parts;
    if (!stateWord(certificate.state).isEmpty())
        parts << stateWord(certificate.state);
    parts << CertificatePages::tr("drawn up on %1").arg(text(certificate.drawnUpOn));
    if (!certificate.digest.empty())
        parts << CertificatePages::tr("record %1").arg(digestText(certificate.digest));
    parts << text(certificate.program);
    return parts.join(QStringLiteral(" · "));
}

/// Behind everything that is on the page already.
void addWatermark(Page& page, DraftState state) {
    if (state == DraftState::SignedOff)
        return;
    const bool incomplete = state == DraftState::Incomplete;
    Watermark mark{incomplete ? CertificatePages::tr("INCOMPLETE") : CertificatePages::tr("DRAFT"), incomplete ? 104.0 : 190.0, 52, PageInk::Shade};
    page.blocks.insert(page.blocks.begin(), PageBlock{QRectF(0, 0, 210, 297), mark});
}

} // namespace

Pages certificatePages(const Certificate& certificate, const QStringList& gaps) {
    Flow flow(emptyPaper(), areaUnder(HeadEnd));
    addTitle(flow, certificate, gaps);
    addIdentification(flow, certificate);
    addStandards(flow, certificate);
    addConditions(flow, certificate);
    addSummary(flow, certificate);
    for (const PhaseSection& section : certificate.phases)
        addSplit(flow, certificate, section);
    for (const PhaseSection& section : certificate.phases)
        addResults(flow, certificate, section);
    addFunction(flow, certificate);
    for (const PhaseSection& section : certificate.phases)
        addBudget(flow, certificate, section);
    for (const PhaseSection& section : certificate.phases)
        addPerformance(flow, certificate, section);
    for (const PhaseSection& section : certificate.phases)
        addForce(flow, certificate, section);
    addExclusions(flow, certificate);
    addStatements(flow, certificate, gaps);
    addSignOffs(flow, certificate);
    Pages pages = flow.take();
    for (std::size_t i = 0; i < pages.pages.size(); ++i) {
        const QString number = pageNumber(i + 1, pages.pages.size());
        addHead(pages.pages[i], certificate, number);
        addFoot(pages.pages[i], footText(certificate), number);
        addWatermark(pages.pages[i], certificate.state);
    }
    return pages;
}

} // namespace spanwright
