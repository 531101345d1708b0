// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/BenchWindow.h"
#include "tests/support/SampleRecord.h"
#include "ui/bench/MatrixDialog.h"
#include "ui/bench/ReadingsTable.h"
#include "ui/look/Look.h"

#include <QApplication>
#include <QClipboard>
#include <QComboBox>
#include <QDialog>
#include <QLabel>
#include <QLineEdit>
#include <QListWidget>
#include <QMenu>
#include <QPushButton>
#include <QTableView>
#include <QTableWidget>
#include <QTest>
#include <QToolButton>

#include <functional>

using namespace spanwright;
using test::BenchWindow;

namespace {

/// Six readings with their uncertainties, of which nothing is known about directions and runs (ISO/TS 28037:2010, clause 7.4).
Record sixReadings() {
    const char* const rows[][4] = {{"1.2", "3.4", "0.2", "0.2"}, {"1.9", "4.4", "0.2", "0.2"},  {"2.9", "7.2", "0.2", "0.2"},
                                   {"4.0", "8.5", "0.2", "0.4"}, {"4.7", "10.8", "0.2", "0.4"}, {"5.9", "13.5", "0.2", "0.4"}};
    Record record;
    for (const auto& row : rows) {
        Reading reading;
        reading.id = record.nextReadingId++;
        reading.reference = test::number(row[0]);
        reading.indication = test::number(row[1]);
        reading.uReference = test::number(row[2]);
        reading.uIndication = test::number(row[3]);
        record.readings.edit().append(reading);
    }
    return record;
}

QString diagonal(int n) {
    QStringList rows;
    for (int i = 0; i < n; ++i) {
        QStringList cells;
        for (int j = 0; j < n; ++j)
            cells << (i == j ? QStringLiteral("0.0400") : QStringLiteral("0"));
        rows << cells.join(QLatin1Char('\t'));
    }
    return rows.join(QLatin1Char('\n'));
}

} // namespace

