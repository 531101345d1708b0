// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/CalibrationFunction.h"

#include <array>

namespace spanwright {

namespace {

using F = FunctionFamily;
constexpr auto Indication = FitDirection::Indication;
constexpr auto Reference = FitDirection::Reference;

/// In the order of FunctionFamily.
constexpr std::array<FunctionFacts, 14> table{{
    {F::Constant, "y = b0", "", "JCGM 100:2008, 4.2", 0, 0, 1, true, Indication},
    {F::Line, "y = b0 + b1·x", "", "ISO/TS 28037:2010, 6; JCGM 100:2008, H.3", 0, 0, 2, true, {}},
    {F::Proportional, "y = b1·x", "", "ISO 11095:1996", 0, 0, 1, true, {}},
    {F::Polynomial, "y = b0 + b1·x + … + bN·x^N", "", "ISO/TS 28038:2018", 2, 10, 1, true, {}},
    {F::PolynomialNoConstant, "y = b1·x + … + bN·x^N", "", "ISO 376:2011, annex C", 2, 10, 0, true, {}},
    {F::SquareRoot, "y = b0 + b1·√x", "x ≥ 0", "ISO 5167-1:2022, 5.1", 0, 0, 2, true, {}},
    {F::Logarithmic, "y = b0 + b1·lg x", "x > 0", "IUPAC 1994, Pure Appl. Chem. 66, 2527", 0, 0, 2, true, {}},
    {F::Power, "y = a·x^b", "x > 0, y > 0", "common practice", 0, 0, 2, false, {}},
    {F::ExponentialApproach, "y = y_inf − A·exp(−x/L)", "", "common practice", 0, 0, 3, false, {}},
    {F::CallendarVanDusen, "R = R0·(1 + A·t + B·t² + [t < 0]·C·(t − 100)·t³)", "−200 °C ≤ t ≤ 850 °C",
     "IEC 60751:2022, 5.2", 0, 0, 3, true, Indication},
    {F::ThermistorB, "R = R25·exp(B·(1/T − 1/298.15 K))", "T > 0 K, R > 0", "IEC 60539-1:2022, 3.2", 0, 0, 2, false,
     Indication},
    {F::SteinhartHart, "1/T = A + B·ln R + C·(ln R)³ + D·(ln R)²", "R > 0",
     "Steinhart and Hart 1968, Deep-Sea Research 15, 497", 2, 4, 0, false, Reference},
    {F::Nernst, "E = E0 − slope·k(25 °C)·(pH − 7)", "", "IUPAC 2002, Pure Appl. Chem. 74, 2169", 0, 0, 2, true,
     Indication},
    {F::Table, "linear between the means at the set points", "", "common practice", 0, 0, 2, true, {}},
}};

std::string raised(const std::string& unit, int power) {
    static constexpr std::array superscript{"⁰", "", "²", "³", "⁴", "⁵", "⁶", "⁷", "⁸", "⁹", "¹⁰"};
    const bool compound = unit.find_first_of("/*^ ") != std::string::npos || unit.find("·") != std::string::npos;
    return (compound ? "(" + unit + ")" : unit) + superscript[static_cast<std::size_t>(power)];
}

/// ordinate/abscissa^power
std::string quotientUnit(const std::string& ordinate, const std::string& abscissa, int power) {
    if (power == 0 || abscissa.empty())
        return ordinate;
    return (ordinate.empty() ? "1" : ordinate) + "/" + raised(abscissa, power);
}

std::vector<CoefficientName> powerNames(int first, std::size_t count, const std::string& x, const std::string& y) {
    std::vector<CoefficientName> names;
    for (int power = first; power < first + static_cast<int>(count); ++power)
        names.push_back({"b" + std::to_string(power), quotientUnit(y, x, power)});
    return names;
}

} // namespace

std::span<const FunctionFacts> calibrationFunctions() {
    return table;
}

const FunctionFacts& factsOf(FunctionFamily family) {
    return table[static_cast<std::size_t>(family)];
}

std::size_t coefficientCount(const FunctionChoice& choice) {
    return static_cast<std::size_t>(choice.order) + factsOf(choice.family).termsBeyondOrder;
}

std::size_t leastSetPoints(const FunctionChoice& choice) {
    return coefficientCount(choice);
}

std::vector<CoefficientName> coefficientNames(const FunctionChoice& choice, const std::string& x, const std::string& y,
                                              std::size_t count) {
    std::vector<CoefficientName> names;
    switch (choice.family) {
    case F::Constant:
    case F::Line:
    case F::Polynomial:
        return powerNames(0, count, x, y);
    case F::Proportional:
    case F::PolynomialNoConstant:
        return powerNames(1, count, x, y);
    case F::SquareRoot:
        names = {{"b0", y}, {"b1", quotientUnit(y, x.empty() ? x : "√" + x, 1)}};
        break;
    case F::Logarithmic:
        names = {{"b0", y}, {"b1", y}};
        break;
    case F::Power:
        names = {{"a", y}, {"b", ""}};
        break;
    case F::ExponentialApproach:
        names = {{"y_inf", y}, {"A", y}, {"L", x}};
        break;
    case F::CallendarVanDusen:
        names = {{"R0", y}, {"A", "1/°C"}, {"B", "1/°C²"}, {"C", "1/°C⁴"}};
        break;
    case F::ThermistorB:
        names = {{"R25", y}, {"B", "K"}};
        break;
    case F::SteinhartHart:
        names = {{"A", "1/K"}, {"B", "1/K"}, {"C", "1/K"}, {"D", "1/K"}};
        break;
    case F::Nernst:
        names = {{"E0", y}, {"slope", "%"}};
        break;
    case F::Table:
        for (std::size_t i = 1; i <= count; ++i)
            names.push_back({"y" + std::to_string(i), y});
        break;
    }
    names.resize(count);
    return names;
}

} // namespace spanwright
