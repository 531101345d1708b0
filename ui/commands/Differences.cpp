// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/commands/Differences.h"

#include <map>

namespace spanwright {

std::string matrixText(const UncertaintyMatrix& matrix) {
    if (matrix.empty())
        return {};
    std::string text = matrix.source;
    for (const MatrixRow& row : matrix.rows) {
        text += "; " + std::string(nameOf(row.side)) + " " + std::to_string(row.reading) + ":";
        for (const Decimal& covariance : row.covariances)
            text += " " + covariance.text();
    }
    return text;
}

std::vector<JournalEntry> differences(const FieldLines& before, const FieldLines& after) {
    std::map<std::string_view, std::string_view> earlier, later;
    for (const auto& [path, text] : before)
        earlier.emplace(path, text);
    for (const auto& [path, text] : after)
        later.emplace(path, text);

    std::vector<JournalEntry> made;
    const auto add = [&](const std::string& path, std::string_view from, std::string_view to) {
        if (from != to)
            made.push_back({.who = {}, .what = "changed", .where = path, .before = std::string(from), .after = std::string(to), .reason = {}});
    };
    for (const auto& [path, text] : before) {
        const auto found = later.find(path);
        add(path, text, found == later.end() ? std::string_view{} : found->second);
    }
    for (const auto& [path, text] : after)
        if (!earlier.contains(path))
            add(path, {}, text);
    return made;
}

} // namespace spanwright
