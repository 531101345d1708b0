// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Arguments.h"
#include "core/exchange/CsvRules.h"
#include "core/exchange/FileBytes.h"
#include "core/record/Record.h"

namespace spanwright {

/// A column of indications, and the table that it stands in.
struct LoadedIndications {
    FileBytes file;
    CsvRules rules;
    std::size_t column = 0; ///< in rules.columns
    DecimalColumn values;   ///< one a data row; a blank cell is missing
    std::vector<std::string> notes;
};

/// Reads a column of indications of the item from a CSV, by the options of a table; other columns are not looked at. It is the column
/// that --indication names, else the one of the quantity's name, or "indication", else the only column of numbers that can be meant: one named like
/// the reference cannot, nor, where another has the unit of the indication, one without. Errors: of the readers, with fact file; a
/// cell that is no number; ColumnUnclear, HeaderShort; UnitsDiffer where the header states another unit than the quantity has.
Result<LoadedIndications> loadIndications(const std::string& path, const Arguments& arguments, const Item& item);

} // namespace spanwright
