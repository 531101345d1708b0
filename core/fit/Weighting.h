// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"
#include "core/fit/Sample.h"
#include "core/record/Choices.h"

#include <vector>

namespace spanwright {

/// A variance that varies along the abscissa: linear between the places where it is known and constant beyond them.
class VarianceProfile {
  public:
    VarianceProfile() = default;
    /// Mean of `variance` over equal abscissae.
    VarianceProfile(const std::vector<double>& x, const std::vector<double>& variance);
    /// 1 where nothing is known.
    [[nodiscard]] double at(double x) const;
    [[nodiscard]] bool constant() const;

  private:
    std::vector<double> x_, variance_;
};

/// Weights w_i = 1/u_i² of the readings with the variance of a reading along the abscissa that they stand for.
struct Weighting {
    std::vector<DoubleDouble> rootWeight; ///< 1/u_i; empty: all 1
    VarianceProfile profile;              ///< u²
};

/// Weights from the stated standard uncertainties of the ordinate. A new reading is taken to have the uncertainty that
/// was stated at its place. Errors: UncertaintyMissing, UncertaintyNotPositive (facts: rows).
Result<Weighting> statedWeighting(const Sample& sample, const PairColumn& x, const PairColumn& u);

/// Weights from the spread of the readings at each set point: u_i is the standard deviation there of the residuals of
/// an unweighted fit, so that a reference that wanders about its set point does not count as spread. Errors:
/// NoSpread (facts: rows) where a set point has fewer than two readings or no spread.
Result<Weighting> replicateWeighting(const Sample& sample, const PairColumn& x,
                                     const std::vector<DoubleDouble>& residual);

/// Weights from u(x) = c0 + c1 |x|, c1 ≥ 0 and c0 at least a tenth of the pooled spread, fitted to the standard
/// deviations at the set points with weights ν/u² (the variance of a standard deviation is u²/2ν), iterated. Errors:
/// TooFewReplicates (facts: needed, got) with fewer than two set points that have replicates, NoSpread (facts: rows)
/// without any spread.
Result<Weighting> varianceFunctionWeighting(const Sample& sample, const PairColumn& x,
                                            const std::vector<DoubleDouble>& residual);

/// Weights from u ∝ |x| (ISO 11095:1996, proportional residual standard deviation). Error: LevelZero (facts: rows)
/// at x = 0.
Result<Weighting> proportionalWeighting(const Sample& sample, const PairColumn& x);

/// Data rows from 1 as a fact, "3, 7, 12, …".
std::string rowsFact(const Sample& sample, const std::vector<std::size_t>& at);

} // namespace spanwright
