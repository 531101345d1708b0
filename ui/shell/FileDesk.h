// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/shell/Dialogs.h"
#include "ui/shell/Document.h"
#include "ui/shell/Settings.h"

#include <QObject>

namespace spanwright {

struct TableSource;

/// New, open, save, import: what a document does, with the questions and sentences that go with it.
class FileDesk : public QObject {
    Q_OBJECT

  public:
    FileDesk(QWidget* window, Workbench& bench, Document& document, Settings& settings, Dialogs& dialogs);

    /// Asks about changes that are not saved. False: stay where we are.
    bool askToLeave();
    void newSession();
    void open();
    /// A session is opened, a table of text is shown for import.
    bool openPath(const QString& path);
    bool save();
    bool saveAs();
    void import();
    /// A table as bytes: shown, and taken in as one step when accepted. `origin` stands in the journal.
    bool importTable(const QByteArray& bytes, const QString& origin);
    bool recover(const Recovery::Found& found);

  signals:
    /// Another record is there.
    void opened();
    /// Readings were taken in.
    void imported();
    void recentChanged();

  private:
    bool openSession(const QString& path);
    bool openTable(const QString& path);
    bool take(TableSource source, const QString& origin);
    void tellError(const QString& title, const Error& error);
    void tellNotes(const QStringList& notes);
    void remember(const QString& path);
    [[nodiscard]] QString suggestion() const;

    QWidget* window_;
    Workbench& bench_;
    Document& document_;
    Settings& settings_;
    Dialogs& dialogs_;
};

/// What the record is called in titles and questions: description and serial, else the file, else "New session".
QString recordName(const Record& record, const QString& path);

} // namespace spanwright
