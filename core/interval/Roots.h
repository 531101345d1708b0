// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"

#include <functional>
#include <optional>
#include <vector>

namespace spanwright {

/// Where answers and ends of intervals are sought: the calibrated range and a span on either side, within the
/// function's domain.
struct RangeOfSearch {
    double low = 0, high = 0;
};
RangeOfSearch searchRange(const Fit& fit);

using RealFunction = std::function<double(double)>;

/// The first step on the way from `from` to `limit` on which `f` turns positive; empty when it does not.
struct Crossing {
    double inner = 0, outer = 0;
};
std::optional<Crossing> firstCrossing(const RealFunction& f, double from, double limit);

/// The root between two places of different sign, to the last bits (Alefeld, Potra and Shi 1995, algorithm 748).
double rootBetween(const RealFunction& f, double a, double b);

/// Every root of a smooth function in [low, high], in rising order: sign changes on a grid of 400 steps, with touching
/// extremes refined so that a pair of roots between two grid points is not missed.
std::vector<double> rootsIn(const RealFunction& f, double low, double high);

} // namespace spanwright
