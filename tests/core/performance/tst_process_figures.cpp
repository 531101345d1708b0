// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/performance/ProcessFigures.h"
#include "core/performance/StraightLines.h"
#include "tests/support/SampleRecord.h"

#include <QTest>

#include <cmath>
#include <vector>

using namespace spanwright;
using spanwright::test::number;

namespace {

Record recordOf(const std::vector<std::array<const char*, 3>>& rows, const std::vector<Direction>& directions,
                const std::vector<int>& runs) {
    Record record;
    for (std::size_t i = 0; i < rows.size(); ++i) {
        Reading reading;
        reading.id = record.nextReadingId++;
        reading.setPoint = number(rows[i][0]);
        reading.reference = number(rows[i][1]);
        reading.indication = number(rows[i][2]);
        reading.direction = directions[i];
        reading.run = runs[i];
        record.readings.edit().append(reading);
    }
    return record;
}

double largest(const Points& points, double intercept, double slope) {
    double most = 0;
    for (std::size_t i = 0; i < points.x.size(); ++i)
        most = std::max(most, std::abs(points.y[i] - intercept - slope * points.x[i]));
    return most;
}

} // namespace

class ProcessFiguresTest : public QObject {
    Q_OBJECT

  private slots:
    // Invented readings; figures computed beside them, to three decimals of % of span.
    void pressureTransmitterGivesTheFiguresOfItsDescription() {
        const Record record = spanwright::test::pressureTransmitter();
        const auto figures = processFigures(makeSample(record, Phase::AsFound), record.item);
        QVERIFY(figures);
        QCOMPARE(figures->span, 16.0);
        QVERIFY(std::abs(figures->hysteresisInCycle->percentOfSpan - 0.089) < 0.0005); // the largest of one run
        QVERIFY(std::abs(figures->hysteresis->percentOfSpan - 0.077) < 0.0005);        // of the averages
        QVERIFY(std::abs(figures->nonRepeatability->percentOfSpan - 0.031) < 0.0005);
        QVERIFY(std::abs(std::abs(figures->nonLinearityTerminal->percentOfSpan) - 0.034) < 0.0005);
        QVERIFY(std::abs(std::abs(figures->nonLinearityIndependent->percentOfSpan) - 0.017) < 0.0005);
        QVERIFY(std::abs(std::abs(figures->nonLinearityZeroBased->percentOfSpan) - 0.024) < 0.0005);
        QVERIFY(figures->warnings.empty());
        // The mean error at 5 bar rising is the largest of the averages.
        QVERIFY(std::abs(figures->measuredErrorMax->value + 0.00845) < 0.00005);
        QCOMPARE(figures->measuredErrorMax->setPoint, 5.0);
    }

    // By hand: range 0–10 to 0–100, errors rising 0, −1, 0 and 0, −3, 2; falling 1, 1, 0 and 1, 3, 2.
    void aSmallSetComesOutAsByHand() {
        const std::vector<std::array<const char*, 3>> rows{{"0", "0", "0"},     {"5", "5.1", "50"}, {"10", "10", "100"},
                                                           {"10", "10", "100"}, {"5", "5", "51"},   {"0", "0", "1"},
                                                           {"0", "0", "0"},     {"5", "5", "47"},   {"10", "10", "102"},
                                                           {"10", "10", "102"}, {"5", "5", "53"},   {"0", "0", "1"}};
        const auto up = Direction::Rising, down = Direction::Falling;
        Record record = recordOf(rows, {up, up, up, down, down, down, up, up, up, down, down, down},
                                 {1, 1, 1, 1, 1, 1, 2, 2, 2, 2, 2, 2});
        record.item.rangeLow = number("0");
        record.item.rangeHigh = number("10");
        record.item.outputLow = number("0");
        record.item.outputHigh = number("100");
        const auto f = processFigures(makeSample(record, Phase::AsFound), record.item);
        QVERIFY(f);
        QCOMPARE(f->measuredErrorMax->value, -2.0); // rising at 5: (−1 − 3)/2
        QCOMPARE(f->inaccuracyHigh->value, 3.0);
        QCOMPARE(f->inaccuracyLow->value, -3.0);
        QCOMPARE(f->hysteresis->value, 4.0);        // −2 against 2
        QCOMPARE(f->hysteresisInCycle->value, 6.0); // −3 against 3
        QCOMPARE(f->hysteresisInCycle->setPoint, 5.0);
        QCOMPARE(f->nonRepeatability->value, 2.0);
        // Averages 0.5, 0, 1: chord 0.5, 0.75, 1 → −0.75; minimax half of it; through the lower end: r5 = −(0.5 + 5b),
        // r10 = 0.5 − 10b, equal and opposite at b = 0: 0.5.
        QCOMPARE(f->nonLinearityTerminal->value, -0.75);
        QCOMPARE(std::abs(f->nonLinearityIndependent->value), 0.375);
        QCOMPARE(std::abs(f->nonLinearityZeroBased->value), 0.5);
        QCOMPARE(f->nonLinearityTerminal->percentOfSpan, -0.75);
    }

