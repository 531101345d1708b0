// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleRecord.h"
#include "ui/bench/BenchPage.h"
#include "ui/bench/CoefficientsDialog.h"
#include "ui/bench/NumberEdit.h"
#include "ui/bench/PastedBlock.h"
#include "ui/bench/PlanRows.h"
#include "ui/bench/ReadingsTable.h"
#include "ui/look/TypedNumber.h"
#include "ui/commands/ExclusionCommands.h"
#include "ui/look/Look.h"
#include "ui/plot/LinePlot.h"
#include "ui/plot/ResidualPlot.h"
#include "ui/plot/SplitPicture.h"

#include <QAction>
#include <QApplication>
#include <QClipboard>
#include <QCheckBox>
#include <QComboBox>
#include <QDialog>
#include <QLabel>
#include <QMenu>
#include <QPlainTextEdit>
#include <QPushButton>
#include <QSignalSpy>
#include <QTableWidget>
#include <QTemporaryDir>
#include <QTest>
#include <QToolButton>

using namespace spanwright;

namespace {

/// A transmitter with a plan of three set points, rising and falling, two runs, and nothing taken yet.
Record planned() {
    const Record sample = test::pressureTransmitter();
    Record record;
    record.item = sample.item;
    record.plan.setPoints = {test::number("0"), test::number("5"), test::number("10")};
    record.plan.runs = 2;
    return record;
}

/// The bench in a window, with keys and mouse at hand.
class Bench {
  public:
    explicit Bench(const Record& record) : workbench([this] { return now; }), page(workbench) {
        workbench.setPerson(QStringLiteral("IO"));
        workbench.setRecord(record);
        page.resize(1280, 720);
        page.show();
        QApplication::setActiveWindow(&page);
        QTest::qWait(0);
    }
    template <class T>
    T* find(const char* name) const {
        T* found = page.findChild<T*>(QLatin1String(name));
        Q_ASSERT(found);
        return found;
    }
    ReadingsTable* table() const { return find<ReadingsTable>("readingsTable"); }
    NumberEdit* cell() const {
        for (NumberEdit* editor : table()->viewport()->findChildren<NumberEdit*>(QStringLiteral("cellEditor")))
            if (editor->isVisible())
                return editor;
        return nullptr;
    }
    /// Types into the widget that has the focus of the bench.
    static void type(QWidget* widget, const char* keys) {
        QTest::keyClicks(widget, QLatin1String(keys));
    }
    void enter(const char* name, const char* keys) {
        auto* field = find<NumberEdit>(name);
        field->setFocus();
        type(field, keys);
        QTest::keyClick(field, Qt::Key_Return);
    }
    const ReadingColumns& readings() const { return *workbench.record().readings; }
    QDialog* dialog(const char* name) const {
        QDialog* found = nullptr;
        for (QDialog* candidate : page.findChildren<QDialog*>(QLatin1String(name)))
            if (candidate->isVisible())
                found = candidate;
        return found;
    }
    void act(const char* id) const { find<QAction>(id)->trigger(); }

    std::int64_t now = 1764590400000;
    Workbench workbench;
    BenchPage page;
};

std::string text(const std::optional<Decimal>& value) {
    return value ? value->text() : "none";
}

} // namespace

