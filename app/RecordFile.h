// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Arguments.h"
#include "core/base/Warning.h"
#include "core/exchange/CsvRules.h"
#include "core/record/Record.h"
#include "core/session/StoredResults.h"

namespace spanwright {

/// The options that say how a CSV is understood: columns by name or number, decimal mark, separator, encoding, rows left out.
std::span<const OptionSpec> tableOptions();

/// That a phase which an option asks for has no readings.
Error noReadingsOf(Phase phase);

/// A record as a file gave it, and what there is to say about how it was understood (one line each, for the error stream).
struct LoadedRecord {
    Record record;
    std::vector<std::string> notes;
    std::vector<Warning> broken; ///< of a session: SealBroken, JournalBroken
    bool session = false;
};

/// The decimal mark of --decimal, point when it is not given. Error: UsageValueBad.
Result<DecimalMark> decimalMark(const Arguments& arguments);

/// Whether the bytes are meant as a session: JSON, or a name that ends in .spanwright.
bool looksLikeSession(const std::string& path, std::string_view bytes);

/// A session as it was read.
struct LoadedSession {
    Record record;
    StoredResults results;
    std::vector<Warning> broken; ///< SealBroken, JournalBroken: nothing may be built upon the file
};

/// Reads a session whole. Errors: of the readers, with fact file; NewerLayout (facts: version), which only a newer program
/// understands in full.
Result<LoadedSession> loadSessionFile(const std::string& path);

/// Reads a session or a CSV into a record, with the options of choiceOptions(), --positions and --exclude put over it. A cell of a used column
/// that is no number refuses the file, unless its row is excluded. Errors: of the readers, with fact file; UsageValueBad.
Result<LoadedRecord> loadRecord(const std::string& path, const Arguments& arguments);

} // namespace spanwright
