// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/RecordCommand.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

/// Puts rows into the record: a row with an id replaces that reading, a row with id 0 is appended and gets the next free id. One
/// step for whatever was typed or pasted at once. Time and initials of new rows are filled in when they are empty.
class PutReadings : public RecordCommand {
  public:
    PutReadings(const QString& text, std::vector<Reading> rows, std::string reason = {});
    /// What the journal is to say of one row besides the reason.
    void remark(std::size_t row, const std::string& words);
    /// Ids of the rows, once performed.
    [[nodiscard]] std::vector<ReadingId> ids() const;

    void apply(Record& record) override;
    void revert(Record& record) override;
    [[nodiscard]] std::vector<JournalEntry> entries(const Record& before, const Record& after) const override;
    [[nodiscard]] bool changesNothing(const Record& record) const override;
    void stamp(std::int64_t now, const std::string& person) override;

  private:
    [[nodiscard]] std::string reasonOf(std::size_t row) const;

    std::vector<Reading> rows_;
    std::vector<Reading> replaced_;
    std::string reason_;
    std::vector<std::string> remarks_; ///< by row; empty where there is nothing to say of any
    std::vector<bool> added_;
};

/// Appends readings, in the order given.
class AddReadings : public PutReadings {
  public:
    explicit AddReadings(std::vector<Reading> rows);
};

/// Changes one number of one reading; the value before stays in the journal (ISO/IEC 17025:2017, 7.5.2).
class AmendValue : public RecordCommand {
  public:
    AmendValue(ReadingId id, NumberColumn column, std::optional<Decimal> value, std::string reason = {});

    void apply(Record& record) override;
    void revert(Record& record) override;
    [[nodiscard]] std::vector<JournalEntry> entries(const Record& before, const Record& after) const override;
    [[nodiscard]] bool changesNothing(const Record& record) const override;

  private:
    ReadingId id_;
    NumberColumn column_;
    std::optional<Decimal> value_;
    std::optional<Decimal> before_;
    std::string reason_;
};

/// Where readings belong: phase, run, direction, and the set point where given. Empty fields stay as they are.
struct Place {
    std::optional<Phase> phase;
    std::optional<int> run;
    std::optional<Direction> direction;
    std::optional<Decimal> setPoint;
};

class PlaceReadings : public RecordCommand {
  public:
    PlaceReadings(std::vector<ReadingId> ids, Place place);

    void apply(Record& record) override;
    void revert(Record& record) override;
    [[nodiscard]] std::vector<JournalEntry> entries(const Record& before, const Record& after) const override;

  private:
    std::vector<ReadingId> ids_;
    Place place_;
    std::vector<Reading> before_;
};

/// Takes in whole columns, as an importer read them.
class ImportReadings : public RecordCommand {
  public:
    /// `origin` is written in the journal: the file's name or "pasted".
    ImportReadings(ReadingColumns::Block block, std::string origin);

    void apply(Record& record) override;
    void revert(Record& record) override;
    [[nodiscard]] std::vector<JournalEntry> entries(const Record& before, const Record& after) const override;
    [[nodiscard]] bool changesNothing(const Record& record) const override;
    void stamp(std::int64_t now, const std::string& person) override;

  private:
    ReadingColumns::Block block_;
    std::string origin_;
    ReadingId firstId_ = 0;
};

} // namespace spanwright
