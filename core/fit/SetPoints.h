// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Sample.h"

namespace spanwright {

/// Fills `group` and `groupValue`: equal values share a set point, set points in rising order. O(n log n), for few
/// readings.
void groupByValue(Sample& sample, const PairColumn& value);

/// The same by integers on a decimal grid, in O(n): by a small table where set points are few, by a map of bits where the
/// range is not too wide for the readings, else by sorting digits of 11 bits (O(n log n) where the grid is wider than
/// 2^44 or so).
void groupByGrid(Sample& sample, std::span<const std::int64_t> grid, int scale);

} // namespace spanwright
