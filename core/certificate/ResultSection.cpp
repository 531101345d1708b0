// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/ResultSection.h"

#include "core/base/Rounding.h"
#include "core/certificate/ShortText.h"
#include "core/certificate/SplitSection.h"

#include <algorithm>
#include <charconv>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr int FactorDecimals = 2, PercentDecimals = 3;

enum class ErrorKnown { No, Yes };

Digits optionalText(const std::optional<double>& value, int decimals) {
    return value ? roundedText(*value, decimals) : Digits{};
}

Digits percentText(double probability) {
    if (probability > 0.9995)
        return ">99.9";
    if (probability < 0.0005)
        return "<0.1";
    return roundedText(100 * probability, 1);
}

/// Decimals below which references and indications are not rounded, those of the set points, and those of the readings, for where U is
/// not known.
struct LeastDecimals {
    int reference = 0, indication = std::numeric_limits<int>::min();
    int place = 0, read = 0;
};

/// Decimals that a column of places needs: 5, 10 and 2.4995 are 5.0000, 10.0000 and 2.4995.
int placeDecimals(const Record& record, const std::vector<PointResult>& points) {
    const int most = std::max(record.readings->setPoint().scale(), record.readings->reference().scale());
    int decimals = 0;
    for (const PointResult& point : points)
        decimals = std::max(decimals, decimalsIn(shortText(std::stod(roundedText(point.setPoint, most)))));
    return decimals;
}

/// What tells neighbouring set points apart, and the digits of the set points as typed: where U is wider than that, rounding to
/// the place of U would print different points as the same number.
LeastDecimals leastDecimals(const Record& record, const std::vector<PointResult>& points) {
    constexpr int digits = 2;
    std::vector<std::pair<double, double>> at;
    for (const PointResult& point : points)
        at.emplace_back(point.reference, point.indication);
    std::sort(at.begin(), at.end());
    LeastDecimals least;
    least.place = placeDecimals(record, points);
    least.read = record.readings->indication().scale();
    for (const Decimal& planned : record.plan.setPoints)
        least.reference = std::max(least.reference, planned.decimals);
    double gap = INFINITY;
    for (const PointResult& one : points)
        for (const PointResult& other : points)
            if (other.setPoint > one.setPoint)
                gap = std::min(gap, std::fabs(other.reference - one.reference));
    if (at.empty() || !std::isfinite(gap))
        return least;
    const double run = at.back().first - at.front().first, rise = std::fabs(at.back().second - at.front().second);
    least.reference = std::max(least.reference, decimalsFor(gap, digits));
    if (run > 0)
        least.indication = decimalsFor(gap * rise / run, digits);
    return least;
}

ResultLine resultLine(const PointResult& point, const LeastDecimals& least) {
    ResultLine line;
    line.setPoint = roundedText(point.setPoint, least.place);
    line.direction = point.direction;
    line.n = point.n;
    const RoundedUncertainty u = roundUncertainty(point.expanded);
    const RoundedUncertainty uReference = roundUncertainty(point.expandedReference);
    const RoundedUncertainty uPercent = roundUncertainty(point.expandedPercentOfSpan);
    const bool known = point.expanded > 0;
    if (known) {
        line.expanded = u.text;
        line.expandedReference = uReference.text;
        line.expandedPercent = uPercent.text;
        line.coverageFactor = roundedText(point.coverageFactor, FactorDecimals);
    }
    line.reference = roundedText(point.reference, std::max(uReference.decimals, least.reference));
    const int places = known ? u.decimals : least.read, shown = std::max(places, least.indication);
    line.indication = roundedText(point.indication, shown);
    line.rising = optionalText(point.rising, shown);
    line.falling = optionalText(point.falling, shown);
    line.error = roundedText(point.error, places);
    line.errorPercent = roundedText(point.errorPercentOfSpan, known ? uPercent.decimals : PercentDecimals);
    line.limit = optionalText(point.limit, places);
    if (point.acceptance && *point.acceptance >= 0)
        line.acceptance = roundedText(*point.acceptance, u.decimals);
    line.state = point.state;
    if (point.conformanceProbability)
        line.conformance = percentText(*point.conformanceProbability);
    line.drawn = {point.reference, point.error, point.expanded, point.limit, point.acceptance};
    return line;
}

/// Three digits without zeros at the end; with an exponent where the plain form would be long.
Digits short3(double value) {
    constexpr int digits = 3;
    constexpr double small = 1e-4;
    const double rounded = std::stod(significantDigits(value, digits));
    if (rounded == 0 || std::fabs(rounded) >= small)
        return shortText(rounded);
    char buffer[32];
    return {buffer, std::to_chars(std::begin(buffer), std::end(buffer), rounded, std::chars_format::scientific).ptr};
}

