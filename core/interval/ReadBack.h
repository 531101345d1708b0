// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"

#include <optional>
#include <vector>

namespace spanwright {

/// The reference value that belongs to an indication, with the set of values for which the indication would lie within
/// the band (Fieller's interval for the line; root finding for curves).
struct ReadBackAnswer {
    double indication = 0;
    std::optional<double> reference; ///< empty: no answer in the range
    std::vector<double> others;      ///< further answers, when the function is not monotonic
    double standardUncertainty = 0;
    double low = 0, high = 0; ///< may be infinite
    bool insideRange = true;
    std::vector<Warning> warnings;
};

/// Every abscissa at which the function has this value, the one nearest to the middle of the calibrated range first: in the range,
/// or else in a span on either side of it.
std::vector<double> abscissaeOf(const Fit& fit, double ordinate);

/// The set {x : |y − f(x)| ≤ k √(u²(f(x)) + σ²(x)/q)}, so that a value is in it exactly when the indication is in the
/// band there: for a line the closed form of Fieller (1954), which may be all values, or all but a finite gap (then low
/// and high are infinite, and NoFiniteInterval carries the gap); for curves the ends next to the answer, sought over
/// the calibrated range and a span on either side, and infinite when they are not met there. Standard uncertainty:
/// √(u²(f) + σ²/q)/|f′| (GUM 5.1.2; ISO/TS 28037:2010, 11.1). A function that gives the reference is evaluated: its
/// value with ± k √(u²(f) + σ²/q).
///
/// Warnings: NoAnswer, SeveralAnswers, Extrapolated, NoFiniteInterval (facts: value).
/// `repeats`: number of new readings of which `indication` is the mean; empty: an exact indication.
ReadBackAnswer readBack(const Fit& fit, double indication, std::optional<int> repeats);

} // namespace spanwright
