// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/RecordCommand.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

/// Sets readings aside for a reason; they stay in the record and in view.
class Exclude : public RecordCommand {
  public:
    /// `words` must not be empty for ExclusionReason::Other.
    Exclude(std::vector<ReadingId> ids, ExclusionReason reason, std::string words = {});

    void apply(Record& record) override;
    void revert(Record& record) override;
    [[nodiscard]] std::vector<JournalEntry> entries(const Record& before, const Record& after) const override;
    [[nodiscard]] bool changesNothing(const Record& record) const override;
    void stamp(std::int64_t now, const std::string& person) override;

  private:
    std::vector<Exclusion> made_;
    std::vector<Exclusion> before_;
};

/// Takes excluded readings back in.
class Readmit : public RecordCommand {
  public:
    explicit Readmit(std::vector<ReadingId> ids, std::string reason = {});

    void apply(Record& record) override;
    void revert(Record& record) override;
    [[nodiscard]] std::vector<JournalEntry> entries(const Record& before, const Record& after) const override;
    [[nodiscard]] bool changesNothing(const Record& record) const override;

  private:
    std::vector<ReadingId> ids_;
    std::vector<Exclusion> before_;
    std::string reason_;
};

} // namespace spanwright
