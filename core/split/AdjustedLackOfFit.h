// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/split/NoiseChain.h"
#include "core/split/VarianceSplit.h"

namespace spanwright {

struct AdjustedLackOfFit {
    std::optional<SplitRow> row; ///< sum of squares and degrees of freedom only
    std::string approximation;   ///< "linearised", "mean-indication"; empty: exact by linear theory
};

/// Lack of fit after direction and run: RSS(function + direction + run) − RSS(set points + direction + run), so that in
/// unbalanced data (a point missing in one run, an exclusion) a run effect does not pass for curvature. Direction is a
/// contrast of ±½ at every set point that has both; run offsets and slopes are coded to sum to zero, so that in
/// balanced data the result equals the sequential row. Empty when the data are balanced.
///
/// Exact where the function gives the indication and is linear in its coefficients. Else it says why not: a function that is not
/// linear is replaced by its tangent at the fit; a function that gives the reference stands, at each set point, at the mean of
/// indications that were read, not set.
[[nodiscard]] AdjustedLackOfFit adjustedLackOfFit(const Sample& sample, const NoiseChain& chain, const Fit& fit);

} // namespace spanwright
