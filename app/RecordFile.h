// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Arguments.h"
#include "core/base/Warning.h"
#include "core/exchange/CsvRules.h"
#include "core/exchange/FileBytes.h"
#include "core/record/Record.h"
#include "core/session/StoredResults.h"

namespace spanwright {

/// The options that say how a CSV is understood: columns by name or number, decimal mark, separator, encoding, rows left out.
std::span<const OptionSpec> tableOptions();

/// A record as a file gave it, and what there is to say about how it was understood (one line each, for the error stream).
struct LoadedRecord {
    Record record;
    std::vector<std::string> notes;
    std::vector<Warning> broken; ///< of a session: SealBroken, JournalBroken
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

/// A column of indications, and the table that it stands in.
struct LoadedIndications {
    FileBytes file;
    CsvRules rules;
    std::size_t column = 0; ///< in rules.columns
    DecimalColumn values;   ///< one a data row; a blank cell is missing
    std::vector<std::string> notes;
};

/// Reads a column of indications from a CSV, by the same options; other columns are not looked at. Without --indication it is the
/// column of the quantity's name, else the first column of numbers. Errors: of the readers, with fact file; a cell that is no
/// number; UnitsDiffer where the header states another unit than the quantity has.
Result<LoadedIndications> loadIndications(const std::string& path, const Arguments& arguments, const Quantity& quantity);

} // namespace spanwright
