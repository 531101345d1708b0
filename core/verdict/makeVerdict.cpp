// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/verdict/makeVerdict.h"

#include "core/budget/PointMeans.h"
#include "core/verdict/Conformity.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr double RelativeNoise = 1e-13; // of means of doubles

std::optional<double> width(const std::optional<Decimal>& low, const std::optional<Decimal>& high) {
    if (!low || !high || compareValue(*low, *high) == 0)
        return std::nullopt;
    return std::fabs(high->toDouble() - low->toDouble());
}

PointResult resultOf(const Item& item, const PointMeans& point, const SetPointBudget& budget) {
    PointResult result;
    result.setPoint = point.setPoint;
    result.direction = point.direction;
    result.n = point.n;
    result.reference = point.reference;
    result.indication = point.indication;
    result.rising = point.rising;
    result.falling = point.falling;
    result.ideal = idealIndication(item, point.reference).value_or(std::numeric_limits<double>::quiet_NaN());
    result.error = result.indication - result.ideal;
    result.expanded = budget.expanded;
    result.expandedReference = budget.expandedReference;
    result.coverageFactor = budget.coverageFactor;
    const double span = outputSpan(item).value_or(std::numeric_limits<double>::quiet_NaN());
    result.errorPercentOfSpan = 100 * result.error / span;
    result.expandedPercentOfSpan = 100 * result.expanded / span;
    return result;
}

void decideOn(PointResult& result, const Limits& limits, const SetPointBudget& budget, double limit) {
    result.limit = limit;
    // Where no contribution is known, U is not zero but unknown, and nothing can be decided.
    if (!(budget.combined > 0))
        return;
    result.guardBand = guardBand(limits, result.expanded);
    result.acceptance = limit - *result.guardBand;
    if (!std::isfinite(result.error))
        return;
    const double noise = RelativeNoise * std::max({std::fabs(result.indication), std::fabs(result.ideal), limit});
    result.state = decide(result.error, limit, *result.guardBand, limits.rule, noise);
    const MeasuredValue measured{result.error, budget.combined, budget.effectiveDegreesOfFreedom, budget.distribution};
    result.conformanceProbability = conformanceProbability(measured, -limit, limit);
}

} // namespace

std::optional<double> outputSpan(const Item& item) {
    if (const auto output = width(item.outputLow, item.outputHigh))
        return output;
    const bool sameUnit = !item.reference.unit.empty() && item.reference.unit == item.indication.unit;
    return sameUnit && !item.outputLow && !item.outputHigh ? width(item.rangeLow, item.rangeHigh) : std::nullopt;
}

std::optional<double> limitHalfWidth(const Limits& limits, const Item& item, double reference, double indication, double slope) {
    if (!limits.percentOfReading && !limits.percentOfSpan && !limits.constant)
        return std::nullopt;
    const bool ofReference = limits.side == Side::Reference;
    double half = 0;
    if (limits.percentOfReading)
        half += limits.percentOfReading->toDouble() / 100 * std::fabs(ofReference ? reference : indication);
    if (limits.percentOfSpan) {
        const auto span = ofReference ? width(item.rangeLow, item.rangeHigh) : outputSpan(item);
        if (!span)
            return std::nullopt;
        half += limits.percentOfSpan->toDouble() / 100 * *span;
    }
    if (limits.constant)
        half += std::fabs(limits.constant->toDouble());
    return ofReference ? half * std::fabs(slope) : half;
}

Verdict makeVerdict(const Record& record, const Fit* fit, const Budget& budget) {
    Verdict verdict;
    for (std::size_t i = 0; i < budget.points.size(); ++i) {
        PointResult result = resultOf(record.item, budget.means[i], budget.points[i]);
        const double slope = sensitivityAt(record.item, fit, result.reference, result.indication);
        if (record.limits.stated)
            if (const auto limit = limitHalfWidth(record.limits, record.item, result.reference, result.indication, slope))
                decideOn(result, record.limits, budget.points[i], *limit);
        if (result.state && (!verdict.overall || *result.state > *verdict.overall))
            verdict.overall = result.state;
        verdict.points.push_back(result);
    }
    const bool noError = std::any_of(verdict.points.begin(), verdict.points.end(), [](const PointResult& p) { return !std::isfinite(p.error); });
    if (noError)
        verdict.warnings.push_back({WarningCode::FigureUndefined, {{"figure", "error"}, {"reason", "no-output-range"}}});
    return verdict;
}

} // namespace spanwright
