// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/Cholesky.h"

namespace spanwright {

namespace {

constexpr double LostBelow = 1e-26;

} // namespace

CholeskyFactor cholesky(std::vector<DoubleDouble> matrix, std::size_t n) {
    CholeskyFactor factor{n, std::move(matrix), {}};
    std::vector<DoubleDouble>& l = factor.lower;
    for (std::size_t i = 0; i < n; ++i) {
        const DoubleDouble variance = l[i * n + i];
        for (std::size_t j = 0; j <= i; ++j) {
            DoubleDouble sum = l[i * n + j];
            for (std::size_t k = 0; k < j; ++k)
                sum -= l[i * n + k] * l[j * n + k];
            if (j < i) {
                l[i * n + j] = sum / l[j * n + j];
                continue;
            }
            if (!(sum > variance * LostBelow && sum > 0.0)) {
                factor.lostRow = i;
                return factor;
            }
            l[i * n + i] = sqrt(sum);
        }
        for (std::size_t j = i + 1; j < n; ++j)
            l[i * n + j] = 0.0;
    }
    return factor;
}

void solveLower(const CholeskyFactor& factor, std::span<DoubleDouble> v) {
    const std::size_t n = factor.n;
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t k = 0; k < i; ++k)
            v[i] -= factor.lower[i * n + k] * v[k];
        v[i] /= factor.lower[i * n + i];
    }
}

void solveSymmetric(const CholeskyFactor& factor, std::span<DoubleDouble> v) {
    const std::size_t n = factor.n;
    solveLower(factor, v);
    for (std::size_t i = n; i-- > 0;) {
        for (std::size_t k = i + 1; k < n; ++k)
            v[i] -= factor.lower[k * n + i] * v[k];
        v[i] /= factor.lower[i * n + i];
    }
}

} // namespace spanwright
