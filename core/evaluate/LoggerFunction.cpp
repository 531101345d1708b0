// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/LoggerFunction.h"

#include <cmath>
#include <limits>

namespace spanwright {

namespace {

using F = FunctionFamily;

constexpr int Halvings = 60;

} // namespace

bool isPolynomial(FunctionFamily family) {
    return family == F::Constant || family == F::Line || family == F::Proportional || family == F::Polynomial ||
           family == F::PolynomialNoConstant;
}

bool LoggerFunction::withoutConstant() const {
    return !constants_.centre && (function_.family == F::Proportional || function_.family == F::PolynomialNoConstant);
}

double LoggerFunction::value(double x) const {
    const std::vector<double>& n = numbers_;
    switch (function_.family) {
    case F::Constant:
    case F::Line:
    case F::Proportional:
    case F::Polynomial:
    case F::PolynomialNoConstant: return polynomial(x);
    case F::SquareRoot: return n[0] + n[1] * std::sqrt(x);
    case F::Logarithmic: return n[0] + n[1] * std::log10(x);
    case F::Power: return n[0] * std::pow(x, n[1]);
    case F::ExponentialApproach: return n[0] - n[1] * std::exp(-x / n[2]);
    case F::CallendarVanDusen: {
        const double t = x - constants_.zeroCelsius;
        const double below = n.size() > 3 && t < 0 ? n[3] * (t - 100.0) * t : 0.0;
        return n[0] * (1.0 + t * (n[1] + t * (n[2] + below)));
    }
    case F::ThermistorB: return n[0] * std::exp(n[1] * (1.0 / (x - constants_.zeroCelsius + 273.15) - 1.0 / 298.15));
    case F::SteinhartHart: {
        const double l = std::log(x);
        const double cubic = n.size() > 2 ? n[2] : 0.0, square = n.size() > 3 ? n[3] : 0.0;
        return 1.0 / (n[0] + l * (n[1] + l * (square + l * cubic))) - 273.15 + constants_.zeroCelsius;
    }
    case F::Nernst: return n[0] + n[1] * (7.0 - x);
    case F::Table: return table(x, 0, 1);
    }
    return std::numeric_limits<double>::quiet_NaN();
}

bool LoggerFunction::hasClosedInverse() const {
    switch (function_.family) {
    case F::Constant:
    case F::SteinhartHart: return false;
    case F::Polynomial:
    case F::PolynomialNoConstant: return function_.order <= 2;
    case F::CallendarVanDusen: return numbers_.size() == 3;
    default: return true;
    }
}

double LoggerFunction::inverse(double y) const {
    const std::vector<double>& n = numbers_;
    switch (function_.family) {
    case F::Line:
    case F::Proportional:
    case F::Polynomial:
    case F::PolynomialNoConstant: return polynomialInverse(y);
    case F::SquareRoot: {
        const double root = (y - n[0]) / n[1];
        return root * root;
    }
    case F::Logarithmic: return std::pow(10.0, (y - n[0]) / n[1]);
    case F::Power: return std::pow(y / n[0], 1.0 / n[1]);
    case F::ExponentialApproach: return -n[2] * std::log((n[0] - y) / n[1]);
    case F::CallendarVanDusen: {
        const double excess = y / n[0] - 1.0;
        return 2.0 * excess / (n[1] + std::sqrt(n[1] * n[1] + 4.0 * n[2] * excess)) + constants_.zeroCelsius;
    }
    case F::ThermistorB: return 1.0 / (1.0 / 298.15 + std::log(y / n[0]) / n[1]) - 273.15 + constants_.zeroCelsius;
    case F::Nernst: return 7.0 - (y - n[0]) / n[1];
    case F::Table: return table(y, 1, 0);
    case F::Constant:
    case F::SteinhartHart: break;
    }
    return std::numeric_limits<double>::quiet_NaN();
}

double LoggerFunction::halvedInverse(double y, double low, double high) const {
    for (int i = 0; i < Halvings; ++i) {
        const double middle = 0.5 * (low + high);
        (constants_.slopeSign * (y - value(middle)) > 0 ? low : high) = middle;
    }
    return 0.5 * (low + high);
}

double LoggerFunction::polynomial(double x) const {
    const double u = x - constants_.centre.value_or(0.0);
    double sum = 0;
    for (std::size_t k = numbers_.size(); k-- > 0;)
        sum = numbers_[k] + u * sum;
    return withoutConstant() ? u * sum : sum;
}

bool LoggerFunction::rationalRoot() const {
    const double b1 = numbers_[withoutConstant() ? 0 : 1];
    return b1 * constants_.slopeSign > 0;
}

double LoggerFunction::polynomialInverse(double y) const {
    const std::size_t first = withoutConstant() ? 0 : 1;
    const double b0 = withoutConstant() ? 0.0 : numbers_[0], b1 = numbers_[first];
    const double centre = constants_.centre.value_or(0.0);
    if (numbers_.size() == first + 1)
        return (y - b0) / b1 + centre;
    const double b2 = numbers_[first + 1];
    const double root = constants_.slopeSign * std::sqrt(b1 * b1 + 4.0 * b2 * (y - b0));
    return (rationalRoot() ? 2.0 * (y - b0) / (b1 + root) : (root - b1) / (2.0 * b2)) + centre;
}

/// On the line through the two knots between which `from` lies; beyond the ends the outer lines go on. `known`, `wanted`: 0 for x, 1
/// for y.
double LoggerFunction::table(double from, std::size_t known, std::size_t wanted) const {
    const double sign = known == 0 ? 1.0 : constants_.slopeSign;
    std::size_t i = 0;
    while (2 * i + 4 < numbers_.size() && sign * from >= sign * numbers_[2 * (i + 1) + known])
        ++i;
    const double* here = &numbers_[2 * i];
    return here[wanted] + (from - here[known]) / (here[2 + known] - here[known]) * (here[2 + wanted] - here[wanted]);
}

} // namespace spanwright
