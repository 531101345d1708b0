// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

namespace spanwright {

/// A number as it is printed: rounded once, to `decimals` digits after the point (negative: to tens, hundreds, …), half away from
/// zero, with a minus sign '-' unless it rounds to zero. The decimal that is rounded is the double to 15 significant digits, so
/// 2.675 gives 2.68 although the nearest double lies below. Infinite and missing numbers give an empty text.
std::string roundedText(double value, int decimals);

/// Digits after the point that show `value` to `digits` significant digits, after rounding (0.0996 to two digits: 2, for 0.10).
/// 0 for zero, infinite and missing numbers.
int decimalsFor(double value, int digits);

/// The shortest text of `digits` significant digits, with an exponent "e" where the plain form would be long.
std::string significantDigits(double value, int digits);

/// An expanded uncertainty as it is stated, and the place to which the result belonging to it is rounded.
struct RoundedUncertainty {
    std::string text;
    int decimals = 0;
};

/// Rounds to at most two significant digits (JCGM 100:2008, 7.2.6; ILAC P14:09/2020), to the nearest unless that lowers the
/// uncertainty by more than 5 % (EA-4/02 M, 6.3), then up. `expanded` in any unit, not negative; digits 1 or 2.
RoundedUncertainty roundUncertainty(double expanded, int digits = 2);

} // namespace spanwright
