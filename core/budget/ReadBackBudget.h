// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/budget/Budget.h"
#include "core/fit/Fit.h"
#include "core/record/Record.h"
#include "core/split/VarianceSplit.h"

#include <optional>
#include <vector>

namespace spanwright {

/// Budget of a reference value taken from the function: covariance of the function, scatter of one reading about it (which holds
/// repeatability, runs, hysteresis and the rounding of the indication; that rounding alone where it is larger), the standards (unless
/// the covariance of the function holds their errors, SharedError::Fit), the resolution of the reference, lines by hand; at the coverage of the record's budget. U in the unit of the reference is `expandedReference`.
///
/// `abscissa`: of the fit, where the value lies. `scatter`: the share of the variance of one new reading that the indication carries
/// (scatterOfMean()). Empty for a constant, and where no degrees of freedom tell the scatter, or the slope is zero.
std::optional<SetPointBudget> readBackBudget(const Record& record, const Fit& fit, double abscissa, double scatter = 1);

/// The same for one new reading at each of many places.
std::vector<std::optional<SetPointBudget>> readBackBudgets(const Record& record, const Fit& fit, const std::vector<double>& abscissae);

/// Share of the variance of a reading about the function that repeatability explains, from 0 to 1; what is left is lack of fit,
/// hysteresis and runs. Empty where no reading was repeated under the same conditions: then nothing tells them apart.
std::optional<double> repeatableShare(const Fit& fit, const VarianceSplit* split);

/// What is left of the variance of a reading in the mean of `repeats` new ones (empty: without their scatter): only repeatability
/// averages out, the rest is common to all readings at that place (JCGM 100:2008, 4.2.3 holds for independent readings).
double scatterOfMean(std::optional<double> repeatable, std::optional<int> repeats);

/// The same for one new reading, at the place in the calibrated range where u in the unit of the reference is largest.
std::optional<SetPointBudget> worstReadBackBudget(const Record& record, const Fit& fit);

} // namespace spanwright
