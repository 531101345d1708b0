// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/ReadBackBudget.h"

#include "core/budget/BudgetLines.h"
#include "core/budget/Combine.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr int Places = 101; // at which the largest uncertainty is sought

struct ReadBackLines {
    BudgetPlace place;
    std::vector<BudgetItem> items;
    /// u² of the reference value.
    [[nodiscard]] double variance() const {
        double sum = 0;
        for (const BudgetItem& item : items)
            sum += item.contribution * item.contribution;
        return sum / (place.slope * place.slope);
    }
};

/// Scatter of the mean of new readings, or the rounding of what is read where that is larger: equal readings hide their scatter
/// below the resolution, and their mean gains nothing (JCGM 100:2008, F.2.2.1).
std::vector<BudgetItem> scatterLine(const Record& record, const BudgetPlace& place, Side side, double variance, double df) {
    BudgetLines scatter(record, place), rounding(record, place);
    scatter.add(DerivedLine::Repeatability, side, Distribution::Student, std::sqrt(variance), 1, df);
    rounding.addIndicationResolution();
    std::vector<BudgetItem> seen = scatter.take(), hidden = rounding.take();
    const bool roundingIsLarger = !seen.empty() && !hidden.empty() && hidden.front().contribution > seen.front().contribution;
    return roundingIsLarger ? hidden : seen;
}

/// Where the stated uncertainties are taken as they are, the residuals tell nothing of them.
double degreesOfFreedom(const Fit& fit) {
    return fit.covarianceScale == CovarianceScale::Stated ? std::numeric_limits<double>::infinity() : fit.degreesOfFreedom;
}

ReadBackLines linesAt(const Record& record, const Fit& fit, double x, double scatter) {
    const bool forward = fit.direction == FitDirection::Indication;
    const double y = fit.curve->value(x);
    const BudgetPlace place = budgetPlace(record, &fit, forward ? x : y, forward ? y : x);
    const Side side = forward ? Side::Indication : Side::Reference;
    const double df = degreesOfFreedom(fit);
    BudgetLines lines(record, place);
    if (fit.sharedError == SharedError::Budget) // else the covariance of the function holds their errors
        lines.addStandards();
    lines.addReferenceResolution();
    lines.add(DerivedLine::Fit, side, Distribution::Student, std::sqrt(fit.curve->variance(x)), 1, df);
    lines.addManual();
    std::vector<BudgetItem> items = lines.take();
    if (scatter > 0)
        for (BudgetItem& item : scatterLine(record, place, side, fit.curve->readingVariance(x) * scatter, df))
            items.push_back(std::move(item));
    return {place, std::move(items)};
}

bool canBeReadBack(const Fit& fit) {
    return fit.function.family != FunctionFamily::Constant && degreesOfFreedom(fit) > 0 && fit.high > fit.low;
}

CoverageFactors factorsOf(const Record& record) {
    return CoverageFactors(record.budget.coverage.toDouble());
}

SetPointBudget combined(ReadBackLines lines, CoverageFactors& factors) {
    return combine(lines.place.reference, Direction::Unknown, std::move(lines.items), factors, lines.place.slope);
}

std::optional<SetPointBudget> budgetAt(const Record& record, const Fit& fit, double abscissa, double scatter, CoverageFactors& factors) {
    if (!canBeReadBack(fit) || fit.curve->derivative(abscissa) == 0)
        return std::nullopt;
    ReadBackLines here = linesAt(record, fit, abscissa, scatter);
    return std::isfinite(here.variance()) ? std::optional(combined(std::move(here), factors)) : std::nullopt;
}

} // namespace

std::optional<SetPointBudget> readBackBudget(const Record& record, const Fit& fit, double abscissa, double scatter) {
    CoverageFactors factors = factorsOf(record);
    return budgetAt(record, fit, abscissa, scatter, factors);
}

std::vector<std::optional<SetPointBudget>> readBackBudgets(const Record& record, const Fit& fit, const std::vector<double>& abscissae) {
    CoverageFactors factors = factorsOf(record);
    std::vector<std::optional<SetPointBudget>> budgets;
    budgets.reserve(abscissae.size());
    for (const double abscissa : abscissae)
        budgets.push_back(budgetAt(record, fit, abscissa, 1, factors));
    return budgets;
}

std::optional<double> repeatableShare(const Fit& fit, const VarianceSplit* split) {
    if (split == nullptr)
        return std::nullopt;
    // Where direction is known, pure error holds the hysteresis and is no measure of repeatability.
    const std::optional<SplitRow>& row = split->repeatability || split->hysteresis ? split->repeatability : split->pureError;
    if (!row || row->df <= 0)
        return std::nullopt;
    const double whole = fit.covarianceScale == CovarianceScale::Stated ? 1.0 : fit.residualSd * fit.residualSd;
    return whole > 0 ? std::optional(std::min(1.0, row->ss / row->df / whole)) : std::nullopt;
}

double scatterOfMean(std::optional<double> repeatable, std::optional<int> repeats) {
    const double averaged = repeats ? 1.0 / std::max(1, *repeats) : 0.0;
    return 1 - repeatable.value_or(0) * (1 - averaged);
}

std::optional<SetPointBudget> worstReadBackBudget(const Record& record, const Fit& fit) {
    if (!canBeReadBack(fit))
        return std::nullopt;
    std::optional<ReadBackLines> worst;
    double largest = -1;
    for (int i = 0; i < Places; ++i) {
        ReadBackLines here = linesAt(record, fit, fit.low + (fit.high - fit.low) * i / (Places - 1), 1);
        const double variance = here.variance();
        if (std::isfinite(variance) && variance > largest) {
            largest = variance;
            worst = std::move(here);
        }
    }
    CoverageFactors factors = factorsOf(record);
    return worst ? std::optional(combined(std::move(*worst), factors)) : std::nullopt;
}

} // namespace spanwright
