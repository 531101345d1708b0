// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"
#include "core/base/Result.h"

#include <cstdint>
#include <string>
#include <string_view>

namespace spanwright {

enum class DecimalMark : char { Point = '.', Comma = ',' };

/// A number as typed: value = mantissa · 10^(−decimals), where `decimals` counts the digits after the decimal mark, so 100.10
/// keeps its last zero. A plus sign, a missing zero before the mark and the kind of mark are not kept; the digits are.
///
/// A number that does not fit (more than 18 digits, or a zero with a minus sign) keeps its canonical text in `wide`; then
/// `mantissa` is 0 and the value is read from the text, rounded to double-double.
struct Decimal {
    std::int64_t mantissa = 0;
    int decimals = 0;
    std::string wide;

    /// Reads digits with at most one decimal mark, an optional sign (also U+2212) and an optional exponent (e or E).
    /// Errors: CellEmpty; ThousandsSeparator (the other mark, or a space or apostrophe between digits); NumberTooLarge (decimal
    /// exponent beyond ±300); CellNotANumber (anything else, NaN and Inf words too). Facts: text.
    static Result<Decimal> parse(std::string_view text, DecimalMark mark = DecimalMark::Point);

    /// Canonical text with a decimal point, digit for digit: plain when 0 ≤ decimals ≤ 30, else with an exponent. parse(text())
    /// gives an equal Decimal.
    [[nodiscard]] std::string text() const;
    /// Nearest double.
    [[nodiscard]] double toDouble() const;
    /// Nearest double-double (about 31 digits; exact for a mantissa of up to 18 digits up to the rounding of 10^−decimals).
    [[nodiscard]] DoubleDouble toDoubleDouble() const;
    [[nodiscard]] bool isWide() const { return !wide.empty(); }

    /// Equal as typed: 100.1 and 100.10 differ.
    bool operator==(const Decimal&) const = default;
};

/// Three-way comparison by value: negative, zero or positive.
int compareValue(const Decimal& a, const Decimal& b);

} // namespace spanwright
