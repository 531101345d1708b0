// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/Document.h"

#include "core/evaluate/KeyFigures.h"
#include "ui/words/Words.h"

#include <QDir>
#include <QFileInfo>

namespace spanwright {

namespace {

/// A change is on disk within a second; keys that follow one another quickly share a write.
constexpr int keepAfterMs = 250;

/// The newest figures, waited for where they are still being computed, so that what is stored belongs to the record.
StoredResults resultsToStore(Workbench& bench) {
    bench.settle();
    return {SPANWRIGHT_VERSION, keyFigures(*bench.evaluation())};
}

QString differenceText(const StoredResults& stored, const Evaluation& now) {
    const std::vector<Warning> all = differingFigures(stored.figures, now);
    if (all.empty())
        return {};
    return Document::tr("%n stored figure(s) [differs|differ] from what is computed now; the session was saved by version %1. The first: %2", nullptr,
                        static_cast<int>(all.size()))
        .arg(QString::fromStdString(stored.program), warningText(all.front()));
}

} // namespace

Document::Document(Workbench& bench, const QString& dataFolder, QObject* parent)
    : QObject(parent), bench_(bench), dataFolder_(dataFolder) {
    keepTimer_.setSingleShot(true);
    keepTimer_.setInterval(keepAfterMs);
    connect(&keepTimer_, &QTimer::timeout, this, &Document::keepNow);
    connect(&bench, &Workbench::recordChanged, this, [this] {
        // Whether there is anything to keep is known only when the command stands on the stack.
        if (!keepTimer_.isActive())
            keepTimer_.start();
    });
    connect(&bench.undoStack(), &QUndoStack::cleanChanged, this, &Document::stateChanged);
    startKeeping();
}

void Document::startKeeping() {
    keepTimer_.stop();
    QDir().mkpath(dataFolder_);
    recovery_.emplace(path().toStdString(), dataFolder_.toStdString());
    keepingFailed_ = false;
}

void Document::begin(Record record) {
    file_.reset();
    bench_.setRecord(std::move(record));
    savedAt_ = 0;
    startKeeping();
    emit stateChanged();
}

QStringList Document::notesOf(const Session& session, const std::string& heldBy) const {
    QStringList notes;
    if (!heldBy.empty())
        notes << tr("The session is open elsewhere, by %1. It can be looked at here; save it under another name to change it.")
                     .arg(QString::fromStdString(heldBy));
    if (session.readOnly)
        notes << errorText(Error(ErrorCode::NewerLayout, {{"version", std::to_string(session.version)}}));
    for (const Warning& warning : session.warnings)
        notes << warningText(warning);
    return notes;
}

Result<QStringList> Document::open(const QString& path) {
    Result<SessionFile::Opened> opened = SessionFile::open(path.toStdString());
    if (!opened)
        return opened.error();
    QStringList notes = notesOf(opened->session, opened->heldBy);
    const bool readOnly = opened->session.readOnly || !opened->heldBy.empty();
    // Saving seals the file anew; that it once did not hold stays in the journal.
    for (JournalEntry& entry : entriesAbout(opened->session.warnings, bench_.now(), bench_.person().toStdString()))
        opened->session.record.journal.edit().append(std::move(entry));
    file_.emplace(std::move(opened->file));
    bench_.setRecord(std::move(opened->session.record));
    bench_.setReadOnly(readOnly);
    savedEntries_ = bench_.record().journal->size();
    compareResults(opened->session.results, notes);
    savedAt_ = QFileInfo(path).lastModified().toMSecsSinceEpoch();
    startKeeping();
    emit stateChanged();
    return notes;
}

void Document::compareResults(const StoredResults& stored, QStringList& notes) {
    if (!bench_.evaluating()) {
        if (const QString text = differenceText(stored, *bench_.evaluation()); !text.isEmpty())
            notes << text;
        return;
    }
    connect(
        &bench_, &Workbench::evaluationChanged, this,
        [this, stored, entries = bench_.record().journal->size()] {
            // Figures of a record that was changed meanwhile say nothing about the file.
            const QString text = differenceText(stored, *bench_.evaluation());
            if (!text.isEmpty() && bench_.record().journal->size() == entries)
                emit resultsDiffer(text);
        },
        Qt::SingleShotConnection);
}

void Document::saved() {
    bench_.undoStack().setClean();
    savedEntries_ = bench_.record().journal->size();
    savedAt_ = bench_.now();
    recovery_->discard();
    startKeeping();
    emit stateChanged();
}

Result<void> Document::save() {
    const Result<void> written = file_->save(bench_.record(), resultsToStore(bench_));
    if (written)
        saved();
    return written;
}

Result<void> Document::saveAs(const QString& path) {
    if (file_ && QFileInfo(path) == QFileInfo(this->path()) && !bench_.readOnly())
        return save();
    Result<SessionFile> written =
        SessionFile::saveAs(path.toStdString(), bench_.record(), resultsToStore(bench_));
    if (!written)
        return written.error();
    recovery_->discard();
    file_.emplace(std::move(written).value());
    bench_.setReadOnly(false);
    saved();
    return {};
}

Result<QStringList> Document::recover(const Recovery::Found& found) {
    Result<Record> record = Recovery::restore(found.path);
    if (!record)
        return record.error();
    QStringList notes;
    file_.reset();
    if (!found.sessionPath.empty()) {
        // The file is opened for its lock and to notice a change on disk; the record is the one that was not saved.
        Result<SessionFile::Opened> opened = SessionFile::open(found.sessionPath);
        if (opened && opened->heldBy.empty() && !opened->session.readOnly)
            file_.emplace(std::move(opened->file));
        else
            notes << tr("The session's own file could not be opened, so what was kept must be saved under a new name: %1")
                         .arg(opened ? QString::fromStdString(opened->heldBy) : errorText(opened.error()));
    }
    bench_.setRecord(std::move(*record));
    bench_.undoStack().resetClean();
    savedAt_ = 0;
    startKeeping();
    keepNow();
    if (!keepingFailed_ && recovery_->path() != found.path)
        Recovery::remove(found.path);
    emit stateChanged();
    return notes;
}

bool Document::modified() const {
    // A change that was taken back leaves the record as it was, and two entries in the journal that the file does not have.
    return !bench_.undoStack().isClean() || (file_ && bench_.record().journal->size() != savedEntries_);
}

QString Document::path() const {
    return file_ ? QString::fromStdString(file_->path()) : QString();
}

bool Document::pristine() const {
    return !file_ && bench_.record() == Record{};
}

void Document::keepNow() {
    keepTimer_.stop();
    if (!modified() || bench_.readOnly())
        return;
    const Result<void> kept = recovery_->keep(bench_.record());
    if (!kept && !keepingFailed_)
        emit keepingFailed(errorText(kept.error()));
    keepingFailed_ = !kept;
}

void Document::discardRecovery() {
    keepTimer_.stop();
    recovery_->discard();
}

QString Document::recoveryPath() const {
    return QString::fromStdString(recovery_->path());
}

std::vector<Recovery::Found> Document::leftBehind(const QString& dataFolder, const QStringList& recentFiles) {
    std::vector<std::string> sessions;
    for (const QString& path : recentFiles)
        sessions.push_back(path.toStdString());
    return Recovery::find(dataFolder.toStdString(), sessions);
}

} // namespace spanwright
