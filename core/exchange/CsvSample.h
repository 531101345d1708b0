// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace spanwright {

/// What a cell could be, before it is known how its column is read.
enum class CellLook { Blank, Number, Time, NoValueWord, Text };

/// A number under either decimal mark, also one with thousands separators, which are refused only later.
CellLook lookOf(std::string_view cell);
/// "---", "NA", "null", …: words by which programs say that there is no value, and nothing went wrong.
bool isUsualMissingWord(std::string_view cell);

/// A row at the beginning of a table; cells without blanks around them.
struct SampleRow {
    std::size_t line = 0;
    std::vector<std::string> cells;
};

bool hasNumber(const SampleRow& row);

/// The beginning of a table.
struct CsvSample {
    std::vector<SampleRow> rows;
    std::size_t unclosedQuote = 0; ///< line in which a quote was opened that nothing closes; 0 when there is none
};

/// The first `most` rows that are not blank.
CsvSample readCsvSample(std::string_view text, char separator, char quote, std::size_t most);
std::vector<SampleRow> sampleRows(std::string_view text, char separator, char quote, std::size_t most);

/// The number of fields that most rows with numbers have; of rows altogether when none has.
std::size_t usualWidth(std::span<const SampleRow> rows);
/// The same without columns at the end that are blank in every row and have no name (a separator at the end of each line).
std::size_t usedWidth(std::span<const SampleRow> data, const SampleRow* names, std::size_t width);
/// The first row whose cells are numbers or times where those of the later rows are.
std::size_t firstDataRow(std::span<const SampleRow> rows, std::size_t width);

} // namespace spanwright
