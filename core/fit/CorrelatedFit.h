// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/FitTask.h"

namespace spanwright {

/// Generalised least squares with covariances between readings, in double-double: with V = L Lᵀ (Cholesky), the ordinary problem
/// of L⁻¹A and L⁻¹y, by QR. The total is about the generalised mean.
///
/// Only the ordinates uncertain: V = U_y, for every function that is linear in its coefficients (ISO/TS 28037:2010, clause 9, for
/// the line). Both uncertain, for a line with or without a constant: the Gauss–Newton iteration of clause 10 with its adjusted
/// abscissae eliminated: z = y − f(x), V = U_y − b(U_xy + U_yx) + b²U_x, X = x − (U_xy − bU_x)V⁻¹z, then the increment of β from z on
/// ∂f/∂β at X with covariance V. Eliminating δX from the standard's 2m equations leaves this step, with m rows instead of 2m.
///
/// In the task are left, for the figures of single readings, w_i = 1/V_ii; leverages are those of e with that weight: (A C Aᵀ)_ii/V_ii,
/// C the covariance of β, so that 1 − h is the share of V_ii that is left in the residual.
///
/// Errors: those of jointCovariance(), RankLost (facts: terms), MatrixNotPositive, NoConvergence.
Result<SolvedModel> solveCorrelated(FitTask& task);

} // namespace spanwright
