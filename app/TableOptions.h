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

/// A number that could be read in two ways is not read at all: nobody looks over the first rows here, as in the window. Null where
/// every number is certain.
const Error* doubtAboutNumbers(const CsvRules& rules, const ImportMapping& mapping);

/// How a table was understood, on one line.
std::string understood(const std::string& path, const CsvRules& rules, const ImportMapping& mapping);

} // namespace spanwright
