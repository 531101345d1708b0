// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"
#include "core/session/JsonScanner.h"
#include "core/session/JsonText.h"

namespace spanwright {

/// The pointer to a member of what `pointer` points to (RFC 6901).
std::string childPointer(std::string_view pointer, std::string_view key);
std::string childPointer(std::string_view pointer, std::size_t index);

/// Passes a value that this program has no use for, and keeps it in the record as it stands.
void keepUnknown(JsonScanner& scan, Record& record, const std::string& pointer);
/// Writes what was kept of the object at `pointer`.
void writeUnknown(JsonText& json, const Record& record, std::string_view pointer);
/// Forgets what was kept at or below `pointer`, before it is read anew.
void forgetUnknown(Record& record, const std::string& pointer);

} // namespace spanwright
