// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Slips.h"

#include <array>
#include <charconv>
#include <cmath>
#include <string_view>

namespace spanwright {
namespace {

/// A number in another unit of the same quantity, value = factor · other + offset.
struct UnitConversion {
    std::string_view unit, other;
    double factor = 1, offset = 0;
};

// Factors by definition of the units (ISO 80000; the pound-force per square inch from memory, 6894.757 Pa).
constexpr std::array conversions{UnitConversion{"bar", "psi", 0.06894757, 0},
                                 UnitConversion{"psi", "bar", 14.503774, 0},
                                 UnitConversion{"bar", "kPa", 0.01, 0},
                                 UnitConversion{"kPa", "bar", 100, 0},
                                 UnitConversion{"kPa", "psi", 6.894757, 0},
                                 UnitConversion{"psi", "kPa", 0.14503774, 0},
                                 UnitConversion{"mbar", "kPa", 10, 0},
                                 UnitConversion{"kPa", "mbar", 0.1, 0},
                                 UnitConversion{"mbar", "mmH2O", 0.0980665, 0},
                                 UnitConversion{"mmH2O", "mbar", 10.197162, 0},
                                 UnitConversion{"bar", "bar absolute", 1, -1.01325},
                                 UnitConversion{"bar", "bar gauge", 1, 1.01325},
                                 UnitConversion{"kPa", "kPa absolute", 1, -101.325},
                                 UnitConversion{"kPa", "kPa gauge", 1, 101.325},
                                 UnitConversion{"°C", "°F", 5.0 / 9, -160.0 / 9},
                                 UnitConversion{"°F", "°C", 1.8, 32},
                                 UnitConversion{"°C", "K", 1, -273.15},
                                 UnitConversion{"K", "°C", 1, 273.15},
                                 UnitConversion{"kN", "kgf", 0.00980665, 0},
                                 UnitConversion{"kN", "lbf", 0.0044482216, 0},
                                 UnitConversion{"L/min", "m³/h", 1000.0 / 60, 0},
                                 UnitConversion{"m³/h", "L/min", 0.06, 0}};

/// Digits without a mark, and how many of them come after it.
struct Digits {
    std::string text;
    int decimals = 0;
    bool negative = false;
};

Digits digitsOf(const Decimal& typed) {
    Digits digits;
    digits.negative = typed.mantissa < 0;
    digits.text = std::to_string(digits.negative ? -typed.mantissa : typed.mantissa);
    digits.decimals = typed.decimals;
    while (static_cast<int>(digits.text.size()) < digits.decimals + 1)
        digits.text.insert(digits.text.begin(), '0');
    return digits;
}

std::optional<Decimal> decimalOf(const Digits& digits) {
    if (digits.text.empty() || digits.text.size() > 18 || digits.decimals < 0)
        return std::nullopt;
    Decimal value;
    std::from_chars(digits.text.data(), digits.text.data() + digits.text.size(), value.mantissa);
    if (digits.negative)
        value.mantissa = -value.mantissa;
    value.decimals = digits.decimals;
    return value;
}

class Collector {
  public:
    explicit Collector(const Decimal& typed) : typed_(typed) {}
    void add(SlipKind kind, const Digits& digits) {
        const auto value = decimalOf(digits);
        if (value && compareValue(*value, typed_) != 0)
            candidates_.push_back({kind, *value});
    }
    std::vector<SlipCandidate> take() { return std::move(candidates_); }

  private:
    const Decimal& typed_;
    std::vector<SlipCandidate> candidates_;
};

void shifted(const Digits& typed, Collector& collect) {
    for (const int places : {1, -1, 2, -2, 3, -3}) {
        Digits moved = typed;
        moved.decimals += places;
        while (moved.decimals < 0) {
            moved.text += '0';
            ++moved.decimals;
        }
        collect.add(std::abs(places) == 3 ? SlipKind::UnitPrefix : SlipKind::DecimalShifted, moved);
    }
}

void doubledOrMissing(const Digits& typed, int usualDecimals, Collector& collect) {
    const auto size = static_cast<int>(typed.text.size());
    for (int i = 0; i + 1 < size; ++i)
        if (typed.text[static_cast<std::size_t>(i)] == typed.text[static_cast<std::size_t>(i) + 1]) {
            Digits shorter = typed;
            shorter.text.erase(static_cast<std::size_t>(i), 1);
            shorter.decimals -= i >= size - typed.decimals ? 1 : 0;
            collect.add(SlipKind::DigitDoubled, shorter);
        }
    if (typed.decimals >= usualDecimals)
        return;
    // A digit fell out after the mark: the last one cannot be told from rounding, so it must have stood before another
    // one.
    for (int at = size - typed.decimals; at < size; ++at)
        for (char digit = '0'; digit <= '9'; ++digit) {
            Digits longer = typed;
            longer.text.insert(static_cast<std::size_t>(at), 1, digit);
            ++longer.decimals;
            collect.add(SlipKind::DigitMissing, longer);
        }
}

} // namespace

std::vector<SlipCandidate> slipCandidates(const Decimal& typed, int usualDecimals, const std::string& unit) {
    if (typed.isWide())
        return {};
    Collector collect(typed);
    const Digits digits = digitsOf(typed);
    for (std::size_t i = 0; i + 1 < digits.text.size(); ++i) {
        Digits swapped = digits;
        std::swap(swapped.text[i], swapped.text[i + 1]);
        collect.add(SlipKind::DigitsSwapped, swapped);
    }
    shifted(digits, collect);
    Digits other = digits;
    other.negative = !digits.negative;
    collect.add(SlipKind::SignLost, other);
    doubledOrMissing(digits, usualDecimals, collect);
    std::vector<SlipCandidate> candidates = collect.take();
    for (const UnitConversion& conversion : conversions)
        if (conversion.unit == unit) {
            const double value = typed.toDouble() * conversion.factor + conversion.offset;
            const int decimals = std::clamp(usualDecimals, 0, 9);
            const double scaled = std::round(value * std::pow(10.0, decimals));
            if (std::abs(scaled) < 1e15)
                candidates.push_back({SlipKind::UnitFactor, Decimal{static_cast<std::int64_t>(scaled), decimals, {}}});
        }
    return candidates;
}

} // namespace spanwright
