// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/Plan.h"
#include "core/record/ReadingColumns.h"

#include <QTest>

using namespace spanwright;

namespace {

std::optional<Decimal> typed(const char* text) {
    return *Decimal::parse(text);
}

Reading reading(ReadingId id, const char* reference, const char* indication) {
    Reading r;
    r.id = id;
    r.reference = typed(reference);
    r.indication = typed(indication);
    r.enteredBy = "IO";
    return r;
}

} // namespace

class ReadingColumnsTest : public QObject {
    Q_OBJECT

  private slots:
    void aRowComesBackAsItWasAppended() {
        ReadingColumns columns;
        columns.append(reading(1, "100.10", "4.002"));
        columns.append(reading(2, "0.5", "-0.0011"));
        QVERIFY(columns.row(0) == reading(1, "100.10", "4.002"));
        QVERIFY(columns.row(1) == reading(2, "0.5", "-0.0011"));
        QCOMPARE(columns.reference().scale(), 2);
        QVERIFY(columns.reference().exact());
    }

    void aRemovedRowIsRestoredInItsPlace() {
        ReadingColumns columns;
        for (int i = 1; i <= 3; ++i)
            columns.append(reading(i, "1.0", "2.0"));
        const ReadingColumns before = columns;
        const Reading removed = columns.row(1);
        columns.remove(2);
        QCOMPARE(columns.size(), std::size_t(2));
        columns.restore(removed);
        QVERIFY(columns == before);
    }

    void aZeroWithAMinusIsKeptAndIsExact() {
        DecimalColumn column;
        column.push_back(typed("-0.000"));
        column.push_back(typed("0.021"));
        QVERIFY(column.exact());
        QCOMPARE(column.at(0)->text(), std::string("-0.000"));
    }

    void valuesThatFitNoGridAreKeptAsTyped() {
        DecimalColumn column;
        column.push_back(typed("123456789012345678"));
        column.push_back(typed("0.000000000000000001"));
        column.push_back(typed("1e250"));
        column.push_back(std::nullopt);
        QVERIFY(!column.exact());
        QCOMPARE(column.at(0)->text(), std::string("123456789012345678"));
        QCOMPARE(column.at(1)->text(), std::string("0.000000000000000001"));
        QCOMPARE(column.at(2)->text(), std::string("1e250"));
        QVERIFY(!column.at(3).has_value());
        column.erase(0);
        QCOMPARE(column.at(1)->text(), std::string("1e250"));
        column.set(1, typed("7.50"));
        QCOMPARE(column.at(1)->text(), std::string("7.50"));
    }

    /// Numbers kept aside, here zeros with a minus sign, must not make taking back a block cost their square.
    void aLargeBlockOfNumbersKeptAsideIsTakenBack() {
        const Decimal zero = *Decimal::parse("-0.0"), one = *Decimal::parse("1.5");
        ReadingColumns::Block block;
        block.n = 200'000;
        for (std::size_t i = 0; i < block.n; ++i) {
            block.reference.push_back(i % 3 == 0 ? std::optional<Decimal>() : zero);
            block.indication.push_back(i % 2 == 0 ? one : zero);
        }
        ReadingColumns columns;
        columns.append(reading(1, "-0.0", "1.5"));
        const ReadingColumns before = columns;
        columns.appendBlock(block, 2);
        QCOMPARE(columns.size(), std::size_t{200'001});
        columns.removeBlock(2, block.n);
        QVERIFY(columns == before);
        QCOMPARE(columns.reference().at(0)->text(), std::string("-0.0"));
        QVERIFY(columns.complete(0));
    }

    void blocksAreAppendedAndTakenBack() {
        ReadingColumns columns;
        columns.append(reading(1, "1", "2"));
        const ReadingColumns before = columns;
        ReadingColumns::Block block;
        block.n = 2;
        block.reference.push_back(typed("3.0"));
        block.reference.push_back(typed("4.00"));
        block.indication = block.reference;
        columns.appendBlock(block, 5);
        QCOMPARE(columns.size(), std::size_t(3));
        QCOMPARE(columns.indexOf(6), std::size_t(2));
        QCOMPARE(columns.row(2).reference->text(), std::string("4.00"));
        columns.removeBlock(5, 2);
        QVERIFY(columns == before);
    }

    void theNextPlannedReadingFollowsThePlan() {
        Plan plan;
        plan.setPoints = {*typed("0"), *typed("5"), *typed("10")};
        plan.runs = 2;
        QCOMPARE(plannedReadings(plan, Phase::AsFound).size(), std::size_t(12));
        ReadingColumns columns;
        const auto planned = plannedReadings(plan, Phase::AsFound);
        for (std::size_t i = 0; i < planned.size(); ++i) {
            QVERIFY(*nextPlanned(plan, columns, Phase::AsFound) == planned[i]);
            Reading r = reading(static_cast<ReadingId>(i + 1), "1", "2");
            r.run = planned[i].run;
            r.direction = planned[i].direction;
            r.setPoint = planned[i].setPoint;
            columns.append(r);
        }
        QVERIFY(!nextPlanned(plan, columns, Phase::AsFound));
        QVERIFY(!nextPlanned(plan, columns, Phase::AsLeft));
    }
};

QTEST_APPLESS_MAIN(ReadingColumnsTest)
#include "tst_reading_columns.moc"
