// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/SetPoints.h"

#include "core/base/ClassSums.h"
#include "core/fit/StreamKernel.h"

#include <algorithm>
#include <array>
#include <atomic>
#include <bit>
#include <numeric>

namespace spanwright {

namespace {

/// Bits a reading that a map of all values between the ends may take.
constexpr std::uint64_t WidestMap = 64;

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

/// The different values met so far, at most `Most`, each with a number; an open-addressed table.
class FewValues {
  public:
    static constexpr std::int32_t Most = 1024;

    FewValues() { numbers_.fill(-1); }

    /// Number of a value; −1 when there are too many.
    std::int32_t numberOf(std::int64_t value) {
        std::size_t place = (static_cast<std::uint64_t>(value) * 0x9e3779b97f4a7c15u) >> (64 - PlaceBits);
        while (numbers_[place] >= 0) {
            if (held_[place] == value)
                return numbers_[place];
            place = (place + 1) % held_.size();
        }
        if (values_.size() == static_cast<std::size_t>(Most))
            return -1;
        held_[place] = value;
        numbers_[place] = static_cast<std::int32_t>(values_.size());
        values_.push_back(value);
        return numbers_[place];
    }
    [[nodiscard]] const std::vector<std::int64_t>& values() const { return values_; }

  private:
    static constexpr int PlaceBits = 12;
    std::array<std::int64_t, std::size_t{1} << PlaceBits> held_{};
    std::array<std::int32_t, std::size_t{1} << PlaceBits> numbers_{};
    std::vector<std::int64_t> values_;
};

/// Numbers the values from `first` to `last` in the order met; false when there are too many different ones.
bool numberFew(FewValues& few, std::span<const std::int64_t> grid, std::size_t first, std::size_t last, std::vector<std::int32_t>& group) {
    std::int64_t before = grid[first];
    std::int32_t number = few.numberOf(before);
    for (std::size_t i = first; i < last; ++i) {
        if (grid[i] != before) {
            before = grid[i];
            number = few.numberOf(before);
            if (number < 0)
                return false;
        }
        group[i] = number;
    }
    return true;
}

/// False, and nothing done that counts, when there are too many set points for it.
bool groupByFew(Sample& sample, std::span<const std::int64_t> grid, int scale) {
    std::array<FewValues, 2> few;
    std::atomic<bool> held = true;
    inHalves(grid.size(), [&](std::size_t first, std::size_t last) {
        if (!numberFew(few[first == 0 ? 0 : 1], grid, first, last, sample.group))
            held = false;
    });
    std::vector<std::int64_t> rising;
    for (const FewValues& half : few)
        rising.insert(rising.end(), half.values().begin(), half.values().end());
    std::sort(rising.begin(), rising.end());
    rising.erase(std::unique(rising.begin(), rising.end()), rising.end());
    if (!held || rising.size() > static_cast<std::size_t>(FewValues::Most))
        return false;
    const GridValue valueOf(scale);
    for (const std::int64_t value : rising)
        sample.groupValue.push_back(valueOf(value));
    inHalves(grid.size(), [&](std::size_t first, std::size_t last) {
        std::vector<std::int32_t> rank;
        for (const std::int64_t value : few[first == 0 ? 0 : 1].values())
            rank.push_back(static_cast<std::int32_t>(std::lower_bound(rising.begin(), rising.end(), value) - rising.begin()));
        if (std::is_sorted(rank.begin(), rank.end()) && rank.back() + 1 == static_cast<std::int32_t>(rank.size()))
            return; // as numbered
        for (std::size_t i = first; i < last; ++i)
            sample.group[i] = rank[static_cast<std::size_t>(sample.group[i])];
    });
    return true;
}

/// Values that occur among 64 neighbours, one bit each.
struct MapWord {
    unsigned long values = 0;
    void operator+=(const MapWord& other) { values |= other.values; }
};
static_assert(sizeof(MapWord) == sizeof(std::uint64_t));

/// One bit for each value between the ends, set where a reading has it: the number of bits below is the set point.
void groupByMap(Sample& sample, std::span<const std::int64_t> grid, int scale, std::int64_t low, std::uint64_t range) {
    const GridValue valueOf(scale);
    const std::vector<MapWord> map = classSums<MapWord>(grid.size(), range / 64 + 1, [&](std::vector<MapWord>& words, std::size_t first, std::size_t last) {
        for (std::size_t i = first; i < last; ++i) {
            const std::uint64_t place = static_cast<std::uint64_t>(grid[i]) - static_cast<std::uint64_t>(low);
            words[place / 64].values |= 1ul << (place % 64);
        }
    });
    std::vector<std::int32_t> below(map.size() + 1, 0);
    for (std::size_t word = 0; word < map.size(); ++word)
        below[word + 1] = below[word] + std::popcount(map[word].values);
    sample.groupValue.resize(static_cast<std::size_t>(below.back()));
    auto values = beside(grid.size(), [&] {
        double* next = sample.groupValue.data();
        for (std::size_t word = 0; word < map.size(); ++word)
            for (std::uint64_t left = map[word].values; left != 0; left &= left - 1)
                *next++ = valueOf(low + static_cast<std::int64_t>(64 * word + static_cast<std::size_t>(std::countr_zero(left))));
    });
    inHalves(grid.size(), [&](std::size_t first, std::size_t last) {
        streamKernel().ranks(asLong(grid.data() + first), last - first, low, &map.front().values, below.data(), sample.group.data() + first);
    });
    values.get();
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
    if (groupByFew(sample, grid, scale))
        return;
    const auto [low, high] = boundsInHalves(grid.size(), [&](std::size_t i) { return grid[i]; });
    const std::uint64_t range = static_cast<std::uint64_t>(high) - static_cast<std::uint64_t>(low) + 1;
    if (range - 1 < WidestMap * grid.size())
        groupByMap(sample, grid, scale, low, range);
    else if (const int rowBits = bitsOf(grid.size()), keyBits = bitsOf(range - 1); rowBits + keyBits <= 64)
        groupByDigits(sample, grid, scale, low, rowBits, keyBits);
    else
        groupBySorting(sample, grid, scale);
}

} // namespace spanwright
