// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/Recovery.h"

#include "core/exchange/FileBytes.h"
#include "core/session/RecordChanges.h"
#include "core/session/RecoveryLog.h"
#include "core/session/SessionJson.h"

#include <QDateTime>
#include <QDir>
#include <QFile>
#include <QFileInfo>

#include <algorithm>

#include <sys/file.h>
#include <unistd.h>

namespace spanwright {

namespace {

constexpr int MostNames = 1000;

/// "x.recovery", "x.recovery-2", …: one left behind by a crash is never written over.
QString numbered(const QString& base, int number) {
    return number == 1 ? base + ".recovery" : base + ".recovery-" + QString::number(number);
}

bool append(QFile& file, const std::string& bytes) {
    const auto size = static_cast<qint64>(bytes.size());
    return file.write(bytes.data(), size) == size && ::fdatasync(file.handle()) == 0;
}

/// A new file that this program alone has open and holds.
std::unique_ptr<QFile> create(const QString& base) {
    for (int number = 1; number <= MostNames; ++number) {
        auto file = std::make_unique<QFile>(numbered(base, number));
        if (file->open(QIODevice::ReadWrite | QIODevice::NewOnly | QIODevice::Unbuffered)) {
            ::flock(file->handle(), LOCK_EX | LOCK_NB);
            return file;
        }
        if (!file->exists())
            return nullptr;
    }
    return nullptr;
}

/// Whether a program that runs still writes it.
bool isHeld(const QString& path) {
    QFile file(path);
    if (!file.open(QIODevice::ReadOnly))
        return false;
    // The lock goes with this descriptor, and with its program when that is killed.
    return ::flock(file.handle(), LOCK_SH | LOCK_NB) != 0;
}

std::optional<Recovery::Found> look(const QFileInfo& info) {
    const QString path = info.absoluteFilePath();
    if (isHeld(path))
        return std::nullopt;
    const auto file = FileBytes::read(path.toStdString());
    if (!file)
        return std::nullopt;
    const auto log = RecoveryLog::parse(file->bytes());
    if (!log || log->entries.empty())
        return std::nullopt;
    return Recovery::Found{path.toStdString(), log->sessionPath, info.lastModified().toMSecsSinceEpoch(),
                           log->entries.back().readings};
}

} // namespace

class Recovery::Private {
  public:
    std::string sessionPath;
    std::string folder;
    std::unique_ptr<QFile> file;
    Record kept;        ///< what the file restores to
    qint64 whole = 0;   ///< bytes up to the end of its first entry
    qint64 written = 0; ///< bytes up to the end of its last entry

    [[nodiscard]] std::unique_ptr<QFile> makeFile() const {
        const QFileInfo session(QString::fromStdString(sessionPath));
        if (!sessionPath.empty())
            if (auto beside = create(session.absoluteFilePath()))
                return beside;
        const QString home = QString::fromStdString(folder);
        if (!QDir().mkpath(home))
            return nullptr;
        return create(QDir(home).filePath(sessionPath.empty() ? QString("unsaved") : session.fileName()));
    }

    /// The whole record in a new file, which takes the place of the one before only when it is on disk.
    Result<void> startAnew(const Record& record) {
        auto fresh = makeFile();
        if (!fresh)
            return Error(ErrorCode::FileNotWritable, {{"file", folder}});
        const std::string bytes =
            RecoveryLog::heading(sessionPath) + RecoveryLog::entry(writeSession(record, {}), record.readings->size());
        if (!append(*fresh, bytes)) {
            const Error error = failure(*fresh);
            fresh->remove();
            return error;
        }
        if (file)
            file->remove();
        file = std::move(fresh);
        whole = written = static_cast<qint64>(bytes.size());
        kept = record;
        return {};
    }

    Result<void> appendChanges(const Record& record, const std::string& changes) {
        const std::string bytes = RecoveryLog::entry(changes, record.readings->size());
        if (!append(*file, bytes)) {
            const Error error = failure(*file);
            // A torn entry would hide all that come after it.
            file->resize(written);
            file->seek(written);
            return error;
        }
        written += static_cast<qint64>(bytes.size());
        kept = record;
        return {};
    }

  private:
    static Error failure(const QFile& where) {
        return Error(ErrorCode::FileWriteFailed,
                     {{"file", where.fileName().toStdString()}, {"reason", where.errorString().toStdString()}});
    }
};

Recovery::Recovery(std::string sessionPath, std::string folder) : d(std::make_unique<Private>()) {
    d->sessionPath = std::move(sessionPath);
    d->folder = std::move(folder);
}

Recovery::~Recovery() = default;
Recovery::Recovery(Recovery&&) noexcept = default;
Recovery& Recovery::operator=(Recovery&&) noexcept = default;

Result<void> Recovery::keep(const Record& record) {
    constexpr qint64 roomForChanges = 1 << 20;
    if (!d->file || d->written > 2 * d->whole + roomForChanges)
        return d->startAnew(record);
    const auto changes = writeChanges(d->kept, record);
    if (!changes)
        return d->startAnew(record);
    if (*changes == "{}")
        return {};
    return d->appendChanges(record, *changes);
}

void Recovery::discard() {
    if (d->file)
        d->file->remove();
    d->file.reset();
    d->kept = {};
}

std::string Recovery::path() const {
    return d->file ? d->file->fileName().toStdString() : std::string{};
}

std::vector<Recovery::Found> Recovery::find(const std::string& folder, const std::vector<std::string>& sessionPaths) {
    QFileInfoList candidates;
    const auto list = [&candidates](const QDir& place, const QString& pattern) {
        const QStringList names{pattern + ".recovery", pattern + ".recovery-*"};
        if (place.exists())
            candidates += place.entryInfoList(names, QDir::Files | QDir::Hidden, QDir::Name);
    };
    list(QDir(QString::fromStdString(folder)), "*");
    for (const std::string& path : sessionPaths) {
        const QFileInfo session(QString::fromStdString(path));
        list(session.absoluteDir(), session.fileName());
    }
    std::vector<Found> found;
    for (const QFileInfo& info : candidates) {
        const std::string path = info.absoluteFilePath().toStdString();
        const bool known = std::any_of(found.begin(), found.end(), [&](const Found& other) { return other.path == path; });
        if (known)
            continue;
        if (auto left = look(info))
            found.push_back(std::move(*left));
    }
    return found;
}

Result<Record> Recovery::restore(const std::string& recoveryPath) {
    const auto file = FileBytes::read(recoveryPath);
    if (!file)
        return file.error();
    const auto log = RecoveryLog::parse(file->bytes());
    if (!log || log->entries.empty())
        return Error(ErrorCode::NotASession, {{"file", recoveryPath}});
    auto session = readSession(log->entries.front().payload);
    if (!session)
        return session.error().with("file", recoveryPath);
    Record record = std::move(session->record);
    for (std::size_t i = 1; i < log->entries.size(); ++i) {
        const auto applied = applyChanges(record, log->entries[i].payload);
        if (!applied)
            return applied.error().with("file", recoveryPath);
    }
    return record;
}

void Recovery::remove(const std::string& recoveryPath) {
    QFile::remove(QString::fromStdString(recoveryPath));
}

} // namespace spanwright
