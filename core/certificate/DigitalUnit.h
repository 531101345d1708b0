// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>

namespace spanwright {

/// A unit as the SI data model (D-SI 2.2) writes it, and the power of ten by which a value in the printed unit is multiplied for it.
struct DigitalUnit {
    std::string name;
    int exponent = 0;
};

/// The D-SI form of a unit as printed: "mA" is \milli\ampere, "bar" is \pascal with 10^5. A unit that is not known is passed on
/// with a leading "|", as the data model asks for units outside it; an empty one is \one.
DigitalUnit digitalUnit(std::string_view printed);

/// Digits times 10^exponent, without computing: "4.9999" and 5 give "4.9999E5".
std::string scaledDigits(const std::string& digits, int exponent);

} // namespace spanwright
