// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/PlanOfReadings.h"
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

    void aReadingOfNoStatedRunOrDirectionMeetsThePlanToo() {
        Plan plan;
        plan.setPoints = {*typed("0"), *typed("5")};
        plan.runs = 2;
        plan.directions = PlanDirections::Rising;
        ReadingColumns columns;
        for (const char* at : {"0", "5", "0"}) {
            Reading r = reading(static_cast<ReadingId>(columns.size() + 1), "1", "2");
            r.run = 0;
            r.direction = Direction::Unknown;
            r.setPoint = *typed(at);
            columns.append(r);
        }
        QVERIFY((*nextPlanned(plan, columns, Phase::AsFound) == PlannedReading{Phase::AsFound, 2, Direction::Rising, *typed("5")}));
        // Of a set point that is not planned it meets nothing.
        plan.setPoints.push_back(*typed("7"));
        QCOMPARE(openPlanned(plan, columns, Phase::AsFound, Met::WhenBegun).size(), std::size_t(3));
    }

    void aPlanFollowsTheReadings_data() {
        QTest::addColumn<QString>("setPoints");
        QTest::addColumn<QString>("directions"); // r, f
        QTest::addColumn<QString>("runs");
        QTest::addColumn<int>("way");
        QTest::addColumn<int>("passes");
        QTest::addColumn<int>("repeats");
        const auto row = [](const char* name, const char* points, const char* directions, const char* runs, PlanDirections way, int passes, int repeats) {
            QTest::newRow(name) << QString(points) << QString(directions) << QString(runs) << static_cast<int>(way) << passes << repeats;
        };
        row("only rising", "0 5 10", "", "", PlanDirections::Rising, 1, 1);
        row("rising three times", "0 5 10 0 5 10 0 5 10", "", "", PlanDirections::Rising, 3, 1);
        row("only falling", "10 5 0", "", "", PlanDirections::Falling, 1, 1);
        row("each one twice", "0 0 5 5 10 10", "", "", PlanDirections::Rising, 1, 2);
        row("up and down", "0 5 10 10 5 0", "", "", PlanDirections::RisingThenFalling, 1, 1);
        row("stated rising", "0 5 10 0 5 10", "rrrrrr", "111222", PlanDirections::Rising, 2, 1);
        row("stated falling", "10 5 0", "fff", "", PlanDirections::Falling, 1, 1);
        row("stated both", "0 5 5 0", "rrff", "1111", PlanDirections::RisingThenFalling, 1, 1);
        row("runs stated, ways not", "0 5 0 5", "", "1122", PlanDirections::Rising, 2, 1);
        row("one is missing", "0 5 10 0 5", "", "", PlanDirections::Rising, 2, 1);
    }
    void aPlanFollowsTheReadings() {
        QFETCH(QString, setPoints);
        QFETCH(QString, directions);
        QFETCH(QString, runs);
        ReadingColumns::Block block;
        for (const QString& at : setPoints.split(' ')) {
            block.setPoint.push_back(typed(at.toLatin1().constData()));
            block.reference.push_back(typed("1"));
            block.indication.push_back(typed("2"));
            ++block.n;
        }
        for (const QChar c : directions)
            block.directions.push_back(c == 'r' ? Direction::Rising : Direction::Falling);
        for (const QChar c : runs)
            block.runs.push_back(c.digitValue());
        const Plan plan = planOfReadings({}, block);
        QCOMPARE(plan.setPoints.size(), setPoints.contains("10") ? std::size_t(3) : std::size_t(2));
        QTEST(static_cast<int>(plan.directions), "way");
        QTEST(plan.runs, "passes");
        QTEST(plan.repeats, "repeats");
        // What was taken is not asked for again.
        ReadingColumns columns;
        const std::size_t planned = plannedReadings(plan, Phase::AsFound).size();
        const std::size_t n = block.n;
        columns.appendBlock(std::move(block), 1);
        QCOMPARE(openPlanned(plan, columns, Phase::AsFound, Met::WhenComplete).size(), planned - n);
    }

    void aLoggerFollowsNoPlanOfRuns() {
        ReadingColumns::Block block;
        for (int i = 0; i < 6000; ++i) {
            block.setPoint.push_back(typed(i < 3000 ? "0" : "5"));
            block.runs.push_back(i + 1);
        }
        block.n = 6000;
        const Plan plan = planOfReadings({}, block);
        QCOMPARE(plan.setPoints.size(), std::size_t(2));
        QCOMPARE(plannedReadings(plan, Phase::AsFound).size(), std::size_t(2));
        QVERIFY(planOfReadings({}, {}) == Plan{});
    }
};

QTEST_APPLESS_MAIN(ReadingColumnsTest)
#include "tst_reading_columns.moc"
