// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/DecimalColumn.h"

#include <algorithm>
#include <bit>
#include <cstring>
#include <map>

namespace spanwright {

/// A plain decimal number at the beginning of a text: [+-]digits[mark digits], at most 18 digits.
struct PlainNumber {
    const char* end = nullptr; ///< after its last character; null when there is no such number
    std::int64_t mantissa = 0;
    std::uint8_t decimals = 0;
};

/// Digits from `p` on, read behind those of `before`.
struct DigitRun {
    const char* end = nullptr;
    std::uint64_t value = 0;
};

/// Reads up to eight digits in one step: they are found by their bytes and joined in pairs within one word (SWAR). Needs a
/// little-endian machine, else and near the end of the text one digit is read at a time.
inline DigitRun readDigits(const char* p, const char* end, std::uint64_t before) {
    static constexpr std::uint64_t powers[] = {1, 10, 100, 1'000, 10'000, 100'000, 1'000'000, 10'000'000, 100'000'000};
    DigitRun run{p, before};
    if constexpr (std::endian::native == std::endian::little) {
        while (end - run.end >= 8) {
            std::uint64_t word = 0;
            std::memcpy(&word, run.end, sizeof word);
            word ^= 0x3030303030303030u; // a digit is now its value, anything else is above 9
            const std::uint64_t others = ((word + 0x7676767676767676u) | word) & 0x8080808080808080u;
            const int count = others == 0 ? 8 : std::countr_zero(others) / 8;
            if (count == 0)
                return run;
            word <<= 8 * (8 - count); // digits to the end, zeros in front
            word = word * 10 + (word >> 8);
            word = ((word & 0x000000FF000000FFu) * 0x000F424000000064u +
                    ((word >> 16) & 0x000000FF000000FFu) * 0x0000271000000001u) >> 32;
            run.value = run.value * powers[count] + word;
            run.end += count;
            if (count < 8)
                return run;
        }
    }
    while (run.end != end && *run.end >= '0' && *run.end <= '9')
        run.value = run.value * 10 + static_cast<std::uint64_t>(*run.end++ - '0');
    return run;
}

inline PlainNumber readPlainNumber(const char* p, const char* end, DecimalMark mark) {
    const bool minus = p != end && *p == '-';
    if (p != end && (*p == '-' || *p == '+'))
        ++p;
    const DigitRun whole = readDigits(p, end, 0);
    DigitRun all = whole;
    std::ptrdiff_t decimals = 0;
    if (whole.end != end && *whole.end == static_cast<char>(mark)) {
        all = readDigits(whole.end + 1, end, whole.value);
        decimals = all.end - (whole.end + 1);
    }
    const std::ptrdiff_t digits = (whole.end - p) + decimals;
    // More digits may have run over; a zero with a minus sign is no integer. Both are left to Decimal::parse().
    if (digits == 0 || digits > 18 || (minus && all.value == 0))
        return {};
    const auto magnitude = static_cast<std::int64_t>(all.value);
    return {all.end, minus ? -magnitude : magnitude, static_cast<std::uint8_t>(decimals)};
}

/// Gathers the cells of a column of numbers and brings them on one decimal grid at the end.
class NumberColumnBuilder {
  public:
    void reserve(std::size_t rows) {
        mantissas_.reserve(rows);
        decimals_.reserve(rows);
    }
    void add(const PlainNumber& number) {
        mantissas_.push_back(number.mantissa);
        decimals_.push_back(number.decimals);
        least_ = std::min(least_, number.decimals);
        most_ = std::max(most_, number.decimals);
    }
    void add(const Decimal& number);
    void addMissing() {
        mantissas_.push_back(0);
        decimals_.push_back(DecimalColumn::Missing);
    }
    [[nodiscard]] DecimalColumn finish() &&;

  private:
    [[nodiscard]] DecimalColumn withAside(DecimalColumn column) const;

    std::vector<std::int64_t> mantissas_;
    std::vector<std::uint8_t> decimals_;
    std::map<std::size_t, Decimal> aside_;
    std::uint8_t least_ = DecimalColumn::Missing; ///< decimals of any number so far
    std::uint8_t most_ = 0;
};

} // namespace spanwright
