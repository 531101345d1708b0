// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleRecord.h"
#include "ui/budget/BudgetPage.h"
#include "ui/budget/TextTable.h"
#include "ui/look/Look.h"

#include <QApplication>
#include <QHeaderView>
#include <QScrollArea>
#include <QScrollBar>
#include <QTableView>
#include <QTest>

using namespace spanwright;

namespace {

/// The page on a workbench of its own.
struct Desk {
    Desk(const Record& record, QSize size) : bench([] { return std::int64_t(1'792'000'000'000); }) {
        bench.setRecord(record);
        page = std::make_unique<BudgetPage>(bench);
        page->resize(size);
        page->show();
        QVERIFY(QTest::qWaitForWindowExposed(page.get()));
        for (int i = 0; i < 4; ++i) // a scroll bar that comes changes the height, and the height the bar
            QCoreApplication::sendPostedEvents();
    }
    QTableView* table(const char* name) const { return page->findChild<QTableView*>(QLatin1String(name)); }
    QString cell(const char* name, int row, const QString& head) const {
        const QAbstractItemModel* model = table(name)->model();
        for (int column = 0; column < model->columnCount(); ++column)
            if (model->headerData(column, Qt::Horizontal).toString().startsWith(head))
                return model->index(row, column).data().toString();
        return {};
    }

    Workbench bench;
    std::unique_ptr<BudgetPage> page;
};

} // namespace

class BudgetPageTest : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() { setScheme(*qApp, SchemeName::Light); }

    void noNumberIsCutAndNoRowIsHalved_data() {
        QTest::addColumn<QSize>("size");
        for (const int width : {900, 1000, 1080, 1280, 1920})
            for (const int height : {520, 583, 691, 1000})
                QTest::addRow("%d x %d", width, height) << QSize(width, height);
    }

    void noNumberIsCutAndNoRowIsHalved() {
        QFETCH(QSize, size);
        for (const Record& record : {test::pressureTransmitter(), test::loadCell()}) {
            const Desk desk(record, size);
            for (const char* name : {"budget.results", "budget.contributions"}) {
                QTableView* table = desk.table(name);
                const QAbstractItemModel* model = table->model();
                const QFontMetrics metrics(table->font());
                for (int column = 0; column < model->columnCount(); ++column) {
                    const bool number = model->index(0, column).data(Qt::TextAlignmentRole).toInt() & Qt::AlignRight;
                    if (!number || table->isColumnHidden(column))
                        continue;
                    for (int row = 0; row < model->rowCount(); ++row)
                        QVERIFY2(table->columnWidth(column) > metrics.horizontalAdvance(model->index(row, column).data().toString()) + 8,
                                 qPrintable(QStringLiteral("%1, column %2, row %3").arg(QLatin1String(name)).arg(column).arg(row)));
                    for (const QString& line : model->headerData(column, Qt::Horizontal).toString().split(QLatin1Char('\n')))
                        QVERIFY(table->columnWidth(column) >= metrics.horizontalAdvance(line));
                }
                QCOMPARE(table->viewport()->height() % table->verticalHeader()->defaultSectionSize(), 0);
                QVERIFY(table->viewport()->height() > 0);
            }
            // The fields at the right are seen whole.
            auto* side = desk.page->findChild<QScrollArea*>(QStringLiteral("budget.side"));
            QVERIFY(side->widget()->minimumSizeHint().width() <= side->viewport()->width());
        }
    }

    void whatDoesNotExistIsNotShown() {
        const Desk probe(test::temperatureProbe(), {1280, 700}); // resistance: no ideal output, so no error
        QVERIFY(probe.table("budget.results")->isColumnHidden(4));
        QVERIFY(!probe.table("budget.lines")->isVisible());
        const Desk transmitter(test::pressureTransmitter(), {1280, 700});
        QVERIFY(!transmitter.table("budget.results")->isColumnHidden(4));
        QVERIFY(transmitter.table("budget.lines")->isVisible());
    }

    void theIndicationKeepsTheDigitsThatWereRead() {
        Record record = test::pressureTransmitter();
        record.standards[0].expandedUncertainty = test::number("0.5"); // bar, so U is 0.5 · 1.6 mA
        const Desk desk(record, {1280, 700});
        QCOMPARE(desk.cell("budget.results", 0, "U"), QStringLiteral("0.80"));
        QCOMPARE(desk.cell("budget.results", 0, "indication").section(QLatin1Char('.'), 1).size(), record.readings->indication().scale());
        QCOMPARE(desk.cell("budget.results", 0, "error").section(QLatin1Char('.'), 1).size(), 2);
    }
};

QTEST_MAIN(BudgetPageTest)
#include "tst_budget_page.moc"
