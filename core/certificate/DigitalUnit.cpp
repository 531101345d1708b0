// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/DigitalUnit.h"

#include <algorithm>
#include <array>

namespace spanwright {

namespace {

struct Known {
    std::string_view printed, name;
    int exponent = 0;
};

constexpr Known known[] = {
    {"", "\\one"}, {"1", "\\one"}, {"%", "\\percent"}, {"%RH", "\\percent"}, {"ppm", "\\ppm"},
    {"°C", "\\degreecelsius"}, {"°", "\\degree"}, {"bar", "\\pascal", 5}, {"mbar", "\\pascal", 2},
    {"mV/V", "\\milli\\volt\\volt\\tothe{-1}"}, {"L/min", "\\litre\\minute\\tothe{-1}"}, {"l/min", "\\litre\\minute\\tothe{-1}"},
    {"m/s", "\\metre\\second\\tothe{-1}"}, {"min", "\\minute"}, {"h", "\\hour"}, {"d", "\\day"}, {"kg", "\\kilogram"},
    {"g", "\\gram"}, {"mg", "\\milli\\gram"},
};

constexpr Known bases[] = {{"A", "\\ampere"}, {"V", "\\volt"}, {"Ω", "\\ohm"}, {"Ohm", "\\ohm"}, {"Pa", "\\pascal"}, {"N", "\\newton"},
                           {"K", "\\kelvin"}, {"m", "\\metre"}, {"s", "\\second"}, {"Hz", "\\hertz"}, {"W", "\\watt"}, {"J", "\\joule"},
                           {"L", "\\litre"}, {"l", "\\litre"}, {"C", "\\coulomb"}, {"F", "\\farad"}, {"lx", "\\lux"}, {"mol", "\\mole"}};

constexpr Known prefixes[] = {{"p", "\\pico"}, {"n", "\\nano"}, {"µ", "\\micro"}, {"μ", "\\micro"}, {"m", "\\milli"}, {"c", "\\centi"},
                              {"d", "\\deci"}, {"h", "\\hecto"}, {"k", "\\kilo"}, {"M", "\\mega"}, {"G", "\\giga"}};

const Known* find(const Known* from, const Known* to, std::string_view printed) {
    const auto at = std::find_if(from, to, [printed](const Known& one) { return one.printed == printed; });
    return at == to ? nullptr : at;
}

} // namespace

DigitalUnit digitalUnit(std::string_view printed) {
    if (const Known* whole = find(std::begin(known), std::end(known), printed))
        return {std::string(whole->name), whole->exponent};
    if (const Known* base = find(std::begin(bases), std::end(bases), printed))
        return {std::string(base->name), 0};
    for (const Known& prefix : prefixes)
        if (printed.starts_with(prefix.printed))
            if (const Known* base = find(std::begin(bases), std::end(bases), printed.substr(prefix.printed.size())))
                return {std::string(prefix.name) + std::string(base->name), 0};
    return {'|' + std::string(printed), 0};
}

std::string scaledDigits(const std::string& digits, int exponent) {
    if (exponent == 0 || digits.empty())
        return digits;
    const auto e = digits.find_first_of("eE");
    const int own = e == std::string::npos ? 0 : std::stoi(digits.substr(e + 1));
    return digits.substr(0, e) + 'E' + std::to_string(own + exponent);
}

} // namespace spanwright
