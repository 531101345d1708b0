// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/SessionFile.h"

#include "core/session/TextMark.h"
#include "tests/support/Faults.h"
#include "tests/support/FilledRecord.h"
#include "tests/support/SampleRecord.h"

#include <QDir>
#include <QFile>
#include <QLockFile>
#include <QTemporaryDir>
#include <QTest>

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

using namespace spanwright;

namespace {

QByteArray contents(const std::string& path) {
    QFile file(QString::fromStdString(path));
    return file.open(QIODevice::ReadOnly) ? file.readAll() : QByteArray("?");
}

void put(const std::string& path, const QByteArray& bytes) {
    QFile file(QString::fromStdString(path));
    if (!file.open(QIODevice::WriteOnly) || file.write(bytes) != bytes.size())
        qFatal("cannot write");
}

Record changed() {
    Record record = test::pressureTransmitter();
    record.item.tag = "changed";
    return record;
}

} // namespace

class SessionFileTest : public QObject {
    Q_OBJECT

    QTemporaryDir folder_;
    std::string path_;

    std::string path(const char* name) const { return folder_.filePath(name).toStdString(); }

    /// A saved session that nobody holds.
    void saveFresh() {
        QFile::remove(QString::fromStdString(path_));
        const auto saved = SessionFile::saveAs(path_, test::pressureTransmitter(), {});
        QVERIFY(saved.ok());
    }

  private slots:
    void init() {
        path_ = path("session.spanwright");
        saveFresh();
    }

    void aMarkHoldsAsLongAsNobodyTouchesTheText() {
        const std::string text = "b0 = 3.999\nb1 = 1.6001\n", marked = withMark(text, {"/* ", " */"});
        QVERIFY2(marked.starts_with(text + "/* Written by Spanwright ") && marked.ends_with(" */\n"), marked.c_str());
        QVERIFY(bearsMark(marked) && bearsMark(withMark({}, {})));
        QVERIFY(!bearsMark(text) && !bearsMark({}) && !bearsMark(marked + "b2 = 0\n") && !bearsMark(marked + "\n"));
        for (std::size_t i = 0; i < text.size(); ++i) {
            std::string changed = marked;
            changed[i] ^= 1;
            QVERIFY2(!bearsMark(changed), changed.c_str());
        }
        std::string otherLineEnds = marked;
        otherLineEnds.insert(otherLineEnds.find('\n'), "\r");
        QVERIFY(!bearsMark(otherLineEnds));
    }

    void opensWhatWasSaved() {
        const auto opened = SessionFile::open(path_);
        QVERIFY(opened.ok());
        QVERIFY(opened->session.record == test::pressureTransmitter());
        QVERIFY(opened->session.warnings.empty());
        QVERIFY(!opened->session.readOnly);
        QVERIFY(opened->heldBy.empty());
        QCOMPARE(opened->file.path(), path_);
        QVERIFY(readSessionFile(path_)->record == test::pressureTransmitter());
    }

    void savesOverWhatWasOpened() {
        auto opened = SessionFile::open(path_);
        QVERIFY(opened->file.save(changed(), {"0.1.0", {}}).ok());
        QVERIFY(opened->file.save(changed(), {}).ok());
        QVERIFY(readSessionFile(path_)->record == changed());
        QCOMPARE(QDir(folder_.path()).entryList({"session*"}, QDir::Files), QStringList{"session.spanwright"});
    }

    void saysWhyItCannotOpen() {
        QCOMPARE(SessionFile::open(path("none")).error().code, ErrorCode::FileMissing);
        QCOMPARE(SessionFile::open(folder_.path().toStdString()).error().code, ErrorCode::FileIsDirectory);
        put(path("empty"), {});
        QCOMPARE(SessionFile::open(path("empty")).error().code, ErrorCode::FileEmpty);
        put(path("foreign"), "{\"name\": \"x\"}");
        QCOMPARE(SessionFile::open(path("foreign")).error().code, ErrorCode::NotASession);
        QCOMPARE(SessionFile::open(path("foreign")).error().fact("file"), std::string_view(path("foreign")));
        put(path("noise"), QByteArray::fromHex("00ff10fe7f454c46"));
        QCOMPARE(SessionFile::open(path("noise")).error().code, ErrorCode::NotJson);
        QCOMPARE(QDir(folder_.path()).entryList({".*.lock"}, QDir::Files | QDir::Hidden), QStringList{});
    }

    void refusesToOverwriteAFileThatChangedOnDisk() {
        auto opened = SessionFile::open(path_);
        const QByteArray other = contents(path_).replace("PT-4107", "PT-9999") + "\n";
        put(path_, other);
        QVERIFY(opened->file.changedOnDisk());
        const auto saved = opened->file.save(changed(), {});
        QCOMPARE(saved.error().code, ErrorCode::FileChangedOnDisk);
        QCOMPARE(contents(path_), other);
    }

    void aFileThatWasOnlyTouchedOrIsGoneMayBeSaved() {
        auto opened = SessionFile::open(path_);
        put(path_, contents(path_));
        const timespec old[2] = {{1, 0}, {1, 0}};
        QCOMPARE(::utimensat(AT_FDCWD, path_.c_str(), old, 0), 0);
        QVERIFY(!opened->file.changedOnDisk());
        QVERIFY(opened->file.save(changed(), {}).ok());
        QVERIFY(QFile::remove(QString::fromStdString(path_)));
        QVERIFY(opened->file.save(changed(), {}).ok());
        QVERIFY(readSessionFile(path_)->record == changed());
    }

