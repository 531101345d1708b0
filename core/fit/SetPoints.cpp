// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/SetPoints.h"

#include <algorithm>
#include <array>
#include <bit>
#include <numeric>

namespace spanwright {

namespace {

constexpr std::uint64_t WidestTable = 4; ///< places a reading that direct addressing may take

/// A set point from its integer; within one unit of the last place of a double beyond 2^53.
class GridValue {
  public:
    explicit GridValue(int scale) : divisor_(toDouble(powerOfTen(scale))) {}
    double operator()(std::int64_t integer) const { return static_cast<double>(integer) / divisor_; }

  private:
    double divisor_;
};

int bitsOf(std::uint64_t value) {
    return static_cast<int>(std::bit_width(value));
}

void groupByTable(Sample& sample, std::span<const std::int64_t> grid, int scale, std::int64_t low,
                  std::uint64_t range) {
    const GridValue valueOf(scale);
    std::vector<std::int32_t> table(range, -1);
    for (const std::int64_t m : grid)
        table[static_cast<std::size_t>(m - low)] = 0;
    for (std::size_t i = 0; i < table.size(); ++i)
        if (table[i] == 0) {
            table[i] = static_cast<std::int32_t>(sample.groupValue.size());
            sample.groupValue.push_back(valueOf(low + static_cast<std::int64_t>(i)));
        }
    for (std::size_t i = 0; i < grid.size(); ++i)
        sample.group[i] = table[static_cast<std::size_t>(grid[i] - low)];
}

/// Key and row in one number, sorted by digits of the key; the digits of all passes are counted in one.
void sortByDigits(std::vector<std::uint64_t>& items, int keyAt, int keyBits) {
    constexpr int Bits = 11;
    constexpr std::uint64_t Mask = (1u << Bits) - 1;
    const auto passes = static_cast<std::size_t>((keyBits + Bits - 1) / Bits);
    std::vector<std::array<std::uint32_t, Mask + 1>> places(passes);
    for (const std::uint64_t item : items)
        for (std::size_t pass = 0; pass < passes; ++pass)
            places[pass][(item >> (keyAt + static_cast<int>(pass) * Bits)) & Mask] += 1;
    std::vector<std::uint64_t> other(items.size());
    for (std::size_t pass = 0; pass < passes; ++pass) {
        auto& place = places[pass];
        const int shift = keyAt + static_cast<int>(pass) * Bits;
        std::exclusive_scan(place.begin(), place.end(), place.begin(), std::uint32_t{0});
        for (const std::uint64_t item : items)
            other[place[(item >> shift) & Mask]++] = item;
        items.swap(other);
    }
}

void groupByDigits(Sample& sample, std::span<const std::int64_t> grid, int scale, std::int64_t low, int rowBits,
                   int keyBits) {
    std::vector<std::uint64_t> items(grid.size());
    for (std::size_t i = 0; i < grid.size(); ++i)
        items[i] = ((static_cast<std::uint64_t>(grid[i]) - static_cast<std::uint64_t>(low)) << rowBits) | i;
    sortByDigits(items, rowBits, keyBits);
    const GridValue valueOf(scale);
    const std::uint64_t rowMask = (std::uint64_t{1} << rowBits) - 1;
    std::uint64_t before = 0;
    for (std::size_t i = 0; i < items.size(); ++i) {
        const std::uint64_t key = items[i] >> rowBits;
        if (i == 0 || key != before)
            sample.groupValue.push_back(valueOf(low + static_cast<std::int64_t>(key)));
        before = key;
        sample.group[static_cast<std::size_t>(items[i] & rowMask)] =
            static_cast<std::int32_t>(sample.groupValue.size()) - 1;
    }
}

/// For grids so wide that key and row do not fit in one number.
void groupBySorting(Sample& sample, std::span<const std::int64_t> grid, int scale) {
    std::vector<std::int64_t> values(grid.begin(), grid.end());
    std::sort(values.begin(), values.end());
    values.erase(std::unique(values.begin(), values.end()), values.end());
    const GridValue valueOf(scale);
    for (const std::int64_t value : values)
        sample.groupValue.push_back(valueOf(value));
    for (std::size_t i = 0; i < grid.size(); ++i)
        sample.group[i] =
            static_cast<std::int32_t>(std::lower_bound(values.begin(), values.end(), grid[i]) - values.begin());
}

} // namespace

void groupByValue(Sample& sample, const PairColumn& value) {
    std::vector<std::uint32_t> order(value.size());
    std::iota(order.begin(), order.end(), 0u);
    std::sort(order.begin(), order.end(), [&](std::uint32_t a, std::uint32_t b) { return value[a] < value[b]; });
    sample.group.resize(value.size());
    for (std::size_t i = 0; i < order.size(); ++i) {
        if (i == 0 || value[order[i]] != value[order[i - 1]])
            sample.groupValue.push_back(value.high[order[i]]);
        sample.group[order[i]] = static_cast<std::int32_t>(sample.groupValue.size()) - 1;
    }
}

void groupByGrid(Sample& sample, std::span<const std::int64_t> grid, int scale) {
    sample.group.resize(grid.size());
    if (grid.empty())
        return;
    const auto [low, high] = std::minmax_element(grid.begin(), grid.end());
    const std::uint64_t range = static_cast<std::uint64_t>(*high) - static_cast<std::uint64_t>(*low) + 1;
    if (range <= WidestTable * grid.size())
        groupByTable(sample, grid, scale, *low, range);
    else if (const int rowBits = bitsOf(grid.size()), keyBits = bitsOf(range - 1); rowBits + keyBits <= 64)
        groupByDigits(sample, grid, scale, *low, rowBits, keyBits);
    else
        groupBySorting(sample, grid, scale);
}

} // namespace spanwright
