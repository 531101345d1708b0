// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Sample.h"

#include <vector>

namespace spanwright {

/// How each reading stands to the fitted function, one value a reading; NaN where it does not exist (a reading that the
/// function must pass through, no degrees of freedom).
struct Influence {
    std::vector<double> standardised; ///< √w e / (s √(1 − h)), internally studentised
    std::vector<double> studentised; ///< externally: r √((ν − 1)/(ν − r²)), Student with ν − 1 degrees of freedom
    std::vector<double> cook;        ///< r² h / (p (1 − h)); Cook, Technometrics 19 (1977) 15
};

/// n residuals of a function with p coefficients; s² = Σ w e²/(n − p) is taken from the residuals. Source: Belsley, Kuh
/// and Welsch, "Regression Diagnostics" (1980), chapter 2.
[[nodiscard]] Influence influence(const Residuals& residuals, int terms);

} // namespace spanwright
