// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/split/NoiseChain.h"
#include "core/split/VarianceSplit.h"

namespace spanwright {

/// Standard deviations that belong to one cause, from mean squares and their expectations (analysis-of-variance
/// estimators, Henderson's method 3; balanced: σ²_run = (MS_run − s²)/(readings of a run not shared), σ²_direction =
/// (MS_hyst − s²)/R):
///   Repeatability: s² = MS of the last row; 95 % interval of σ from chi-squared.
///   RunOffset, Hysteresis (set point × direction): 95 % interval from Williams and Tukey (Williams, Biometrika 49
///   (1962) 278),
///     not narrower than stated; degrees of freedom from Satterthwaite (Biometrics Bulletin 2 (1946) 110).
/// Run slopes are taken as fixed. Empty without degrees of freedom for repeatability.
[[nodiscard]] std::vector<VarianceComponent> varianceComponents(const NoiseChain& chain, const VarianceSplit& split,
                                                                double meanVarianceOfReading);

} // namespace spanwright
