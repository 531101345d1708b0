// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Normality.h"

#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <span>

namespace spanwright {
namespace {

double polynomial(std::span<const double> coefficients, double x) {
    double value = 0;
    for (std::size_t k = coefficients.size(); k-- > 0;)
        value = value * x + coefficients[k];
    return value;
}

// Coefficients of AS R94, lowest power first.
constexpr double c1[] = {0, 0.221157, -0.147981, -2.07119, 4.434685, -2.706056};
constexpr double c2[] = {0, 0.042981, -0.293762, -1.752461, 5.682633, -3.582633};
constexpr double c3[] = {0.544, -0.39978, 0.025054, -6.714e-4};
constexpr double c4[] = {1.3822, -0.77857, 0.062767, -0.0020322};
constexpr double c5[] = {-1.5861, -0.31082, -0.083751, 0.0038915};
constexpr double c6[] = {-0.4803, -0.082676, 0.0030302};
constexpr double g[] = {-2.273, 0.459};

/// Weights of the upper half, largest first.
std::vector<double> weightsOf(std::size_t n) {
    const std::size_t half = n / 2;
    if (n == 3)
        return {std::numbers::sqrt2 / 2};
    const double size = static_cast<double>(n);
    std::vector<double> m(half);
    double squares = 0;
    for (std::size_t i = 0; i < half; ++i) {
        m[i] = normalQuantileAbove((static_cast<double>(i) + 0.625) / (size + 0.25));
        squares += 2 * m[i] * m[i];
    }
    const double root = 1 / std::sqrt(size), norm = std::sqrt(squares);
    std::vector<double> a(half);
    a[0] = polynomial(c1, root) + m[0] / norm;
    std::size_t first = 1;
    double left = squares - 2 * m[0] * m[0], right = 1 - 2 * a[0] * a[0];
    if (n > 5) {
        a[1] = polynomial(c2, root) + m[1] / norm;
        left -= 2 * m[1] * m[1];
        right -= 2 * a[1] * a[1];
        first = 2;
    }
    const double factor = std::sqrt(left / right);
    for (std::size_t i = first; i < half; ++i)
        a[i] = m[i] / factor;
    return a;
}

double pOf(double w, std::size_t n) {
    if (n == 3)
        return std::max(0.0, 6 / std::numbers::pi * (std::asin(std::sqrt(w)) - std::asin(std::sqrt(0.75))));
    const double size = static_cast<double>(n);
    double y = std::log1p(-w), mean = 0, sd = 0;
    if (n <= 11) {
        const double limit = polynomial(g, size);
        if (y >= limit)
            return 1e-99;
        y = -std::log(limit - y);
        mean = polynomial(c3, size);
        sd = std::exp(polynomial(c4, size));
    } else {
        const double logSize = std::log(size);
        mean = polynomial(c5, logSize);
        sd = std::exp(polynomial(c6, logSize));
    }
    return 0.5 * std::erfc((y - mean) / (sd * std::numbers::sqrt2));
}

} // namespace

std::optional<TestResult> shapiroWilk(std::vector<double> values) {
    const std::size_t n = values.size();
    if (n < 3 || n > 5000)
        return std::nullopt;
    std::sort(values.begin(), values.end());
    double mean = 0;
    for (const double value : values)
        mean += value;
    mean /= static_cast<double>(n);
    double squares = 0;
    for (const double value : values)
        squares += (value - mean) * (value - mean);
    if (!(values.back() > values.front()) || !(squares > 0))
        return std::nullopt;
    const std::vector<double> a = weightsOf(n);
    double sum = 0;
    for (std::size_t i = 0; i < a.size(); ++i)
        sum += a[i] * (values[n - 1 - i] - values[i]);
    TestResult result;
    result.statistic = std::min(1.0, sum * sum / squares);
    result.p = pOf(result.statistic, n);
    return result;
}

} // namespace spanwright
