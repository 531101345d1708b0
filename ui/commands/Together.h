// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/RecordCommand.h"

#include <memory>
#include <vector>

namespace spanwright {

/// Several changes as one step of undo.
class Together : public RecordCommand {
  public:
    Together(const QString& text, std::vector<std::unique_ptr<RecordCommand>> changes)
        : RecordCommand(text), changes_(std::move(changes)) {}

    void apply(Record& record) override;
    void revert(Record& record) override;
    [[nodiscard]] std::vector<JournalEntry> entries(const Record& before, const Record& after) const override;
    [[nodiscard]] bool changesNothing(const Record& record) const override;
    void stamp(std::int64_t now, const std::string& person) override;

  private:
    std::vector<std::unique_ptr<RecordCommand>> changes_;
};

} // namespace spanwright
