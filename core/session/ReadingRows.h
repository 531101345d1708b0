// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"
#include "core/session/JsonScanner.h"
#include "core/session/JsonText.h"

#include <span>

namespace spanwright {

/// Writes the keys "columns" and "rows" of an object: one reading a line, and only those columns in which a reading has anything
/// (id, reference and indication always).
void writeReadingRows(JsonText& json, const ReadingColumns& readings);
/// The same for some rows.
void writeReadingRows(JsonText& json, const ReadingColumns& readings, std::span<const std::size_t> rows);

/// What becomes of a column that this program does not know.
enum class StrangeColumn { Refuse, PassOver };

/// Reads the value of "columns"; SessionValueBad where one stands twice or is refused.
std::vector<std::string> readColumnNames(JsonScanner& scan, StrangeColumn strange);
/// Reads the value of "rows"; ids must rise. SessionValueBad where a row does not fit the columns.
ReadingColumns readReadingRows(JsonScanner& scan, const std::vector<std::string>& columns);

/// ISO 8601, null for 0 (not known), and the bare number of milliseconds outside the years 0 to 9999.
void appendMoment(std::string& json, std::int64_t milliseconds);
/// Reads what appendMoment() wrote; SessionValueBad at `key` otherwise.
std::int64_t readMoment(JsonScanner& scan, std::string_view key);

} // namespace spanwright
