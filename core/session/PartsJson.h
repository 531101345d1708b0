// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"
#include "core/session/JsonScanner.h"
#include "core/session/JsonText.h"

namespace spanwright {

/// Writes the part of that name (as in parts()) as an object or array, keys in the order of fields(). Numbers that were typed
/// are strings; what was not entered is null.
void writePart(JsonText& json, const Record& record, std::string_view name);

/// Reads the part of that name, which replaces the one in the record. Keys that are missing have their defaults. False when the
/// record has no such part; then nothing was read.
bool readPart(JsonScanner& scan, Record& record, std::string_view name);

} // namespace spanwright
