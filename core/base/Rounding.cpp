// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/Rounding.h"

#include <algorithm>
#include <charconv>
#include <cmath>
#include <cstdlib>

namespace spanwright {

namespace {

constexpr int TrustedDigits = 15; // every decimal of that many digits survives the way through a double

/// |value| = 0.d1d2d3… × 10^exponent.
struct Digits {
    std::string digits;
    int exponent = 0;
};

Digits digitsOf(double value) {
    char buffer[48];
    const auto end = std::to_chars(buffer, buffer + sizeof buffer, std::fabs(value), std::chars_format::scientific, TrustedDigits - 1);
    const std::string text(buffer, end.ptr);
    const auto e = text.find('e');
    Digits result;
    for (std::size_t i = 0; i < e; ++i)
        if (text[i] != '.')
            result.digits.push_back(text[i]);
    result.exponent = std::atoi(text.c_str() + e + 1) + 1;
    return result;
}

/// Keeps the first `count` digits, rounding half up; a carry out of the first digit raises the exponent.
Digits rounded(Digits number, int count) {
    if (count < 0)
        return {"0", 1};
    const auto kept = static_cast<std::size_t>(count);
    if (kept >= number.digits.size())
        return number;
    const bool up = number.digits[kept] >= '5';
    number.digits.resize(kept);
    if (!up)
        return number;
    std::size_t i = kept;
    while (i > 0 && number.digits[i - 1] == '9')
        number.digits[--i] = '0';
    if (i > 0) {
        ++number.digits[i - 1];
    } else {
        number.digits.insert(number.digits.begin(), '1');
        ++number.exponent;
    }
    return number;
}

bool allZero(const std::string& digits) {
    return digits.find_first_not_of('0') == std::string::npos;
}

std::string plain(const Digits& number, int decimals) {
    std::string whole, after;
    for (int place = std::max(number.exponent, 1); place > -std::max(decimals, 0); --place) {
        const int index = number.exponent - place;
        const bool inside = index >= 0 && index < static_cast<int>(number.digits.size());
        (place > 0 ? whole : after).push_back(inside ? number.digits[static_cast<std::size_t>(index)] : '0');
    }
    return after.empty() ? whole : whole + '.' + after;
}

} // namespace

std::string roundedText(double value, int decimals) {
    if (!std::isfinite(value))
        return {};
    Digits number = digitsOf(value);
    number = rounded(number, number.exponent + decimals);
    if (number.digits.empty() || allZero(number.digits))
        return plain({"0", 1}, decimals);
    return (value < 0 ? "-" : "") + plain(number, decimals);
}

int decimalsFor(double value, int digits) {
    if (!std::isfinite(value) || value == 0)
        return 0;
    return digits - rounded(digitsOf(value), digits).exponent;
}

std::string significantDigits(double value, int digits) {
    if (!std::isfinite(value))
        return {};
    if (value == 0)
        return "0";
    const Digits number = rounded(digitsOf(value), digits);
    const int decimals = digits - number.exponent;
    if (number.exponent > -5 && decimals >= 0)
        return (value < 0 ? "-" : "") + plain(number, decimals);
    char buffer[48];
    const auto end = std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::scientific, digits - 1);
    return {buffer, end.ptr};
}

RoundedUncertainty roundUncertainty(double expanded, int digits) {
    const int decimals = decimalsFor(expanded, digits);
    RoundedUncertainty result{roundedText(expanded, decimals), decimals};
    if (result.text.empty() || expanded == 0)
        return result;
    const double shown = std::strtod(result.text.c_str(), nullptr);
    if (shown < 0.95 * expanded) {
        const double raised = shown + std::pow(10.0, -decimals);
        result.decimals = decimalsFor(raised, digits);
        result.text = roundedText(raised, result.decimals);
    }
    return result;
}

} // namespace spanwright
