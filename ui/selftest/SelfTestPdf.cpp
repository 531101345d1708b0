// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/Flow.h"
#include "ui/certificate/Paper.h"
#include "ui/selftest/SelfTest.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

constexpr double HeadEnd = 25; // mm

struct SelfTestPdf {
    Q_DECLARE_TR_FUNCTIONS(SelfTestPdf)
};

Table tableOf(const SelfTestCase& one) {
    Table table;
    table.points = 8;
    table.columns = {{SelfTestPdf::tr("figure"), {}, ColumnAlign::Left, 3.2},
                     {SelfTestPdf::tr("printed"), {}, ColumnAlign::Right, 2.4},
                     {SelfTestPdf::tr("computed"), {}, ColumnAlign::Right, 2.4},
                     {SelfTestPdf::tr("digits"), {}, ColumnAlign::Right, 0.8},
                     {{}, {}, ColumnAlign::Left, 1.0}};
    for (const SelfTestFigure& figure : one.figures)
        table.rows.push_back({{selfTestFigureText(figure.name)},
                              {figure.printed},
                              {selfTestNumberText(figure.got)},
                              {QString::number(figure.digits, 'f', 1)},
                              {figure.holds ? SelfTestPdf::tr("agrees") : SelfTestPdf::tr("DIFFERS"), figure.holds ? PageInk::Quiet : PageInk::Warning, !figure.holds}});
    return table;
}

void addCase(Flow& flow, const SelfTestCase& one) {
    constexpr double headAndTwoRows = 24;
    flow.heading(one.name, SelfTestPdf::tr("%n reading(s)", nullptr, static_cast<int>(one.readings)), headAndTwoRows);
    flow.paragraph(one.source, {8, false, PageInk::Quiet});
    flow.space(0.8);
    flow.table(tableOf(one));
    flow.space(3);
}

void addHead(Page& page, const QString& number) {
    const TextStyle small{8, false, PageInk::Quiet};
    page.blocks.push_back(textBlock(PaperContent.left(), 17.5, SelfTestPdf::tr("Validation record of a self-test"), {9.5, true, PageInk::Text}));
    page.blocks.push_back(textBlock(PaperContent.right(), 17.5, number, small, Qt::AlignRight));
    page.blocks.push_back({QRectF(PaperContent.left(), 20, PaperContent.width(), 0), Rule{0.4, PageInk::Text}});
}

Pages selfTestPages(const SelfTestOutcome& outcome, const SelfTestOccasion& occasion) {
    Flow flow(emptyPaper(), areaUnder(HeadEnd));
    flow.title(SelfTestPdf::tr("Validation record"));
    flow.labelled({{SelfTestPdf::tr("Program"), occasion.program}, {SelfTestPdf::tr("Machine"), occasion.machine}},
                  {{SelfTestPdf::tr("Recomputed"), occasion.date}, {SelfTestPdf::tr("Method"), SelfTestPdf::tr("published cases by the road of every record")}});
    flow.space(2);
    flow.notice(selfTestVerdict(outcome), outcome.cases.empty() || outcome.failed() > 0 ? PageInk::Warning : PageInk::Accent);
    flow.space(1.5);
    flow.paragraph(SelfTestPdf::tr("Published cases, recomputed with this program on this machine. A figure agrees when it rounds to what the source "
                                   "prints; digits are those agreed, 15 at most. The record is one part of a validation (ISO/IEC 17025:2017, 7.11.2); "
                                   "it does not replace the laboratory's own."),
                   {8.5, false, PageInk::Text});
    flow.space(2);
    for (const SelfTestCase* one : failuresFirst(outcome))
        addCase(flow, *one);
    Pages pages = flow.take();
    for (std::size_t i = 0; i < pages.pages.size(); ++i) {
        const QString number = pageNumber(i + 1, pages.pages.size());
        addHead(pages.pages[i], number);
        addFoot(pages.pages[i], occasion.program + QStringLiteral(" · ") + occasion.date, number);
    }
    return pages;
}

} // namespace

bool writeSelfTestPdf(const SelfTestOutcome& outcome, const SelfTestOccasion& occasion, const QString& path) {
    return writePdf(selfTestPages(outcome, occasion), {SelfTestPdf::tr("Validation record"), occasion.program}, path).ok();
}

} // namespace spanwright
