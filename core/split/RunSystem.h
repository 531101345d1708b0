// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"

#include <algorithm>
#include <cstddef>
#include <vector>

namespace spanwright {

inline double plain(double value) {
    return value;
}
inline double plain(const DoubleDouble& value) {
    return toDouble(value);
}

/// Symmetric system A ρ = b over the columns "offset of run r" and "slope of run r" within cells, eliminated with the
/// largest pivot first, so that a column which depends on others is found and left at zero.
template <class T>
struct RunSystem {
    std::size_t size = 0;
    std::vector<T> a, b;
    std::vector<char> used;
    std::vector<std::size_t> order;
    T explained = T(0.0);

    explicit RunSystem(std::size_t columns)
        : size(columns), a(columns * columns, T(0.0)), b(columns, T(0.0)), used(columns, 0) {}
    T& at(std::size_t i, std::size_t j) { return a[i * size + j]; }

    /// Eliminates the columns [from, to) as far as they are not dependent on those before; returns the rank added.
    int eliminate(std::size_t from, std::size_t to, const std::vector<double>& scale) {
        int rank = 0;
        for (;;) {
            std::size_t pivot = size;
            double best = 1e-11;
            for (std::size_t j = from; j < to; ++j)
                if (!used[j] && scale[j] > 0 && plain(at(j, j)) / scale[j] > best) {
                    best = plain(at(j, j)) / scale[j];
                    pivot = j;
                }
            if (pivot == size)
                return rank;
            used[pivot] = 1;
            order.push_back(pivot);
            ++rank;
            explained += b[pivot] * b[pivot] / at(pivot, pivot);
            for (std::size_t i = 0; i < size; ++i) {
                if (used[i])
                    continue;
                const T factor = at(i, pivot) / at(pivot, pivot);
                for (std::size_t j = 0; j <= i; ++j)
                    if (!used[j]) {
                        at(i, j) -= factor * at(pivot, j);
                        at(j, i) = at(i, j);
                    }
                b[i] -= factor * b[pivot];
            }
        }
    }

    /// Solution with dependent columns at zero.
    std::vector<double> solve() {
        std::vector<T> x(size, T(0.0));
        for (std::size_t k = order.size(); k-- > 0;) {
            const std::size_t i = order[k];
            T right = b[i];
            for (std::size_t m = k + 1; m < order.size(); ++m)
                right -= at(i, order[m]) * x[order[m]];
            x[i] = right / at(i, i);
        }
        std::vector<double> result(size);
        std::transform(x.begin(), x.end(), result.begin(), [](const T& value) { return plain(value); });
        return result;
    }
};

} // namespace spanwright
