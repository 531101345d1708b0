// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Arguments.h"
#include "core/exchange/ReadingImport.h"

#include <optional>
#include <string>

namespace spanwright {

/// What --decimal, --separator, --encoding and --missing say of a table. Error: UsageValueBad (facts: option, text).
Result<CsvWishes> wishesOf(const Arguments& arguments);

/// The first column of numbers that is not `other`; where there is none, the first column, so that its cells say what is wrong.
std::optional<std::size_t> firstNumbersBut(const CsvRules& rules, std::optional<std::size_t> other);

/// What could be read in two ways is not read at all, as nobody looks over the first rows here: a number with an unclear decimal mark, a
/// header that leaves open which column a name belongs to. Null where all that is taken is certain.
const Error* doubtToRefuse(const CsvRules& rules, const ImportMapping& mapping);

/// How a table was understood, on one line.
std::string understood(const std::string& path, const CsvRules& rules, const ImportMapping& mapping);

} // namespace spanwright
