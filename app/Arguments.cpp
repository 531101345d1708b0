// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Arguments.h"

#include <algorithm>

namespace spanwright {

bool Arguments::has(std::string_view name) const {
    return std::any_of(options.begin(), options.end(), [&](const auto& option) { return option.first == name; });
}

std::optional<std::string> Arguments::value(std::string_view name) const {
    const auto found = std::find_if(options.rbegin(), options.rend(), [&](const auto& option) { return option.first == name; });
    return found == options.rend() ? std::nullopt : std::optional(found->second);
}

Result<Arguments> parseArguments(std::span<const std::string> words, std::span<const OptionSpec> known) {
    Arguments arguments;
    for (std::size_t i = 0; i < words.size(); ++i) {
        const std::string& word = words[i];
        if (word == "--") {
            arguments.files.insert(arguments.files.end(), words.begin() + static_cast<std::ptrdiff_t>(i) + 1, words.end());
            break;
        }
        if (word.size() < 2 || word.front() != '-') {
            arguments.files.push_back(word);
            continue;
        }
        const std::size_t equals = word.find('=');
        const std::string name = word.substr(0, equals);
        const auto spec = std::find_if(known.begin(), known.end(), [&](const OptionSpec& s) { return s.name == name; });
        if (spec == known.end())
            return Error(ErrorCode::UsageUnknownOption, {{"option", name}});
        if (spec->kind == OptionKind::Flag) {
            if (equals != std::string::npos)
                return Error(ErrorCode::UsageValueBad, {{"option", name}, {"text", word.substr(equals + 1)}});
            arguments.options.emplace_back(name, "");
        } else if (equals != std::string::npos) {
            arguments.options.emplace_back(name, word.substr(equals + 1));
        } else if (i + 1 < words.size() && !words[i + 1].starts_with("--")) {
            arguments.options.emplace_back(name, words[++i]);
        } else {
            return Error(ErrorCode::UsageValueMissing, {{"option", name}});
        }
    }
    return arguments;
}

Result<std::string> onlyFile(const Arguments& arguments, std::string_view command) {
    if (arguments.files.empty() || arguments.files.front().empty())
        return Error(ErrorCode::UsageNoFile, {{"command", std::string(command)}});
    if (arguments.files.size() > 1)
        return Error(ErrorCode::UsageUnknownCommand, {{"command", std::string(command)}, {"text", arguments.files[1]}});
    return arguments.files.front();
}

} // namespace spanwright
