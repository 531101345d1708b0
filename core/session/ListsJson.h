// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"
#include "core/session/JsonScanner.h"
#include "core/session/JsonText.h"

#include <span>

namespace spanwright {

/// Writes exclusions as an array, one a line. `record` holds what was kept of unknown keys.
void writeExclusions(JsonText& json, const Record& record, std::span<const Exclusion> exclusions);
/// Reads such an array and adds each to the record's exclusions.
void readExclusions(JsonScanner& scan, Record& record);

/// Writes journal entries as an array, one a line, each with the digest of the one before ("previous"), of which the first is
/// given; empty when there is none.
void writeJournal(JsonText& json, const Record& record, std::span<const JournalEntry> entries, std::string previous);
/// Reads such an array and appends it to the record's journal. Number, from 1, of the first entry whose "previous" is not the
/// digest of the one before; 0 when the chain holds.
std::size_t readJournal(JsonScanner& scan, Record& record, std::string previous);

} // namespace spanwright
