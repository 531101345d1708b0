// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/Recovery.h"

#include "core/record/Fields.h"
#include "core/session/RecordChanges.h"
#include "tests/support/Faults.h"
#include "tests/support/FilledRecord.h"
#include "tests/support/SampleRecord.h"

#include <QDir>
#include <QFile>
#include <QTemporaryDir>
#include <QTest>

#include <csignal>
#include <sys/wait.h>
#include <unistd.h>

using namespace spanwright;

namespace {

bool sameHistory(const Record& a, const Record& b) {
    return a == b && *a.journal == *b.journal && a.nextReadingId == b.nextReadingId;
}

void addReading(Record& record, const char* indication) {
    Reading reading;
    reading.id = record.nextReadingId++;
    reading.indication = *Decimal::parse(indication);
    reading.enteredBy = "IO";
    record.readings.edit().append(reading);
    record.journal.edit().append({1, "IO", "reading-entered", "reading " + std::to_string(reading.id), "", indication, ""});
}

/// The record after each of many kinds of change.
std::vector<Record> history() {
    Record record = test::pressureTransmitter();
    std::vector<Record> states{record};
    const auto then = [&](auto&& change) {
        change();
        states.push_back(record);
    };
    then([&] { addReading(record, "4.0020"); });
    then([&] { addReading(record, "12345678901234567890.5"); });
    then([&] { record.item.serial = "NV-\"1\""; });
    then([&] { record.readings.edit().setNumber(3, NumberColumn::Indication, *Decimal::parse("1.847")); });
    then([&] { record.readings.edit().setNumber(3, NumberColumn::Indication, *Decimal::parse("1.8470")); });
    then([&] { record.readings.edit().setNumber(4, NumberColumn::Indication, std::nullopt); });
    then([&] { record.readings.edit().setNumber(5, NumberColumn::Reference, *Decimal::parse("1.23456789")); });
    then([&] { record.readings.edit().setPlace(6, Phase::AsLeft, 9, Direction::Unknown); });
    then([&] { record.readings.edit().setEntry(7, 1'772'352'930'250, "TL"); });
    then([&] { record.exclusions.edit().add({5, ExclusionReason::Other, "bumped", "IO", 5}); });
    then([&] { record.exclusions.edit().add({5, ExclusionReason::TypingSlip, "", "IO", 6}); });
    then([&] { record.exclusions.edit().remove(5); });
    const Reading taken = record.readings->row(10);
    then([&] { record.readings.edit().remove(taken.id); });
    then([&] { record.readings.edit().restore(taken); });
    then([&] { record.standards.pop_back(); });
    then([&] { record.limits = {}; });
    then([&] { record.journal.edit().append({9, "TL", "undone", "", "", "", ""}); });
    then([&] { record.unknown["/item/colour"] = "\"red\""; });
    then([&] { record.plan = {}; });
    return states;
}

} // namespace

class RecoveryTest : public QObject {
    Q_OBJECT

    std::unique_ptr<QTemporaryDir> folder_;
    std::string session_, data_;

    [[nodiscard]] std::vector<Recovery::Found> found() const { return Recovery::find(data_, {session_}); }

  private slots:
    void init() {
        folder_ = std::make_unique<QTemporaryDir>();
        session_ = folder_->filePath("job/pt.spanwright").toStdString();
        data_ = folder_->filePath("data").toStdString();
        QVERIFY(QDir(folder_->path()).mkdir("job"));
    }

    void changesLeadFromEachStateToTheNext() {
        const std::vector<Record> states = history();
        for (std::size_t i = 0; i + 1 < states.size(); ++i) {
            const auto changes = writeChanges(states[i], states[i + 1]);
            QVERIFY(changes.has_value());
            Record record = states[i];
            const auto applied = applyChanges(record, *changes);
            QVERIFY2(applied.ok(), changes->c_str());
            QVERIFY2(sameHistory(record, states[i + 1]), changes->c_str());
            QCOMPARE(*writeChanges(states[i], states[i]), std::string("{}"));
        }
    }

    void aWholeOtherRecordIsNoChange() {
        QVERIFY(!writeChanges(test::filledRecord(), test::pressureTransmitter()).has_value());
        Record many;
        ReadingColumns::Block block;
        block.n = 5000;
        many.readings.edit().appendBlock(block, 1);
        QVERIFY(!writeChanges({}, many).has_value());
    }

