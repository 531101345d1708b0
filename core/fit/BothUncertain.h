// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/FitTask.h"

namespace spanwright {

/// A straight line (with or without a constant) through readings of which both coordinates are uncertain: ISO/TS
/// 28037:2010, clauses 7 and 8. Minimises Σ [(x_i − X_i)²/u²(x_i) + (y_i − f(X_i))²/u²(y_i)] over the line and the true
/// abscissae X_i (with the covariance u(x_i, y_i) of a reading where it is stated), by the standard's iteration: t_i = 1/(u²(y_i) − 2b u(x_i, y_i) + b²u²(x_i)), X_i = x_i + (b u²(x_i) −
/// u(x_i, y_i)) t_i (y_i − f(x_i)), then the weighted line through z_i = y_i − f(x_i) on X_i as an increment. The weights t_i are left in the task,
/// residuals are z_i, and Σ t z² = χ². In double-double until the increment is below 10⁻²⁶ of the ordinates.
///
/// Covariances between readings, such as the calibration error of their standard, are the matter of solveCorrelated(). Errors:
/// UncertaintyMissing, UncertaintyNotPositive, CovarianceTooLarge (facts: rows); ReferencesAllEqual, RankLost, NoConvergence.
Result<SolvedModel> solveBothUncertain(FitTask& task);

} // namespace spanwright