class BenchTest : public QObject {
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
        Bench bench(planned());
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
        Bench bench(planned());
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
        Bench bench(record);
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
        Bench bench(planned());
        bench.enter("referenceField", "zero");
        auto* field = bench.find<NumberEdit>("referenceField");
        QVERIFY(field->refused());
        QCOMPARE(field->text(), QStringLiteral("zero"));
        QVERIFY(bench.find<QLabel>("typedWords")->text().contains(QStringLiteral("is not a number")));
        bench.type(field, "1");
        QVERIFY(!field->refused());
    }

    void enterInTheTableGoesToTheNextPlannedCell() {
        Bench bench(planned());
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
        Bench bench(planned());
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
        Bench bench(test::pressureTransmitter());
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

        Bench bench(planned());
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
        Bench bench(record);
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

    /// Readings 40 to 42 of the sample, the first with a slipped decimal mark; and a reference far from its set point.
    void aPastedBlockIsAskedAboutInOneQuestion() {
        const Record sample = test::pressureTransmitter();
        Record record = sample;
        ReadingColumns& columns = record.readings.edit();
        while (columns.size() > 39)
            columns.remove(columns.ids().back());
        Bench bench(record);
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
        table->paste(block(QStringLiteral("10.404"))); // nothing doubtful, nothing asked
        QVERIFY(!bench.dialog("suspectsDialog"));
        QCOMPARE(bench.readings().size(), std::size_t(42));
    }

    void aReadingTakenBeforeTheWaitIsMarked() {
        Record record = planned();
        record.plan.dwellSeconds = 60;
        Bench bench(record);
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

    void theFunctionIsCopiedAndSavedForALogger() {
        Bench bench(test::pressureTransmitter());
        bench.act("bench.coefficients");
        QDialog* dialog = bench.dialog("coefficientsDialog");
        QVERIFY(dialog);
        auto* shown = dialog->findChild<QPlainTextEdit*>(QStringLiteral("coefficientText"));
        QVERIFY2(shown->toPlainText().contains(QStringLiteral("b1 = 1.6001 mA/bar")), qPrintable(shown->toPlainText()));
        dialog->findChild<QComboBox*>(QStringLiteral("coefficientForm"))->setCurrentIndex(1);
        QVERIFY(shown->toPlainText().contains(QStringLiteral("double pressure_from_current(double current)")));
        dialog->findChild<QPushButton*>(QStringLiteral("coefficientCopy"))->click();
        QCOMPARE(QApplication::clipboard()->text(), shown->toPlainText());
        dialog->close();

        QTemporaryDir folder;
        QString suggested;
        CoefficientsDialog saving(bench.workbench, [&](QWidget*, const QString& suggestion) { return folder.filePath(suggested = suggestion); });
        saving.setAttribute(Qt::WA_DeleteOnClose, false);
        saving.show();
        saving.findChild<QPushButton*>(QStringLiteral("coefficientSave"))->click();
        QCOMPARE(suggested, QStringLiteral("NV-20318-coefficients.txt"));
        QFile file(folder.filePath(suggested));
        QVERIFY(file.open(QIODevice::ReadOnly));
        QCOMPARE(QString::fromUtf8(file.readAll()), saving.findChild<QPlainTextEdit*>(QStringLiteral("coefficientText"))->toPlainText());
        bench.workbench.setRecord(planned());
        bench.workbench.settle();
        QVERIFY(!saving.findChild<QPushButton*>(QStringLiteral("coefficientSave"))->isEnabled());
    }

    void selectingInOnePlaceSelectsInAll() {
        Bench bench(test::pressureTransmitter());
        auto* residual = bench.find<ResidualPlot>("residualPlot");
        auto* line = bench.find<LinePlot>("linePlot");
        QTest::mouseClick(residual->viewport(), Qt::LeftButton, {}, residual->placeOf(6).toPoint());
        QCOMPARE(bench.workbench.selection(), std::set<ReadingId>{6});
        QCOMPARE(line->cloud().selection(), std::set<ReadingId>{6});
        QCOMPARE(bench.table()->selectionModel()->selectedRows().size(), 1);
        QCOMPARE(bench.table()->selectionModel()->selectedRows()[0].row(), 5);
        bench.table()->selectRow(10);
        QCOMPARE(residual->cloud().selection(), std::set<ReadingId>{11});
        QVERIFY(bench.find<QWidget>("selectionBar")->isVisible());
        bench.find<QToolButton>("clearSelection")->click();
        QVERIFY(bench.table()->selectionModel()->selectedRows().isEmpty());
    }

    void readingsAreExcludedWithAReasonAndTakenBack() {
        Bench bench(test::pressureTransmitter());
        const Record before = bench.workbench.record();
        auto* residual = bench.find<ResidualPlot>("residualPlot");
        QTest::mouseClick(residual->viewport(), Qt::LeftButton, {}, residual->placeOf(6).toPoint());
        QTest::keyClick(residual, Qt::Key_X);
        QDialog* dialog = bench.dialog("excludeDialog");
        QVERIFY(dialog);
        auto* accept = dialog->findChild<QPushButton*>(QStringLiteral("excludeAccept"));
        QVERIFY(!accept->isEnabled());
        auto* reason = dialog->findChild<QComboBox*>(QStringLiteral("excludeReason"));
        reason->setCurrentIndex(reason->count() - 1); // other: needs words
        QVERIFY(!accept->isEnabled());
        QTest::keyClicks(dialog->findChild<QLineEdit*>(QStringLiteral("excludeWords")), QStringLiteral("valve still moving"));
        QVERIFY(accept->isEnabled());
        auto* effect = dialog->findChild<QWidget*>(QStringLiteral("effectTable"));
        QTRY_VERIFY(effect->accessibleDescription().contains(QStringLiteral("readings used\t66\t65")));
        QVERIFY(effect->accessibleDescription().contains(QStringLiteral("slope b1\t1.60010\t")));
        accept->click();
        QVERIFY(bench.workbench.record().exclusions->contains(6));
        QCOMPARE(bench.workbench.record().exclusions->find(6)->words, std::string("valve still moving"));
        QCOMPARE(residual->points().excluded[5], std::uint8_t(1));
        QVERIFY(bench.table()->readings().index(5, 0).data(ReadingsModel::ExcludedRole).toBool());
        QVERIFY(residual->ink().notes().front().text.contains(QStringLiteral("valve still moving")));
        bench.find<QToolButton>("readmitSelected")->click();
        QVERIFY(bench.workbench.record() == before);
    }

    void theCalibrationFunctionIsChosenAndUndone() {
        Bench bench(test::pressureTransmitter());
        auto* choice = bench.find<QToolButton>("functionChoice");
        QVERIFY(bench.find<QLabel>("equation")->text().contains(QStringLiteral("1.60010 x")));
        choice->findChild<QAction*>(QStringLiteral("polynomial:2"))->trigger();
        QVERIFY(bench.workbench.record().choices.function == (FunctionChoice{FunctionFamily::Polynomial, 2}));
        QVERIFY(bench.find<QLabel>("equation")->text().contains(QStringLiteral("x²")));
        QVERIFY(choice->text().contains(QStringLiteral("degree 2")));
        bench.workbench.undoStack().undo();
        QVERIFY(choice->text().contains(QStringLiteral("Straight line")));
    }

    void aPartOfTheSplitShowsItselfOnTheResiduals() {
        Bench bench(test::pressureTransmitter());
        auto* picture = bench.find<SplitPicture>("splitPicture");
        auto* residual = bench.find<ResidualPlot>("residualPlot");
        picture->setFocus();
        QTest::keyClick(picture, Qt::Key_Down);
        QTest::keyClick(picture, Qt::Key_Down);
        QVERIFY(residual->part() == SplitPart::LackOfFit);
        QTest::keyClick(picture, Qt::Key_Down);
        QVERIFY(residual->part() == SplitPart::Hysteresis);
        QTest::keyClick(picture, Qt::Key_Escape);
        QVERIFY(!residual->part());
        bench.act("bench.split-table");
        QDialog* table = bench.dialog("splitTable");
        QVERIFY(table);
        table->findChild<QPushButton*>(QStringLiteral("copySplit"))->click();
        QVERIFY(QApplication::clipboard()->text().contains(QStringLiteral("\nlack of fit\t0.00023864\t9\t")));
    }

    void theSplitIsCopiedByKeysAndPutOnTheCertificate() {
        Bench bench(test::pressureTransmitter());
        bench.act("bench.split-table");
        QDialog* dialog = bench.dialog("splitTable");
        QVERIFY(dialog);
        auto* table = dialog->findChild<QTableWidget*>(QStringLiteral("splitFiguresTable"));
        table->setFocus();
        table->selectRow(4);
        QTest::keyClick(table, Qt::Key_C, Qt::ControlModifier);
        const QStringList lines = QApplication::clipboard()->text().split(QLatin1Char('\n'), Qt::SkipEmptyParts);
        QCOMPARE(lines.size(), 2); // a head and the row
        QVERIFY(lines[0].startsWith(QStringLiteral("source\tsum of squares (mA)²\t")));
        QVERIFY(lines[1].startsWith(QStringLiteral("naive, against pure error\t")));
        QTest::keyClick(table, Qt::Key_A, Qt::ControlModifier);
        QTest::keyClick(table, Qt::Key_C, Qt::ControlModifier);
        QCOMPARE(QApplication::clipboard()->text().count(QLatin1Char('\n')), table->rowCount() + 1);
        QVERIFY(!bench.workbench.record().choices.splitOnCertificate);
        dialog->findChild<QCheckBox*>(QStringLiteral("choices.split_on_certificate"))->click();
        QVERIFY(bench.workbench.record().choices.splitOnCertificate);
        QCOMPARE(bench.workbench.record().journal->entries().back().where, std::string("choices.split_on_certificate"));
        bench.workbench.undoStack().undo();
        QVERIFY(!bench.workbench.record().choices.splitOnCertificate);
    }

    void performanceFiguresSayWhereTheyOccurAndForceFiguresComeWithTurning() {
        Bench bench(test::loadCell());
        bench.find<QToolButton>("performanceFigures")->click();
        QDialog* dialog = bench.dialog("performanceDialog");
        QVERIFY(dialog);
        dialog->findChild<QPushButton*>(QStringLiteral("copyPerformance"))->click();
        const QString text = QApplication::clipboard()->text();
        QVERIFY(text.contains(QStringLiteral("\nlargest\t\t0.0080\t0.0028\t-0.0014\t–")));
        QVERIFY(text.contains(QStringLiteral("\nat\t\t5\t25\t15\t–")));
        QVERIFY(text.contains(QStringLiteral("non-linearity, terminal-based\t-0.000385\t-0.019\t30")));
        QVERIFY(dialog->findChild<QLabel*>(QStringLiteral("forceNote"))->text().contains(QStringLiteral("No zero error")));
        dialog->reject();
        Record still = test::loadCell();
        still.plan.positions.clear();
        Bench other(still);
        other.act("bench.performance");
        QVERIFY(other.dialog("performanceDialog")->findChild<QWidget*>(QStringLiteral("forceFigures"))->isHidden());
    }

    void eachExclusionShowsWhatItDoesAndTheLimitIsSet() {
        Record record = test::pressureTransmitter();
        record.exclusions.edit().add({6, ExclusionReason::Disturbance, "door", "IO", 0});
        record.exclusions.edit().add({50, ExclusionReason::NotSettled, {}, "TL", 0});
        Bench bench(record);
        bench.act("bench.exclusions");
        QDialog* dialog = bench.dialog("exclusionsDialog");
        QVERIFY(dialog);
        auto* list = dialog->findChild<QTableWidget*>(QStringLiteral("exclusionsList"));
        QCOMPARE(list->rowCount(), 4); // all, each, none
        QTRY_VERIFY(!list->item(2, 1)->text().isEmpty());
        QCOMPARE(list->item(1, 4)->text(), QStringLiteral("disturbance: door"));
        QVERIFY(list->item(0, 1)->text() != list->item(3, 1)->text());
        list->setCurrentCell(1, 0);
        QVERIFY(dialog->findChild<QWidget*>(QStringLiteral("effectTable"))->accessibleDescription().contains(QStringLiteral("readings used\t64\t65")));
        auto* limit = dialog->findChild<QLineEdit*>(QStringLiteral("choices.exclusion_limit"));
        QCOMPARE(limit->text(), QStringLiteral("10"));
        limit->selectAll();
        QTest::keyClicks(limit, QStringLiteral("2.5"));
        QTest::keyClick(limit, Qt::Key_Return);
        QCOMPARE(bench.workbench.record().choices.exclusionLimit.text(), std::string("0.025"));
        QVERIFY(dialog->findChild<QLabel*>(QStringLiteral("exclusionsShare"))->text().contains(QStringLiteral("more than the limit")));
        list->setCurrentCell(1, 0);
        dialog->findChild<QPushButton*>(QStringLiteral("readmitChosen"))->click();
        QVERIFY(!bench.workbench.record().exclusions->contains(6));
        bench.workbench.undoStack().undo();
        bench.workbench.undoStack().undo();
        QVERIFY(bench.workbench.record() == record);
    }

    void anyFunctionOrARobustFitStandsBesideTheOneInUse() {
        Bench bench(test::pressureTransmitter());
        bench.act("bench.compare");
        QDialog* dialog = bench.dialog("compareDialog");
        QVERIFY(dialog);
        auto* choice = dialog->findChild<QComboBox*>(QStringLiteral("compareWith"));
        auto* effect = dialog->findChild<QWidget*>(QStringLiteral("effectTable"));
        auto* take = dialog->findChild<QPushButton*>(QStringLiteral("takeOver"));
        QVERIFY(choice->currentText().startsWith(QStringLiteral("Robust")));
        QTRY_VERIFY(effect->accessibleDescription().contains(QStringLiteral("value at 5 bar, mA\t11.9999\t12.0000")));
        QVERIFY(take->isHidden()); // for comparison only
        choice->setCurrentIndex(choice->findText(QStringLiteral("Polynomial of degree 3")));
        QTRY_VERIFY(take->isEnabled());
        QVERIFY(effect->accessibleDescription().contains(QStringLiteral("b3\t–\t")));
        take->click();
        QVERIFY(bench.workbench.record().choices.function == (FunctionChoice{FunctionFamily::Polynomial, 3}));
    }

    void aFindingLeadsToItsRemedyOrIsDismissedWithAReason() {
        Bench bench(test::pressureTransmitter());
        auto* view = bench.find<QWidget>("findings");
        QVERIFY(view->findChild<QToolButton*>(QStringLiteral("remedy")));
        for (const QToolButton* button : view->findChildren<QToolButton*>())
            QVERIFY2(button->mapTo(view, QPoint(button->width(), 0)).x() <= view->width(), qPrintable(QStringLiteral("%1 in %2: %3").arg(button->width()).arg(view->width()).arg(button->text())));
        view->findChild<QToolButton*>(QStringLiteral("remedy"))->click(); // lack of fit: compare with a quadratic
        QDialog* compare = bench.dialog("compareDialog");
        QVERIFY(compare);
        auto* take = compare->findChild<QPushButton*>(QStringLiteral("takeOver"));
        QTRY_VERIFY(take->isEnabled());
        QVERIFY(compare->findChild<QLabel*>(QStringLiteral("compareFindings"))->text().contains(QStringLiteral("Only straight line")));
        take->click();
        QVERIFY(bench.workbench.record().choices.function == (FunctionChoice{FunctionFamily::Polynomial, 2}));
        bench.workbench.undoStack().undo();
        QTRY_VERIFY(!view->findChildren<QToolButton*>(QStringLiteral("dismiss")).isEmpty());
        view->findChildren<QToolButton*>(QStringLiteral("dismiss")).back()->click();
        QDialog* dialog = bench.dialog("dismissDialog");
        QVERIFY(dialog);
        auto* reason = dialog->findChild<QComboBox*>(QStringLiteral("reason"));
        QTest::keyClick(reason, Qt::Key_Return);
        QVERIFY(bench.workbench.record().dismissals.empty());
        QTest::keyClicks(reason, QStringLiteral("known of this type"));
        QTest::keyClick(reason, Qt::Key_Return);
        QCOMPARE(bench.workbench.record().dismissals.size(), std::size_t(1));
        QCOMPARE(bench.workbench.record().dismissals[0].reason, std::string("known of this type"));
        QVERIFY(view->findChild<QToolButton*>(QStringLiteral("recall")));
        view->findChild<QToolButton*>(QStringLiteral("recall"))->click();
        QVERIFY(bench.workbench.record().dismissals.empty());
    }

    void anIndicationIsConvertedBesideTheWork() {
        Bench bench(test::pressureTransmitter());
        bench.act("bench.convert");
        QDialog* dialog = bench.dialog("convertDialog");
        QVERIFY(dialog);
        QTest::keyClicks(dialog->findChild<QLineEdit*>(QStringLiteral("convertIndication")), QStringLiteral("12,000"));
        const QString value = dialog->findChild<QLabel*>(QStringLiteral("convertValue"))->text();
        // The whole budget of the value: 0.0066 bar, as `convert` gives it; the function alone would say 0.0061 bar.
        QCOMPARE(value, QStringLiteral("5.0000 bar, U = 0.0066 bar (k = 2.03)"));
        QTest::keyClicks(dialog->findChild<QLineEdit*>(QStringLiteral("convertIndication")), QStringLiteral("0"));
        QCOMPARE(dialog->findChild<QLabel*>(QStringLiteral("convertValue"))->text(), QStringLiteral("5.0000 bar, U = 0.0066 bar (k = 2.03)"));
        dialog->findChild<QLineEdit*>(QStringLiteral("convertIndication"))->clear();
        QTest::keyClicks(dialog->findChild<QLineEdit*>(QStringLiteral("convertIndication")), QStringLiteral("25.1"));
        QCOMPARE(dialog->findChild<QLabel*>(QStringLiteral("convertValue"))->text(), QStringLiteral("13.1870 bar, without an uncertainty"));
        // y = x²: 4 belongs to −2 and 2, and both are shown.
        Record turning;
        for (const char* x : {"-3", "-2", "-1", "0", "1", "2", "3"}) {
            Reading reading;
            reading.id = turning.nextReadingId++;
            reading.reference = test::number(x);
            reading.indication = Decimal{reading.reference->mantissa * reading.reference->mantissa, 0, {}};
            turning.readings.edit().append(reading);
        }
        turning.choices.function = {FunctionFamily::Polynomial, 2};
        bench.workbench.setRecord(turning);
        bench.workbench.settle();
        dialog->findChild<QLineEdit*>(QStringLiteral("convertIndication"))->setText(QStringLiteral("4"));
        const QString both = dialog->findChild<QLabel*>(QStringLiteral("convertValue"))->text();
        QVERIFY2(both.contains(QStringLiteral("2.00000")) && both.contains(QStringLiteral("−2.00000")), qPrintable(both));
    }

    void goingOnAsLeftIsGuarded() {
        Record record = planned();
        record.plan.asLeftRuns = 1;
        Bench bench(record);
        const auto chooseLeft = [&] { bench.find<QToolButton>("phaseChoice")->menu()->actions()[1]->trigger(); };
        chooseLeft();
        QVERIFY(bench.workbench.record().choices.phase == Phase::AsFound);
        QDialog* guard = bench.dialog("phaseGuard");
        QVERIFY(guard);
        guard->reject();
        QVERIFY(bench.workbench.record().choices.phase == Phase::AsFound);
        Bench full(test::pressureTransmitter());
        full.find<QToolButton>("phaseChoice")->menu()->actions()[1]->trigger();
        QVERIFY(full.workbench.record().choices.phase == Phase::AsLeft);
        QCOMPARE(full.table()->readings().taken(), 10);
    }

    void aMillionReadingsAreShownAtOnce() {
        Record record;
        const std::size_t n = 1000000;
        std::vector<std::int64_t> x(n), y(n);
        for (std::size_t i = 0; i < n; ++i) {
            x[i] = static_cast<std::int64_t>(i % 1000);
            y[i] = 400 + 16 * x[i] / 10 + static_cast<std::int64_t>(i % 7);
        }
        ReadingColumns::Block block;
        block.n = n;
        block.reference = DecimalColumn::fromGrid(x, std::vector<std::uint8_t>(n, 2), 2);
        block.indication = DecimalColumn::fromGrid(y, std::vector<std::uint8_t>(n, 2), 2);
        record.readings.edit().appendBlock(block, 1);
        record.nextReadingId = static_cast<ReadingId>(n + 1);
        Bench bench(record);
        QCOMPARE(bench.table()->readings().rowCount(), int(n) + 1);
        QTRY_VERIFY_WITH_TIMEOUT(bench.find<LinePlot>("linePlot")->points().size() == n, 60000);
        QVERIFY(bench.find<LinePlot>("linePlot")->cloud().showsDensity());
        bench.table()->scrollTo(bench.table()->readings().index(999999, 0));
        QCOMPARE(bench.table()->readings().index(999999, ReadingsModel::ReferenceValue).data().toString(), QStringLiteral("9.99"));
    }

    void nothingIsClippedInASmallWindow() {
        Bench bench(test::pressureTransmitter());
        for (const QToolButton* button : bench.page.findChildren<QToolButton*>())
            if (button->isVisible() && !button->text().isEmpty())
                QVERIFY2(button->width() >= button->fontMetrics().horizontalAdvance(button->text()), qPrintable(button->text()));
        for (const QLabel* label : bench.page.findChildren<QLabel*>())
            if (label->isVisible() && !label->wordWrap() && !label->text().isEmpty())
                QVERIFY2(label->width() >= label->fontMetrics().horizontalAdvance(label->text()), qPrintable(label->text()));
        for (const QWidget* widget : bench.page.findChildren<QWidget*>())
            if (widget->focusPolicy() != Qt::NoFocus && widget->isVisible() && widget->parentWidget() != bench.table()->viewport() && !widget->inherits("QScrollBar") &&
                !widget->parentWidget()->inherits("QAbstractScrollArea") &&
                !widget->inherits("QHeaderView"))
                QVERIFY2(!widget->accessibleName().isEmpty() || !widget->property("text").toString().isEmpty(), qPrintable(QString::fromLatin1(widget->metaObject()->className()) + widget->objectName() + QStringLiteral(" in ") + QString::fromLatin1(widget->parentWidget()->metaObject()->className())));
    }
};

QTEST_MAIN(BenchTest)
#include "tst_bench.moc"
