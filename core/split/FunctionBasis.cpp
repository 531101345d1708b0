// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/FunctionBasis.h"

#include "core/fit/CalibrationFunction.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

/// Lowest and highest power of a polynomial; highest < lowest when it is none.
struct Powers {
    int lowest = 0, highest = -1;
};

Powers powersOf(const FunctionChoice& function) {
    switch (function.family) {
    case FunctionFamily::Constant:
        return {0, 0};
    case FunctionFamily::Line:
        return {0, 1};
    case FunctionFamily::Proportional:
        return {1, 1};
    case FunctionFamily::Polynomial:
        return {0, function.order};
    case FunctionFamily::PolynomialNoConstant:
        return {1, function.order};
    default:
        return {};
    }
}

FunctionBasis powerBasis(const Powers& powers, std::span<const double> abscissa) {
    FunctionBasis basis;
    basis.rows = abscissa.size();
    basis.terms = static_cast<std::size_t>(powers.highest - powers.lowest + 1);
    basis.columns.resize(basis.rows * basis.terms);
    const auto [low, high] = std::minmax_element(abscissa.begin(), abscissa.end());
    const double middle = powers.lowest == 0 ? (*low + *high) / 2 : 0;
    const double half = powers.lowest == 0 ? (*high - *low) / 2 : std::max(std::abs(*low), std::abs(*high));
    const double scale = half > 0 ? 1 / half : 1;
    for (std::size_t i = 0; i < basis.rows; ++i) {
        const double x = (abscissa[i] - middle) * scale;
        double power = powers.lowest == 0 ? 1 : x;
        for (std::size_t j = 0; j < basis.terms; ++j) {
            basis.columns[j * basis.rows + i] = power;
            power *= x;
        }
    }
    return basis;
}

FunctionBasis gradientBasis(const Fit& fit, std::span<const double> abscissa) {
    FunctionBasis basis;
    basis.linear = factsOf(fit.function.family).linear;
    basis.rows = abscissa.size();
    for (std::size_t i = 0; i < basis.rows; ++i) {
        const std::vector<double> gradient = fit.curve->gradient(abscissa[i]);
        if (i == 0) {
            basis.terms = gradient.size();
            basis.columns.resize(basis.rows * basis.terms);
        }
        for (std::size_t j = 0; j < basis.terms; ++j)
            basis.columns[j * basis.rows + i] = gradient[j];
    }
    return basis;
}

} // namespace

bool spannedByPowers(const FunctionChoice& function) {
    const Powers powers = powersOf(function);
    return powers.highest >= powers.lowest;
}

FunctionBasis functionBasis(const Fit& fit, std::span<const double> abscissa) {
    if (abscissa.empty())
        return {};
    return spannedByPowers(fit.function) ? powerBasis(powersOf(fit.function), abscissa) : gradientBasis(fit, abscissa);
}

} // namespace spanwright
