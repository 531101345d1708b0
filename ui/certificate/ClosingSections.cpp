// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/CertificateSections.h"
#include "ui/certificate/CertificateText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

#include <algorithm>

namespace spanwright {

namespace {

struct ClosingSections {
    Q_DECLARE_TR_FUNCTIONS(ClosingSections)
};

constexpr TextStyle Small{8.5, false, PageInk::Quiet};

QString text(const std::string& from) {
    return QString::fromStdString(from);
}

QString named(const QString& symbol, const Quantity& quantity) {
    const QString name = text(quantity.name);
    return ClosingSections::tr("%1: %2 in %3").arg(symbol, name.isEmpty() ? ClosingSections::tr("value") : name, orDash(quantity.unit));
}

void addTerms(Flow& flow, const FunctionSection& function) {
    Table table;
    table.columns = {{ClosingSections::tr("coefficient"), {}, ColumnAlign::Left, 1},
                     {ClosingSections::tr("value"), {}, ColumnAlign::DecimalMark, 2},
                     {ClosingSections::tr("standard uncertainty"), {}, ColumnAlign::DecimalMark, 2},
                     {ClosingSections::tr("unit"), {}, ColumnAlign::Left, 2}};
    for (const auto& term : function.terms)
        table.rows.push_back({{text(term.name)}, {digitsText(term.value)}, {digitsText(term.uncertainty)}, {text(term.unit)}});
    flow.table(table);
}

QString checksText(const FunctionSection& function, const QString& x, const QString& y) {
    QStringList checks;
    for (const auto& check : function.checks)
        checks << ClosingSections::tr("%1 = %2 gives %3 = %4").arg(x, digitsText(check.x), y, digitsText(check.y));
    return ClosingSections::tr("Check values: %1.").arg(checks.join(QStringLiteral("; ")));
}

QString budgetName(const BudgetRow& row, Phase phase) {
    if (!row.derived)
        return row.name.empty() ? ClosingSections::tr("added by hand") : text(row.name);
    QString name = derivedLineText(*row.derived);
    if (!row.name.empty())
        name += QStringLiteral(", ") + text(row.name);
    if (row.fromOtherPhase)
        name += ClosingSections::tr(" (readings %1)").arg(phaseText(phase == Phase::AsLeft ? Phase::AsFound : Phase::AsLeft));
    return name;
}

QString placeText(const BudgetSection& budget, const Item& item) {
    const QString at = withUnit(digitsText(budget.setPoint), item.reference.unit);
    return budget.direction == Direction::Unknown ? at : at + QStringLiteral(", ") + directionText(budget.direction);
}

QString signOffLine(SignOffRole role) {
    switch (role) {
    case SignOffRole::Performed: return ClosingSections::tr("Calibrated by");
    case SignOffRole::Checked: return ClosingSections::tr("Checked by");
    case SignOffRole::Authorised: return ClosingSections::tr("Authorised by");
    }
    return {};
}

constexpr double SignOffLine = 17, EndMark = 10, HeadingRoom = 13; // mm
constexpr double SignOffGap = 10;
constexpr double BetweenLines = 0.8;

TextStyle lineStyle(PageInk ink) {
    return {8.5, false, ink};
}

double heightOf(const QStringList& lines, double width) {
    double height = 0;
    for (const QString& line : lines)
        height += static_cast<double>(wrapped(line, lineStyle(PageInk::Text), width).size()) * lineHeight(lineStyle(PageInk::Text)) + BetweenLines;
    return height;
}

void addLines(Flow& flow, const QStringList& lines, PageInk ink) {
    for (const QString& line : lines) {
        flow.paragraph(line, lineStyle(ink));
        flow.space(BetweenLines);
    }
}

/// Who signed, line by line as it fits under the rule.
std::vector<std::pair<QString, TextStyle>> signOffLines(const Certificate& certificate, SignOffRole role, double width) {
    const TextStyle name{9.5, true, PageInk::Text}, body{8.5, false, PageInk::Text};
    std::vector<std::pair<QString, TextStyle>> lines{{signOffLine(role), {8, false, PageInk::Quiet}}};
    const auto& all = certificate.signOffs;
    const auto found = std::find_if(all.begin(), all.end(), [&](const SignOff& one) { return one.role == role; });
    if (found == all.end())
        return lines;
    const std::pair<const std::string*, TextStyle> parts[] = {{&found->name, name}, {&found->position, body}, {&found->date, body}};
    for (const auto& [words, style] : parts)
        if (!words->empty())
            for (const QString& line : wrapped(text(*words), style, width))
                lines.emplace_back(line, style);
    return lines;
}

constexpr SignOffRole SignOffRoles[] = {SignOffRole::Performed, SignOffRole::Checked, SignOffRole::Authorised};

double signOffWidth(const Flow& flow) {
    return (flow.area().width() - 2 * SignOffGap) / 3;
}

double signOffHeight(const Flow& flow, const Certificate& certificate) {
    constexpr double least = 34; // mm
    double height = least;
    for (const SignOffRole role : SignOffRoles) {
        double lines = SignOffLine;
        for (const auto& [words, style] : signOffLines(certificate, role, signOffWidth(flow)))
            lines += lineHeight(style);
        height = std::max(height, lines + 1);
    }
    return height;
}

} // namespace

void addFunction(Flow& flow, const Certificate& certificate) {
    if (!certificate.function)
        return;
    const FunctionSection& function = *certificate.function;
    const Item& item = certificate.item;
    const bool forward = function.direction == FitDirection::Indication;
    const QString x = forward ? QStringLiteral("x") : QStringLiteral("y"), y = forward ? QStringLiteral("y") : QStringLiteral("x");
    const Quantity &abscissa = forward ? item.reference : item.indication, &ordinate = forward ? item.indication : item.reference;
    flow.heading(ClosingSections::tr("Calibration function"), ClosingSections::tr("from the readings %1").arg(phaseText(function.phase)), 30);
    const QString form = equationForm(function);
    flow.paragraph(form.isEmpty() ? functionText(function.function) : form, {10, true, PageInk::Text});
    flow.paragraph(named(QStringLiteral("y"), item.indication) + QStringLiteral("   ·   ") + named(QStringLiteral("x"), item.reference), Small);
    flow.paragraph(ClosingSections::tr("Valid from %1 to %2, for these readings and conditions; not to be used beyond.")
                       .arg(digitsText(function.low), withUnit(digitsText(function.high), abscissa.unit)),
                   {9, true, PageInk::Text});
    flow.space(1);
    addTerms(flow, function);
    const QString unit = function.weighted ? QString() : text(ordinate.unit);
    QString words = checksText(function, x, y) + QLatin1Char(' ') +
                    (function.weighted ? ClosingSections::tr("Weighted residual standard deviation %1 (no unit) with %2 degrees of freedom; largest residual %3.")
                                       : ClosingSections::tr("Residual standard deviation %1 with %2 degrees of freedom; largest residual %3."))
                        .arg(withUnit(digitsText(function.residualSd), unit.toStdString()))
                        .arg(function.degreesOfFreedom)
                        .arg(withUnit(digitsText(function.largestResidual, SignShown::Both), ordinate.unit));
    if (!function.readBackExpanded.empty())
        words += QLatin1Char(' ') +
                 ClosingSections::tr("A reference value taken from the function by one new reading has U = %1 (k = %2) at most in this range.")
                     .arg(withUnit(digitsText(function.readBackExpanded), item.reference.unit), digitsText(function.readBackFactor));
    flow.paragraph(words, Small);
}

void addBudget(Flow& flow, const Certificate& certificate, const PhaseSection& section) {
    if (!section.budget)
        return;
    const BudgetSection& budget = *section.budget;
    const Item& item = certificate.item;
    if (budget.rows.empty()) {
        flow.heading(ClosingSections::tr("Uncertainty budget %1").arg(phaseText(section.phase)));
        flow.paragraph(ClosingSections::tr("No contribution is stated, so nothing is known about the uncertainty."), lineStyle(PageInk::Warning));
        return;
    }
    Table table;
    table.points = 8;
    table.columns = {{ClosingSections::tr("contribution"), {}, ColumnAlign::Left, 3.4},
                     {ClosingSections::tr("amount"), {}, ColumnAlign::Right, 2},
                     {ClosingSections::tr("distribution"), {}, ColumnAlign::Left, 1.5},
                     {ClosingSections::tr("divisor"), {}, ColumnAlign::DecimalMark, 1.1},
                     {ClosingSections::tr("u"), {}, ColumnAlign::Right, 2},
                     {ClosingSections::tr("ν"), {}, ColumnAlign::Right, 0.7},
                     {ClosingSections::tr("c"), {}, ColumnAlign::DecimalMark, 1.1},
                     {ClosingSections::tr("|c| u"), text(item.indication.unit), ColumnAlign::DecimalMark, 1.4},
                     {ClosingSections::tr("share"), {}, ColumnAlign::Right, 1.15}};
    for (const BudgetRow& row : budget.rows) {
        const std::string& unit = row.side == Side::Reference ? item.reference.unit : item.indication.unit;
        table.rows.push_back({{budgetName(row, section.phase)},
                              {withUnit(digitsText(row.amount), unit)},
                              {distributionText(row.distribution)},
                              {digitsText(row.divisor)},
                              {withUnit(digitsText(row.standardUncertainty), unit)},
                              {row.degreesOfFreedom.empty() ? QStringLiteral("∞") : digitsText(row.degreesOfFreedom)},
                              {digitsText(row.sensitivity)},
                              {digitsText(row.contribution)},
                              {briefShareText(row.share)}});
    }
    flow.headedTable(ClosingSections::tr("Uncertainty budget %1").arg(phaseText(section.phase)),
                     ClosingSections::tr("at the point with the largest U: %1").arg(placeText(budget, item)), table);
    flow.paragraph(ClosingSections::tr("Combined standard uncertainty %1; effective degrees of freedom %2; k = %3; U = %4, or %5 in the unit of the reference.")
                       .arg(withUnit(digitsText(budget.combined), item.indication.unit),
                            budget.degreesOfFreedom.empty() ? QStringLiteral("∞") : digitsText(budget.degreesOfFreedom),
                            digitsText(budget.coverageFactor), withUnit(digitsText(budget.expanded), item.indication.unit),
                            withUnit(digitsText(budget.expandedReference), item.reference.unit)),
                   Small);
}

void addPerformance(Flow& flow, const Certificate& certificate, const PhaseSection& section) {
    if (section.performance.empty())
        return;
    Table table;
    table.columns = {{ClosingSections::tr("figure"), {}, ColumnAlign::Left, 4},
                     {ClosingSections::tr("value"), text(certificate.item.indication.unit), ColumnAlign::DecimalMark, 1.3},
                     {ClosingSections::tr("value"), ClosingSections::tr("% of span"), ColumnAlign::DecimalMark, 1.3},
                     {ClosingSections::tr("at"), text(certificate.item.reference.unit), ColumnAlign::DecimalMark, 1.3}};
    for (const PerformanceRow& row : section.performance)
        table.rows.push_back({{performanceText(row.kind)}, {digitsText(row.value)}, {digitsText(row.percentOfSpan)}, {digitsText(row.setPoint)}});
    flow.headedTable(ClosingSections::tr("Performance figures %1").arg(phaseText(section.phase)), {}, table);
}

void addExclusions(Flow& flow, const Certificate& certificate) {
    if (certificate.excluded.empty())
        return;
    const Item& item = certificate.item;
    Table table;
    table.columns = {{ClosingSections::tr("reading"), {}, ColumnAlign::Right, 0.9},
                     {ClosingSections::tr("phase, run"), {}, ColumnAlign::Left, 1.8},
                     {ClosingSections::tr("approach"), {}, ColumnAlign::Left, 1.1},
                     {ClosingSections::tr("reference"), text(item.reference.unit), ColumnAlign::DecimalMark, 1.2},
                     {ClosingSections::tr("indication"), text(item.indication.unit), ColumnAlign::DecimalMark, 1.2},
                     {ClosingSections::tr("reason"), {}, ColumnAlign::Left, 3.6},
                     {ClosingSections::tr("by"), {}, ColumnAlign::Left, 0.7}};
    for (const ExcludedLine& line : certificate.excluded) {
        const QString run = line.run > 0 ? ClosingSections::tr("%1, run %2").arg(phaseText(line.phase)).arg(line.run) : phaseText(line.phase);
        const QString reason = line.words.empty() ? reasonText(line.reason)
                               : line.reason == ExclusionReason::Other ? text(line.words)
                                                                       : reasonText(line.reason) + QStringLiteral(": ") + text(line.words);
        table.rows.push_back({{QString::number(line.row)}, {run},
                              {line.direction == Direction::Unknown ? QStringLiteral("–") : directionText(line.direction)},
                              {digitsText(line.reference)}, {digitsText(line.indication)}, {reason}, {orDash(line.by)}});
    }
    flow.headedTable(ClosingSections::tr("Excluded readings"), ClosingSections::tr("recorded, but not used in any figure above"), table);
}

void addStatements(Flow& flow, const Certificate& certificate, const QStringList& gaps) {
    QStringList lines;
    for (const StatementLine& statement : certificate.statements)
        lines << statementText(statement);
    // Signatures never stand alone: statements and signatures share a page where they fit on one.
    const double width = flow.area().width();
    double together = HeadingRoom + heightOf(lines, width) + signOffHeight(flow, certificate) + EndMark;
    const QStringList opinions = certificate.job.opinions.empty() ? QStringList() : QStringList(text(certificate.job.opinions));
    for (const QStringList& part : {opinions, gaps})
        together += part.isEmpty() ? 0 : HeadingRoom + heightOf(part, width);
    if (together <= flow.area().height())
        flow.keepTogether(together);
    flow.heading(ClosingSections::tr("Statements"), {}, 20);
    addLines(flow, lines, PageInk::Quiet);
    if (!opinions.isEmpty()) {
        flow.heading(ClosingSections::tr("Opinions and interpretations"), ClosingSections::tr("not part of the results"), 12);
        addLines(flow, opinions, PageInk::Text);
    }
    if (!gaps.isEmpty()) {
        flow.heading(ClosingSections::tr("Missing for a complete draft"), {}, 12);
        addLines(flow, gaps, PageInk::Warning);
    }
}

void addSignOffs(Flow& flow, const Certificate& certificate) {
    const double height = signOffHeight(flow, certificate), width = signOffWidth(flow);
    flow.keepTogether(height + EndMark);
    const QRectF box = flow.picture(height + EndMark);
    for (int i = 0; i < 3; ++i) {
        const double left = box.left() + i * (width + SignOffGap);
        double line = box.top() + SignOffLine;
        flow.place({QRectF(left, line, width, 0), Rule{0.35, PageInk::Quiet}});
        for (const auto& [words, style] : signOffLines(certificate, SignOffRoles[i], width)) {
            line += lineHeight(style);
            flow.textAt(left, line, words, style);
        }
    }
    flow.textAt(box.center().x(), box.bottom() - 2, ClosingSections::tr("End of certificate"), {8, false, PageInk::Quiet}, Qt::AlignHCenter);
}

} // namespace spanwright
