// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/GroupedColumn.h"

#include "core/base/Parallel.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <memory>

namespace spanwright {

namespace {

/// Values looked at beforehand, and from how many values on that pays.
constexpr std::size_t Sampled = 2048, Many = 16 * Sampled;

/// The values between two bounds, and how many lie below them.
struct Between {
    std::size_t below = 0, count = 0;
    std::unique_ptr<double[]> inside;
};

Between between(std::span<const double> values, double low, double high) {
    Between found;
    found.inside = std::make_unique_for_overwrite<double[]>(values.size() + 1);
    for (const double value : values) {
        found.inside[found.count] = value; // overwritten unless it counts: no branch, half of which would be foretold wrongly
        found.below += static_cast<std::size_t>(value < low);
        found.count += static_cast<std::size_t>(value >= low) & static_cast<std::size_t>(value <= high);
    }
    return found;
}

/// Four standard deviations of a sample's median on both sides, so that the median of all is hardly ever missed.
Between nearMedian(std::span<const double> values) {
    std::vector<double> sample;
    const std::size_t step = values.size() / Sampled;
    for (std::size_t i = step / 2; i < values.size(); i += step)
        sample.push_back(values[i]);
    const double size = static_cast<double>(sample.size()), side = 2 / std::sqrt(size);
    const auto at = [&](double share) { return sample.begin() + static_cast<std::ptrdiff_t>(share * size); };
    const auto low = at(0.5 - side), high = at(0.5 + side);
    std::nth_element(sample.begin(), low, sample.end());
    std::nth_element(low + 1, high, sample.end());
    return between(values, *low, *high);
}

} // namespace

GroupedColumn::GroupedColumn(const GroupedValues& values)
    : values_(std::make_unique_for_overwrite<double[]>(values.u.size())), begin_(values.groups + 1, 0) {
    // Both halves know where theirs go, so that they can be put there at the same time.
    const std::size_t n = values.u.size();
    std::array<std::vector<std::size_t>, 2> next;
    next.fill(std::vector<std::size_t>(values.groups, 0));
    inHalves(n, [&](std::size_t first, std::size_t last) {
        std::vector<std::size_t>& count = next[first == 0 ? 0 : 1];
        for (std::size_t i = first; i < last; ++i)
            ++count[static_cast<std::size_t>(values.group[i])];
    });
    for (std::size_t g = 0; g < values.groups; ++g) {
        begin_[g + 1] = begin_[g] + next[0][g] + next[1][g];
        next[1][g] = begin_[g] + next[0][g];
        next[0][g] = begin_[g];
    }
    inHalves(n, [&](std::size_t first, std::size_t last) {
        std::vector<std::size_t>& place = next[first == 0 ? 0 : 1];
        for (std::size_t i = first; i < last; ++i)
            values_[place[static_cast<std::size_t>(values.group[i])]++] = values.u[i];
    });
}

double medianOf(std::span<const double> values) {
    const std::size_t n = values.size();
    if (n == 0)
        return 0;
    const std::size_t lower = (n - 1) / 2, upper = n / 2;
    Between middle;
    if (n >= Many)
        middle = nearMedian(values);
    if (lower < middle.below || upper >= middle.below + middle.count)
        middle = between(values, -std::numeric_limits<double>::infinity(), std::numeric_limits<double>::infinity());
    double* const begin = middle.inside.get();
    double* const end = begin + middle.count;
    double* const place = begin + (lower - middle.below);
    std::nth_element(begin, place, end);
    return upper == lower ? *place : (*place + *std::min_element(place + 1, end)) / 2;
}

} // namespace spanwright
