// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/exchange/CsvRules.h"

#include <functional>
#include <span>

namespace spanwright {

/// A column that is put behind those of a table.
struct AddedColumn {
    std::string name, unit; ///< the unit stands in the units row, or behind the name where there is none
};

/// The cells of one data row (from 0), as many as columns are added; numbers with a decimal point, which gets the decimal mark.
struct AddedCell {
    std::string text;
    bool number = false;
};
using AddedCells = std::function<std::vector<AddedCell>(std::size_t row)>;

/// The table with columns added to its right: what stands there already is kept character by character, lines without cells too;
/// a line with fewer cells than others is filled up, so that what is added stands in its column. UTF-8; with a byte order mark where the bytes had one or were no UTF-8. Errors: as readTable(); RaggedRow (facts: line) where a
/// reading holds something behind the columns of the table.
Result<std::string> withAddedColumns(std::string_view bytes, const CsvRules& rules, DecimalMark mark, std::span<const AddedColumn> added,
                                     const AddedCells& cells);

} // namespace spanwright
