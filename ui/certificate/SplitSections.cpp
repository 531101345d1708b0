// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/CertificateSections.h"
#include "ui/certificate/CertificateText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

struct SplitSections {
    Q_DECLARE_TR_FUNCTIONS(SplitSections)
};

constexpr TextStyle Small{8.5, false, PageInk::Quiet};
constexpr double IndentStep = 2.5; // mm

QString text(const std::string& from) {
    return QString::fromStdString(from);
}

QString sourceText(const SplitTableLine& line) {
    QString name;
    switch (line.test) {
    case SplitTableLine::Test::Chain: name = line.part == SplitPart::Regression ? SplitSections::tr("signal (regression)") : splitPartText(line.part); break;
    case SplitTableLine::Test::Naive: name = SplitSections::tr("the same, naive: against pure error"); break;
    case SplitTableLine::Test::Adjusted: name = SplitSections::tr("the same, adjusted for direction and run"); break;
    }
    return name;
}

QString squared(const SplitSection& split, const Item& item) {
    const std::string& unit = split.direction == FitDirection::Indication ? item.indication.unit : item.reference.unit;
    return split.weighted || unit.empty() ? QString() : QLatin1Char('(') + text(unit) + QStringLiteral(")²");
}

} // namespace

void addSplit(Flow& flow, const Certificate& certificate, const PhaseSection& section) {
    if (!section.split)
        return;
    flow.leaveFirstPage();
    const SplitSection& split = *section.split;
    const QString unit = squared(split, certificate.item);
    Table table;
    table.points = 8;
    table.columns = {{SplitSections::tr("source"), {}, ColumnAlign::Left, 4.2},
                     {SplitSections::tr("sum of squares"), unit, ColumnAlign::Right, 1.8},
                     {SplitSections::tr("d.f."), {}, ColumnAlign::Right, 0.7},
                     {SplitSections::tr("mean square"), unit, ColumnAlign::Right, 1.8},
                     {SplitSections::tr("F"), {}, ColumnAlign::Right, 1.4},
                     {SplitSections::tr("p"), {}, ColumnAlign::Right, 1.05},
                     {SplitSections::tr("share"), SplitSections::tr("of total"), ColumnAlign::Right, 1.1},
                     {SplitSections::tr("share"), SplitSections::tr("of noise"), ColumnAlign::Right, 1.1}};
    for (const SplitTableLine& line : split.lines) {
        const bool chain = line.test == SplitTableLine::Test::Chain;
        const PageInk ink = chain ? PageInk::Text : PageInk::Quiet;
        table.rows.push_back({{sourceText(line), ink, false, std::nullopt, IndentStep * line.level},
                              {chain ? digitsText(line.sumOfSquares) : QString(), ink},
                              {QString::number(line.degreesOfFreedom), ink},
                              {digitsText(line.meanSquare), ink},
                              {line.f.empty() ? QString() : digitsText(line.f), ink},
                              {line.p.empty() ? QString() : digitsText(line.p), ink},
                              {line.share ? briefShareText(*line.share) : QString(), ink},
                              {line.noiseShare ? briefShareText(*line.noiseShare) : QString(), ink}});
    }
    flow.headedTable(SplitSections::tr("What the spread is made of"),
                     SplitSections::tr("readings %1, %2").arg(phaseText(section.phase), functionText(split.function)), table);
    flow.paragraph(SplitSections::tr("Nested least-squares models on the residuals. F and p: the signal against the residual, the other sources against %1.")
                       .arg(splitPartText(split.against).toLower()),
                   Small);
}

void addForce(Flow& flow, const Certificate& certificate, const PhaseSection& section) {
    if (!section.force)
        return;
    const ForceSection& force = *section.force;
    const Item& item = certificate.item;
    const QString percent = SplitSections::tr("%");
    Table table;
    table.columns = {{SplitSections::tr("force"), text(item.reference.unit), ColumnAlign::DecimalMark, 1},
                     {SplitSections::tr("mean deflection"), text(item.indication.unit), ColumnAlign::DecimalMark, 1.4},
                     {SplitSections::tr("reproducibility b"), percent, ColumnAlign::DecimalMark, 1.4},
                     {SplitSections::tr("repeatability b′"), percent, ColumnAlign::DecimalMark, 1.4},
                     {SplitSections::tr("interpolation error"), percent, ColumnAlign::DecimalMark, 1.5},
                     {SplitSections::tr("reversibility v"), percent, ColumnAlign::DecimalMark, 1.3}};
    for (const ForceSection::Step& step : force.steps)
        table.rows.push_back({{digitsText(step.force)}, {digitsText(step.mean)}, {digitsText(step.reproducibility)}, {digitsText(step.repeatability)},
                              {digitsText(step.interpolation, SignShown::Both)}, {digitsText(step.reversibility)}});
    flow.headedTable(SplitSections::tr("Force figures %1").arg(phaseText(section.phase)), SplitSections::tr("item turned between runs"), table);
    QString words = force.zero.empty() ? SplitSections::tr("No zero was read after a run, so there is no zero error.")
                                       : SplitSections::tr("Zero error %1 % of the largest deflection.").arg(digitsText(force.zero));
    words += QLatin1Char(' ') + SplitSections::tr("Lower limit factor %1, or %2; loading range from %3 (class AA) or %4 (class A), never below the lowest force applied; function of degree %5.")
                                    .arg(withUnit(digitsText(force.lowerLimitFactor), item.indication.unit),
                                         withUnit(digitsText(force.lowerLimitForce), item.reference.unit),
                                         withUnit(digitsText(force.lowestForceClassAA), item.reference.unit),
                                         withUnit(digitsText(force.lowestForceClassA), item.reference.unit))
                                    .arg(force.degree);
    flow.paragraph(words, Small);
}

} // namespace spanwright
