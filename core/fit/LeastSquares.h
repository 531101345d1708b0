// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"

#include <cstddef>
#include <vector>

namespace spanwright {

/// min over β of Σ w (y − A β)², n readings, p coefficients, all in double-double.
struct LinearProblem {
    std::size_t terms = 0;
    std::vector<DoubleDouble> design;     ///< A, n × p, column by column
    std::vector<DoubleDouble> ordinate;   ///< y
    std::vector<DoubleDouble> rootWeight; ///< √w; empty: all 1

    [[nodiscard]] std::size_t size() const { return ordinate.size(); }
};

struct LinearSolution {
    std::vector<DoubleDouble> beta;
    std::vector<DoubleDouble> inverseRoot; ///< R⁻¹, p × p, row by row, upper: (AᵀWA)⁻¹ = R⁻¹R⁻ᵀ
    std::vector<DoubleDouble> residual;    ///< e = y − A β, unit of y
    std::vector<double> leverage;          ///< h_ii = w_i ‖a_iᵀ R⁻¹‖²
    DoubleDouble residualSs = 0.0;         ///< Σ w e²
    std::vector<std::size_t> lostTerms;    ///< columns that depend on the ones before; when any, only these are filled
};

/// Householder QR of √W·A without pivoting (Golub and Van Loan, Matrix Computations, 5.2 and 5.3), so a lost term is
/// named as the first that adds nothing to those before it: |R_kk| below 10⁻²⁴ of its column. Requires n ≥ p.
LinearSolution solveLeastSquares(const LinearProblem& problem);

/// (AᵀWA)⁻¹ from its root, p × p, row by row.
std::vector<DoubleDouble> unscaledCovariance(const std::vector<DoubleDouble>& inverseRoot, std::size_t terms);

} // namespace spanwright