    void aSessionThatAnotherProgramHoldsOpensToBeLookedAt() {
        const auto first = SessionFile::open(path_);
        auto second = SessionFile::open(path_);
        QVERIFY(second.ok());
        QVERIFY(!second->session.readOnly); // which says that the layout is newer
        QVERIFY(QString::fromStdString(second->heldBy).contains(QString::number(QCoreApplication::applicationPid())));
        const QByteArray before = contents(path_);
        const auto saved = second->file.save(changed(), {});
        QCOMPARE(saved.error().code, ErrorCode::FileInUse);
        QCOMPARE(saved.error().fact("holder"), std::string_view(second->heldBy));
        QCOMPARE(SessionFile::saveAs(path_, changed(), {}).error().code, ErrorCode::FileInUse);
        QCOMPARE(contents(path_), before);
    }

    void aLockThatAKilledProgramLeftBehindIsTakenOver() {
        // The largest process number of Linux is 2^22, so that this one does not run.
        put(path(".session.spanwright.lock"), "4194305\nspanwright\n" + QSysInfo::machineHostName().toUtf8() + "\n");
        const auto opened = SessionFile::open(path_);
        QVERIFY(opened.ok());
        QVERIFY(opened->heldBy.empty());
    }

    void aNewerSessionIsNeverWrittenBack() {
        put(path_, contents(path_).replace("\"version\": 1", "\"version\": 9"));
        const QByteArray before = contents(path_);
        auto opened = SessionFile::open(path_);
        QVERIFY(opened->session.readOnly);
        QCOMPARE(opened->file.save(opened->session.record, {}).error().code, ErrorCode::NewerLayout);
        QCOMPARE(contents(path_), before);
    }

    void theOldFileIsIntactWhicheverWriteFails() {
        const QByteArray before = contents(path_);
        int n = 1;
        for (;; ++n) {
            QVERIFY(n < 100);
            auto opened = SessionFile::open(path_);
            const test::DiskFault fault(n);
            const auto saved = opened->file.save(changed(), {});
            if (!fault.happened()) {
                QVERIFY(saved.ok());
                break;
            }
            // The last call flushes the folder, when the file is already there whole.
            if (saved.ok()) {
                const auto again = readSessionFile(path_);
                QVERIFY2(again.ok(), qPrintable(QString::number(n) + " " + QString::number(contents(path_).size())));
                QVERIFY(again->record == changed());
                put(path_, before);
                continue;
            }
            QVERIFY(saved.error().code == ErrorCode::FileWriteFailed || saved.error().code == ErrorCode::FileNotWritable);
            QVERIFY(!saved.error().fact("reason").empty());
            QCOMPARE(contents(path_), before);
            QCOMPARE(QDir(folder_.path()).entryList({"session*"}, QDir::Files), QStringList{"session.spanwright"});
        }
        QVERIFY(n > 3); // written, flushed and renamed at the least
        QVERIFY(readSessionFile(path_)->record == changed());
    }

    void theOldFileIsIntactWhereTheDiskIsFull() {
        const QByteArray before = contents(path_);
        const auto size = static_cast<unsigned long>(before.size());
        for (unsigned long limit = 0; limit < size; limit += 1000) {
            auto opened = SessionFile::open(path_);
            Result<void> saved;
            {
                const test::SizeLimit full(limit);
                saved = opened->file.save(changed(), {});
            }
            QCOMPARE(saved.error().code, ErrorCode::FileWriteFailed);
            QCOMPARE(contents(path_), before);
        }
    }

    void aFolderWithoutPermissionIsSaid() {
        QVERIFY(QFile::setPermissions(folder_.path(), QFile::ReadOwner | QFile::ExeOwner | QFile::ReadGroup | QFile::ExeGroup | QFile::ReadOther | QFile::ExeOther));
        QVERIFY(QFile::setPermissions(QString::fromStdString(path_), QFile::ReadOwner | QFile::ReadGroup | QFile::ReadOther));
        const QByteArray before = contents(path_);
        {
            const test::AsNobody nobody;
            auto opened = SessionFile::open(path_);
            QVERIFY(opened.ok());
            QVERIFY(opened->heldBy.empty());
            QCOMPARE(opened->file.save(changed(), {}).error().code, ErrorCode::FileNotWritable);
            QCOMPARE(SessionFile::saveAs(path("new"), changed(), {}).error().code, ErrorCode::FileNotWritable);
        }
        QVERIFY(QFile::setPermissions(folder_.path(), QFile::ReadOwner | QFile::WriteOwner | QFile::ExeOwner));
        QVERIFY(QFile::setPermissions(QString::fromStdString(path_), QFile::ReadOwner | QFile::WriteOwner));
        QCOMPARE(contents(path_), before);
    }

    void aFolderCannotBeSavedOver() {
        QCOMPARE(SessionFile::saveAs(folder_.path().toStdString(), changed(), {}).error().code, ErrorCode::FileIsDirectory);
        QCOMPARE(SessionFile::saveAs(path("no/such/folder"), changed(), {}).error().code, ErrorCode::FileNotWritable);
    }

    void savingThroughALinkKeepsTheLink() {
        const std::string link = path("link");
        QCOMPARE(::symlink(path_.c_str(), link.c_str()), 0);
        auto opened = SessionFile::open(link);
        QVERIFY(opened->file.save(changed(), {}).ok());
        QVERIFY(QFileInfo(QString::fromStdString(link)).isSymLink());
        QVERIFY(readSessionFile(path_)->record == changed());
    }
};

QTEST_GUILESS_MAIN(SessionFileTest)
#include "tst_session_file.moc"
