// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/FunctionSection.h"

#include "core/base/Rounding.h"
#include "core/evaluate/PrintedFunction.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

/// Smallest U at a stated point, unit of the ordinate.
double smallestExpanded(const PhaseEvaluation& phase) {
    double smallest = INFINITY;
    for (const SetPointBudget& point : phase.budget.points) {
        const double u = phase.fit->direction == FitDirection::Indication ? point.expanded : point.expandedReference;
        if (u > 0)
            smallest = std::min(smallest, u);
    }
    return smallest;
}

double largestResidual(const RowFigures& rows) {
    double largest = 0;
    for (std::size_t i = 0; i < rows.size(); ++i)
        if (rows.excluded[i] == 0 && std::fabs(rows.residual[i]) > std::fabs(largest))
            largest = rows.residual[i];
    return largest;
}

} // namespace

std::optional<FunctionSection> functionSection(const Record& record, const PhaseEvaluation& phase) {
    const std::optional<PrintedFunction> printed = printedFunction(record, phase, WithoutU::ByScatter);
    if (!printed)
        return std::nullopt;
    const Fit& fit = *phase.fit;
    FunctionSection section;
    section.phase = phase.phase;
    section.function = fit.function;
    section.direction = fit.direction;
    section.method = fit.method;
    section.weights = fit.weights;
    section.weighted = fit.weights != Weights::Equal || fit.method == Method::BothUncertain;
    const double stated = smallestExpanded(phase);
    // Without a stated uncertainty the digits follow from the scatter.
    const double expanded = std::isfinite(stated) || !(fit.residualSd > 0) || section.weighted ? stated : fit.residualSd;
    for (const PrintedNumber& number : printed->numbers)
        section.terms.push_back({number.name, number.unit, number.text, number.standardUncertainty ? significantDigits(*number.standardUncertainty, 2) : Digits{}});
    section.centre = printed->centre;
    for (const PrintedCheck& check : printed->checks)
        section.checks.push_back({check.input, check.output});
    const int rangeDecimals = std::max(0, decimalsFor(fit.high - fit.low, 6));
    section.low = roundedText(fit.low, rangeDecimals);
    section.high = roundedText(fit.high, rangeDecimals);
    section.residualSd = significantDigits(fit.residualSd, 2);
    section.degreesOfFreedom = fit.degreesOfFreedom;
    section.largestResidual = roundedText(largestResidual(phase.rows), std::isfinite(expanded) ? decimalsFor(expanded, 2) : 6);
    if (phase.budget.readBack && phase.budget.readBack->expandedReference > 0) {
        section.readBackExpanded = roundUncertainty(phase.budget.readBack->expandedReference).text;
        section.readBackFactor = roundedText(phase.budget.readBack->coverageFactor, 2);
    }
    return section;
}

} // namespace spanwright
