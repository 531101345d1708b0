// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Influence.h"

#include <cmath>
#include <limits>

namespace spanwright {

Influence influence(const Residuals& residuals, int terms) {
    const std::size_t n = residuals.e.size();
    constexpr double none = std::numeric_limits<double>::quiet_NaN();
    Influence result{std::vector<double>(n, none), std::vector<double>(n, none), std::vector<double>(n, none)};
    const double freedom = static_cast<double>(n) - terms;
    if (freedom <= 0 || residuals.leverage.size() != n)
        return result;
    const double* e = residuals.e.high.data();
    const double* w = residuals.weight.empty() ? nullptr : residuals.weight.high.data();
    double sum = 0;
    for (std::size_t i = 0; i < n; ++i)
        sum += w ? w[i] * e[i] * e[i] : e[i] * e[i];
    const double variance = sum / freedom;
    if (!(variance > 0))
        return result;
    for (std::size_t i = 0; i < n; ++i) {
        const double h = residuals.leverage[i];
        const double rest = 1 - h;
        if (rest < 1e-13)
            continue;
        const double scale = w ? w[i] / (variance * rest) : 1 / (variance * rest);
        const double r = e[i] * std::sqrt(scale);
        result.standardised[i] = r;
        if (freedom > 1 && freedom > r * r)
            result.studentised[i] = r * std::sqrt((freedom - 1) / (freedom - r * r));
        result.cook[i] = r * r * h / (terms * rest);
    }
    return result;
}

} // namespace spanwright
