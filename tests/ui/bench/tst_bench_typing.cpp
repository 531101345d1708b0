// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/BenchWindow.h"
#include "tests/support/SampleRecord.h"
#include "ui/bench/NumberEdit.h"
#include "ui/bench/PastedBlock.h"
#include "ui/bench/ReadingsTable.h"
#include "ui/commands/ExclusionCommands.h"
#include "ui/look/TypedNumber.h"
#include "ui/look/Look.h"

#include <QApplication>
#include <QClipboard>
#include <QComboBox>
#include <QDialog>
#include <QLabel>
#include <QMenu>
#include <QPushButton>
#include <QTest>
#include <QToolButton>

using namespace spanwright;
using test::BenchWindow;
using test::plannedTransmitter;
using test::text;

/// Readings are typed into the panel and into the table, pasted, amended; what is doubtful is asked about, what cannot be is refused.
class BenchTyping : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() {
        setScheme(*qApp, SchemeName::Light);
        QLocale::setDefault(QLocale::c());
    }

    void aPointOrACommaIsTypedAndKept() {
        QCOMPARE(parseTyped(QStringLiteral("100,10"))->text(), std::string("100.10"));
        QCOMPARE(parseTyped(QStringLiteral("100.10"))->text(), std::string("100.10"));
        QCOMPARE(parseTyped(QStringLiteral(" −0,50 "))->text(), std::string("-0.50"));
        QVERIFY(parseTyped(QStringLiteral("1,234.5")).error().code == ErrorCode::ThousandsSeparator);
        QVERIFY(parseTyped(QStringLiteral("1 234")).error().code == ErrorCode::ThousandsSeparator);
        QVERIFY(parseTyped(QStringLiteral("open")).error().code == ErrorCode::CellNotANumber);
        QVERIFY(parseTyped(QString()).error().code == ErrorCode::CellEmpty);
    }

    void thePanelTakesThePlannedReadingsInTurn() {
        BenchWindow bench(plannedTransmitter());
        QCOMPARE(bench.find<QLabel>("setPointFigure")->text(), QStringLiteral("0"));
        QCOMPARE(bench.find<QLabel>("placeWords")->text(), QStringLiteral("rising, run 1"));
        bench.enter("referenceField", "0.0001");
        QVERIFY(bench.find<NumberEdit>("indicationField")->hasFocus());
        bench.enter("indicationField", "4,00");
        QCOMPARE(bench.readings().size(), std::size_t(1));
        const Reading first = bench.readings().row(0);
        QCOMPARE(text(first.reference), std::string("0.0001"));
        QCOMPARE(text(first.indication), std::string("4.00"));
        QCOMPARE(text(first.setPoint), std::string("0"));
        QVERIFY(first.direction == Direction::Rising);
        QCOMPARE(first.run, 1);
        QCOMPARE(first.enteredAt, bench.now);
        QCOMPARE(first.enteredBy, std::string("IO"));
        QCOMPARE(bench.find<QLabel>("setPointFigure")->text(), QStringLiteral("5"));
        QCOMPARE(bench.find<QLabel>("takenCounter")->text(), QStringLiteral("1 of 12 taken"));
        QVERIFY(bench.find<NumberEdit>("referenceField")->hasFocus());
    }

    void aDoubtfulValueIsAskedAboutAndNeverChanged() {
        BenchWindow bench(plannedTransmitter());
        bench.enter("referenceField", "0.0001");
        bench.enter("indicationField", "40.02"); // a perfect item reads 4.00
        QCOMPARE(bench.readings().size(), std::size_t(0));
        const QString said = bench.find<QLabel>("typedWords")->text();
        QVERIFY2(said.contains(QStringLiteral("40.02")) && said.contains(QStringLiteral("Enter once more")), qPrintable(said));
        QTest::keyClick(bench.find<NumberEdit>("indicationField"), Qt::Key_Return);
        QCOMPARE(bench.readings().size(), std::size_t(1));
        QCOMPARE(text(bench.readings().row(0).indication), std::string("40.02"));
    }

    /// The sample's reading 40 was 10.404 mA at 4 bar, falling, run 2; its digits are exchanged here.
    void aSlipOfTheHandIsAskedAbout() {
        Record record = test::pressureTransmitter();
        ReadingColumns& columns = record.readings.edit();
        while (columns.size() > 39)
            columns.remove(columns.ids().back());
        BenchWindow bench(record);
        QCOMPARE(bench.find<QLabel>("placeWords")->text(), QStringLiteral("falling, run 2"));
        bench.enter("referenceField", "4.0002");
        bench.enter("indicationField", "14.004");
        QCOMPARE(bench.readings().size(), std::size_t(39));
        QCOMPARE(bench.find<QLabel>("typedWords")->text(), QStringLiteral("You typed 14.004. 10.404 would fit. Digits swapped?"));
        QTest::keyClick(bench.find<QPushButton>("useSuggestion"), Qt::Key_Space);
        QCOMPARE(bench.readings().size(), std::size_t(40));
        QCOMPARE(text(bench.readings().row(39).indication), std::string("10.404"));
    }

    void aWordInThePanelIsRefusedInPlace() {
        BenchWindow bench(plannedTransmitter());
        bench.enter("referenceField", "zero");
        auto* field = bench.find<NumberEdit>("referenceField");
        QVERIFY(field->refused());
        QCOMPARE(field->text(), QStringLiteral("zero"));
        QVERIFY(bench.find<QLabel>("typedWords")->text().contains(QStringLiteral("is not a number")));
        bench.type(field, "1");
        QVERIFY(!field->refused());
    }

    void enterInTheTableGoesToTheNextPlannedCell() {
        BenchWindow bench(plannedTransmitter());
        ReadingsTable* table = bench.table();
        table->setFocus();
        table->typeNext();
        QVERIFY(bench.cell());
        QCOMPARE(table->currentIndex().column(), int(ReadingsModel::ReferenceValue));
        bench.type(bench.cell(), "0.0002");
        QTest::keyClick(bench.cell(), Qt::Key_Return);
        QVERIFY(bench.cell());
        QCOMPARE(table->currentIndex().column(), int(ReadingsModel::IndicationValue));
        QCOMPARE(table->currentIndex().row(), 0);
        bench.type(bench.cell(), "4.001");
        QTest::keyClick(bench.cell(), Qt::Key_Return);
        QCOMPARE(bench.readings().size(), std::size_t(1));
        QCOMPARE(text(bench.readings().row(0).indication), std::string("4.001"));
        QCOMPARE(table->currentIndex().row(), 1);
        QCOMPARE(table->currentIndex().column(), int(ReadingsModel::ReferenceValue));
        QCOMPARE(table->readings().rowCount(), 12);
        // A later planned reading may be taken first; then the table goes back to the one that is left out.
        QTest::keyClick(bench.cell(), Qt::Key_Escape);
        const QModelIndex fourth = table->readings().index(4, ReadingsModel::ReferenceValue);
        table->setCurrentIndex(fourth);
        QTest::keyClicks(table, QStringLiteral("5"));
        bench.type(bench.cell(), ".0003");
        QTest::keyClick(bench.cell(), Qt::Key_Return);
        bench.type(bench.cell(), "12.002");
        QTest::keyClick(bench.cell(), Qt::Key_Return);
        const Reading second = bench.readings().row(1);
        QCOMPARE(text(second.setPoint), std::string("5"));
        QVERIFY(second.direction == Direction::Falling);
        QCOMPARE(table->currentIndex().row(), 2);
        QVERIFY(table->readings().readingAt(2).direction == Direction::Rising);
    }

    void wordsEmptyCellsAndThousandsAreRefusedInTheCell() {
        BenchWindow bench(plannedTransmitter());
        ReadingsTable* table = bench.table();
        table->setFocus();
        table->typeNext();
        for (const char* bad : {"four", "1,234.5", ""}) {
            bench.cell()->clear();
            bench.type(bench.cell(), bad);
            QTest::keyClick(bench.cell(), Qt::Key_Return);
            QVERIFY(bench.cell());
            QCOMPARE(bench.cell()->text(), QLatin1String(bad));
            QVERIFY(bench.cell()->refused());
            QVERIFY(!table->refusal().isEmpty());
            QCOMPARE(bench.readings().size(), std::size_t(0));
        }
        // Not even a click elsewhere loses what was typed.
        bench.type(bench.cell(), "five");
        QTest::mouseClick(table->viewport(), Qt::LeftButton, {}, table->visualRect(table->readings().index(5, ReadingsModel::Number)).center());
        QVERIFY(bench.cell());
        QCOMPARE(bench.cell()->text(), QStringLiteral("five"));
        QVERIFY(table->refusal().contains(QStringLiteral("five")));
        QTest::keyClick(bench.cell(), Qt::Key_Escape);
        QVERIFY(table->refusal().isEmpty());
    }

    void aValueIsAmendedWithAReasonAndItsHistoryIsShown() {
        BenchWindow bench(test::pressureTransmitter());
        ReadingsTable* table = bench.table();
        table->setFocus();
        const QModelIndex cell = table->readings().index(2, ReadingsModel::IndicationValue);
        table->setCurrentIndex(cell);
        QTest::keyClick(table, Qt::Key_Return);
        QVERIFY(bench.cell());
        QCOMPARE(bench.cell()->text(), QStringLiteral("7.195"));
        bench.type(bench.cell(), "7.159");
        QTest::keyClick(bench.cell(), Qt::Key_Return);
        QDialog* dialog = bench.dialog("amendDialog");
        QVERIFY(dialog);
        QCOMPARE(text(bench.readings().row(2).indication), std::string("7.195"));
        auto* reason = dialog->findChild<QComboBox*>(QStringLiteral("reason"));
        QCOMPARE(reason->currentText(), QStringLiteral("typed wrongly"));
        QTest::keyClick(reason, Qt::Key_Return);
        QVERIFY(!dialog->isVisible());
        QCOMPARE(text(bench.readings().row(2).indication), std::string("7.159"));
        const JournalEntry& entry = bench.workbench.record().journal->entries().back();
        QCOMPARE(entry.before, std::string("7.195"));
        QCOMPARE(entry.reason, std::string("typed wrongly"));
        QVERIFY(cell.data(ReadingsModel::AmendedRole).toBool());
        QVERIFY(cell.data(Qt::ToolTipRole).toString().contains(QStringLiteral("7.195 → 7.159")));
        bench.workbench.undoStack().undo();
        QVERIFY(bench.workbench.record() == test::pressureTransmitter());
    }

    void aBlockIsPastedWholeOrNotAtAll() {
        const PastedBlock block = readPasted(QStringLiteral("0,0001\t4,002\r\n4,9998\t12,003\r\n\r\n"));
        QCOMPARE(block.rows.size(), std::size_t(2));
        QCOMPARE(block.rows[1][0].text(), std::string("4.9998"));
        const PastedBlock bad = readPasted(QStringLiteral("0.1\t4.0\n5.0\tOVR\n1,000.0\t9\n3"));
        QVERIFY(bad.rows.empty());
        QCOMPARE(bad.refused.size(), std::size_t(3));
        QCOMPARE(bad.refused[0].row, 2);
        QCOMPARE(bad.refused[0].column, 2);
        QVERIFY(bad.refused[2].error.code == ErrorCode::RaggedRow);

        BenchWindow bench(plannedTransmitter());
        ReadingsTable* table = bench.table();
        table->setFocus();
        table->setCurrentIndex(table->readings().nextCell());
        QApplication::clipboard()->setText(QStringLiteral("0.0001\t4.002\n4.9998\tOVR\n"));
        QTest::keySequence(table, QKeySequence::Paste);
        QCOMPARE(bench.readings().size(), std::size_t(0));
        QVERIFY(table->refusal().contains(QStringLiteral("Line 2, cell 2")));
        QVERIFY(table->refusal().contains(QStringLiteral("OVR")));
        QApplication::clipboard()->setText(QStringLiteral("0.0001\t4.002\n4.9998\t12.003\n10.0000\t20.00\n"));
        QTest::keySequence(table, QKeySequence::Paste);
        QCOMPARE(bench.readings().size(), std::size_t(3));
        QCOMPARE(text(bench.readings().row(2).reference), std::string("10.0000"));
        QCOMPARE(text(bench.readings().row(2).setPoint), std::string("10"));
        QCOMPARE(bench.workbench.undoStack().count(), 1);
        bench.workbench.undoStack().undo();
        QCOMPARE(bench.readings().size(), std::size_t(0));
    }

    /// The sample's reading 40 was 10.404 mA; typed in the table with its digits exchanged.
    void aSlipInTheTableIsAskedAboutOnce() {
        Record record = test::pressureTransmitter();
        ReadingColumns& columns = record.readings.edit();
        while (columns.size() > 39)
            columns.remove(columns.ids().back());
        BenchWindow bench(record);
        ReadingsTable* table = bench.table();
        table->setFocus();
        table->typeNext();
        bench.type(bench.cell(), "4.0002");
        QTest::keyClick(bench.cell(), Qt::Key_Return);
        QCOMPARE(bench.readings().size(), std::size_t(40));
        bench.type(bench.cell(), "14.004");
        QTest::keyClick(bench.cell(), Qt::Key_Return);
        QDialog* dialog = bench.dialog("suspectsDialog");
        QVERIFY(dialog);
        QVERIFY(!bench.readings().indication().has(39)); // nothing is recorded before the answer
        auto* answer = dialog->findChild<QComboBox*>(QStringLiteral("suspectAnswer.0"));
        QCOMPARE(answer->currentText(), QStringLiteral("14.004, as typed"));
        QCOMPARE(answer->itemText(1), QStringLiteral("10.404 instead"));
        dialog->reject();
        QVERIFY(bench.cell());
        QCOMPARE(bench.cell()->text(), QStringLiteral("14.004")); // to be looked at again
        QTest::keyClick(bench.cell(), Qt::Key_Return);
        dialog = bench.dialog("suspectsDialog");
        QVERIFY(dialog);
        QTest::keyClick(dialog->findChild<QPushButton*>(QStringLiteral("suspectsRecord")), Qt::Key_Space);
        QCOMPARE(text(bench.readings().row(39).indication), std::string("14.004"));
        const JournalEntry& entry = bench.workbench.record().journal->entries().back();
        QVERIFY2(entry.reason.starts_with("kept as typed when asked: You typed 14.004. 10.404 would fit."), entry.reason.c_str());
        QVERIFY(!bench.dialog("suspectsDialog"));
        bench.workbench.undoStack().undo();
        bench.workbench.undoStack().undo();
        QVERIFY(bench.workbench.record() == record);
    }

    /// One wild reading among a dozen widens the interval in which a further one is expected; panel, table and paste all go by it.
    void whatLiesInsideTheExpectedIntervalIsNotCalledFarOff() {
        Record record;
        for (int i = 0; i < 13; ++i) {
            Reading reading;
            reading.id = record.nextReadingId++;
            reading.run = 1;
            reading.reference = Decimal{i * 1000, 3, {}};
            reading.indication = Decimal{i == 6 ? 998'000 : i * 1000 + i * 7 % 5, 3, {}};
            record.readings.edit().append(reading);
        }
        BenchWindow bench(record);
        bench.enter("referenceField", "5.000");
        QVERIFY(bench.find<QLabel>("expectedWords")->text().startsWith(QStringLiteral("expected −")));
        bench.enter("indicationField", "7.913");
        QCOMPARE(bench.readings().size(), std::size_t(14));
        bench.table()->setFocus();
        bench.table()->setCurrentIndex(bench.table()->readings().nextCell());
        bench.table()->paste(QStringLiteral("5.000\t7.931\n"));
        QVERIFY(!bench.dialog("suspectsDialog"));
        QCOMPARE(bench.readings().size(), std::size_t(15));
        bench.table()->setCurrentIndex(bench.table()->readings().nextCell());
        bench.table()->paste(QStringLiteral("7.000\t70.00\n")); // an explanation is offered even so
        QVERIFY(bench.dialog("suspectsDialog"));
        bench.dialog("suspectsDialog")->reject();
        bench.workbench.perform(std::make_unique<Exclude>(std::vector<ReadingId>{7, 14, 15}, ExclusionReason::Other, "wild"));
        bench.table()->setCurrentIndex(bench.table()->readings().nextCell());
        bench.table()->paste(QStringLiteral("5.000\t7.913\n"));
        QVERIFY(bench.dialog("suspectsDialog"));
        bench.dialog("suspectsDialog")->reject();
        QCOMPARE(bench.readings().size(), std::size_t(15));
    }

    void thePanelKeepsNoEmptyLinesOnceThePlanIsDone() {
        BenchWindow bench(test::pressureTransmitter());
        const auto* panel = bench.find<QWidget>("nextReading");
        const auto* field = bench.find<QWidget>("indicationField");
        QVERIFY2(panel->height() - field->geometry().bottom() < 24, qPrintable(QString::number(panel->height() - field->geometry().bottom())));
    }

    /// Readings 40 to 42 of the sample, the first with a slipped decimal mark; and a reference far from its set point.
    void aPastedBlockIsAskedAboutInOneQuestion() {
        const Record sample = test::pressureTransmitter();
        Record record = sample;
        ReadingColumns& columns = record.readings.edit();
        while (columns.size() > 39)
            columns.remove(columns.ids().back());
        BenchWindow bench(record);
        ReadingsTable* table = bench.table();
        const auto block = [&](const QString& slipped) {
            QString text;
            for (std::size_t row = 39; row < 42; ++row) {
                const Reading reading = sample.readings->row(row);
                text += QString::fromStdString(reading.reference->text()) + u'\t' + (row == 39 ? slipped : QString::fromStdString(reading.indication->text())) + u'\n';
            }
            return text;
        };
        table->setFocus();
        table->setCurrentIndex(table->readings().nextCell());
        table->paste(block(QStringLiteral("104.04")));
        QDialog* dialog = bench.dialog("suspectsDialog");
        QVERIFY(dialog);
        QCOMPARE(bench.readings().size(), std::size_t(39));
        QVERIFY(dialog->findChild<QComboBox*>(QStringLiteral("suspectAnswer.0")));
        QVERIFY(!dialog->findChild<QComboBox*>(QStringLiteral("suspectAnswer.1")));
        auto* answer = dialog->findChild<QComboBox*>(QStringLiteral("suspectAnswer.0"));
        QCOMPARE(answer->count(), 2);
        answer->setCurrentIndex(1);
        dialog->accept();
        QCOMPARE(bench.readings().size(), std::size_t(42));
        QCOMPARE(text(bench.readings().row(39).indication), std::string("10.404"));
        const auto& entries = bench.workbench.record().journal->entries();
        QCOMPARE(entries[entries.size() - 3].reason, std::string("pasted; taken instead of 104.04 when asked"));
        QCOMPARE(entries.back().reason, std::string("pasted"));
        QCOMPARE(bench.workbench.undoStack().count(), 1);
        bench.workbench.undoStack().undo();
        QVERIFY(bench.workbench.record() == record);
        table->setCurrentIndex(table->readings().nextCell());
        table->paste(QStringLiteral("9.0001\n"));
        dialog = bench.dialog("suspectsDialog");
        QVERIFY(dialog);
        dialog->reject();
        QVERIFY(bench.workbench.record() == record);
        table->setCurrentIndex(table->readings().nextCell());
        table->paste(block(QStringLiteral("10.444"))); // no slip explains it, but it lies far outside the interval expected
        dialog = bench.dialog("suspectsDialog");
        QVERIFY(dialog);
        dialog->reject();
        QVERIFY(bench.workbench.record() == record);
        QTest::keyClick(table, Qt::Key_F2); // a block that is pasted into an open cell is still a block
        QLineEdit* cell = table->findChild<QLineEdit*>(QStringLiteral("cellEditor"));
        QVERIFY(cell);
        QApplication::clipboard()->setText(block(QStringLiteral("10.404")));
        QTest::keySequence(cell, QKeySequence::Paste);
        QCOMPARE(bench.readings().size(), std::size_t(42));
        bench.workbench.undoStack().undo();
        table->setCurrentIndex(table->readings().nextCell());
        table->paste(block(QStringLiteral("10.404"))); // nothing doubtful, nothing asked
        QVERIFY(!bench.dialog("suspectsDialog"));
        QCOMPARE(bench.readings().size(), std::size_t(42));
    }

    void aReadingTakenBeforeTheWaitIsMarked() {
        Record record = plannedTransmitter();
        record.plan.dwellSeconds = 60;
        BenchWindow bench(record);
        bench.enter("referenceField", "0.0001");
        bench.enter("indicationField", "4.00");
        bench.now += 12'000;
        bench.enter("referenceField", "5.0001");
        bench.enter("indicationField", "12.00");
        bench.now += 61'000;
        bench.enter("referenceField", "10.0001");
        bench.enter("indicationField", "20.00");
        const ReadingsModel& model = bench.table()->readings();
        QCOMPARE(model.taken(), 3);
        for (int row = 0; row < 3; ++row) {
            QCOMPARE(model.index(row, 0).data(ReadingsModel::HurriedRole).toBool(), row == 1);
            QCOMPARE(model.index(row, ReadingsModel::State).data().toString(), row == 1 ? QStringLiteral("early") : QString());
        }
        const QString tip = model.index(1, ReadingsModel::IndicationValue).data(Qt::ToolTipRole).toString();
        QVERIFY2(tip.contains(QStringLiteral("Taken early: 12 s after the reading before; the plan asks for 60 s")), qPrintable(tip));
    }

    void goingOnAsLeftIsGuarded() {
        Record record = plannedTransmitter();
        record.plan.asLeftRuns = 1;
        BenchWindow bench(record);
        const auto chooseLeft = [&] { bench.find<QToolButton>("phaseChoice")->menu()->actions()[1]->trigger(); };
        chooseLeft();
        QVERIFY(bench.workbench.record().choices.phase == Phase::AsFound);
        QDialog* guard = bench.dialog("phaseGuard");
        QVERIFY(guard);
        guard->reject();
        QVERIFY(bench.workbench.record().choices.phase == Phase::AsFound);
        BenchWindow full(test::pressureTransmitter());
        full.find<QToolButton>("phaseChoice")->menu()->actions()[1]->trigger();
        QVERIFY(full.workbench.record().choices.phase == Phase::AsLeft);
        QCOMPARE(full.table()->readings().taken(), 10);
    }
};

QTEST_MAIN(BenchTyping)
#include "tst_bench_typing.moc"
