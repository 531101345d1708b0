// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Sample.h"

namespace spanwright {

/// How a reading stands to the fitted function; NaN where a figure does not exist (a reading that the function must pass
/// through, no degrees of freedom).
struct InfluenceFigures {
    double standardised; ///< √w e / (s √(1 − h)), internally studentised
    double studentised;  ///< externally: r √((ν − 1)/(ν − r²)), Student with ν − 1 degrees of freedom
    double cook;         ///< r² h / (p (1 − h)); Cook, Technometrics 19 (1977) 15
};

/// The figures of any reading of n, fitted by a function of p coefficients; s² = Σ w e²/(n − p) is taken from the
/// residuals. Computed when asked for: very many readings are rarely looked at one by one. Source: Belsley, Kuh and
/// Welsch, "Regression Diagnostics" (1980), chapter 2.
class Influence {
  public:
    Influence() = default;
    Influence(const Residuals& residuals, int terms);

    /// Of a reading with residual e, leverage h and weight w.
    [[nodiscard]] InfluenceFigures of(double e, double h, double w = 1) const;

  private:
    double variance_ = 0;
    double freedom_ = 0;
    int terms_ = 0;
};

} // namespace spanwright
