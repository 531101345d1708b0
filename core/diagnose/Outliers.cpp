// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Outliers.h"

#include "core/base/LaneSums.h"
#include "core/base/Parallel.h"
#include "core/diagnose/ResidualColumn.h"
#include "core/fit/Quantiles.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <type_traits>

namespace spanwright {
namespace {

/// The `most` smallest and the `most` largest values by index, in rising order: no other can be found.
template <class T>
class Ends {
  public:
    Ends(std::span<const T> u, std::size_t most) : u_(u), most_(most) {}

    /// Whether a value belongs among those held.
    [[nodiscard]] bool wants(const T& value) const {
        return low.size() < most_ || value < lowLimit_ || value > highLimit_;
    }
    void take(std::size_t i) {
        if (low.size() < most_ || u_[i] < lowLimit_) {
            keep(low, i, [this](std::size_t a, std::size_t b) { return u_[a] < u_[b] || (u_[a] == u_[b] && a < b); });
            lowLimit_ = u_[low.back()];
        }
        if (high.size() < most_ || u_[i] > highLimit_) {
            keep(high, i, [this](std::size_t a, std::size_t b) { return u_[a] > u_[b] || (u_[a] == u_[b] && a < b); });
            highLimit_ = u_[high.back()];
        }
    }

    std::vector<std::size_t> low, high;

  private:
    void keep(std::vector<std::size_t>& kept, std::size_t i, auto before) const {
        if (kept.size() == most_)
            kept.pop_back();
        kept.insert(std::upper_bound(kept.begin(), kept.end(), i, before), i);
    }

    std::span<const T> u_;
    std::size_t most_;
    T lowLimit_ = T(0.0), highLimit_ = T(0.0);
};

/// Mean, squares about it, and the ends.
template <class T>
struct Spread {
    T mean = T(0.0), squares = T(0.0);
    Ends<T> ends;
};

template <class T>
Spread<T> spreadOf(std::span<const T> u, std::size_t most) {
    Spread<T> spread{T(0.0), T(0.0), Ends<T>(u, most)};
    for (const T& value : u)
        spread.mean += value;
    spread.mean = spread.mean / static_cast<double>(u.size());
    for (std::size_t i = 0; i < u.size(); ++i) {
        const T d = u[i] - spread.mean;
        spread.squares += d * d;
        if (spread.ends.wants(u[i]))
            spread.ends.take(i);
    }
    return spread;
}

/// Of the values from `from` to `to`: Σ d and Σ d² of the distances d from `origin`, and their ends.
Spread<double> distancesOf(std::span<const double> u, std::size_t from, std::size_t to, double origin, std::size_t most) {
    constexpr std::size_t Block = 512;
    Spread<double> spread{0, 0, Ends<double>(u, most)};
    for (std::size_t first = from; first < to; first += Block) {
        const std::size_t last = std::min(first + Block, to);
        const auto [sum, squares] = laneSums<2>(first, last, [&, column = u.data()](auto i) {
            const auto d = at(column, i) - origin;
            return std::array{d, d * d};
        });
        spread.mean += sum;
        spread.squares += squares;
        const auto [low, high] = laneBounds(first, last, [column = u.data()](auto i) { return at(column, i); });
        if (!spread.ends.wants(low) && !spread.ends.wants(high))
            continue;
        for (std::size_t i = first; i < last; ++i)
            if (spread.ends.wants(u[i]))
                spread.ends.take(i);
    }
    return spread;
}

/// In one pass for very many values: in blocks, of which few hold an end, and with the distances from the first value, so
/// that a common level costs no digits.
Spread<double> spreadOfMany(std::span<const double> u, std::size_t most) {
    const std::size_t n = u.size();
    auto second = beside(n, [&] { return distancesOf(u, n / 2, n, u[0], most); });
    Spread<double> spread = distancesOf(u, 0, n / 2, u[0], most);
    const Spread<double> others = second.get();
    for (const std::vector<std::size_t>* end : {&others.ends.low, &others.ends.high})
        for (const std::size_t i : *end)
            if (spread.ends.wants(u[i]))
                spread.ends.take(i);
    const double sum = spread.mean + others.mean, size = static_cast<double>(n);
    spread.mean = u[0] + sum / size;
    spread.squares += others.squares - sum * (sum / size);
    return spread;
}

/// From here on the values are gone through once, in plain sums.
constexpr std::size_t ManyValues = 100'000;

template <class T>
std::vector<ExtremeTrial> trialsOf(std::span<const T> u, int most, double level) {
    std::vector<ExtremeTrial> trials;
    const std::size_t n = u.size();
    if (n < 3 || most < 1)
        return trials;
    const auto wanted = std::min(static_cast<std::size_t>(most), n - 2);
    Spread<T> spread{T(0.0), T(0.0), Ends<T>(u, 0)};
    if constexpr (std::is_same_v<T, double>)
        spread = n < ManyValues ? spreadOf(u, wanted) : spreadOfMany(u, wanted);
    else
        spread = spreadOf(u, wanted);
    const Ends<T>& ends = spread.ends;
    T mean = spread.mean, squares = spread.squares;
    const T all = squares;
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
