// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"

#include <cstddef>
#include <optional>
#include <span>
#include <vector>

namespace spanwright {

/// L with A = L Lᵀ of a symmetric matrix of n rows.
struct CholeskyFactor {
    std::size_t n = 0;
    std::vector<DoubleDouble> lower;     ///< n × n, row by row
    std::optional<std::size_t> lostRow;  ///< the first that has nothing of its own left; then A is not positive definite
};

/// In double-double, of the lower triangle of `matrix`, n × n, row by row (Golub and Van Loan, Matrix Computations, 4.2.5). A row
/// is lost when less than 10⁻²⁶ of its variance is left by the rows before it.
CholeskyFactor cholesky(std::vector<DoubleDouble> matrix, std::size_t n);

/// L⁻¹ v in the place of v.
void solveLower(const CholeskyFactor& factor, std::span<DoubleDouble> v);
/// A⁻¹ v in the place of v.
void solveSymmetric(const CholeskyFactor& factor, std::span<DoubleDouble> v);

} // namespace spanwright
