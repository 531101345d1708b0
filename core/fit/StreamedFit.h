// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"

#include <cstdint>
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

enum class StreamedConstant { With, Without };

/// A polynomial through very many readings with equal weights; ordinates in units of their grid.
struct StreamedFit {
    StreamSums sums;
    StreamedConstant constant = StreamedConstant::With;
    std::vector<DoubleDouble> beta;        ///< of T_j(t), or of x·T_j(t) without a constant
    std::vector<DoubleDouble> inverseRoot; ///< as in LinearSolution
    DoubleDouble residualSs = 0.0, totalSs = 0.0;

    [[nodiscard]] std::size_t terms() const { return beta.size(); }
};

/// Least squares on 64-bit grids: moments and residuals in two passes of streamed doubles with block sums in double-double, the normal equations in the Chebyshev basis solved in double-double by Cholesky, one refinement from the
/// residuals (Björck, Numerical Methods for Least Squares Problems, 2.9.2). About 13 digits of the coefficients, 14 of their
/// uncertainties. The same bits for any number of `threads` and any processor. Empty when a grid spans 2^51 or more, or when the
/// moments lose more than half of their digits: then the readings need double-double throughout.
std::optional<StreamedFit> fitStreamed(const GridColumn& x, const GridColumn& y, int degree, StreamedConstant constant, unsigned threads);

/// Residuals in the user's unit and leverages of the readings of a streamed fit, in the order given.
struct StreamedRows {
    std::vector<double> residual, leverage;
};
StreamedRows streamedRows(const StreamedFit& fit, const GridColumn& x, const GridColumn& y, unsigned threads);

/// The same fit without one of its readings, or with one more, from the sums alone: β ∓ G⁻¹φ e/(1 ∓ h), Σe² ∓ e²/(1 ∓ h), and a new
/// Cholesky factor of G ∓ φφᵀ. Independent of the number of readings.
enum class StreamedChange { Exclude, Include };
std::optional<StreamedFit> changedBy(const StreamedFit& fit, StreamedChange change, std::int64_t x, std::int64_t y);

} // namespace spanwright
