// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/FileDesk.h"

#include "core/exchange/FileBytes.h"
#include "ui/import/ImportDialog.h"
#include "ui/words/Words.h"

#include <QDir>
#include <QFile>
#include <QFileInfo>
#include <QRegularExpression>
#include <QWidget>

namespace spanwright {

namespace {

/// Sessions are JSON objects; whatever else is text is taken for a table.
bool looksLikeSession(const QString& path) {
    if (path.endsWith(QLatin1String(".spanwright"), Qt::CaseInsensitive))
        return true;
    QFile file(path);
    return file.open(QIODevice::ReadOnly) && file.read(64).trimmed().startsWith('{');
}

} // namespace

QString recordName(const Record& record, const QString& path) {
    QStringList words;
    for (const std::string* text : {&record.item.description, &record.item.serial})
        if (!text->empty() && *text != "none")
            words << QString::fromStdString(*text);
    if (!words.isEmpty())
        return words.join(QLatin1Char(' '));
    return path.isEmpty() ? FileDesk::tr("New session") : QFileInfo(path).completeBaseName();
}

FileDesk::FileDesk(QWidget* window, Workbench& bench, Document& document, Settings& settings, Dialogs& dialogs)
    : QObject(window), window_(window), bench_(bench), document_(document), settings_(settings), dialogs_(dialogs) {
    connect(&document, &Document::keepingFailed, this, [this](const QString& sentence) {
        dialogs_.tell(window_, tr("Changes are not being kept for recovery"), sentence);
    });
    connect(&document, &Document::resultsDiffer, this, [this](const QString& sentence) { tellNotes({sentence}); });
}

bool FileDesk::askToLeave() {
    if (!document_.modified()) {
        document_.discardRecovery();
        return true;
    }
    switch (dialogs_.askSave(window_, recordName(bench_.record(), document_.path()))) {
    case SaveAnswer::Save: return save();
    case SaveAnswer::Discard: document_.discardRecovery(); return true;
    case SaveAnswer::Cancel: break;
    }
    return false;
}

void FileDesk::newSession() {
    if (!askToLeave())
        return;
    document_.begin(Record{});
    emit opened();
}

void FileDesk::open() {
    const QString path = dialogs_.openPath(window_, settings_.lastFolder());
    if (!path.isEmpty())
        openPath(path);
}

bool FileDesk::openPath(const QString& path) {
    settings_.setLastFolder(QFileInfo(path).absolutePath());
    return looksLikeSession(path) ? openSession(path) : openTable(path);
}

bool FileDesk::openSession(const QString& path) {
    if (document_.hasFile() && QFileInfo(document_.path()) == QFileInfo(path) && document_.modified() &&
        !dialogs_.confirm(window_, tr("Read the session again?"), tr("Changes since the last save are given up."), tr("&Read again")))
        return false;
    else if (!(document_.hasFile() && QFileInfo(document_.path()) == QFileInfo(path)) && !askToLeave())
        return false;
    const Result<QStringList> notes = document_.open(QFileInfo(path).absoluteFilePath());
    if (!notes) {
        settings_.forgetRecentFile(path);
        emit recentChanged();
        tellError(tr("The session was not opened"), notes.error());
        return false;
    }
    remember(document_.path());
    emit opened();
    tellNotes(*notes);
    return true;
}

/// A large table is read beside the window, by the dialog that shows it.
bool FileDesk::openTable(const QString& path) {
    TableSource later{{}, path, {}};
    if (later.large())
        return take(std::move(later), QFileInfo(path).fileName());
    const Result<FileBytes> file = FileBytes::read(path.toStdString());
    if (!file) {
        tellError(tr("The table was not opened"), file.error());
        return false;
    }
    const std::string_view bytes = file->bytes();
    return importTable(QByteArray::fromRawData(bytes.data(), static_cast<qsizetype>(bytes.size())), QFileInfo(path).fileName());
}

bool FileDesk::importTable(const QByteArray& bytes, const QString& origin) {
    return take({bytes, {}, {}}, origin);
}

bool FileDesk::take(TableSource source, const QString& origin) {
    if (bench_.readOnly()) {
        dialogs_.tell(window_, tr("Nothing was taken in"), tr("This session can only be looked at. Save it under another name first."));
        return false;
    }
    ImportDialog dialog(std::move(source), origin, bench_.record(), window_);
    if (!dialogs_.run(dialog))
        return false;
    std::unique_ptr<RecordCommand> command = dialog.takeCommand();
    if (!command)
        return false;
    bench_.perform(std::move(command));
    emit imported();
    return true;
}

void FileDesk::import() {
    const QString path = dialogs_.openPath(window_, settings_.lastFolder());
    if (!path.isEmpty() && !looksLikeSession(path))
        openPath(path);
    else if (!path.isEmpty())
        dialogs_.tell(window_, tr("Nothing was taken in"), tr("This is a session, not a table of readings. Use Open for it."));
}

bool FileDesk::save() {
    if (!document_.hasFile() || bench_.readOnly())
        return saveAs();
    const Result<void> written = document_.save();
    if (written) {
        remember(document_.path());
        return true;
    }
    if (dialogs_.confirm(window_, tr("The session was not saved"), errorText(written.error()), tr("&Save under another name\u2026")))
        return saveAs();
    return false;
}

bool FileDesk::saveAs() {
    const QString path = dialogs_.savePath(window_, suggestion());
    if (path.isEmpty())
        return false;
    if (const Result<void> written = document_.saveAs(QFileInfo(path).absoluteFilePath()); !written) {
        tellError(tr("The session was not saved"), written.error());
        return false;
    }
    settings_.setLastFolder(QFileInfo(path).absolutePath());
    remember(document_.path());
    return true;
}

bool FileDesk::recover(const Recovery::Found& found) {
    const Result<QStringList> notes = document_.recover(found);
    if (!notes) {
        tellError(tr("What was kept could not be read"), notes.error());
        return false;
    }
    emit opened();
    tellNotes(*notes);
    return true;
}

void FileDesk::tellError(const QString& title, const Error& error) {
    dialogs_.tell(window_, title, errorText(error));
}

void FileDesk::tellNotes(const QStringList& notes) {
    if (!notes.isEmpty())
        dialogs_.tell(window_, tr("To be known about this session"), notes.join(QStringLiteral("\n\n")));
}

void FileDesk::remember(const QString& path) {
    settings_.addRecentFile(path);
    emit recentChanged();
}

QString FileDesk::suggestion() const {
    if (document_.hasFile())
        return document_.path();
    static const QRegularExpression unfit(QStringLiteral("[^\\w.-]+"), QRegularExpression::UseUnicodePropertiesOption);
    const QString name = recordName(bench_.record(), {}).toLower().replace(unfit, QStringLiteral("-"));
    return QDir(settings_.lastFolder()).filePath(name + QStringLiteral(".spanwright"));
}

} // namespace spanwright
