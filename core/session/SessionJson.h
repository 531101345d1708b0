// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"
#include "core/record/Record.h"
#include "core/session/StoredResults.h"

namespace spanwright {

/// What a session file says.
struct Session {
    Record record;
    StoredResults results;
    /// SealBroken, JournalBroken: the file opens all the same, and the window says so.
    std::vector<Warning> warnings;
    int version = 1;
    /// Written by a newer program: it may be looked at, and is never written back.
    bool readOnly = false;
};

/// The layout version that is written.
inline constexpr int SessionVersion = 1;

/// The record in the layout of resources/session.schema.json: fixed order of keys, one reading, exclusion and journal entry a
/// line, journal chained, sealed. Numbers that were typed are strings, so that 100.10 stays 100.10 in every program's hands.
/// The same record and results give the same bytes.
std::string writeSession(const Record& record, const StoredResults& results);

/// Reads what writeSession() wrote, or a newer program. Errors: FileEmpty; NotJson (facts: line); NotASession; SessionValueBad
/// (facts: line, key, text).
Result<Session> readSession(std::string_view json);

/// What the journal has to tell of a file that did not hold, before saving seals and chains it anew: "seal-broken" and
/// "journal-broken", one entry for each of these warnings.
std::vector<JournalEntry> entriesAbout(const std::vector<Warning>& warnings, std::int64_t at, const std::string& who);

} // namespace spanwright
