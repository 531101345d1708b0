// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <qd/dd_real.h>

#include <cstdint>

namespace spanwright {

/// An unevaluated sum of two doubles, about 31 digits (Hida, Li and Bailey, "Library for double-double and quad-double
/// arithmetic", 2007; library libqd). No translation unit that uses it may be compiled with contracted multiply-add.
using DoubleDouble = dd_real;

/// Exact.
DoubleDouble toDoubleDouble(std::int64_t integer);

/// 10^exponent, correctly rounded to about 31 digits; exact for 0 ≤ exponent ≤ 44.
DoubleDouble powerOfTen(int exponent);

/// Nearest double.
inline double toDouble(const DoubleDouble& value) { return value.x[0]; }

} // namespace spanwright
