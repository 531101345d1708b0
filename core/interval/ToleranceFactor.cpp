// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/interval/ToleranceFactor.h"

#include "core/fit/Quantiles.h"
#include "core/interval/Roots.h"

#include <boost/math/distributions/non_central_t.hpp>

#include <cmath>
#include <limits>
#include <numbers>

namespace spanwright {

namespace {

constexpr double NoValue = std::numeric_limits<double>::quiet_NaN();

double normalBelow(double z) {
    return 0.5 * std::erfc(-z / std::numbers::sqrt2);
}
double normalDensity(double z) {
    return std::exp(-z * z / 2) / std::sqrt(2 * std::numbers::pi);
}

/// Half-width r about a centre at distance d from the mean (in σ) that holds `share`.
double halfWidthHolding(double share, double d) {
    // By Newton from above, with the tail Q(r − d) + Q(r + d) = 1 − share, which keeps its digits for large shares.
    const double tail = 1 - share;
    double r = normalQuantileAbove(tail / 2) + d;
    for (int i = 0; i < 100; ++i) {
        const double miss = normalBelow(d - r) + normalBelow(-d - r) - tail;
        const double step = miss / (normalDensity(r - d) + normalDensity(r + d));
        r += step;
        if (std::fabs(step) <= 1e-16 * r)
            break;
    }
    return r;
}

/// P(at least `share` is held) for a factor k: the trapezoidal rule on the line converges faster than any power for the
/// normal density (Trefethen and Weideman 2014, SIAM Review 56, 385).
double probabilityHeld(double k, double effective, double df, double share) {
    constexpr double Step = 0.25, Reach = 9;
    double sum = 0;
    for (int i = 0; i * Step <= Reach; ++i) {
        const double z = i * Step;
        const double r = halfWidthHolding(share, z / std::sqrt(effective));
        sum += (i == 0 ? 1 : 2) * normalDensity(z) * chiSquaredAbove(df * (r / k) * (r / k), df);
    }
    return sum * Step;
}

bool usable(double effective, double df, double share, double confidence) {
    return effective > 0 && df > 0 && share > 0 && share < 1 && confidence > 0 && confidence < 1;
}

} // namespace

double toleranceFactorOneSided(double effective, double df, double share, double confidence) {
    if (!usable(effective, df, share, confidence))
        return NoValue;
    const double shift = normalQuantileAbove(1 - share) * std::sqrt(effective);
    return quantile(boost::math::non_central_t(df, shift), confidence) / std::sqrt(effective);
}

double toleranceFactorTwoSided(double effective, double df, double share, double confidence) {
    if (!usable(effective, df, share, confidence))
        return NoValue;
    const double near = toleranceFactorHowe(effective, df, share, confidence);
    const RealFunction miss = [&](double k) { return probabilityHeld(k, effective, df, share) - confidence; };
    double low = near * 0.8, high = near * 1.25;
    while (miss(low) > 0)
        low *= 0.5;
    while (miss(high) < 0 && high < near * 1e6)
        high *= 2;
    return rootBetween(miss, low, high);
}

double toleranceFactorHowe(double effective, double df, double share, double confidence) {
    if (!usable(effective, df, share, confidence))
        return NoValue;
    const double z = normalQuantileAbove((1 - share) / 2);
    return std::sqrt(df * (1 + 1 / effective) / chiSquaredQuantileAbove(confidence, df)) * z;
}

} // namespace spanwright
