// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/budget/Budget.h"
#include "core/fit/Fit.h"
#include "core/record/Record.h"

#include <optional>

namespace spanwright {

/// Budget of a reference value taken from the function: covariance of the function, scatter of one reading about it (which holds
/// repeatability, runs, hysteresis and the rounding of the indication; that rounding alone where it is larger), the standards (unless
/// the covariance of the function holds their errors, SharedError::Fit), the resolution of the reference, lines by hand; at the coverage of the record's budget. U in the unit of the reference is `expandedReference`.
///
/// `abscissa`: of the fit, where the value lies. `repeats`: independent new readings of which the indication is the mean; empty: an
/// exact indication. Empty for a constant, and where no degrees of freedom tell the scatter, or the slope is zero.
std::optional<SetPointBudget> readBackBudget(const Record& record, const Fit& fit, double abscissa, std::optional<int> repeats);

/// The same for one new reading, at the place in the calibrated range where u in the unit of the reference is largest.
std::optional<SetPointBudget> worstReadBackBudget(const Record& record, const Fit& fit);

} // namespace spanwright
