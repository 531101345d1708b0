// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/GroupedColumn.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

/// Values looked at beforehand, and from how many values on that pays.
constexpr std::size_t Sampled = 2048, Many = 16 * Sampled;

/// The values between two bounds, and how many lie below them.
struct Between {
    std::size_t below = 0;
    std::vector<double> inside;
};

Between between(std::span<const double> values, double low, double high) {
    Between found;
    found.inside.resize(values.size());
    std::size_t kept = 0;
    for (const double value : values) {
        found.inside[kept] = value; // overwritten unless it counts: no branch, half of which would be foretold wrongly
        found.below += static_cast<std::size_t>(value < low);
        kept += static_cast<std::size_t>(value >= low) & static_cast<std::size_t>(value <= high);
    }
    found.inside.resize(kept);
    return found;
}

/// Four standard deviations of a sample's median on both sides, so that the median of all is hardly ever missed.
Between nearMedian(std::span<const double> values) {
    std::vector<double> sample;
    const std::size_t step = values.size() / Sampled;
    for (std::size_t i = step / 2; i < values.size(); i += step)
        sample.push_back(values[i]);
    std::sort(sample.begin(), sample.end());
    const double size = static_cast<double>(sample.size()), side = 2 / std::sqrt(size);
    return between(values, sample[static_cast<std::size_t>((0.5 - side) * size)],
                   sample[static_cast<std::size_t>((0.5 + side) * size)]);
}

} // namespace

GroupedColumn::GroupedColumn(const GroupedValues& values) : values_(values.u.size()), begin_(values.groups + 1, 0) {
    for (const std::int32_t group : values.group)
        ++begin_[static_cast<std::size_t>(group) + 1];
    for (std::size_t g = 0; g < values.groups; ++g)
        begin_[g + 1] += begin_[g];
    std::vector<std::size_t> next(begin_.begin(), begin_.end() - 1);
    for (std::size_t i = 0; i < values.u.size(); ++i)
        values_[next[static_cast<std::size_t>(values.group[i])]++] = values.u[i];
}

double medianOf(std::span<const double> values) {
    const std::size_t n = values.size();
    if (n == 0)
        return 0;
    const std::size_t lower = (n - 1) / 2, upper = n / 2;
    Between middle;
    if (n >= Many)
        middle = nearMedian(values);
    if (lower < middle.below || upper >= middle.below + middle.inside.size())
        middle = {0, {values.begin(), values.end()}};
    const auto nth = [&](std::size_t rank) {
        const auto place = middle.inside.begin() + static_cast<std::ptrdiff_t>(rank - middle.below);
        std::nth_element(middle.inside.begin(), place, middle.inside.end());
        return *place;
    };
    return (nth(lower) + nth(upper)) / 2;
}

} // namespace spanwright
