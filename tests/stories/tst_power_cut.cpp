// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleRecord.h"
#include "tests/support/StoryWindow.h"

#include <QApplication>
#include <QDir>
#include <QProcess>

#include <cstdio>

using namespace spanwright;
using namespace spanwright::test;

namespace {

constexpr std::size_t typedReadings = 7;

Record prepared() {
    Record record = pressureTransmitter();
    record.readings = ReadingColumns();
    record.nextReadingId = 1;
    return record;
}

/// Types the first readings of the sample.
void typeReadings(StoryWindow& story) {
    story.window().document().begin(prepared());
    story.act("view.bench");
    const Record sample = pressureTransmitter();
    for (std::size_t row = 0; row < typedReadings; ++row) {
        const Reading reading = sample.readings->row(row);
        story.type(QString::fromStdString(reading.reference->text()));
        story.press(Qt::Key_Return);
        story.type(QString::fromStdString(reading.indication->text()));
        story.press(Qt::Key_Return);
        story.now += 90'000;
    }
}

/// Readings in the recovery file of a folder, 0 when there is none that can be read.
std::size_t keptReadings(const QString& folder) {
    std::size_t most = 0;
    for (const QFileInfo& file : QDir(folder).entryInfoList(QDir::Files))
        if (const Result<Record> record = Recovery::restore(file.filePath().toStdString()); record)
            most = std::max(most, record->readings->size());
    return most;
}

/// The program that will be killed: types, says so, and waits.
int typeAndWait(QApplication& application, const QString& home) {
    StoryWindow story(home);
    typeReadings(story);
    std::puts("typed");
    std::fflush(stdout);
    return application.exec();
}

} // namespace

/// The program is killed in the middle of typing; the next start has every reading that was recorded.
class PowerCutTest : public QObject {
    Q_OBJECT

  private slots:
    void losesNoReading() {
        const QTemporaryDir home;
        const QString data = StoryWindow::dataFolder(home.path());
        QProcess program;
        program.setProcessChannelMode(QProcess::ForwardedErrorChannel);
        program.start(QCoreApplication::applicationFilePath(), {"--type", home.path()});
        QTRY_VERIFY_WITH_TIMEOUT(program.canReadLine(), 60'000);
        QCOMPARE(program.readLine().trimmed(), QByteArray("typed"));

        // While the program still runs, what it keeps is its own.
        QVERIFY(Document::leftBehind(data, {}).empty());
        // A change is on disk within a second; a slow machine under a sanitizer gets some more.
        QTRY_VERIFY_WITH_TIMEOUT(keptReadings(data) == typedReadings, 5'000);
        program.kill();
        QVERIFY(program.waitForFinished());
        QCOMPARE(program.exitStatus(), QProcess::CrashExit);

        const std::vector<Recovery::Found> found = Document::leftBehind(data, {});
        QCOMPARE(found.size(), std::size_t(1));
        QCOMPARE(found[0].readings, typedReadings);

        const QTemporaryDir elsewhere;
        StoryWindow untroubled(elsewhere.path());
        typeReadings(untroubled);
        StoryWindow next(home.path());
        QVERIFY(next.window().files().recover(found[0]));
        QCOMPARE(next.told(), QString());
        QVERIFY(next.record() == untroubled.record());
        QVERIFY(*next.record().journal == *untroubled.record().journal);
        QVERIFY(next.window().isWindowModified());
    }
};

int main(int argc, char** argv) {
    QApplication application(argc, argv);
    if (argc == 3 && qstrcmp(argv[1], "--type") == 0)
        return typeAndWait(application, QString::fromLocal8Bit(argv[2]));
    PowerCutTest test;
    return QTest::qExec(&test, argc, argv);
}

#include "tst_power_cut.moc"
