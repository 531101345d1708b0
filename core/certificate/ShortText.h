// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

namespace spanwright {

/// The shortest text that reads back as the same double, without an exponent where that is not longer by much.
std::string shortText(double value);
/// Digits after the point of a plain number; 0 for one with an exponent.
int decimalsIn(const std::string& text);

} // namespace spanwright
