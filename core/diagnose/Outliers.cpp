// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Outliers.h"

#include "core/diagnose/ResidualColumn.h"
#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

/// The `most` smallest and the `most` largest values by index, in rising order: no other can be found.
struct Ends {
    std::vector<std::size_t> low, high;
};

template <class T>
Ends endsOf(std::span<const T> u, std::size_t most) {
    Ends ends;
    const auto less = [&](std::size_t a, std::size_t b) { return u[a] < u[b] || (u[a] == u[b] && a < b); };
    const auto more = [&](std::size_t a, std::size_t b) { return u[a] > u[b] || (u[a] == u[b] && a < b); };
    const auto keep = [&](std::vector<std::size_t>& kept, std::size_t i, auto before) {
        if (kept.size() == most)
            kept.pop_back();
        kept.insert(std::upper_bound(kept.begin(), kept.end(), i, before), i);
    };
    T lowLimit(0.0), highLimit(0.0);
    for (std::size_t i = 0; i < u.size(); ++i) {
        if (ends.low.size() < most || u[i] < lowLimit) {
            keep(ends.low, i, less);
            lowLimit = u[ends.low.back()];
        }
        if (ends.high.size() < most || u[i] > highLimit) {
            keep(ends.high, i, more);
            highLimit = u[ends.high.back()];
        }
    }
    return ends;
}

template <class T>
std::vector<ExtremeTrial> trialsOf(std::span<const T> u, int most, double level) {
    std::vector<ExtremeTrial> trials;
    const std::size_t n = u.size();
    if (n < 3 || most < 1)
        return trials;
    const auto wanted = std::min(static_cast<std::size_t>(most), n - 2);
    T sum(0.0);
    for (const T& value : u)
        sum += value;
    T mean = sum / static_cast<double>(n);
    T squares(0.0);
    for (const T& value : u) {
        const T d = value - mean;
        squares += d * d;
    }
    const T all = squares;
    const Ends ends = endsOf(u, wanted);
    std::size_t low = 0, high = 0;
    for (std::size_t i = 0; i < wanted; ++i) {
        const double left = static_cast<double>(n - i);
        if (!(rounded(squares) > 1e-28 * rounded(all)))
            break;
        const std::size_t below = ends.low[low], above = ends.high[high];
        const bool takeHigh =
            u[above] - mean > mean - u[below] || (u[above] - mean == mean - u[below] && above < below);
        const std::size_t found = takeHigh ? above : below;
        ++(takeHigh ? high : low);
        const T d = u[found] - mean;
        const double variance = rounded(squares) / (left - 1);
        trials.push_back(
            {found, std::abs(rounded(d)) / std::sqrt(variance), level > 0 ? grubbsCriticalValue(n - i, level) : 0});
        // Mean and squares without the value: ū' = ū − d/(m−1), S' = S − d² m/(m−1).
        mean = mean - d / (left - 1);
        squares = squares - d * d * (left / (left - 1));
    }
    return trials;
}

double criticalFrom(double quantile, std::size_t n) {
    const double size = static_cast<double>(n);
    return (size - 1) / std::sqrt(size) * std::sqrt(quantile * quantile / (size - 2 + quantile * quantile));
}

} // namespace

std::vector<ExtremeTrial> extremeTrials(std::span<const DoubleDouble> u, int most, double level) {
    return trialsOf(u, most, level);
}

std::vector<ExtremeTrial> extremeTrials(std::span<const double> u, int most, double level) {
    return trialsOf(u, most, level);
}

std::vector<ExtremeTrial> extremeTrials(std::span<const double> u, int most) {
    return trialsOf(u, most, 0);
}

int outlierCount(const std::vector<ExtremeTrial>& trials, std::size_t n, double level) {
    for (std::size_t k = trials.size(); k > 0; --k) {
        const std::size_t left = n - (k - 1);
        const double least = criticalFrom(normalQuantileAbove(level / (2 * static_cast<double>(left))), left);
        if (trials[k - 1].r > least && trials[k - 1].r > grubbsCriticalValue(left, level))
            return static_cast<int>(k);
    }
    return 0;
}

int outlierCount(const std::vector<ExtremeTrial>& trials) {
    for (std::size_t k = trials.size(); k > 0; --k)
        if (trials[k - 1].r > trials[k - 1].lambda)
            return static_cast<int>(k);
    return 0;
}

double grubbsCriticalValue(std::size_t n, double level) {
    const double size = static_cast<double>(n);
    return criticalFrom(studentQuantileAbove(level / (2 * size), size - 2), n);
}

} // namespace spanwright
