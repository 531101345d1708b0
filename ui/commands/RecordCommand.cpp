// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/commands/RecordCommand.h"

#include "ui/commands/Workbench.h"

namespace spanwright {

namespace {

/// What the entries of a change look like when it is taken back or made again: what was changed stays readable in `reason`.
std::vector<JournalEntry> again(std::vector<JournalEntry> entries, const char* what) {
    for (JournalEntry& entry : entries) {
        entry.reason = entry.reason.empty() ? entry.what : entry.what + ": " + entry.reason;
        entry.what = what;
    }
    return entries;
}

} // namespace

void RecordCommand::redo() {
    workbench_->change([this](Record& record) {
        const Record before = record;
        apply(record);
        std::vector<JournalEntry> made = entries(before, record);
        if (once_)
            made = again(std::move(made), "redone");
        once_ = true;
        return made;
    });
}

void RecordCommand::undo() {
    workbench_->change([this](Record& record) {
        const Record after = record;
        revert(record);
        std::vector<JournalEntry> made = again(entries(record, after), "undone");
        for (JournalEntry& entry : made)
            std::swap(entry.before, entry.after);
        return made;
    });
}

} // namespace spanwright
