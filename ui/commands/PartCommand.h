// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Differences.h"
#include "ui/commands/RecordCommand.h"

#include <memory>

namespace spanwright {

/// The name of a part as in the file and in the journal.
template <class Part>
std::string partName(Part Record::*part) {
    static const Record record;
    std::string name;
    parts(record, [&](std::string_view candidate, const auto& field) {
        if (static_cast<const void*>(&field) == static_cast<const void*>(&(record.*part)))
            name = candidate;
    });
    return name;
}

/// Puts another value in the place of a whole part of the record: job, item, standards, conditions, plan, choices, budget,
/// limits, sign-offs. The journal gets one entry for each field that differs.
template <class Part>
class PartCommand final : public RecordCommand {
  public:
    PartCommand(const QString& text, Part Record::*part, Part after, std::string reason = {})
        : RecordCommand(text), part_(part), after_(std::move(after)), reason_(std::move(reason)) {}

    void apply(Record& record) override {
        before_ = record.*part_;
        record.*part_ = after_;
    }
    void revert(Record& record) override { record.*part_ = before_; }
    [[nodiscard]] std::vector<JournalEntry> entries(const Record&, const Record&) const override {
        const std::string name = partName(part_);
        std::vector<JournalEntry> made = differences(fieldLines(name, before_), fieldLines(name, after_));
        for (JournalEntry& entry : made)
            entry.reason = reason_;
        return made;
    }
    [[nodiscard]] bool changesNothing(const Record& record) const override { return record.*part_ == after_; }

  private:
    Part Record::*part_;
    Part before_{};
    Part after_;
    std::string reason_;
};

/// The command that changes a copy of a part: changePart(record, &Record::job, tr("customer"), [&](Job& job) { … }).
template <class Part, class Edit>
std::unique_ptr<RecordCommand> changePart(const Record& record, Part Record::*part, const QString& text, Edit&& edit) {
    Part after = record.*part;
    edit(after);
    return std::make_unique<PartCommand<Part>>(text, part, std::move(after));
}

} // namespace spanwright
