// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/FitTask.h"

namespace spanwright {

/// M-estimate by iteratively reweighted least squares (Huber 1981, Robust Statistics, 7.8): Huber's ψ with k = 1.345,
/// or Tukey's bisquare with c = 4.685 started from Huber's solution, on residuals over σ = median|e|/0.6745. The
/// covariance is Huber's K² [Σψ²/(n − p)]/[mean ψ′]²·σ² (AᵀWA)⁻¹. For comparison beside least squares, never for the
/// certificate. Errors: those of solveModel(); NoConvergence (facts: reason).
Result<SolvedModel> solveRobust(FitTask& task);

} // namespace spanwright
