// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Influence.h"

#include "core/base/ClassSums.h"

#include <cmath>
#include <limits>

namespace spanwright {

namespace {

/// Below this 1 − h is made of rounding: the function passes through the reading whatever it is.
constexpr double leastRest = 1e-13;

} // namespace

Influence::Influence(const Residuals& residuals, int terms)
    : freedom_(static_cast<double>(residuals.e.size()) - terms), terms_(terms) {
    if (freedom_ <= 0 || residuals.leverage.size() != residuals.e.size())
        return;
    const double* e = residuals.e.high.data();
    const double* w = residuals.weight.empty() ? nullptr : residuals.weight.high.data();
    const auto sum = sumInHalves<1>(residuals.e.size(), [e, w](auto i) {
        const auto square = at(e, i) * at(e, i);
        return std::array{w == nullptr ? square : at(w, i) * square};
    });
    variance_ = sum[0] / freedom_;
}

InfluenceFigures Influence::of(double e, double h, double w) const {
    constexpr double none = std::numeric_limits<double>::quiet_NaN();
    const double rest = 1 - h;
    if (!(variance_ > 0) || !(rest >= leastRest))
        return {none, none, none};
    const double r = e * std::sqrt(w / (variance_ * rest));
    const bool others = freedom_ > 1 && freedom_ > r * r;
    return {r, others ? r * std::sqrt((freedom_ - 1) / (freedom_ - r * r)) : none, r * r * h / (terms_ * rest)};
}

} // namespace spanwright
