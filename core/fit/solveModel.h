// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/FitTask.h"

namespace spanwright {

/// min over β of Σ w (y − f(x; β))². Linear families in one step; others by Gauss–Newton with halved steps (Björck,
/// Numerical Methods for Least Squares Problems, 9.2.1), everything in double-double, until the step moves the fitted
/// values by less than 10⁻¹⁶ of the residuals (or 10⁻²⁷ of the ordinates, when the readings lie on the function).
/// Errors: RankLost (facts: terms), NoConvergence (facts: reason), those of the model's start.
Result<SolvedModel> solveModel(const FitTask& task);

} // namespace spanwright
