// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Arguments.h"
#include "core/record/Choices.h"

namespace spanwright {

/// The options that decide how readings are evaluated: --function, --fit, --method, --weights, --covariance, --coverage, --phase,
/// --at, --read, --repeats, --outliers, --outlier-level, --shared-error, --robust, --tolerance-share.
std::span<const OptionSpec> choiceOptions();

/// The choices with the options given put over them. Numbers are read with the decimal mark; a list is divided at commas, or at
/// semicolons when the comma is the decimal mark. Errors: UsageValueBad (facts: option, text).
Result<Choices> withOptions(Choices choices, const Arguments& arguments, DecimalMark mark);

/// Numbers divided at commas, or at semicolons when the comma is the decimal mark. Error: UsageValueBad (facts: option, text).
Result<std::vector<Decimal>> numberList(std::string_view option, std::string_view text, DecimalMark mark);

/// Whole numbers from 1, divided by commas or semicolons. Error: UsageValueBad (facts: option, text).
Result<std::vector<std::size_t>> rowList(std::string_view option, std::string_view text);

} // namespace spanwright
