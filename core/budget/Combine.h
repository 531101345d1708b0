// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/budget/Budget.h"

#include <map>

namespace spanwright {

/// Divisor that turns a half-width into a standard uncertainty (JCGM 100:2008, 4.3.7, 4.3.9; common practice for the U shape);
/// 1 for Normal and Student, whose divisor is their own.
double divisorOf(Distribution distribution);

/// One contribution: u = amount/divisor, contribution |c| u in the unit of the indication.
BudgetItem budgetItem(Side side, Distribution distribution, double amount, double divisor, double degreesOfFreedom,
                      double sensitivity);

/// Two-sided Student quantile for a probability, of the normal distribution for infinite degrees of freedom (JCGM 100:2008,
/// table G.2).
double coverageFactor(double coverage, double degreesOfFreedom);

/// Coverage factors of one probability. Effective degrees of freedom are whole numbers that repeat from place to place, and a quantile
/// of Student's distribution costs more than all else in a budget: each is found once.
class CoverageFactors {
  public:
    explicit CoverageFactors(double coverage) : coverage_(coverage) {}
    [[nodiscard]] double coverage() const { return coverage_; }
    [[nodiscard]] double at(double degreesOfFreedom);

  private:
    double coverage_;
    std::map<double, double> found_; ///< by degrees of freedom
};

/// Combines uncorrelated contributions: u_c = √Σ(c u)² (JCGM 100:2008, 5.1.2); ν_eff by Welch and Satterthwaite, cut to the next
/// lower integer (G.4.1, G.6.4), function and scatter about it counting as one estimate; k from Student's distribution; U = k u_c; shares of the variance. Where one rectangular
/// contribution dominates, the others together being at most 0.3 of it, the result is taken as rectangular and k = p √3 (EA-4/02 M,
/// supplement S9). `slope`: change of the indication per change of the reference.
SetPointBudget combine(double setPoint, Direction direction, std::vector<BudgetItem> items, CoverageFactors& factors, double slope);

} // namespace spanwright