    void withoutAStatedOutputTheEndsStandInAndItIsSaid() {
        const std::vector<std::array<const char*, 3>> rows{
            {"0", "0", "4.00"}, {"5", "5", "12.02"}, {"10", "10", "20.00"}};
        Record record = recordOf(rows, std::vector<Direction>(3), {0, 0, 0});
        const auto f = processFigures(makeSample(record, Phase::AsFound), record.item);
        QVERIFY(f);
        QCOMPARE(f->span, 16.0);
        QVERIFY(std::abs(f->measuredErrorMax->value - 0.02) < 1e-15);
        QVERIFY(!f->hysteresis && !f->nonRepeatability);
        QCOMPARE(f->warnings.size(), std::size_t{1});
        record.item.reference.unit = record.item.indication.unit = "bar";
        const auto same = processFigures(makeSample(record, Phase::AsFound), record.item);
        QCOMPARE(same->span, 10.0);
        QCOMPARE(same->inaccuracyHigh->value, 10.0);
    }

    // Independent route: no line in a fine grid about it does better, and three deviations alternate.
    void noLineBeatsTheMinimaxLineOrTheOneThroughTheLowerEnd() {
        unsigned seed = 12345;
        const auto next = [&] { return static_cast<double>((seed = seed * 1664525u + 1013904223u) >> 8) / 16777216.0; };
        for (int trial = 0; trial < 200; ++trial) {
            std::vector<double> x, y;
            for (int i = 0; i < 3 + trial % 9; ++i) {
                x.push_back(i + 0.5 * next());
                y.push_back(next() - 0.5 + 0.02 * i * i);
            }
            const Points points{x, y};
            const DeviationLine best = minimaxLine(points);
            const double most = largest(points, best.intercept, best.slope);
            QVERIFY(std::abs(most - std::abs(best.deviation)) < 1e-9);
            const DeviationLine based = zeroBasedLine(points);
            const double basedMost = largest(points, based.intercept, based.slope);
            for (int k = -50; k <= 50; ++k) {
                const double slope = best.slope + k * 0.004;
                double high = -1e300, low = 1e300;
                for (std::size_t i = 0; i < x.size(); ++i) {
                    high = std::max(high, y[i] - slope * x[i]);
                    low = std::min(low, y[i] - slope * x[i]);
                }
                QVERIFY((high - low) / 2 > most - 1e-12);
                const double other = based.slope + k * 0.004;
                QVERIFY(largest(points, y[0] - other * x[0], other) > basedMost - 1e-12);
            }
            int touching = 0, sign = 0;
            for (std::size_t i = 0; i < x.size(); ++i) {
                const double d = y[i] - best.intercept - best.slope * x[i];
                if (std::abs(std::abs(d) - most) < 1e-10 && (d > 0 ? 1 : -1) != sign) {
                    sign = d > 0 ? 1 : -1;
                    ++touching;
                }
            }
            QVERIFY(touching >= 3);
        }
    }
};

QTEST_APPLESS_MAIN(ProcessFiguresTest)
#include "tst_process_figures.moc"
