// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Choices.h"

#include <cstddef>
#include <span>
#include <vector>

namespace spanwright {

/// Columns that span a calibration function that is linear in its coefficients, at given abscissae: powers of the
/// abscissa centred and scaled to [−1, 1] (scaled only, without a constant). The space is what counts, for hat matrices
/// and nested models; the coefficients are not those of the function. Column by column, `terms` of them; empty when the
/// function is not of this kind.
struct FunctionBasis {
    std::size_t rows = 0, terms = 0;
    std::vector<double> columns;

    [[nodiscard]] bool empty() const { return terms == 0; }
    [[nodiscard]] std::span<const double> column(std::size_t j) const { return {columns.data() + j * rows, rows}; }
};

[[nodiscard]] FunctionBasis functionBasis(const FunctionChoice& function, std::span<const double> abscissa);

/// Whether functionBasis() knows the function.
[[nodiscard]] bool hasFunctionBasis(const FunctionChoice& function);

} // namespace spanwright
