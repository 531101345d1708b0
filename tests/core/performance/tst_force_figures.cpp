// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/performance/ForceFigures.h"
#include "core/performance/LoadingRange.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/SampleTable.h"

#include <QTest>

#include <cmath>

using namespace spanwright;
using spanwright::test::number;

namespace {

/// sample-data/load-cell.csv: invented readings of a 50 kN load cell, runs 1 and 2 at 0°, 3 at 120°, 4 at 240°.
Record loadCell() {
    return spanwright::test::sampleTableAtReferences("load-cell.csv");
}

std::vector<Decimal> positions(std::initializer_list<const char*> degrees) {
    std::vector<Decimal> all;
    for (const char* one : degrees)
        all.push_back(number(one));
    return all;
}

const ForceStep& at(const ForceFigures& figures, double force) {
    for (const ForceStep& step : figures.steps)
        if (std::abs(step.force - force) < 1e-9)
            return step;
    qFatal("no such force");
}

} // namespace

class ForceFiguresTest : public QObject {
    Q_OBJECT

  private slots:
    // Figures computed beside the invented readings, to the digits given there.
    void loadCellGivesTheFiguresOfItsDescription() {
        const Record record = loadCell();
        const auto figures = forceFigures(makeSample(record, Phase::AsFound), record.choices, 0.000002, positions({"0", "0", "120", "240"}));
        QVERIFY(figures);
        QCOMPARE(figures->degree, 2);
        QVERIFY(std::abs(figures->residualSd - 2.34e-5) < 0.005e-5);
        QVERIFY(std::abs(figures->lowerLimitFactor - 5.62e-5) < 0.01e-5);
        QVERIFY(std::abs(figures->lowerLimitForce - 0.00140) < 0.000006);
        QVERIFY(std::abs(figures->lowestForceClassA - 0.56) < 0.005);
        QVERIFY(std::abs(figures->lowestForceClassAA - 2.81) < 0.01);
        // Both limits lie below 5 kN, the lowest force applied, where the loading range begins therefore.
        QCOMPARE(loadingRange(*figures, figures->lowestForceClassAA).from, 5.0);
        QVERIFY(loadingRange(*figures, figures->lowestForceClassA).lowestApplied);
        QCOMPARE(loadingRange(*figures, 7.5).from, 7.5);
        QVERIFY(!loadingRange(*figures, 7.5).lowestApplied);
        QVERIFY(std::abs(*at(*figures, 5).reproducibility - 0.008) < 0.0005);
        QVERIFY(std::abs(*at(*figures, 25).reproducibility - 0.005) < 0.0005);
        QVERIFY(std::abs(*at(*figures, 50).reproducibility - 0.003) < 0.0005);
        QVERIFY(std::abs(*at(*figures, 5).repeatability - 0.001) < 0.0005);
        QVERIFY(std::abs(*at(*figures, 25).repeatability - 0.003) < 0.0005);
        QVERIFY(std::abs(*at(*figures, 50).repeatability - 0.0002) < 0.00005);
        QVERIFY(!figures->zero && !at(*figures, 5).reversibility);
        QVERIFY(std::abs(*at(*figures, 5).interpolation) < 0.01);
    }

    // By hand: zero 0.1 before, 0.12 after each series; deflections 10, 20, 30 but 10.1 in the second, 20.2 in the
    // turned series.
    void zeroAndReversibilityComeOutAsByHand() {
        Record record;
        const auto add = [&](int run, Direction direction, const char* force, const char* indication) {
            Reading reading;
            reading.id = record.nextReadingId++;
            reading.run = run;
            reading.direction = direction;
            reading.reference = reading.setPoint = number(force);
            reading.indication = number(indication);
            record.readings.edit().append(reading);
        };
        for (const int run : {1, 2, 3}) {
            add(run, Direction::Rising, "0", "0.1");
            add(run, Direction::Rising, "1", run == 2 ? "10.2" : "10.1");
            add(run, Direction::Rising, "2", run == 3 ? "20.3" : "20.1");
            add(run, Direction::Rising, "3", "30.1");
            add(run, Direction::Rising, "4", "40.1");
            add(run, Direction::Falling, "2", run == 3 ? "20.5" : "20.1");
            add(run, Direction::Falling, "0", "0.12");
        }
        const auto figures = forceFigures(makeSample(record, Phase::AsFound), record.choices, 0.1, positions({"0", "0", "180"}));
        QVERIFY(figures);
        QVERIFY(std::abs(*at(*figures, 1).repeatability - 100 * 0.1 / 10.05) < 1e-9);
        QVERIFY(std::abs(*at(*figures, 2).reproducibility - 100 * 0.2 / 20.1) < 1e-9);
        QVERIFY(std::abs(*at(*figures, 2).reversibility - 50 * 0.2 / 20.2) < 1e-9);
        QVERIFY(std::abs(*figures->zero - 100 * 0.02 / 40) < 1e-9);
        QCOMPARE(figures->degree, 1);
        QCOMPARE(figures->lowerLimitFactor, std::max(2.4 * figures->residualSd, 0.1));
    }

    void theFirstRunInEachPositionIsARotatedOne() {
        const std::vector<std::int32_t> runs{1, 2, 3, 4, 5, 6};
        const auto series = turnedSeries(positions({"0", "0", "120", "-240", "240", "600"}), runs); // −240° is 120°, 600° is 240°
        QVERIFY(series);
        QCOMPARE(series->rotated, std::vector<int>({1, 3, 5}));
        QCOMPARE(series->first, std::optional(1));
        QCOMPARE(series->again, std::optional(2));
        const auto apart = turnedSeries(positions({"0", "120", "240"}), runs);
        QVERIFY(apart && !apart->again);
        QCOMPARE(apart->rotated, std::vector<int>({1, 2, 3}));
    }

    void largestFiguresSayWhereTheyOccur() {
        const Record record = loadCell();
        const auto figures = forceFigures(makeSample(record, Phase::AsFound), record.choices, 0.000002, positions({"0", "0", "120", "240"}));
        QVERIFY(figures && figures->reproducibility && figures->repeatability && figures->interpolation && !figures->reversibility);
        for (const ForceStep& step : figures->steps) {
            QVERIFY(*step.reproducibility <= figures->reproducibility->value);
            QVERIFY(std::abs(*step.interpolation) <= std::abs(figures->interpolation->value));
        }
        QCOMPARE(*at(*figures, figures->reproducibility->force).reproducibility, figures->reproducibility->value);
    }

    void withoutRotatedSeriesThereAreNone() {
        const Record record = spanwright::test::pressureTransmitter();
        const Sample sample = makeSample(record, Phase::AsFound);
        QVERIFY(!forceFigures(sample, record.choices, 0.001, {}));
        QVERIFY(!forceFigures(sample, record.choices, 0.001, positions({"0", "0", "360"}))); // a whole turn is none
        QVERIFY(!forceFigures(sample, record.choices, 0.001, positions({"0", "0", "0", "120"}))); // run 4 was not taken
    }
};

QTEST_APPLESS_MAIN(ForceFiguresTest)
#include "tst_force_figures.moc"
