// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"
#include "core/fit/StreamKernel.h"

#include <cstdint>
#include <functional>
#include <optional>
#include <span>
#include <vector>

namespace spanwright {

/// A column on its decimal grid: value = integer · 10^(−scale).
struct GridColumn {
    std::span<const std::int64_t> grid;
    int scale = 0;
};

/// How the grids are mapped: t = (m_x − x0)·xStep in about [−1, 1] and v = m_y − y0, an exact
/// integer. Ordinates are counted in units of their grid, unit() of which is one, until they are reported.
struct StreamMap {
    std::int64_t x0 = 0, y0 = 0;
    double xStep = 1;
    int xScale = 0, yScale = 0;

    [[nodiscard]] DoubleDouble centre() const; ///< abscissa at t = 0
    [[nodiscard]] DoubleDouble half() const;   ///< abscissa from t = 0 to t = 1
    [[nodiscard]] DoubleDouble offset() const; ///< ordinate at v = 0, in units of the grid
    [[nodiscard]] DoubleDouble unit() const;   ///< 10^(−scale) of the ordinate
    [[nodiscard]] double t(std::int64_t x) const { return static_cast<double>(x - x0) * xStep; }
    [[nodiscard]] DoubleDouble v(std::int64_t y) const;
};

/// Sums that determine a polynomial through very many readings, in Chebyshev polynomials T_j of t.
struct StreamSums {
    int degree = 1;
    StreamMap map;
    std::size_t n = 0;
    std::int64_t lowX = 0, highX = 0;
    std::vector<DoubleDouble> moment; ///< Σ T_j, j = 0…2·degree
    std::vector<DoubleDouble> cross;  ///< Σ T_j v, j = 0…degree
    DoubleDouble square = 0.0;        ///< Σ v²
};

/// First pass. Empty when a grid spans 2^51 or more, or when a function that is not constant has one abscissa only.
std::optional<StreamSums> gatherSums(const GridColumn& x, const GridColumn& y, int degree, unsigned threads);

/// Σ T_j T_k = (Σ T_{j+k} + Σ T_{|j−k|})/2
DoubleDouble productSum(const StreamSums& sums, std::size_t j, std::size_t k);

/// Readings from x and y on, of which there are n, as the kernel takes them.
StreamBlock streamBlock(const StreamMap& map, const std::int64_t* x, const std::int64_t* y, std::size_t n);

/// The sums of `width` figures that `kernel` gives for a block; it also gets the number of the chunk. Blocks in double,
/// chunks of blocks in double-double and in order, so that the number of threads does not show.
using BlockSum = std::function<void(const StreamBlock&, double*, std::size_t)>;
std::vector<DoubleDouble> streamedSums(const StreamMap& map, const GridColumn& x, const GridColumn& y,
                                       std::size_t width, const BlockSum& kernel, unsigned threads);

} // namespace spanwright
