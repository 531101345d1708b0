// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"
#include "core/base/Result.h"

#include <optional>
#include <string_view>
#include <vector>

namespace spanwright {

using MatrixNumbers = std::vector<std::vector<Decimal>>;

/// A table of nothing but numbers, row by row, divided by tabs, semicolons, commas or blanks, as it is pasted or stands in a file;
/// empty lines and lines that begin with # are passed over. The decimal mark is a point unless `mark` says otherwise, or the numbers
/// hold commas and are divided by something else. Errors: NoDataRows; CellEmpty, CellNotANumber, NumberTooLarge, ThousandsSeparator
/// (facts: row, column, text).
Result<MatrixNumbers> readMatrix(std::string_view text, std::optional<DecimalMark> mark = {});

} // namespace spanwright
