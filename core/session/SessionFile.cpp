// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/SessionFile.h"

#include "core/exchange/FileBytes.h"
#include "core/session/Sha256.h"

#include <QFileInfo>
#include <QLockFile>
#include <QSaveFile>

#include <cerrno>
#include <cstring>
#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

namespace spanwright {

namespace {

/// What a file was like when it was read or written, to know it again.
struct Fingerprint {
    dev_t device = 0;
    ino_t node = 0;
    off_t size = -1;
    timespec changed{};

    static Fingerprint of(const std::string& path) {
        struct stat about{};
        if (::stat(path.c_str(), &about) != 0)
            return {};
        return {about.st_dev, about.st_ino, about.st_size, about.st_mtim};
    }
    [[nodiscard]] bool exists() const { return size >= 0; }
    bool operator==(const Fingerprint& other) const {
        return device == other.device && node == other.node && size == other.size && changed.tv_sec == other.changed.tv_sec &&
               changed.tv_nsec == other.changed.tv_nsec;
    }
};

/// So that the new name is on disk too, not only the bytes.
void flushFolder(const QString& path) {
    const std::string folder = QFileInfo(path).absolutePath().toStdString();
    const int number = ::open(folder.c_str(), O_RDONLY | O_DIRECTORY | O_CLOEXEC);
    if (number < 0)
        return;
    ::fsync(number);
    ::close(number);
}

Result<void> writeWhole(const std::string& path, const std::string& bytes) {
    const QString name = QString::fromStdString(path);
    if (QFileInfo(name).isDir())
        return Error(ErrorCode::FileIsDirectory, {{"file", path}});
    QSaveFile file(name);
    const auto refuse = [&](ErrorCode code) {
        return Error(code, {{"file", path}, {"reason", file.errorString().toStdString()}});
    };
    // Unbuffered: what is left in a buffer is written by commit(), which in Qt 6.4 succeeds even when that fails. It takes no
    // notice of a failed flush to disk either.
    if (!file.open(QIODevice::WriteOnly | QIODevice::Unbuffered))
        return refuse(ErrorCode::FileNotWritable);
    const auto size = static_cast<qint64>(bytes.size());
    if (file.write(bytes.data(), size) != size)
        return refuse(ErrorCode::FileWriteFailed);
    if (::fsync(file.handle()) != 0 && errno != EINVAL) // a file system that cannot flush says EINVAL
        return Error(ErrorCode::FileWriteFailed, {{"file", path}, {"reason", std::strerror(errno)}});
    if (!file.commit())
        return refuse(ErrorCode::FileWriteFailed);
    flushFolder(name);
    return {};
}

std::string holderOf(const QLockFile& lock) {
    qint64 process = 0;
    QString host;
    QString program;
    if (!lock.getLockInfo(&process, &host, &program))
        return "?";
    return (program + " (" + QString::number(process) + ") @ " + host).toStdString();
}

} // namespace

class SessionFile::Private {
  public:
    std::string path;
    std::unique_ptr<QLockFile> lock;
    Fingerprint seen;
    std::string digest; ///< of the bytes that were read or written last
    int version = SessionVersion;

    explicit Private(std::string where) : path(std::move(where)) {
        const QFileInfo info(QString::fromStdString(path));
        lock = std::make_unique<QLockFile>(info.absolutePath() + "/." + info.fileName() + ".lock");
        lock->setStaleLockTime(0);
    }

    /// Takes the lock; says who holds it where another does. Empty also where no lock can be made.
    std::string take() {
        if (lock->isLocked())
            return {};
        // Asked before trying, because a failed try may leave nothing to ask.
        const std::string holder = holderOf(*lock);
        if (lock->tryLock(0) || lock->error() != QLockFile::LockFailedError)
            return {};
        return holder;
    }

    void remember(std::string_view bytes) {
        seen = Fingerprint::of(path);
        digest = sha256(bytes);
    }

    Result<void> write(const Record& record, const StoredResults& results) {
        const std::string bytes = writeSession(record, results);
        auto written = writeWhole(path, bytes);
        if (written)
            remember(bytes);
        return written;
    }
};

SessionFile::SessionFile(std::unique_ptr<Private> p) : d(std::move(p)) {}
SessionFile::SessionFile(SessionFile&&) noexcept = default;
SessionFile& SessionFile::operator=(SessionFile&&) noexcept = default;
SessionFile::~SessionFile() = default;

Result<SessionFile::Opened> SessionFile::open(const std::string& path) {
    auto opened = std::make_unique<Private>(path);
    // Locked before it is read, so that nobody writes in between. Nothing is locked that is not there.
    const bool isFile = QFileInfo(QString::fromStdString(path)).isFile();
    std::string heldBy = isFile ? opened->take() : std::string{};
    const auto file = FileBytes::read(path);
    if (!file)
        return file.error();
    auto session = readSession(file->bytes());
    if (!session)
        return session.error().with("file", path);
    opened->remember(file->bytes());
    opened->version = session->version;
    return Opened{SessionFile(std::move(opened)), std::move(*session), std::move(heldBy)};
}

Result<SessionFile> SessionFile::saveAs(const std::string& path, const Record& record, const StoredResults& results) {
    auto saved = std::make_unique<Private>(path);
    if (const std::string holder = saved->take(); !holder.empty())
        return Error(ErrorCode::FileInUse, {{"file", path}, {"holder", holder}});
    const auto written = saved->write(record, results);
    if (!written)
        return written.error();
    return SessionFile(std::move(saved));
}

Result<void> SessionFile::save(const Record& record, const StoredResults& results) {
    if (d->version > SessionVersion)
        return Error(ErrorCode::NewerLayout, {{"file", d->path}, {"version", std::to_string(d->version)}});
    if (const std::string holder = d->take(); !holder.empty())
        return Error(ErrorCode::FileInUse, {{"file", d->path}, {"holder", holder}});
    if (changedOnDisk())
        return Error(ErrorCode::FileChangedOnDisk, {{"file", d->path}});
    return d->write(record, results);
}

const std::string& SessionFile::path() const {
    return d->path;
}

bool SessionFile::changedOnDisk() const {
    const Fingerprint now = Fingerprint::of(d->path);
    // A file that is gone is no change that saving could destroy.
    if (!now.exists() || now == d->seen)
        return false;
    // Touched or copied back, but the same bytes.
    const auto file = FileBytes::read(d->path);
    return !file || sha256(file->bytes()) != d->digest;
}

Result<Session> readSessionFile(const std::string& path) {
    const auto file = FileBytes::read(path);
    if (!file)
        return file.error();
    auto session = readSession(file->bytes());
    if (!session)
        return session.error().with("file", path);
    return session;
}

} // namespace spanwright
