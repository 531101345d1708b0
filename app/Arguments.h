// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"

#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace spanwright {

enum class OptionKind { Flag, Value };

/// An option that a command knows, with its two dashes.
struct OptionSpec {
    std::string_view name;
    OptionKind kind = OptionKind::Value;
};

/// A command line taken apart: options in the order given, and what is no option.
struct Arguments {
    std::vector<std::pair<std::string, std::string>> options;
    std::vector<std::string> files;

    [[nodiscard]] bool has(std::string_view name) const;
    /// The value given last; empty when the option was not given.
    [[nodiscard]] std::optional<std::string> value(std::string_view name) const;
};

/// Takes "--name value", "--name=value", "--flag"; "--" ends the options. A value may begin with a single minus sign. Errors:
/// UsageUnknownOption, UsageValueMissing, UsageValueBad (a flag with a value). Facts: option.
Result<Arguments> parseArguments(std::span<const std::string> words, std::span<const OptionSpec> known);

/// The one file that a command takes. Errors: UsageNoFile (fact: command), UsageUnknownCommand (facts: command, text) where there are more.
Result<std::string> onlyFile(const Arguments& arguments, std::string_view command);

} // namespace spanwright
