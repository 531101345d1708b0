// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

#include <QObject>
#include <QUndoStack>

#include <functional>
#include <memory>
#include <set>

namespace spanwright {

class RecordCommand;

/// The one place in the window that holds the Record. Views read record() and evaluation(), ask for changes with perform(), and
/// redraw on the signals. Evaluates off the window's thread; the newest request wins.
class Workbench : public QObject {
    Q_OBJECT

  public:
    /// The clock gives ms since 1970-01-01 UTC.
    using Clock = std::function<std::int64_t()>;
    explicit Workbench(Clock clock, QObject* parent = nullptr);
    ~Workbench() override;

    [[nodiscard]] const Record& record() const;
    /// Never null; belongs to the newest record that was evaluated, which may be one step behind record().
    [[nodiscard]] std::shared_ptr<const Evaluation> evaluation() const;
    [[nodiscard]] bool evaluating() const;
    /// Waits for the evaluation that is on its way, so that evaluation() belongs to record().
    void settle();
    [[nodiscard]] QUndoStack& undoStack();
    [[nodiscard]] std::int64_t now() const;
    /// Initials that stand in the journal.
    [[nodiscard]] QString person() const;
    void setPerson(const QString& initials);

    /// Takes over another record (opened, new): clears the undo stack.
    void setRecord(Record record);
    /// Whether the record may only be looked at (a newer layout version).
    [[nodiscard]] bool readOnly() const;
    void setReadOnly(bool readOnly);

    /// The only way to change the record: runs the command, puts it on the undo stack, journals it, evaluates. A command that
    /// would change nothing is dropped, and so is every command while the record is read-only.
    void perform(std::unique_ptr<RecordCommand> command);

    /// Readings that are selected everywhere.
    [[nodiscard]] const std::set<ReadingId>& selection() const;
    void select(std::set<ReadingId> ids);

  signals:
    void recordChanged();
    void evaluationChanged();
    void evaluatingChanged(bool busy);
    void selectionChanged();
    void personChanged();

  private:
    class Private;
    friend class RecordCommand;
    /// Runs a change of the record, appends the entries it returns and lets everybody know.
    void change(const std::function<std::vector<JournalEntry>(Record&)>& doIt);
    void evaluateNow();
    void evaluateAside();
    void take(std::shared_ptr<const Evaluation> evaluation);

    std::unique_ptr<Private> d;
};

} // namespace spanwright
