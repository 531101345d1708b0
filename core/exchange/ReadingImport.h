// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/exchange/CsvReader.h"
#include "core/record/ReadingColumns.h"

namespace spanwright {

/// Which column of the table is which of a reading, as indices in CsvRules::columns.
struct ImportMapping {
    std::optional<std::size_t> reference, indication;
    std::optional<std::size_t> setPoint, direction, run;
    std::optional<std::size_t> uReference, uIndication, uCovariance;
    std::optional<std::size_t> time;
    bool operator==(const ImportMapping&) const = default;
};

/// The first two columns of numbers are reference and indication; nothing else is taken.
ImportMapping firstTwoColumns(const CsvRules& rules);
/// The same, but columns whose names say what they are ("set point", "direction", "run", "u_ref", "time", …) are taken as that.
ImportMapping mappingByNames(const CsvRules& rules);

/// up, rising, increasing, ↑, 1, +1 and down, falling, decreasing, ↓, -1; without case; blank is Unknown. Empty for other
/// words.
std::optional<Direction> parseDirection(std::string_view word);

struct ImportedReadings {
    ReadingColumns::Block block;       ///< rows in the order of the file; the caller adds phase and initials
    std::vector<std::uint32_t> lines;  ///< of the file, from 1, of every row
    CellIssues issues;                 ///< row counts the rows of the file's data; a cell with an issue is missing in the block
    std::size_t missing = 0;           ///< blank cells and missing words among reference and indication
};

/// Reads what the mapping names. A run must be a whole number from 1 (CellOutOfRange), a direction one of its words
/// (DirectionUnknown). Errors: as readTable(); ColumnMissing when the mapping names a column that is not there.
Result<ImportedReadings> readReadings(std::string_view bytes, const CsvRules& rules, const ImportMapping& mapping,
                                      Progress& progress);

} // namespace spanwright
