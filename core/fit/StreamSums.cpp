// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/StreamSums.h"

#include "core/base/Decimal.h"
#include "core/base/Parallel.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr std::size_t BlockSize = 512, ChunkSize = 128 * BlockSize;
constexpr std::uint64_t WidestGrid = std::uint64_t{1} << 51;
/// The extremes of some readings, enough to place t and v; all of them are known after the first pass.
StreamRange guessedRange(std::span<const std::int64_t> grid) {
    constexpr std::size_t Looked = 4096;
    const std::size_t step = std::max<std::size_t>(1, grid.size() / Looked);
    StreamRange range{grid.front(), grid.front(), 0};
    for (std::size_t i = 0; i < grid.size(); i += step) {
        range.low = std::min<long>(range.low, grid[i]);
        range.high = std::max<long>(range.high, grid[i]);
    }
    return range;
}

StreamMap mapOver(const StreamRange& x, const StreamRange& y, int xScale, int yScale) {
    StreamMap map{x.low + (x.high - x.low) / 2, y.low + (y.high - y.low) / 2, 1.0, xScale, yScale};
    if (x.high > x.low)
        map.xStep = 2.0 / static_cast<double>(x.high - x.low);
    return map;
}

/// Moments with t over `guess`, and the range that there was.
struct Gathered {
    StreamSums sums;
    StreamRange range;
};

Gathered gatheredOver(const StreamMap& map, const GridColumn& x, const GridColumn& y, int degree, unsigned threads) {
    const auto d = static_cast<std::size_t>(degree);
    const auto kernel = streamKernel().moments[d];
    std::vector<StreamRange> ranges((x.grid.size() + ChunkSize - 1) / ChunkSize, {x.grid.front(), x.grid.front(), 0});
    const BlockSum sum = [&](const StreamBlock& block, double* out, std::size_t chunk) {
        kernel(block, out, ranges[chunk]);
    };
    const auto all = streamedSums(map, x, y, 3 * d + 3, sum, threads);
    const auto from = [&](std::size_t at) { return all.begin() + static_cast<std::ptrdiff_t>(at); };
    Gathered gathered{{degree, map, x.grid.size(), 0, 0, {}, {}, all.back()}, ranges.front()};
    for (const StreamRange& range : ranges) {
        gathered.range.low = std::min(gathered.range.low, range.low);
        gathered.range.high = std::max(gathered.range.high, range.high);
        gathered.range.wide |= range.wide;
    }
    gathered.sums.lowX = gathered.range.low;
    gathered.sums.highX = gathered.range.high;
    gathered.sums.moment.assign(from(0), from(2 * d + 1));
    gathered.sums.cross.assign(from(2 * d + 1), from(3 * d + 2));
    return gathered;
}

} // namespace

DoubleDouble StreamMap::centre() const {
    return toDoubleDouble(x0) * powerOfTen(-xScale);
}
DoubleDouble StreamMap::half() const {
    return powerOfTen(-xScale) / xStep;
}
DoubleDouble StreamMap::offset() const {
    return toDoubleDouble(y0);
}
DoubleDouble StreamMap::unit() const {
    return powerOfTen(-yScale);
}
DoubleDouble StreamMap::v(std::int64_t y) const {
    return toDoubleDouble(y - y0);
}

StreamBlock streamBlock(const StreamMap& map, const std::int64_t* x, const std::int64_t* y, std::size_t n) {
    return {asLong(x), asLong(y), n, map.x0, map.y0, map.xStep, toDouble(map.unit())};
}

std::vector<DoubleDouble> streamedSums(const StreamMap& map, const GridColumn& x, const GridColumn& y,
                                       std::size_t width, const BlockSum& kernel, unsigned threads) {
    const std::size_t n = x.grid.size(), chunks = (n + ChunkSize - 1) / ChunkSize;
    std::vector<DoubleDouble> totals(chunks * width, 0.0);
    const auto chunk = [&](std::size_t c) {
        double sums[64];
        const std::size_t end = std::min(n, (c + 1) * ChunkSize);
        for (std::size_t from = c * ChunkSize; from < end; from += BlockSize) {
            const std::size_t count = std::min(BlockSize, end - from), whole = count - count % 4;
            if (whole > 0) {
                kernel(streamBlock(map, x.grid.data() + from, y.grid.data() + from, whole), sums, c);
                for (std::size_t k = 0; k < width; ++k)
                    totals[c * width + k] += sums[k];
            }
            for (std::size_t i = from + whole; i < end && i < from + count; ++i) {
                // A last reading alone: four of it, a quarter of the sums.
                const std::int64_t mx[4] = {x.grid[i], x.grid[i], x.grid[i], x.grid[i]};
                const std::int64_t my[4] = {y.grid[i], y.grid[i], y.grid[i], y.grid[i]};
                kernel(streamBlock(map, mx, my, 4), sums, c);
                for (std::size_t k = 0; k < width; ++k)
                    totals[c * width + k] += sums[k] / 4;
            }
        }
    };
    const auto part = [&](unsigned which) {
        for (std::size_t c = which; c < chunks; c += threads)
            chunk(c);
    };
    inParallel(threads, part);
    std::vector<DoubleDouble> sum(width, 0.0);
    for (std::size_t c = 0; c < chunks; ++c)
        for (std::size_t k = 0; k < width; ++k)
            sum[k] += totals[c * width + k];
    return sum;
}

DoubleDouble productSum(const StreamSums& sums, std::size_t j, std::size_t k) {
    return (sums.moment[j + k] + sums.moment[j > k ? j - k : k - j]) * 0.5;
}

std::optional<StreamSums> gatherSums(const GridColumn& x, const GridColumn& y, int degree, unsigned threads) {
    const auto tooWide = [](std::int64_t low, std::int64_t high) {
        return static_cast<std::uint64_t>(high) - static_cast<std::uint64_t>(low) >= WidestGrid;
    };
    const StreamRange guess = guessedRange(x.grid), guessY = guessedRange(y.grid);
    if (tooWide(guess.low, guess.high) || tooWide(guessY.low, guessY.high))
        return std::nullopt;
    StreamMap map = mapOver(guess, guessY, x.scale, y.scale);
    Gathered first = gatheredOver(map, x, y, degree, threads);
    const StreamRange& range = first.range;
    if (tooWide(range.low, range.high) || (range.wide >> 52) != 0 || (degree > 0 && range.high == range.low))
        return std::nullopt;
    // Readings far outside the guess would make the Chebyshev polynomials grow: once more, over the whole range.
    const double beyond =
        std::max(static_cast<double>(range.high - map.x0), static_cast<double>(map.x0 - range.low)) * map.xStep;
    if (beyond <= 1.02)
        return std::move(first.sums);
    return gatheredOver(mapOver(range, guessY, x.scale, y.scale), x, y, degree, threads).sums;
}

} // namespace spanwright
