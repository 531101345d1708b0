// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/commands/Workbench.h"

#include "core/evaluate/evaluate.h"
#include "ui/commands/RecordCommand.h"

#include <QFutureWatcher>
#include <QtConcurrent/QtConcurrentRun>

namespace spanwright {

namespace {

using Snapshot = std::shared_ptr<const Evaluation>;

/// Up to so many readings the evaluation takes less than a frame, and is there before the next key is pressed.
constexpr std::size_t fewReadings = 2000;
/// The same with covariances between readings, which cost the third power of their number.
constexpr std::size_t fewCorrelated = 50;

bool takesLong(const Record& record) {
    const bool correlated = !record.uncertaintyMatrix.empty() || record.choices.sharedError == SharedError::Fit;
    return record.readings->size() > (correlated ? fewCorrelated : fewReadings);
}

Snapshot evaluated(const Record& record, Progress& progress) {
    Result<Evaluation> result = evaluate(record, progress);
    return result ? std::make_shared<const Evaluation>(std::move(result).value()) : nullptr;
}

} // namespace

class Workbench::Private {
  public:
    Clock clock;
    Record record;
    Snapshot evaluation = std::make_shared<const Evaluation>();
    QUndoStack stack;
    QString person;
    std::set<ReadingId> selection;
    bool readOnly = false;

    std::shared_ptr<Progress> progress; ///< of the evaluation that is awaited; null: none is
    std::vector<QFuture<Snapshot>> running;

    void stop() {
        if (progress)
            progress->cancel();
        progress.reset();
    }
};

Workbench::Workbench(Clock clock, QObject* parent) : QObject(parent), d(std::make_unique<Private>()) {
    d->clock = std::move(clock);
}

Workbench::~Workbench() {
    d->stop();
    for (QFuture<Snapshot>& future : d->running)
        future.waitForFinished();
}

const Record& Workbench::record() const {
    return d->record;
}

std::shared_ptr<const Evaluation> Workbench::evaluation() const {
    return d->evaluation;
}

bool Workbench::evaluating() const {
    return d->progress != nullptr;
}

void Workbench::settle() {
    if (!evaluating())
        return;
    QFuture<Snapshot> newest = d->running.back();
    newest.waitForFinished();
    // Its watcher will find that somebody else took the answer.
    take(newest.resultCount() > 0 ? newest.result() : nullptr);
}

QUndoStack& Workbench::undoStack() {
    return d->stack;
}

std::int64_t Workbench::now() const {
    return d->clock();
}

QString Workbench::person() const {
    return d->person;
}

void Workbench::setPerson(const QString& initials) {
    if (d->person == initials)
        return;
    d->person = initials;
    emit personChanged();
}

void Workbench::setRecord(Record record) {
    d->stop();
    d->stack.clear();
    d->record = std::move(record);
    d->readOnly = false;
    d->selection.clear();
    d->evaluation = std::make_shared<const Evaluation>();
    evaluateNow();
    emit selectionChanged();
}

bool Workbench::readOnly() const {
    return d->readOnly;
}

void Workbench::setReadOnly(bool readOnly) {
    if (d->readOnly == readOnly)
        return;
    d->readOnly = readOnly;
    emit recordChanged();
}

void Workbench::perform(std::unique_ptr<RecordCommand> command) {
    if (d->readOnly || command->changesNothing(d->record))
        return;
    command->workbench_ = this;
    command->stamp(now(), d->person.toStdString());
    d->stack.push(command.release());
}

void Workbench::change(const std::function<std::vector<JournalEntry>(Record&)>& doIt) {
    for (JournalEntry& entry : doIt(d->record)) {
        entry.at = now();
        entry.who = d->person.toStdString();
        d->record.journal.edit().append(std::move(entry));
    }
    const std::size_t before = d->selection.size();
    std::erase_if(d->selection, [&](ReadingId id) { return d->record.readings->indexOf(id) == d->record.readings->size(); });
    const bool fewerSelected = d->selection.size() != before;
    evaluateNow();
    if (fewerSelected)
        emit selectionChanged();
}

void Workbench::evaluateNow() {
    const bool wasBusy = evaluating();
    d->stop();
    if (takesLong(d->record)) {
        evaluateAside();
        emit recordChanged();
        if (!wasBusy)
            emit evaluatingChanged(true);
        return;
    }
    Progress progress;
    Snapshot snapshot = evaluated(d->record, progress);
    if (snapshot)
        d->evaluation = std::move(snapshot);
    emit recordChanged();
    emit evaluationChanged();
    if (wasBusy)
        emit evaluatingChanged(false);
}

void Workbench::evaluateAside() {
    std::erase_if(d->running, [](const QFuture<Snapshot>& future) { return future.isFinished(); });
    auto progress = std::make_shared<Progress>();
    d->progress = progress;
    QFuture<Snapshot> future = QtConcurrent::run([snapshot = d->record, progress](QPromise<Snapshot>& promise) {
        if (Snapshot made = evaluated(snapshot, *progress))
            promise.addResult(std::move(made));
    });
    d->running.push_back(future);
    auto* watcher = new QFutureWatcher<Snapshot>(this);
    connect(watcher, &QFutureWatcherBase::finished, this, [this, watcher, progress] {
        watcher->deleteLater();
        // Only the newest request may answer.
        if (d->progress == progress)
            take(watcher->future().resultCount() > 0 ? watcher->result() : nullptr);
    });
    watcher->setFuture(future);
}

void Workbench::take(std::shared_ptr<const Evaluation> evaluation) {
    d->progress.reset();
    if (evaluation) {
        d->evaluation = std::move(evaluation);
        emit evaluationChanged();
    }
    emit evaluatingChanged(false);
}

const std::set<ReadingId>& Workbench::selection() const {
    return d->selection;
}

void Workbench::select(std::set<ReadingId> ids) {
    if (ids == d->selection)
        return;
    d->selection = std::move(ids);
    emit selectionChanged();
}

} // namespace spanwright
