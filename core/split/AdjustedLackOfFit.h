// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/split/NoiseChain.h"
#include "core/split/VarianceSplit.h"

namespace spanwright {

/// Lack of fit after direction and run: RSS(function + direction + run) − RSS(set points + direction + run), so that in
/// unbalanced data (a point missing in one run, an exclusion) a run effect does not pass for curvature. Direction is a
/// contrast of ±½ at every set point that has both; run offsets and slopes are coded to sum to zero, so that in
/// balanced data the result equals the sequential row. Sum of squares and degrees of freedom only. Empty when the data
/// are balanced, or the function is not a polynomial in the reference.
[[nodiscard]] std::optional<SplitRow> adjustedLackOfFit(const Sample& sample, const NoiseChain& chain, const Fit& fit);

} // namespace spanwright
