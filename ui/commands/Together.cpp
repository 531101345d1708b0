// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/commands/Together.h"

#include <algorithm>

namespace spanwright {

void Together::apply(Record& record) {
    for (const auto& change : changes_)
        change->apply(record);
}

void Together::revert(Record& record) {
    for (auto change = changes_.rbegin(); change != changes_.rend(); ++change)
        (*change)->revert(record);
}

std::vector<JournalEntry> Together::entries(const Record& before, const Record& after) const {
    std::vector<JournalEntry> all;
    for (const auto& change : changes_)
        for (JournalEntry& entry : change->entries(before, after))
            all.push_back(std::move(entry));
    return all;
}

bool Together::changesNothing(const Record& record) const {
    return std::all_of(changes_.begin(), changes_.end(), [&](const auto& change) { return change->changesNothing(record); });
}

void Together::stamp(std::int64_t now, const std::string& person) {
    for (const auto& change : changes_)
        change->stamp(now, person);
}

} // namespace spanwright
