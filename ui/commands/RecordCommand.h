// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <QString>
#include <QUndoCommand>

#include <vector>

namespace spanwright {

class Workbench;

/// A change of the record that can be undone. A subclass holds row ids and values, never an index of a model. apply() and
/// revert() change the record's content; this class adds the journal entries (also for undo and redo) and tells the workbench.
class RecordCommand : public QUndoCommand {
  public:
    explicit RecordCommand(const QString& text) : QUndoCommand(text) {}
    void redo() final;
    void undo() final;

    virtual void apply(Record& record) = 0;
    virtual void revert(Record& record) = 0;
    /// What to write in the journal when applied: what, where, before, after, reason; time and person are filled in here.
    [[nodiscard]] virtual std::vector<JournalEntry> entries(const Record& before, const Record& after) const = 0;
    /// Whether applying would leave the record as it is; then it is not performed.
    [[nodiscard]] virtual bool changesNothing(const Record&) const { return false; }
    /// Who changed it and when; told once, before the first apply(), so that a redo gives the same record.
    virtual void stamp(std::int64_t /*now*/, const std::string& /*person*/) {}

  private:
    friend class Workbench;
    Workbench* workbench_ = nullptr;
    bool once_ = false; ///< applied before: a redo
};

} // namespace spanwright
