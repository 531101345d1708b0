// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/StreamSums.h"

#include <cstdint>
#include <optional>
#include <vector>

namespace spanwright {

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

/// Least squares on 64-bit grids: moments and residuals in two passes of streamed doubles with block sums in
/// double-double, the normal equations in the Chebyshev basis solved in double-double by Cholesky, one refinement from
/// the residuals (Björck, Numerical Methods for Least Squares Problems, 2.9.2). About 13 digits of the coefficients, 14
/// of their uncertainties. The same bits for any number of `threads` and any processor. Empty when a grid spans 2^51 or
/// more, or when the moments lose more than half of their digits: then the readings need double-double throughout.
std::optional<StreamedFit> fitStreamed(const GridColumn& x, const GridColumn& y, int degree, StreamedConstant constant,
                                       unsigned threads);

/// Residuals in the user's unit and leverages of the readings of a streamed fit, in the order given.
struct StreamedRows {
    std::vector<double> residual, leverage;
};
StreamedRows streamedRows(const StreamedFit& fit, const GridColumn& x, const GridColumn& y, unsigned threads);

/// The same fit without one of its readings, or with one more, from the sums alone: β ∓ G⁻¹φ e/(1 ∓ h), Σe² ∓ e²/(1 ∓
/// h), and a new Cholesky factor of G ∓ φφᵀ. Independent of the number of readings.
enum class StreamedChange { Exclude, Include };
std::optional<StreamedFit> changedBy(const StreamedFit& fit, StreamedChange change, std::int64_t x, std::int64_t y);

} // namespace spanwright
