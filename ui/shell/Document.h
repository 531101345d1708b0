// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/session/Recovery.h"
#include "core/session/SessionFile.h"
#include "ui/commands/Workbench.h"

#include <QObject>
#include <QStringList>
#include <QTimer>

#include <optional>

namespace spanwright {

/// The record of a workbench and the file it lives in: open, save, the lock, and the recovery file that holds every change within
/// a second. Asks nothing; what it returns is put in words by the window.
class Document : public QObject {
    Q_OBJECT

  public:
    /// `dataFolder` takes the recovery file of a session that has no file yet.
    Document(Workbench& bench, const QString& dataFolder, QObject* parent = nullptr);

    /// Begins with a record that has no file.
    void begin(Record record);
    /// Opens a session file. Sentences to be told all the same: held by another program, seal, results that differ.
    Result<QStringList> open(const QString& path);
    Result<void> save();
    Result<void> saveAs(const QString& path);
    /// Takes up what a program that was stopped left behind; it stays unsaved until it is saved.
    Result<QStringList> recover(const Recovery::Found& found);

    [[nodiscard]] bool modified() const;
    [[nodiscard]] bool hasFile() const { return file_.has_value(); }
    [[nodiscard]] QString path() const;
    /// Whether nothing was entered yet and there is no file.
    [[nodiscard]] bool pristine() const;
    [[nodiscard]] std::int64_t savedAt() const { return savedAt_; }

    /// Writes the recovery file now when there is something to keep.
    void keepNow();
    /// Removes the recovery file: closed without saving on purpose.
    void discardRecovery();
    [[nodiscard]] QString recoveryPath() const;

    /// Recovery files of programs that no longer run, in the data folder and beside the recent sessions.
    static std::vector<Recovery::Found> leftBehind(const QString& dataFolder, const QStringList& recentFiles);

  signals:
    void stateChanged();
    /// The recovery file could not be written; the sentence says why.
    void keepingFailed(const QString& sentence);
    /// The figures stored with a large session are not those computed after it was opened.
    void resultsDiffer(const QString& sentence);

  private:
    void startKeeping();
    void saved();
    void compareResults(const StoredResults& stored, QStringList& notes);
    [[nodiscard]] QStringList notesOf(const Session& session, const std::string& heldBy) const;

    Workbench& bench_;
    QString dataFolder_;
    std::optional<SessionFile> file_;
    std::optional<Recovery> recovery_;
    QTimer keepTimer_;
    std::size_t savedEntries_ = 0; ///< of the journal, in the file
    std::int64_t savedAt_ = 0;
    bool keepingFailed_ = false;
};

} // namespace spanwright
