// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/CalibrationFunction.h"

namespace spanwright {

namespace {

std::string raised(const std::string& unit, int power) {
    static const char* const superscript[] = {"⁰", "", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹", "¹⁰"};
    const bool compound = unit.find_first_of("/·*^ ") != std::string::npos;
    return (compound ? "(" + unit + ")" : unit) + superscript[power];
}

/// ordinate/abscissa^power
std::string quotientUnit(const std::string& ordinate, const std::string& abscissa, int power) {
    if (power == 0 || abscissa.empty())
        return ordinate;
    return (ordinate.empty() ? "1" : ordinate) + "/" + raised(abscissa, power);
}

} // namespace

std::vector<CoefficientName> coefficientNames(const FunctionChoice& choice, const std::string& abscissaUnit,
                                              const std::string& ordinateUnit) {
    const bool constant = choice.family != FunctionFamily::Proportional && choice.family != FunctionFamily::PolynomialNoConstant;
    const int count = static_cast<int>(coefficientCount(choice));
    std::vector<CoefficientName> names;
    for (int i = 0; i < count; ++i) {
        const int power = constant ? i : i + 1;
        names.push_back({"b" + std::to_string(power), quotientUnit(ordinateUnit, abscissaUnit, power)});
    }
    return names;
}

std::size_t coefficientCount(const FunctionChoice& choice) {
    switch (choice.family) {
    case FunctionFamily::Constant:
    case FunctionFamily::Proportional:
        return 1;
    case FunctionFamily::Polynomial:
        return static_cast<std::size_t>(choice.order) + 1;
    case FunctionFamily::PolynomialNoConstant:
        return static_cast<std::size_t>(choice.order);
    default:
        return 2;
    }
}

} // namespace spanwright
