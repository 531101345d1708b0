// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"
#include "core/fit/Fit.h"
#include "core/fit/Sample.h"

namespace spanwright {

struct StreamedFit;

struct FitOutcome {
    Fit fit;
    Residuals residuals;
    std::shared_ptr<const StreamedFit> streamed; ///< the sums behind a fit of very many readings; else null
};

/// Fits the chosen calibration function: min Σ w (y − f(x))², y the indication (or the reference, when that is what the
/// function gives). Coefficients, covariance and sums of squares are computed in double-double and rounded once.
///
/// Covariance: s²(AᵀWA)⁻¹ with s² = Σ w e²/(n − p), or (AᵀWA)⁻¹ where the stated uncertainties are taken as they are
/// (GUM H.3; ISO/TS 28037:2010, 6 and annex E). Coefficient intervals and bands multiply by Student's quantile with n −
/// p degrees of freedom, or by the normal one.
///
/// Errors: NoReadings; TooFewReadings, TooFewSetPoints (facts: needed, got); ReferencesAllEqual; UncertaintyMissing,
/// UncertaintyNotPositive, OutsideDomain (facts: rows, data rows from 1); RankLost (facts: terms); NoConvergence
/// (facts: reason); FunctionUnknown (facts: text); MethodUnfit (facts: reason, text); those of the weights, of
/// takesCovariances() and of jointCovariance().
Result<FitOutcome> fitFunction(const Sample& sample, const Choices& choices);

/// The direction in which the chosen function is fitted: some sensor equations give one quantity only.
FitDirection directionOf(const Choices& choices);

} // namespace spanwright
