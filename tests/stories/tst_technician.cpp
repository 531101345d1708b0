// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/SessionFile.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/StoryWindow.h"

#include <QLabel>
#include <QLineEdit>

using namespace spanwright;
using namespace spanwright::test;

/// The technician types a run, makes a slip, is stopped, undoes, saves, and finds everything again.
class TechnicianTest : public QObject {
    Q_OBJECT

    QTemporaryDir home_;

    /// The sample's job before the first reading.
    static Record prepared() {
        Record record = pressureTransmitter();
        record.readings = ReadingColumns();
        record.nextReadingId = 1;
        record.choices.phase = Phase::AsFound;
        return record;
    }

    /// Types both values; where the program doubts a value, looks again and presses Enter once more.
    static void typeReading(StoryWindow& story, const QString& reference, const QString& indication) {
        const std::size_t before = story.record().readings->size();
        story.type(reference);
        story.press(Qt::Key_Return);
        story.type(indication);
        story.press(Qt::Key_Return);
        if (story.record().readings->size() == before)
            story.press(Qt::Key_Return);
        story.now += 90'000;
    }

  private slots:
    void typesARunWithDecimalCommas() {
        StoryWindow story(home_.path());
        story.window().document().begin(prepared());
        story.act("view.bench");
        const Record sample = pressureTransmitter();
        for (std::size_t row = 0; row < 22; ++row) {
            const Reading reading = sample.readings->row(row);
            QCOMPARE(story.find<QLabel>("setPointFigure")->text(), QString::fromStdString(reading.setPoint->text()));
            typeReading(story, QString::fromStdString(reading.reference->text()).replace('.', ','),
                        QString::fromStdString(reading.indication->text()).replace('.', ','));
            QCOMPARE(story.record().readings->size(), row + 1);
            const Reading taken = story.record().readings->row(row);
            QVERIFY(taken.reference == reading.reference);
            QVERIFY(taken.indication == reading.indication);
            QCOMPARE(taken.run, reading.run);
            QVERIFY(taken.direction == reading.direction);
            QVERIFY(taken.setPoint == reading.setPoint);
            QCOMPARE(taken.enteredBy, std::string("IO"));
        }
        QVERIFY(story.workbench().evaluation()->phase(Phase::AsFound)->fit.has_value());
    }

    void isStoppedAtWhatIsNoNumber_data() {
        QTest::addColumn<QString>("typed");
        QTest::newRow("a word") << "high";
        QTest::newRow("a thousands separator") << "1,234.5";
        QTest::newRow("nothing") << "";
    }
    void isStoppedAtWhatIsNoNumber() {
        QFETCH(QString, typed);
        StoryWindow story(home_.path());
        story.window().document().begin(prepared());
        story.act("view.bench");
        typeReading(story, "0.0001", typed);
        QVERIFY(story.record().readings->empty());
        QVERIFY(!story.find<QLabel>("typedWords")->text().isEmpty());
        QCOMPARE(story.find<QLineEdit>("indicationField")->text(), typed);
        story.find<QLineEdit>("indicationField")->selectAll();
        story.type("4.0020");
        story.press(Qt::Key_Return);
        QCOMPARE(story.record().readings->size(), std::size_t(1));
        QCOMPARE(story.record().readings->row(0).indication->text(), std::string("4.0020"));
    }

    void undoesSavesAndReopensEqual() {
        Record saved;
        const QString file = home_.filePath("run.spanwright");
        {
            StoryWindow story(home_.path());
            story.window().document().begin(prepared());
            story.act("view.bench");
            typeReading(story, "0.0001", "4.002");
            typeReading(story, "0.9986", "5.600");
            const Record before = story.record();
            typeReading(story, "2.0001", "7.2");
            QCOMPARE(story.record().readings->size(), std::size_t(3));
            story.act("edit.undo");
            QVERIFY(story.record() == before);
            story.act("edit.redo");
            QCOMPARE(story.record().readings->size(), std::size_t(3));
            story.act("edit.undo");
            QVERIFY(story.window().isWindowModified());
            story.dialogs.savedAs = file;
            story.act("file.save");
            QCOMPARE(story.told(), QString());
            QVERIFY(!story.window().isWindowModified());
            saved = story.record();
        }
        StoryWindow again(home_.path());
        again.dialogs.open = file;
        again.act("file.open");
        QCOMPARE(again.told(), QString());
        QVERIFY(again.record() == saved);
        QVERIFY(*again.record().journal == *saved.journal);
        QCOMPARE(again.record().readings->row(1).indication->text(), std::string("5.600"));
    }
};

QTEST_MAIN(TechnicianTest)
#include "tst_technician.moc"