class FitChoices : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() {
        setScheme(*qApp, SchemeName::Light);
        QLocale::setDefault(QLocale::c());
    }

    void theFormulaOfTheFunctionIsInItsChooser() {
        BenchWindow bench(test::pressureTransmitter());
        QMenu* menu = bench.find<QToolButton>("functionChoice")->menu();
        emit menu->aboutToShow();
        QVERIFY(menu->findChildren<QLabel*>(QStringLiteral("functionFormula")).back()->text().contains(QStringLiteral("y = b0 + b1·x\nISO/TS 28037")));
    }

    void chiSquaredIsShownWhereUncertaintiesAreKnown() {
        BenchWindow bench(sixReadings());
        bench.choose("weightsChoice", QStringLiteral("Reference and indication both uncertain"));
        bench.choose("weightsChoice", QStringLiteral("From the stated uncertainties as they are"));
        const QString words = bench.find<QLabel>("equation")->text();
        QVERIFY2(words.contains(QStringLiteral("χ² = 2.743, p = 0.60")), qPrintable(words)); // R: pchisq(2.742677, 4, lower = FALSE) 0.6018
        QVERIFY(words.contains(QStringLiteral("settled after")));
    }

    /// The shared error cannot be scaled by residuals: choosing it takes the stated uncertainties as they are, in one step back.
    void theSharedErrorIsChosenInWords() {
        Record record = sixReadings();
        Standard standard;
        standard.id = "P";
        standard.expandedUncertainty = test::number("0.1");
        record.standards = {standard};
        BenchWindow bench(record);
        bench.choose("weightsChoice", QStringLiteral("Reference and indication both uncertain"));
        const Choices before = bench.choices();
        bench.choose("weightsChoice", QStringLiteral("In the fit, with the stated uncertainties as they are"));
        QVERIFY(bench.choices().sharedError == SharedError::Fit);
        QVERIFY(bench.choices().covariance == CovarianceScale::Stated);
        bench.workbench.settle();
        QVERIFY(bench.workbench.evaluation()->phase(Phase::AsFound)->fit->correlated);
        QVERIFY(bench.page.findChild<QWidget*>(QStringLiteral("splitPicture"))->accessibleDescription().isEmpty() ||
                !bench.workbench.evaluation()->phase(Phase::AsFound)->split);
        bench.workbench.undoStack().undo();
        QVERIFY(bench.choices() == before);
    }

    void covariancesArePastedRefusedAndRemoved() {
        BenchWindow bench(sixReadings());
        auto* dialog = qobject_cast<MatrixDialog*>(bench.open("bench.covariances", "matrixDialog"));
        auto* refusal = dialog->findChild<QLabel*>(QStringLiteral("matrixRefusal"));
        QVERIFY(dialog->findChild<QLabel*>(QStringLiteral("matrixAbout"))->text().contains(QStringLiteral("6 rows")));
        QApplication::clipboard()->setText(diagonal(5));
        dialog->findChild<QPushButton*>(QStringLiteral("matrixPaste"))->click();
        QVERIFY(refusal->text().contains(QStringLiteral("5 rows, and there are 6 readings")));
        QVERIFY(bench.workbench.record().uncertaintyMatrix.empty());
        dialog->take(diagonal(6).replace(0, 8, QStringLiteral("0.04\t0.5")).toStdString(), QStringLiteral("test"));
        QVERIFY2(refusal->text().contains(QStringLiteral("row 2, column 1 has 0")), qPrintable(refusal->text()));
        QApplication::clipboard()->setText(diagonal(6));
        QTest::keyClick(dialog, Qt::Key_V, Qt::ControlModifier);
        QVERIFY(refusal->text().isEmpty());
        QCOMPARE(bench.workbench.record().uncertaintyMatrix.rows.size(), std::size_t{6});
        QCOMPARE(bench.workbench.record().uncertaintyMatrix.rows[5].covariances.size(), std::size_t{6});
        auto* table = dialog->findChild<QTableView*>(QStringLiteral("matrixTable"));
        QCOMPARE(table->model()->index(2, 2).data().toString(), QStringLiteral("0.0400"));
        QCOMPARE(bench.workbench.record().journal->entries().back().where, std::string("uncertainty_matrix"));
        dialog->findChild<QPushButton*>(QStringLiteral("matrixRemove"))->click();
        QVERIFY(bench.workbench.record().uncertaintyMatrix.empty());
        bench.workbench.undoStack().undo();
        QCOMPARE(bench.workbench.record().uncertaintyMatrix.rows.size(), std::size_t{6});
        bench.workbench.undoStack().undo();
        QVERIFY(bench.workbench.record().uncertaintyMatrix.empty());
    }

    void columnsOfUncertaintiesShowWhereTheyAreUsed() {
        BenchWindow plain(test::pressureTransmitter());
        for (const int column : ReadingsModel::statedColumns)
            QVERIFY(plain.find<ReadingsTable>("readingsTable")->isColumnHidden(column));
        BenchWindow bench(sixReadings());
        auto* table = bench.find<ReadingsTable>("readingsTable");
        QVERIFY(!table->isColumnHidden(ReadingsModel::ReferenceUncertainty));
        QVERIFY(table->isColumnHidden(ReadingsModel::Covariance));
        QCOMPARE(table->readings().index(3, ReadingsModel::IndicationUncertainty).data().toString(), QStringLiteral("0.4"));
        table->showStated(true);
        QVERIFY(!table->isColumnHidden(ReadingsModel::Covariance));
        table->setCurrentIndex(table->readings().index(0, ReadingsModel::Covariance));
        table->paste(QStringLiteral("0.036\n0.036\n0.036\n0.036\n0.036\n-0.0360"));
        const DecimalColumn& covariances = bench.workbench.record().readings->uCovariance();
        QCOMPARE(covariances.missing(), std::size_t{0});
        QCOMPARE(covariances.at(5)->text(), std::string("-0.0360"));
        bench.workbench.undoStack().undo();
        QCOMPARE(bench.workbench.record().readings->uCovariance().missing(), std::size_t{6});
    }

    void aDegreeIsChosenFromTheTable() {
        BenchWindow bench(test::pressureTransmitter());
        QDialog* dialog = bench.open("bench.degrees", "degreeTable");
        auto* table = dialog->findChild<QTableWidget*>(QStringLiteral("degrees"));
        QCOMPARE(table->rowCount(), 5);
        QVERIFY(table->item(0, 0)->text().contains(QStringLiteral("in use")));
        table->setCurrentCell(1, 0);
        dialog->findChild<QPushButton*>(QStringLiteral("useDegree"))->click();
        QVERIFY(bench.choices().function == (FunctionChoice{FunctionFamily::Polynomial, 2}));
        bench.workbench.undoStack().undo();
        QVERIFY(bench.choices().function == (FunctionChoice{FunctionFamily::Line, 0}));
    }

    /// Shown beside least squares; the record keeps its method, and a reading in the list is selected everywhere.
    void aRobustFitIsComparedOnly() {
        Record record = sixReadings();
        record.readings.edit().setNumber(3, NumberColumn::Indication, test::number("15"));
        BenchWindow bench(record);
        const Record before = bench.workbench.record();
        QDialog* dialog = bench.open("bench.compare", "compareDialog");
        auto* with = dialog->findChild<QComboBox*>(QStringLiteral("compareWith"));
        QCOMPARE(with->currentText(), QStringLiteral("Robust after Huber, for comparison only"));
        with->setCurrentText(QStringLiteral("Robust, bisquare, for comparison only"));
        auto* list = dialog->findChild<QListWidget*>(QStringLiteral("weighedDown"));
        QTRY_VERIFY(list->count() > 0);
        QVERIFY(!dialog->findChild<QPushButton*>(QStringLiteral("takeOver"))->isVisible());
        list->setCurrentRow(0);
        QCOMPARE(bench.workbench.selection(), std::set<ReadingId>{4});
        QVERIFY(bench.workbench.record() == before);
    }

    void intervalsAtOnePlace() {
        BenchWindow bench(test::pressureTransmitter());
        QDialog* dialog = bench.open("bench.intervals", "intervalsDialog");
        dialog->findChild<QLineEdit*>(QStringLiteral("intervalPlace"))->setText(QStringLiteral("5"));
        QStringList words;
        for (const QLabel* label : dialog->findChildren<QLabel*>())
            words << label->text();
        QVERIFY(words.contains(QStringLiteral("one new reading")));
        QVERIFY(words.contains(QStringLiteral("95 % of all readings")));
        QVERIFY(words.join(QLatin1Char('\n')).contains(QStringLiteral("(Bonferroni)")));
        dialog->findChild<QLineEdit*>(QStringLiteral("intervalPlace"))->setText(QStringLiteral("50"));
        QVERIFY(dialog->findChild<QLabel*>(QStringLiteral("placeWords"))->text().contains(QStringLiteral("outside the calibrated range")));
    }
};

QTEST_MAIN(FitChoices)
#include "tst_fit_choices.moc"
