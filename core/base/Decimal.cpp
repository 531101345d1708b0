// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/Decimal.h"

#include <charconv>
#include <cstdlib>

namespace spanwright {

namespace {

constexpr int MostDigits = 18;
constexpr int LargestExponent = 300;
constexpr int MostPlainDecimals = 30;

bool isDigit(char c) {
    return c >= '0' && c <= '9';
}

std::string_view trimmed(std::string_view text) {
    constexpr std::string_view blanks = " \t\r\n\v\f";
    const auto first = text.find_first_not_of(blanks);
    if (first == std::string_view::npos)
        return {};
    return text.substr(first, text.find_last_not_of(blanks) - first + 1);
}

bool takeMinus(std::string_view& rest) {
    constexpr std::string_view minusSign = "\xE2\x88\x92"; // U+2212
    if (rest.starts_with(minusSign)) {
        rest.remove_prefix(minusSign.size());
        return true;
    }
    if (rest.starts_with('-') || rest.starts_with('+')) {
        const bool minus = rest.front() == '-';
        rest.remove_prefix(1);
        return minus;
    }
    return false;
}

/// Whether `rest`, which did not read as a number, would with separators between groups of digits taken out.
bool looksGrouped(std::string_view text, DecimalMark mark) {
    const char other = mark == DecimalMark::Point ? ',' : '.';
    bool separator = false;
    for (std::size_t i = 0; i < text.size(); ++i) {
        const char c = text[i];
        if (isDigit(c) || c == static_cast<char>(mark) || (i == 0 && (c == '-' || c == '+')))
            continue;
        const bool between = i > 0 && i + 1 < text.size() && isDigit(text[i - 1]);
        if (!between || (c != other && c != ' ' && c != '\''))
            return false;
        separator = true;
    }
    return separator;
}

std::string canonical(bool minus, const std::string& digits, int decimals) {
    std::string text = minus ? "-" : "";
    const int count = static_cast<int>(digits.size());
    if (decimals == 0)
        return text + digits;
    if (decimals > 0 && decimals <= MostPlainDecimals) {
        if (count > decimals)
            return text + digits.substr(0, static_cast<std::size_t>(count - decimals)) + "." +
                   digits.substr(static_cast<std::size_t>(count - decimals));
        return text + "0." + std::string(static_cast<std::size_t>(decimals - count), '0') + digits;
    }
    text += digits.substr(0, 1);
    if (count > 1)
        text += "." + digits.substr(1);
    return text + "e" + std::to_string(count - 1 - decimals);
}

} // namespace

Result<Decimal> Decimal::parse(std::string_view text, DecimalMark mark) {
    const std::string_view whole = trimmed(text);
    if (whole.empty())
        return Error(ErrorCode::CellEmpty);
    const auto refuse = [&](ErrorCode code) { return Error(code, {{"text", std::string(whole)}}); };

    std::string_view rest = whole;
    const bool minus = takeMinus(rest);
    std::string digits;
    int decimals = 0;
    bool afterMark = false;
    bool anyDigit = false;
    std::size_t used = 0;
    for (; used < rest.size(); ++used) {
        const char c = rest[used];
        if (isDigit(c)) {
            anyDigit = true;
            decimals += afterMark ? 1 : 0;
            if (!digits.empty() || c != '0')
                digits += c;
        } else if (c == static_cast<char>(mark) && !afterMark) {
            afterMark = true;
        } else {
            break;
        }
    }
    rest.remove_prefix(used);
    if (anyDigit && !rest.empty() && (rest.front() == 'e' || rest.front() == 'E')) {
        rest.remove_prefix(1);
        if (rest.starts_with('+'))
            rest.remove_prefix(1);
        int exponent = 0;
        const auto [end, problem] = std::from_chars(rest.data(), rest.data() + rest.size(), exponent);
        if (problem == std::errc::result_out_of_range)
            return refuse(ErrorCode::NumberTooLarge);
        if (problem != std::errc{} || end != rest.data() + rest.size())
            return refuse(ErrorCode::CellNotANumber);
        if (std::abs(exponent) > LargestExponent)
            return refuse(ErrorCode::NumberTooLarge);
        decimals -= exponent;
        rest = {};
    }
    if (!anyDigit || !rest.empty())
        return refuse(looksGrouped(whole, mark) ? ErrorCode::ThousandsSeparator : ErrorCode::CellNotANumber);
    if (static_cast<int>(digits.size()) - decimals > LargestExponent || decimals > LargestExponent + 100)
        return refuse(ErrorCode::NumberTooLarge);

    Decimal number;
    number.decimals = decimals;
    const bool zero = digits.empty();
    if (digits.size() > static_cast<std::size_t>(MostDigits) || (zero && minus)) {
        number.wide = canonical(minus, zero ? "0" : digits, decimals);
        return number;
    }
    for (const char c : digits)
        number.mantissa = number.mantissa * 10 + (c - '0');
    if (minus)
        number.mantissa = -number.mantissa;
    return number;
}

std::string Decimal::text() const {
    if (isWide())
        return wide;
    const std::string digits = std::to_string(mantissa < 0 ? -mantissa : mantissa);
    return canonical(mantissa < 0, digits, decimals);
}

double Decimal::toDouble() const {
    const std::string digits = text();
    double value = 0;
    std::from_chars(digits.data(), digits.data() + digits.size(), value);
    return value;
}

DoubleDouble Decimal::toDoubleDouble() const {
    if (!isWide())
        return decimals >= 0 ? spanwright::toDoubleDouble(mantissa) / powerOfTen(decimals)
                             : spanwright::toDoubleDouble(mantissa) * powerOfTen(-decimals);
    DoubleDouble value = 0.0;
    for (const char c : wide) {
        if (c == 'e')
            break;
        if (isDigit(c))
            value = value * 10.0 + static_cast<double>(c - '0');
    }
    value = decimals >= 0 ? value / powerOfTen(decimals) : value * powerOfTen(-decimals);
    return wide.front() == '-' ? -value : value;
}

int compareValue(const Decimal& a, const Decimal& b) {
    if (a.decimals == b.decimals && !a.isWide() && !b.isWide())
        return a.mantissa < b.mantissa ? -1 : a.mantissa > b.mantissa ? 1 : 0;
    const DoubleDouble difference = a.toDoubleDouble() - b.toDoubleDouble();
    // Both are correct to about 31 digits; numbers of up to 18 digits that differ do so far above that.
    return difference < 0.0 ? -1 : difference > 0.0 ? 1 : 0;
}

} // namespace spanwright
