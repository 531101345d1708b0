// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/fitFunction.h"

#include <optional>
#include <vector>

namespace spanwright {

/// One degree of a polynomial beside the one below it.
struct DegreeStep {
    int degree = 0;
    double residualSd = 0;
    std::optional<double> f, p;  ///< partial F of the term that was added
    /// n ln(Σe²/n) + 2k + 2k(k+1)/(n − k − 1), k = p + 1; smaller is better. Empty without a reading beyond k + 1, and for a
    /// perfect fit.
    std::optional<double> aicc;
    std::optional<double> ratio; ///< s of the degree below over s of this one, both on the means, and
    std::optional<double> e74;   ///< C(n1, d), which it must exceed for this degree to be kept (ASTM E74)
    double change = 0; ///< largest change of the function at a set point against the degree below, unit of the ordinate
    double changeAt = 0;    ///< there
    bool worth = false;     ///< s falls by at least resolution/√12 against the degree below
    bool monotonic = false; ///< in the calibrated range; else refused for reading back
};

struct DegreeLadder {
    std::vector<DegreeStep> steps; ///< from 1 (a line) upwards, as far as the readings carry
    int byPartialF = 1;            ///< highest degree whose term is significant at 5 %
    std::optional<int> byAicc; ///< empty where it exists for no degree
    int byE74 = 1;
    int suggested = 1; ///< the lowest of the three that is worth it and monotonic
};

/// Polynomials of rising degree with the chosen weights and direction, up to `highest`. `resolution` of the ordinate, 0
/// when unknown.
///
/// ASTM E74-18, 8.3: from the highest degree down, the first degree d with s_{d−1}/s_d > C(n1, d) is kept,
/// C(n1, d) = √[1 + (F_{0.975}(1, n1 − d − 1) − 1)/(n1 − d)] and n1 the number of set points with a reading other than
/// zero, fitted to the mean at each set point.
DegreeLadder degreeLadder(const Sample& sample, const Choices& choices, double resolution, int highest = 5);

} // namespace spanwright
