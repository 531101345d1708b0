// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/Combine.h"

#include <boost/math/distributions/normal.hpp>
#include <boost/math/distributions/students_t.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr double LargestRestBesideRectangular = 0.3; // EA-4/02 M, S9.14

/// The covariance of the function and the scatter about it are scaled by the same s, so they are one estimate and not two.
double effectiveDegreesOfFreedom(const std::vector<BudgetItem>& items, double combined) {
    const bool readBack = std::any_of(items.begin(), items.end(), [](const BudgetItem& item) { return item.derived == DerivedLine::Fit; });
    double sum = 0, ofResiduals = 0, residualDf = 0;
    for (const BudgetItem& item : items) {
        if (!std::isfinite(item.degreesOfFreedom) || !(item.contribution > 0))
            continue;
        const double share = std::pow(item.contribution / combined, 2);
        if (readBack && (item.derived == DerivedLine::Fit || item.derived == DerivedLine::Repeatability)) {
            ofResiduals += share;
            residualDf = item.degreesOfFreedom;
        } else {
            sum += share * share / item.degreesOfFreedom;
        }
    }
    if (ofResiduals > 0)
        sum += ofResiduals * ofResiduals / residualDf;
    return sum > 0 ? std::max(1.0, std::floor(1 / sum * (1 + 1e-12))) : std::numeric_limits<double>::infinity();
}

bool rectangularDominates(const std::vector<BudgetItem>& items, double combined) {
    const auto largest = std::max_element(items.begin(), items.end(),
                                          [](const BudgetItem& a, const BudgetItem& b) { return a.contribution < b.contribution; });
    if (largest == items.end() || largest->distribution != Distribution::Rectangular || largest->contribution <= 0)
        return false;
    const double rest = std::sqrt(std::max(0.0, combined * combined - largest->contribution * largest->contribution));
    return rest <= LargestRestBesideRectangular * largest->contribution;
}

} // namespace

double divisorOf(Distribution distribution) {
    switch (distribution) {
    case Distribution::Rectangular: return std::sqrt(3.0);
    case Distribution::Triangular: return std::sqrt(6.0);
    case Distribution::UShaped: return std::sqrt(2.0);
    case Distribution::Normal:
    case Distribution::Student: break;
    }
    return 1;
}

BudgetItem budgetItem(Side side, Distribution distribution, double amount, double divisor, double degreesOfFreedom,
                      double sensitivity) {
    BudgetItem item;
    item.side = side;
    item.distribution = distribution;
    item.amount = amount;
    item.divisor = divisor;
    item.standardUncertainty = amount / divisor;
    item.degreesOfFreedom = degreesOfFreedom;
    item.sensitivity = sensitivity;
    item.contribution = std::fabs(sensitivity) * item.standardUncertainty;
    return item;
}

double coverageFactor(double coverage, double degreesOfFreedom) {
    const double tail = (1 - coverage) / 2;
    if (std::isinf(degreesOfFreedom))
        return boost::math::quantile(boost::math::complement(boost::math::normal(), tail));
    return boost::math::quantile(boost::math::complement(boost::math::students_t(degreesOfFreedom), tail));
}

double CoverageFactors::at(double degreesOfFreedom) {
    const auto [place, fresh] = found_.try_emplace(degreesOfFreedom);
    if (fresh)
        place->second = coverageFactor(coverage_, degreesOfFreedom);
    return place->second;
}

SetPointBudget combine(double setPoint, Direction direction, std::vector<BudgetItem> items, CoverageFactors& factors, double slope) {
    SetPointBudget budget;
    budget.setPoint = setPoint;
    budget.direction = direction;
    double variance = 0;
    for (const BudgetItem& item : items)
        variance += item.contribution * item.contribution;
    budget.combined = std::sqrt(variance);
    for (BudgetItem& item : items)
        item.share = variance > 0 ? item.contribution * item.contribution / variance : 0;
    budget.effectiveDegreesOfFreedom = effectiveDegreesOfFreedom(items, budget.combined);
    budget.distribution = std::isinf(budget.effectiveDegreesOfFreedom) ? Distribution::Normal : Distribution::Student;
    const bool rectangular = rectangularDominates(items, budget.combined);
    budget.coverageFactor = rectangular ? factors.coverage() * std::sqrt(3.0) : factors.at(budget.effectiveDegreesOfFreedom);
    if (rectangular)
        budget.distribution = Distribution::Rectangular;
    budget.expanded = budget.coverageFactor * budget.combined;
    budget.expandedReference = budget.expanded / std::fabs(slope);
    budget.items = std::move(items);
    return budget;
}

} // namespace spanwright
