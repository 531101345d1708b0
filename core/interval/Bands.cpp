// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/interval/Bands.h"

#include "core/fit/Quantiles.h"
#include "core/interval/ToleranceFactor.h"

#include <cmath>
#include <limits>

namespace spanwright {

namespace {

/// √(p F) with n − p degrees of freedom, or √χ² where the uncertainties are taken as they are (Working and Hotelling 1929; Scheffé).
double simultaneousFactor(const Fit& fit) {
    const double tail = 1.0 - fit.coverage;
    const auto p = static_cast<double>(fit.terms());
    return fit.covarianceScale == CovarianceScale::Stated ? std::sqrt(chiSquaredQuantileAbove(tail, p))
                                                          : std::sqrt(p * fQuantileAbove(tail, p, fit.degreesOfFreedom));
}

BandPoint bandWith(const Fit& fit, double x, double simultaneous) {
    const double value = fit.curve->value(x);
    const double variance = fit.curve->variance(x);
    const auto around = [value](double halfWidth) { return Interval{value - halfWidth, value + halfWidth}; };
    BandPoint point;
    point.x = x;
    point.value = value;
    point.mean = around(fit.coverageFactor * std::sqrt(variance));
    point.newReading = around(fit.coverageFactor * std::sqrt(variance + fit.curve->readingVariance(x)));
    point.simultaneous = around(simultaneous * std::sqrt(variance));
    point.inside = x >= fit.low && x <= fit.high;
    return point;
}

} // namespace

BandPoint bandAt(const Fit& fit, double x) { return bandWith(fit, x, simultaneousFactor(fit)); }

Interval toleranceAt(const Fit& fit, double x, double share) {
    const double value = fit.curve->value(x), noise = fit.curve->readingVariance(x);
    const double factor = fit.covarianceScale == CovarianceScale::Stated
                              ? std::numeric_limits<double>::quiet_NaN()
                              : toleranceFactorTwoSided(noise / fit.curve->variance(x), fit.degreesOfFreedom, share, fit.coverage);
    return {value - factor * std::sqrt(noise), value + factor * std::sqrt(noise)};
}

std::vector<BandPoint> bandCurve(const Fit& fit, double low, double high, std::size_t points) {
    const double simultaneous = simultaneousFactor(fit);
    std::vector<BandPoint> curve;
    curve.reserve(points);
    for (std::size_t i = 0; i < points; ++i) {
        const double share = points > 1 ? static_cast<double>(i) / static_cast<double>(points - 1) : 0.0;
        curve.push_back(bandWith(fit, i + 1 == points ? high : low + share * (high - low), simultaneous));
    }
    return curve;
}

} // namespace spanwright
