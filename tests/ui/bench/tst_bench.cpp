// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/BenchWindow.h"
#include "tests/support/SampleRecord.h"
#include "ui/bench/CoefficientsDialog.h"
#include "ui/bench/ReadingsTable.h"
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
#include <QLineEdit>
#include <QMenu>
#include <QPlainTextEdit>
#include <QPushButton>
#include <QSpinBox>
#include <QTableWidget>
#include <QTemporaryDir>
#include <QTest>
#include <QToolButton>

using namespace spanwright;
using test::BenchWindow;
using test::plannedTransmitter;

/// The readings seen, selected and excluded; what the function, the split and the findings lead to.
class BenchTest : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() {
        setScheme(*qApp, SchemeName::Light);
        QLocale::setDefault(QLocale::c());
    }

    void theFunctionIsCopiedAndSavedForALogger() {
        BenchWindow bench(test::pressureTransmitter());
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
        bench.workbench.setRecord(plannedTransmitter());
        bench.workbench.settle();
        QVERIFY(!saving.findChild<QPushButton*>(QStringLiteral("coefficientSave"))->isEnabled());
    }

    void selectingInOnePlaceSelectsInAll() {
        BenchWindow bench(test::pressureTransmitter());
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
        BenchWindow bench(test::pressureTransmitter());
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
        BenchWindow bench(test::pressureTransmitter());
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
        BenchWindow bench(test::pressureTransmitter());
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
        BenchWindow bench(test::pressureTransmitter());
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
        BenchWindow bench(test::loadCell());
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
        BenchWindow other(still);
        other.act("bench.performance");
        QVERIFY(other.dialog("performanceDialog")->findChild<QWidget*>(QStringLiteral("forceFigures"))->isHidden());
    }

    void eachExclusionShowsWhatItDoesAndTheLimitIsSet() {
        Record record = test::pressureTransmitter();
        record.exclusions.edit().add({6, ExclusionReason::Disturbance, "door", "IO", 0});
        record.exclusions.edit().add({50, ExclusionReason::NotSettled, {}, "TL", 0});
        BenchWindow bench(record);
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
        BenchWindow bench(test::pressureTransmitter());
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
        BenchWindow bench(test::pressureTransmitter());
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
        BenchWindow bench(test::pressureTransmitter());
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
        // Nothing was repeated, so a mean of five is no better known than one reading, and that is said.
        auto* warnings = dialog->findChild<QLabel*>(QStringLiteral("convertWarnings"));
        QVERIFY(!warnings->text().contains(QStringLiteral("averages out")));
        dialog->findChild<QSpinBox*>(QStringLiteral("convertRepeats"))->setValue(5);
        QVERIFY2(warnings->text().contains(QStringLiteral("nothing tells which part of the scatter averages out")), qPrintable(warnings->text()));
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
        BenchWindow bench(record);
        QCOMPARE(bench.table()->readings().rowCount(), int(n) + 1);
        QTRY_VERIFY_WITH_TIMEOUT(bench.find<LinePlot>("linePlot")->points().size() == n, 60000);
        QVERIFY(bench.find<LinePlot>("linePlot")->cloud().showsDensity());
        bench.table()->scrollTo(bench.table()->readings().index(999999, 0));
        QCOMPARE(bench.table()->readings().index(999999, ReadingsModel::ReferenceValue).data().toString(), QStringLiteral("9.99"));
    }

    void nothingIsClippedInASmallWindow() {
        BenchWindow bench(test::pressureTransmitter());
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
