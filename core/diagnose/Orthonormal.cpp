// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Orthonormal.h"

#include <cmath>

namespace spanwright {

double dot(const std::vector<double>& a, const std::vector<double>& b) {
    double sum = 0;
    for (std::size_t i = 0; i < a.size(); ++i)
        sum += a[i] * b[i];
    return sum;
}

std::vector<std::vector<double>> orthonormal(std::vector<std::vector<double>> columns) {
    std::vector<std::vector<double>> basis;
    for (std::vector<double>& v : columns) {
        const double before = dot(v, v);
        for (int pass = 0; pass < 2; ++pass)
            for (const auto& other : basis) {
                const double along = dot(other, v);
                for (std::size_t i = 0; i < v.size(); ++i)
                    v[i] -= along * other[i];
            }
        const double after = dot(v, v);
        if (!(after > 1e-24 * before))
            continue;
        const double scale = 1 / std::sqrt(after);
        for (double& value : v)
            value *= scale;
        basis.push_back(std::move(v));
    }
    return basis;
}

} // namespace spanwright
