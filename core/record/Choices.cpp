// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/Choices.h"

#include <array>
#include <charconv>

namespace spanwright {

namespace {

struct Name {
    FunctionFamily family;
    std::string_view text;
    int lowest = 0, highest = 0; ///< of the order; 0 when the family has none
    int usual = 0;               ///< order when none is given; 0: it must be given
};

constexpr std::array<Name, 14> names{{
    {FunctionFamily::Constant, "constant"},
    {FunctionFamily::Line, "line"},
    {FunctionFamily::Proportional, "proportional"},
    {FunctionFamily::Polynomial, "polynomial", 2, 10},
    {FunctionFamily::PolynomialNoConstant, "polynomial-no-constant", 2, 10},
    {FunctionFamily::SquareRoot, "square-root"},
    {FunctionFamily::Logarithmic, "logarithmic"},
    {FunctionFamily::Power, "power"},
    {FunctionFamily::ExponentialApproach, "exponential-approach"},
    {FunctionFamily::CallendarVanDusen, "callendar-van-dusen"},
    {FunctionFamily::ThermistorB, "thermistor-b"},
    {FunctionFamily::SteinhartHart, "steinhart-hart", 2, 4, 3},
    {FunctionFamily::Nernst, "nernst"},
    {FunctionFamily::Table, "table"},
}};

} // namespace

std::string functionName(const FunctionChoice& choice) {
    const Name& name = names[static_cast<std::size_t>(choice.family)];
    std::string text{name.text};
    if (name.highest > 0 && choice.order != name.usual)
        text += ":" + std::to_string(choice.order);
    return text;
}

Result<FunctionChoice> parseFunctionName(std::string_view text) {
    const auto unknown = [&] { return Error(ErrorCode::FunctionUnknown, {{"text", std::string(text)}}); };
    const std::size_t colon = text.find(':');
    const std::string_view family = text.substr(0, colon);
    for (const Name& name : names) {
        if (name.text != family)
            continue;
        if (colon == std::string_view::npos)
            return name.highest > 0 && name.usual == 0 ? Result<FunctionChoice>(unknown())
                                                       : FunctionChoice{name.family, name.usual};
        const std::string_view digits = text.substr(colon + 1);
        int order = 0;
        const auto [end, problem] = std::from_chars(digits.data(), digits.data() + digits.size(), order);
        if (problem != std::errc{} || end != digits.data() + digits.size() || order < name.lowest || order > name.highest ||
            name.highest == 0)
            return unknown();
        return FunctionChoice{name.family, order};
    }
    return unknown();
}

} // namespace spanwright