    void everyStateIsRestoredAfterACrash() {
        const std::vector<Record> states = history();
        for (std::size_t last = 0; last < states.size(); last += 3) {
            {
                Recovery recovery(session_, data_);
                for (std::size_t i = 0; i <= last; ++i)
                    QVERIFY(recovery.keep(states[i]).ok());
                QCOMPARE(recovery.path(), session_ + ".recovery");
                QVERIFY(found().empty()); // while its program runs
            }
            const auto left = found();
            QCOMPARE(left.size(), std::size_t(1));
            QCOMPARE(left.front().sessionPath, session_);
            QCOMPARE(left.front().readings, states[last].readings->size());
            const auto record = Recovery::restore(left.front().path);
            QVERIFY(record.ok());
            QVERIFY(sameHistory(*record, states[last]));
            Recovery::remove(left.front().path);
            QVERIFY(found().empty());
        }
    }

    void aKilledProgramLosesNothing() {
        // The child keeps readings until it is killed, and says over a pipe which one is on disk.
        int said[2];
        QCOMPARE(::pipe(said), 0);
        const pid_t child = ::fork();
        if (child == 0) {
            Recovery recovery(session_, data_);
            Record record = test::pressureTransmitter();
            for (;;) {
                addReading(record, "4.0020");
                const auto kept = recovery.keep(record);
                const char sign = kept.ok() ? '.' : '!';
                if (::write(said[1], &sign, 1) != 1)
                    ::_exit(1);
            }
        }
        const std::size_t before = test::pressureTransmitter().readings->size();
        std::size_t kept = 0;
        for (char sign = 0; kept < 20; ++kept) {
            QCOMPARE(::read(said[0], &sign, 1), ssize_t(1));
            QCOMPARE(sign, '.');
        }
        QCOMPARE(::kill(child, SIGKILL), 0);
        QCOMPARE(::waitpid(child, nullptr, 0), child);
        ::close(said[0]);
        ::close(said[1]);
        const auto left = found();
        QCOMPARE(left.size(), std::size_t(1));
        const auto record = Recovery::restore(left.front().path);
        QVERIFY(record.ok());
        QVERIFY(record->readings->size() >= before + kept);
        QCOMPARE(record->readings->row(before + kept - 1).indication->text(), std::string("4.0020"));
    }

    void aTornEntryIsLeftOut() {
        const std::vector<Record> states = history();
        std::vector<qint64> ends;
        {
            Recovery recovery(session_, data_);
            for (const Record& state : states) {
                QVERIFY(recovery.keep(state).ok());
                ends.push_back(QFileInfo(QString::fromStdString(recovery.path())).size());
            }
        }
        QFile file(QString::fromStdString(session_ + ".recovery"));
        QVERIFY(file.open(QIODevice::ReadOnly));
        const QByteArray bytes = file.readAll();
        file.close();
        for (qint64 length = 1; length < bytes.size(); length += 97) {
            QVERIFY(file.open(QIODevice::WriteOnly));
            file.write(bytes.left(length));
            file.close();
            std::size_t whole = 0;
            while (whole < ends.size() && ends[whole] - 1 <= length) // the last line end may be missing
                ++whole;
            const auto record = Recovery::restore(file.fileName().toStdString());
            QCOMPARE(record.ok(), whole > 0);
            if (whole > 0)
                QVERIFY(sameHistory(*record, states[whole - 1]));
        }
    }

    void discardingLeavesNothing() {
        Recovery recovery(session_, data_);
        QVERIFY(recovery.keep(test::pressureTransmitter()).ok());
        recovery.discard();
        QVERIFY(recovery.path().empty());
        QCOMPARE(QDir(folder_->filePath("job")).entryList(QDir::Files), QStringList{});
        QVERIFY(recovery.keep(test::pressureTransmitter()).ok());
        QVERIFY(QFile::exists(QString::fromStdString(session_ + ".recovery")));
    }

    void aSessionWithoutAFileIsKeptInTheDataFolder() {
        {
            Recovery first({}, data_);
            QVERIFY(first.keep(test::pressureTransmitter()).ok());
            Recovery second({}, data_);
            QVERIFY(second.keep(test::filledRecord()).ok());
            QVERIFY(first.path() != second.path());
        }
        const auto left = found();
        QCOMPARE(left.size(), std::size_t(2));
        QVERIFY(left[0].sessionPath.empty());
    }

