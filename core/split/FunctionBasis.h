// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"

#include <cstddef>
#include <span>
#include <vector>

namespace spanwright {

/// Columns that span the functions near a fitted one, at given abscissae: for a polynomial, powers of the abscissa centred and
/// scaled to [−1, 1] (scaled only, without a constant); for any other, the derivatives of its value by its coefficients. The space
/// is what counts, for hat matrices and nested models; the coefficients are not those of the function. Column by column,
/// `terms` of them.
struct FunctionBasis {
    std::size_t rows = 0, terms = 0;
    std::vector<double> columns;
    bool linear = true; ///< in its coefficients: the columns do not depend on the fit, and what is computed from them is exact

    [[nodiscard]] bool empty() const { return terms == 0; }
    [[nodiscard]] std::span<const double> column(std::size_t j) const { return {columns.data() + j * rows, rows}; }
};

/// Whether the function is a polynomial, so that its columns cost little.
[[nodiscard]] bool spannedByPowers(const FunctionChoice& function);

[[nodiscard]] FunctionBasis functionBasis(const Fit& fit, std::span<const double> abscissa);

} // namespace spanwright
