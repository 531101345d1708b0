// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/interval/Bands.h"

#include "core/base/Parallel.h"
#include "core/fit/Quantiles.h"
#include "core/fit/StreamKernel.h"
#include "core/interval/ToleranceFactor.h"

#include <cmath>
#include <limits>
#include <numbers>
#include <optional>
#include <utility>

namespace spanwright {

namespace {

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

/// Degree of a polynomial; empty when the function is none.
std::optional<int> degreeOf(const FunctionChoice& function) {
    switch (function.family) {
    case FunctionFamily::Constant:
        return 0;
    case FunctionFamily::Line:
    case FunctionFamily::Proportional:
        return 1;
    case FunctionFamily::Polynomial:
    case FunctionFamily::PolynomialNoConstant:
        return function.order;
    default:
        return std::nullopt;
    }
}

/// Coefficients of a polynomial of degree m, in powers of s in [−1, 1], from its values at the roots of T_{m+1}: the
/// discrete cosine sum for those of T_j (Trefethen, Approximation Theory and Approximation Practice, chapter 3), then T_{j+1} =
/// 2 s T_j − T_{j−1}.
template <class F>
void fillPowers(int m, double* powers, const F& f) {
    const auto width = static_cast<std::size_t>(m) + 1;
    std::vector<double> before(width, 0.0), now(width, 0.0), next(width, 0.0);
    now[0] = 1;
    for (int j = 0; j <= m; ++j) {
        double coefficient = 0;
        for (int k = 0; k <= m; ++k) {
            const double angle = std::numbers::pi * (k + 0.5) / (m + 1);
            coefficient += f(std::cos(angle)) * std::cos(j * angle) * (j == 0 ? 1.0 : 2.0) / (m + 1);
        }
        for (std::size_t k = 0; k < width; ++k)
            powers[k] += coefficient * now[k];
        for (std::size_t k = 0; k < width; ++k)
            next[k] = (j == 0 ? 1 : 2) * (k > 0 ? now[k - 1] : 0) - before[k];
        before = std::exchange(now, next);
    }
}

/// A polynomial g(t) of degree m.
template <class G>
EvenOdd evenOdd(int m, const G& g) {
    EvenOdd parts;
    const auto place = [](double s) { return std::sqrt((s + 1) / 2); };
    fillPowers(m / 2, parts.even, [&](double s) { return (g(place(s)) + g(-place(s))) / 2; });
    if (m > 0)
        fillPowers((m - 1) / 2, parts.odd, [&](double s) { return (g(place(s)) - g(-place(s))) / (2 * place(s)); });
    return parts;
}

bool evenNoise(const Fit& fit) {
    const double middle = fit.curve->readingVariance(fit.low + (fit.high - fit.low) / 2);
    for (int i = 0; i <= 16; ++i)
        if (fit.curve->readingVariance(fit.low + (fit.high - fit.low) * i / 16) != middle)
            return false;
    return true;
}

} // namespace

double simultaneousFactor(const Fit& fit) {
    const double tail = 1.0 - fit.coverage;
    const auto p = static_cast<double>(fit.terms());
    return fit.covarianceScale == CovarianceScale::Stated
               ? std::sqrt(chiSquaredQuantileAbove(tail, p))
               : std::sqrt(p * fQuantileAbove(tail, p, fit.degreesOfFreedom));
}

BandPoint bandAt(const Fit& fit, double x) {
    return bandWith(fit, x, simultaneousFactor(fit));
}

Interval meanOfRepeatsAt(const Fit& fit, double x, std::optional<int> repeats) {
    const double value = fit.curve->value(x);
    const double noise = repeats ? fit.curve->readingVariance(x) / *repeats : 0;
    const double half = fit.coverageFactor * std::sqrt(fit.curve->variance(x) + noise);
    return {value - half, value + half};
}

Interval toleranceAt(const Fit& fit, double x, double share) {
    const double value = fit.curve->value(x), noise = fit.curve->readingVariance(x);
    const double factor =
        fit.covarianceScale == CovarianceScale::Stated
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

BandColumns newReadingBand(const Fit& fit, std::span<const double> x) {
    const std::size_t n = x.size();
    const auto column = [n] { return std::make_unique_for_overwrite<double[]>(n); };
    BandColumns band{n, column(), column(), column()};
    const std::optional<int> degree = degreeOf(fit.function);
    std::size_t done = 0;
    if (degree && *degree <= MostStreamedDegree && evenNoise(fit)) {
        const double centre = fit.low + (fit.high - fit.low) / 2,
                     half = fit.high > fit.low ? (fit.high - fit.low) / 2 : 1.0;
        const double noise = fit.curve->readingVariance(centre);
        const auto at = [&](double t) { return centre + half * t; };
        done = n - n % 4;
        const BandBlock whole{x.data(),
                              done,
                              centre,
                              1 / half,
                              evenOdd(*degree, [&](double t) { return fit.curve->value(at(t)); }),
                              evenOdd(2 * *degree, [&](double t) { return fit.curve->variance(at(t)) + noise; }),
                              fit.coverageFactor};
        inHalves(done / 4, [&](std::size_t first, std::size_t last) {
            BandBlock block = whole;
            block.x += 4 * first;
            block.n = 4 * (last - first);
            streamKernel().band[static_cast<std::size_t>(*degree)](block, band.value.get() + 4 * first, band.low.get() + 4 * first,
                                                                   band.high.get() + 4 * first);
        });
    }
    for (std::size_t i = done; i < n; ++i) {
        const BandPoint point = bandWith(fit, x[i], 0.0);
        band.value[i] = point.value;
        band.low[i] = point.newReading.low;
        band.high[i] = point.newReading.high;
    }
    return band;
}

} // namespace spanwright
