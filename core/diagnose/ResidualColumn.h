// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Sample.h"

#include <cmath>
#include <type_traits>
#include <vector>

namespace spanwright {

inline double rounded(double value) {
    return value;
}
inline double rounded(const DoubleDouble& value) {
    return toDouble(value);
}

/// Residuals times the root of their weights, as the type in which a test is computed.
template <class T>
std::vector<T> weightedResiduals(const Residuals& residuals) {
    std::vector<T> u(residuals.e.size());
    for (std::size_t i = 0; i < u.size(); ++i) {
        if constexpr (std::is_same_v<T, double>)
            u[i] = residuals.weight.empty() ? residuals.e.high[i]
                                            : residuals.e.high[i] * std::sqrt(residuals.weight.high[i]);
        else
            u[i] = residuals.weight.empty() ? residuals.e[i] : residuals.e[i] * sqrt(residuals.weight[i]);
    }
    return u;
}

} // namespace spanwright
