// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"
#include "core/session/JsonScanner.h"

#include <limits>

namespace spanwright {

/// The largest id that a file may state, so that there is always a next one.
inline constexpr ReadingId LargestReadingId = std::numeric_limits<ReadingId>::max() - 1;

/// What becomes of a column that this program does not know.
enum class StrangeColumn { Refuse, PassOver };

/// Reads the value of "columns"; SessionValueBad where one stands twice or is refused.
std::vector<std::string> readColumnNames(JsonScanner& scan, StrangeColumn strange);
/// Reads the value of "rows"; ids must rise. SessionValueBad where a row does not fit the columns.
ReadingColumns readReadingRows(JsonScanner& scan, const std::vector<std::string>& columns);

} // namespace spanwright