BudgetRow budgetRow(const BudgetItem& item, int decimals) {
    constexpr int digits = 3;
    BudgetRow row;
    row.derived = item.derived;
    row.name = item.name;
    row.fromOtherPhase = item.fromOtherPhase;
    row.side = item.side;
    row.distribution = item.distribution;
    row.amount = short3(item.amount);
    row.divisor = shortText(std::stod(significantDigits(item.divisor, digits)));
    row.standardUncertainty = short3(item.standardUncertainty);
    row.degreesOfFreedom = std::isfinite(item.degreesOfFreedom) ? shortText(std::stod(roundedText(item.degreesOfFreedom, item.degreesOfFreedom < 10 ? 1 : 0))) : Digits{};
    row.sensitivity = shortText(std::stod(significantDigits(item.sensitivity, digits + 1)));
    row.contribution = roundedText(item.contribution, decimals);
    row.share = item.share;
    return row;
}

BudgetSection budgetSection(const SetPointBudget& budget, int place) {
    BudgetSection section;
    section.setPoint = roundedText(budget.setPoint, place);
    section.direction = budget.direction;
    const int decimals = decimalsFor(budget.combined, 3);
    for (const BudgetItem& item : budget.items)
        section.rows.push_back(budgetRow(item, decimals));
    section.combined = roundedText(budget.combined, decimals);
    if (std::isfinite(budget.effectiveDegreesOfFreedom))
        section.degreesOfFreedom = roundedText(budget.effectiveDegreesOfFreedom, 0);
    section.coverageFactor = roundedText(budget.coverageFactor, FactorDecimals);
    section.expanded = roundUncertainty(budget.expanded).text;
    section.expandedReference = roundUncertainty(budget.expandedReference).text;
    section.distribution = budget.distribution;
    return section;
}

/// Figures that are errors need a stated output to be errors from.
std::vector<PerformanceRow> performanceRows(const ProcessFigures& figures, int decimals, int place, ErrorKnown known) {
    using Kind = PerformanceRow::Kind;
    const std::pair<Kind, const std::optional<ProcessFigure>*> all[] = {
        {Kind::MeasuredError, &figures.measuredErrorMax},
        {Kind::InaccuracyHigh, &figures.inaccuracyHigh},
        {Kind::InaccuracyLow, &figures.inaccuracyLow},
        {Kind::Hysteresis, &figures.hysteresis},
        {Kind::HysteresisInRun, &figures.hysteresisInCycle},
        {Kind::NonRepeatability, &figures.nonRepeatability},
        {Kind::NonLinearityTerminal, &figures.nonLinearityTerminal},
        {Kind::NonLinearityIndependent, &figures.nonLinearityIndependent},
        {Kind::NonLinearityZeroBased, &figures.nonLinearityZeroBased}};
    std::vector<PerformanceRow> rows;
    for (const auto& [kind, figure] : all)
        if (*figure && (known == ErrorKnown::Yes || kind > Kind::InaccuracyLow))
            rows.push_back({kind, roundedText((*figure)->value, decimals), roundedText((*figure)->percentOfSpan, PercentDecimals),
                            roundedText((*figure)->setPoint, place)});
    return rows;
}

} // namespace

PhaseSection phaseSection(const Record& record, const PhaseEvaluation& phase) {
    PhaseSection section;
    section.phase = phase.phase;
    section.readings = phase.complete;
    section.excluded = phase.excluded;
    section.used = phase.complete - phase.excluded;
    section.directionsSeparate = record.choices.separateDirections;
    double smallest = INFINITY, largest = 0, largestError = -1;
    const LeastDecimals least = leastDecimals(record, phase.verdict.points);
    for (const PointResult& point : phase.verdict.points) {
        section.results.push_back(resultLine(point, least));
        section.errorKnown = section.errorKnown || std::isfinite(point.error);
        if (std::isfinite(point.error) && std::fabs(point.error) > largestError) {
            largestError = std::fabs(point.error);
            section.largest = section.results.size() - 1;
        }
        if (!(point.expanded > 0))
            continue;
        smallest = std::min(smallest, point.coverageFactor);
        largest = std::max(largest, point.coverageFactor);
    }
    section.smallestFactor = roundedText(smallest, FactorDecimals);
    section.largestFactor = roundedText(largest, FactorDecimals);
    section.overall = phase.verdict.overall;
    const auto& budgets = phase.budget.points;
    section.rectangular = std::any_of(budgets.begin(), budgets.end(), [](const SetPointBudget& point) {
        return point.distribution == Distribution::Rectangular;
    });
    const auto worst = std::max_element(budgets.begin(), budgets.end(), [](const SetPointBudget& a, const SetPointBudget& b) {
        return a.expanded < b.expanded;
    });
    if (worst != budgets.end())
        section.budget = budgetSection(*worst, least.place);
    if (phase.performance)
        section.performance = performanceRows(*phase.performance, worst != budgets.end() && worst->expanded > 0 ? roundUncertainty(worst->expanded).decimals : least.read, least.place,
                                              section.errorKnown ? ErrorKnown::Yes : ErrorKnown::No);
    if (record.choices.splitOnCertificate && phase.phase == record.choices.phase)
        section.split = splitSection(phase);
    section.force = forceSection(phase);
    return section;
}

} // namespace spanwright
