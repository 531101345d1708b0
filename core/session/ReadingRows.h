// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"
#include "core/session/JsonText.h"

#include <span>

namespace spanwright {

/// Writes the keys "columns" and "rows" of an object: one reading a line, and only those columns in which a reading has anything
/// (id, reference and indication always).
void writeReadingRows(JsonText& json, const ReadingColumns& readings);
/// The same for some rows.
void writeReadingRows(JsonText& json, const ReadingColumns& readings, std::span<const std::size_t> rows);

} // namespace spanwright
