// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"
#include "core/exchange/TextEncoding.h"
#include "core/exchange/TimeCell.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

enum class ColumnKind { Number, Time, Text, Empty };

/// One column and the one rule by which all its cells are read.
struct CsvColumn {
    std::string name; ///< from the header, without its unit; empty when there is no header
    std::string unit; ///< from the units row, or from the name: "p / bar", "p [bar]", "p (bar)"
    ColumnKind kind = ColumnKind::Text;
    DecimalMark decimal = DecimalMark::Point;
    DateOrder dateOrder = DateOrder::YearMonthDay;
    bool operator==(const CsvColumn&) const = default;
};

/// How a table of text is read. Everything is stated here before a cell is taken in; nothing is guessed cell by cell.
struct CsvRules {
    /// A separator that stands for any run of blanks.
    static constexpr char Blanks = ' ';

    Encoding encoding = Encoding::Utf8;
    char separator = ',';
    char quote = '"';
    std::size_t headerRows = 0;          ///< lines with something on them before the data, names and units among them
    std::optional<std::size_t> namesRow; ///< which of these holds the names, from 0
    std::optional<std::size_t> unitsRow; ///< which of these holds the units, from 0
    std::vector<std::string> missingWords; ///< cells that stand for no value, besides blank ones; compared without case
    std::vector<CsvColumn> columns;

    /// What could also have been meant: SeparatorUnclear (facts: separator), DecimalMarkUnclear (facts: column, text),
    /// DateOrderUnclear (facts: column, text), HeaderShort (facts: line, got, needed). The guess stands in the rules all the same, and is shown before it is used.
    std::vector<Error> doubts;
};

/// What the user says, where a guess would be wrong; the rest is guessed around it.
struct CsvWishes {
    std::optional<Encoding> encoding;
    std::optional<char> separator;
    std::optional<DecimalMark> decimal;   ///< of every column
    std::optional<DateOrder> dateOrder;   ///< of every column of times
    std::optional<std::size_t> headerRows;
    std::optional<bool> hasUnitsRow;      ///< whether the last header row holds units
    std::vector<std::string> missingWords; ///< besides the usual ones that occur
};

/// Understands a table from its beginning (at most the first 1000 rows). Errors: FileEmpty, FileBinary, FileEncoding,
/// UnclosedQuote (facts: line), NoDataRows (only blank lines, or only a header).
Result<CsvRules> guessRules(std::string_view bytes, const CsvWishes& wishes = {});

/// ";", "semicolon", "tab", "\t", "comma", "space", "pipe", … Error: UsageValueBad (facts: text).
Result<char> parseSeparatorName(std::string_view text);

/// The column of that name (without case; with or without its unit), or of that number from 1. Errors: ColumnMissing (facts:
/// column); ColumnUnclear (facts: named, columns) where several have the name.
Result<std::size_t> findColumn(const CsvRules& rules, std::string_view nameOrNumber);

/// Its name, or its number from 1 when it has none.
std::string columnLabel(const CsvRules& rules, std::size_t column);

} // namespace spanwright
