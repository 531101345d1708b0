// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"

#include <memory>
#include <optional>
#include <span>
#include <vector>

namespace spanwright {

struct Interval {
    double low = 0, high = 0;
};

/// The function at one abscissa with its intervals at the fit's coverage, in the unit of the ordinate.
struct BandPoint {
    double x = 0;
    double value = 0;
    Interval mean;         ///< where the function is: ŷ ± t √(vᵀVv)
    Interval newReading;   ///< where the next reading will be: ŷ ± t √(vᵀVv + σ²)
    Interval simultaneous; ///< Working–Hotelling: t replaced by √(p F)
    bool inside = true;    ///< within the calibrated range
    std::optional<Interval> meanOfRepeats; ///< where the mean of the chosen number of new readings will be
};

BandPoint bandAt(const Fit& fit, double x);
/// Where the mean of `repeats` new readings will be: ŷ ± t √(vᵀVv + σ²/q); empty: an exact one, q without end.
Interval meanOfRepeatsAt(const Fit& fit, double x, std::optional<int> repeats);
/// Where at least `share` of all readings at x lie, with the fit's coverage as confidence: ŷ ± k σ(x) with the exact
/// two-sided factor for an effective number of readings σ²/u²(ŷ) (Wallis 1951). NaN where the uncertainties are taken
/// as they are. Takes milliseconds: for figures that are asked for, not for every change.
Interval toleranceAt(const Fit& fit, double x, double share);
/// `points` equidistant abscissae from low to high.
std::vector<BandPoint> bandCurve(const Fit& fit, double low, double high, std::size_t points);

/// Quantile that multiplies a standard uncertainty so that an interval holds for all coefficients and all values of the
/// function together: √(p F), or √χ² where the uncertainties are taken as they are (Working and Hotelling 1929; Scheffé
/// 1953).
double simultaneousFactor(const Fit& fit);

/// Value and band for one new reading at very many abscissae, as columns of n numbers (not vectors, which would be
/// filled twice).
struct BandColumns {
    std::size_t n = 0;
    std::unique_ptr<double[]> value, low, high;
};

/// For polynomials with the same noise everywhere, value and variance are polynomials: found once from values at the
/// Chebyshev points, then a few multiplications a point, of very many in two threads. Other functions are asked point by point.
BandColumns newReadingBand(const Fit& fit, std::span<const double> x);

} // namespace spanwright