    void whatACrashLeftIsNotWrittenOver() {
        {
            Recovery recovery(session_, data_);
            QVERIFY(recovery.keep(test::pressureTransmitter()).ok());
        }
        Recovery again(session_, data_);
        QVERIFY(again.keep(test::filledRecord()).ok());
        QCOMPARE(again.path(), session_ + ".recovery-2");
        QCOMPARE(found().size(), std::size_t(1));
        QVERIFY(*Recovery::restore(found().front().path) == test::pressureTransmitter());
    }

    void theDataFolderServesWhereTheSessionsCannotBeWritten() {
        const QString job = folder_->filePath("job");
        constexpr auto readable = QFile::ReadOwner | QFile::ExeOwner | QFile::ReadGroup | QFile::ExeGroup | QFile::ReadOther | QFile::ExeOther;
        QVERIFY(QFile::setPermissions(folder_->path(), readable | QFile::WriteOwner | QFile::WriteGroup | QFile::WriteOther));
        QVERIFY(QFile::setPermissions(job, readable));
        {
            const test::AsNobody nobody;
            Recovery recovery(session_, data_);
            QVERIFY(recovery.keep(test::pressureTransmitter()).ok());
            QCOMPARE(recovery.path(), data_ + "/pt.spanwright.recovery");
        }
        QCOMPARE(found().size(), std::size_t(1));
        QCOMPARE(found().front().sessionPath, session_);
        QVERIFY(QFile::setPermissions(job, QFile::ReadOwner | QFile::WriteOwner | QFile::ExeOwner));
    }

    void aLogThatHasGrownStartsAnew() {
        Record record = test::pressureTransmitter();
        Recovery recovery(session_, data_);
        QVERIFY(recovery.keep(record).ok());
        for (int i = 0; i < 40; ++i) {
            record.job.opinions = std::string(100'000, static_cast<char>('a' + i % 26));
            QVERIFY(recovery.keep(record).ok());
            QVERIFY(QFileInfo(QString::fromStdString(recovery.path())).size() < 2'500'000);
        }
        QCOMPARE(QDir(folder_->filePath("job")).entryList(QDir::Files).size(), qsizetype(1));
        QVERIFY(sameHistory(*Recovery::restore(recovery.path()), record));
    }

    void whateverWriteFailsTheLastStateKeptIsThere() {
        std::vector<Record> states = history();
        states.resize(5);
        bool failed = true;
        for (int n = 1; failed; ++n) {
            QVERIFY(n < 200);
            Recovery recovery(session_, data_);
            std::optional<std::size_t> kept;
            const test::DiskFault fault(n);
            for (std::size_t i = 0; i < states.size(); ++i)
                if (recovery.keep(states[i]).ok())
                    kept = i;
            failed = fault.happened();
            QVERIFY(*kept + 2 >= states.size());
            QVERIFY(sameHistory(*Recovery::restore(recovery.path()), states[*kept]));
            QVERIFY(recovery.keep(states.back()).ok()); // made good by the next one
            QVERIFY(sameHistory(*Recovery::restore(recovery.path()), states.back()));
            recovery.discard();
            QCOMPARE(QDir(folder_->filePath("job")).entryList(QDir::Files), QStringList{});
        }
    }

    void aFullDiskIsSaidAndWhatWasKeptStays() {
        Record record = test::pressureTransmitter();
        Recovery recovery(session_, data_);
        QVERIFY(recovery.keep(record).ok());
        const Record before = record;
        const auto size = static_cast<unsigned long>(QFileInfo(QString::fromStdString(recovery.path())).size());
        addReading(record, "4.0");
        Result<void> kept;
        {
            const test::SizeLimit full(size + 30);
            kept = recovery.keep(record);
        }
        QCOMPARE(kept.error().code, ErrorCode::FileWriteFailed);
        QVERIFY(sameHistory(*Recovery::restore(recovery.path()), before));
        QVERIFY(recovery.keep(record).ok());
        QVERIFY(sameHistory(*Recovery::restore(recovery.path()), record));
    }

    void foreignFilesAreNotOffered() {
        QVERIFY(QDir().mkpath(QString::fromStdString(data_)));
        for (const char* bytes : {"", "x", "{\"layout\": \"other\"}\n", "{\"layout\": \"spanwright-recovery\"}\n#5 0 sha256:00\nhello\n"}) {
            QFile file(QString::fromStdString(data_) + "/foreign.recovery");
            QVERIFY(file.open(QIODevice::WriteOnly));
            file.write(bytes);
            file.close();
            QVERIFY(found().empty());
            QVERIFY(!Recovery::restore(file.fileName().toStdString()).ok());
        }
    }
};

QTEST_GUILESS_MAIN(RecoveryTest)
#include "tst_recovery.moc"
