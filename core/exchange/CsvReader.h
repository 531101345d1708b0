// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Progress.h"
#include "core/exchange/CsvRules.h"
#include "core/record/DecimalColumn.h"

#include <span>

namespace spanwright {

/// A cell (or a row, when the code is RaggedRow) that is not what its column's rule says; its value is missing from the table.
struct CellIssue {
    ErrorCode code = ErrorCode::CellNotANumber;
    std::size_t row = 0;  ///< data row from 1
    std::size_t line = 0; ///< line of the file from 1
    std::size_t column = 0; ///< from 0
    std::string text;     ///< as it stands in the file, at most 80 bytes

    /// With facts line, column (its label) and text.
    [[nodiscard]] Error error(const CsvRules& rules) const;
};

/// Issues as they were met: all are counted, the first are kept.
struct CellIssues {
    static constexpr std::size_t MostKept = 1000;
    std::vector<CellIssue> first;
    std::size_t count = 0;
    void add(CellIssue issue);
};

/// A column to read, and as what: by its rule, or as text whatever it holds.
struct WantedColumn {
    std::size_t source = 0; ///< index in CsvRules::columns
    ColumnKind kind = ColumnKind::Number;
};

/// The cells of one column that was asked for; only the member of its kind is filled.
struct TableColumn {
    std::size_t source = 0; ///< index in CsvRules::columns
    ColumnKind kind = ColumnKind::Text;
    DecimalColumn numbers;
    std::vector<std::optional<std::int64_t>> times; ///< ms since 1970-01-01 UTC
    std::vector<std::string> texts;
    std::size_t missing = 0; ///< blank cells and missing words; cells with an issue are not among them
};

struct Table {
    std::size_t rows = 0;
    std::vector<TableColumn> columns; ///< in the order asked for
    std::vector<std::uint32_t> lines; ///< of the file, from 1, of every row
    CellIssues issues;
};


Result<Table> readTable(std::string_view bytes, const CsvRules& rules, std::span<const WantedColumn> wanted,
                        Progress& progress);

/// A cell before it is taken in.
struct PreviewCell {
    std::string text;       ///< as in the file
    std::string understood; ///< number with a point, time as ISO 8601, or text; empty when missing or refused
    std::optional<ErrorCode> refused;
};

struct PreviewRow {
    std::size_t line = 0; ///< of the file, from 1
    std::vector<PreviewCell> cells; ///< one a column, and more where the row has more
};

/// The first `most` data rows, every column.
Result<std::vector<PreviewRow>> previewRows(std::string_view bytes, const CsvRules& rules, std::size_t most);

} // namespace spanwright
