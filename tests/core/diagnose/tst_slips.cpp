// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/RobustLine.h"
#include "core/diagnose/Slips.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/SampleTable.h"

#include <QTest>

#include <algorithm>
#include <cmath>

using namespace spanwright;
using spanwright::test::number;

namespace {

/// sample-data/flow-sensor-as-typed.csv: eight levels of six readings, typed by a tired hand (invented); the set points are not told.
Record flowSensorAsTyped() {
    Record record = spanwright::test::sampleTable("flow-sensor-as-typed.csv");
    record.item.reference = {"flow", "L/min"};
    record.item.indication = {"voltage", "V"};
    for (std::size_t row = 0; row < record.readings->size(); ++row)
        record.readings.edit().setNumber(row, NumberColumn::SetPoint, std::nullopt);
    return record;
}

std::vector<Slip> of(const std::vector<Slip>& slips, ReadingId id) {
    std::vector<Slip> mine;
    std::copy_if(slips.begin(), slips.end(), std::back_inserter(mine), [&](const Slip& slip) { return slip.id == id; });
    return mine;
}

bool offers(const std::vector<SlipCandidate>& candidates, SlipKind kind, const char* value) {
    return std::any_of(candidates.begin(), candidates.end(), [&](const SlipCandidate& candidate) {
        return candidate.kind == kind && compareValue(candidate.value, number(value)) == 0;
    });
}

} // namespace

class SlipsTest : public QObject {
    Q_OBJECT

  private slots:
    void theTiredHandIsFoundOut() {
        const Record record = flowSensorAsTyped();
        const auto slips = slipsIn(record, Phase::AsFound);
        const auto expect = [&](ReadingId id, SlipKind kind, const char* suggestion) {
            const auto mine = of(slips, id);
            QVERIFY2(!mine.empty(), qPrintable(QString("reading %1").arg(id)));
            QCOMPARE(mine.front().kind, kind);
            QVERIFY(mine.front().suggestion);
            QCOMPARE(QString::fromStdString(mine.front().suggestion->text()), QString(suggestion));
        };
        expect(19, SlipKind::DigitsSwapped, "1.487");
        expect(8, SlipKind::DecimalShifted, "0.499");
        expect(16, SlipKind::UnitPrefix, "0.998");
        expect(24, SlipKind::RowsExchanged, "1.509");
        expect(30, SlipKind::RowsExchanged, "1.993");
        QCOMPARE(of(slips, 24).front().other, ReadingId{30});
        // Read before it had settled: far off, but no slip of the hand.
        QCOMPARE(of(slips, 37).front().kind, SlipKind::Unexplained);
        QVERIFY(std::abs(of(slips, 37).front().distance + 8) < 1);
        QVERIFY(!of(slips, 37).front().suggestion);
        // A swap too small to be seen, and nothing else is questioned.
        QVERIFY(of(slips, 35).empty());
        QCOMPARE(slips.size(), std::size_t{6});
    }

    void theSameIsSaidWhileTyping() {
        Record record = flowSensorAsTyped();
        Reading typed = record.readings->row(18);
        auto slips = slipsOf(record, typed);
        QCOMPARE(slips.front().kind, SlipKind::DigitsSwapped);
        QCOMPARE(QString::fromStdString(slips.front().suggestion->text()), QStringLiteral("1.487"));
        typed.indication = number("1.487");
        QVERIFY(slipsOf(record, typed).empty());
    }

    void candidatesAreTheNumbersOneSlipAway() {
        const auto swapped = slipCandidates(number("1.847"), 3, "V");
        QVERIFY(offers(swapped, SlipKind::DigitsSwapped, "1.487"));
        QVERIFY(offers(swapped, SlipKind::DigitsSwapped, "8.147"));
        QVERIFY(offers(swapped, SlipKind::DecimalShifted, "18.47"));
        QVERIFY(offers(swapped, SlipKind::UnitPrefix, "0.001847"));
        QVERIFY(offers(swapped, SlipKind::SignLost, "-1.847"));
        QVERIFY(offers(slipCandidates(number("998"), 3, "V"), SlipKind::UnitPrefix, "0.998"));
        QVERIFY(offers(slipCandidates(number("1.8847"), 3, "V"), SlipKind::DigitDoubled, "1.847"));
        QVERIFY(offers(slipCandidates(number("1.47"), 3, "V"), SlipKind::DigitMissing, "1.847"));
        QVERIFY(!offers(slipCandidates(number("1.470"), 3, "V"), SlipKind::DigitMissing, "1.8470"));
        QVERIFY(offers(slipCandidates(number("145.04"), 2, "bar"), SlipKind::UnitFactor, "10.00"));
        QVERIFY(offers(slipCandidates(number("68.0"), 1, "°C"), SlipKind::UnitFactor, "20.0"));
        QVERIFY(offers(slipCandidates(number("0.05"), 2, "V"), SlipKind::DigitsSwapped, "0.50"));
        for (const SlipCandidate& candidate : swapped) {
            QVERIFY(compareValue(candidate.value, number("1.847")) != 0);
            if (candidate.kind ==
                SlipKind::DigitsSwapped) // a swap changes a number by a multiple of nine units of the last digit
                QCOMPARE((candidate.value.mantissa - 1847) % 9, std::int64_t{0});
        }
    }

    void plainChecksWorkFromTheFirstReadingOn() {
        Record record;
        record.item.rangeLow = number("0");
        record.item.rangeHigh = number("10");
        record.item.outputLow = number("4");
        record.item.outputHigh = number("20");
        record.item.resolution = number("0.002");
        record.plan.dwellSeconds = 30;
        Reading first;
        first.id = record.nextReadingId++;
        first.run = 1;
        first.direction = Direction::Rising;
        first.setPoint = number("0");
        first.reference = number("0.001");
        first.indication = number("40.02");
        first.enteredAt = 1'000'000;
        auto kinds = [](const std::vector<Slip>& slips) {
            std::vector<SlipKind> result;
            for (const Slip& slip : slips)
                result.push_back(slip.kind);
            return result;
        };
        QCOMPARE(kinds(slipsOf(record, first)), std::vector<SlipKind>{SlipKind::OutsideItemRange});
        first.indication = number("4.003");
        QCOMPARE(kinds(slipsOf(record, first)), std::vector<SlipKind>{SlipKind::OffResolution});
        first.indication = number("4.002");
        QVERIFY(slipsOf(record, first).empty());
        record.readings.edit().append(first);

        Reading second = first;
        second.id = record.nextReadingId++;
        second.setPoint = number("5");
        second.enteredAt = 1'010'000;
        QCOMPARE(
            kinds(slipsOf(record, second)),
            (std::vector<SlipKind>{SlipKind::RepeatsRowBefore, SlipKind::AgainstDirection, SlipKind::BeforeSettled}));
        // Where the plan has the set point read several times, the same pair again is what is to be expected.
        second.setPoint = first.setPoint;
        QCOMPARE(kinds(slipsOf(record, second)), std::vector<SlipKind>{SlipKind::RepeatsRowBefore});
        record.plan.repeats = 3;
        QVERIFY(slipsOf(record, second).empty());
        second.setPoint = number("5");
        QCOMPARE(kinds(slipsOf(record, second)).front(), SlipKind::RepeatsRowBefore);
        second.reference = number("5.001");
        second.indication = number("12.004");
        second.enteredAt = 1'040'000;
        QVERIFY(slipsOf(record, second).empty());
        Standard standard;
        standard.unit = record.item.reference.unit;
        standard.rangeLow = number("0");
        standard.rangeHigh = number("5");
        record.standards = {standard};
        QCOMPARE(kinds(slipsOf(record, second)), std::vector<SlipKind>{SlipKind::OutsideStandardRange});
    }

    void soundReadingsAreNotQuestioned() {
        const Record record = spanwright::test::pressureTransmitter();
        for (const Phase phase : bothPhases)
            for (const Slip& slip : slipsIn(record, phase))
                QVERIFY2(slip.distance == 0, qPrintable(QString("reading %1").arg(slip.id)));
    }

    // Two of eight readings are wild, and the line does not move.
    void theRobustLineDoesNotBend() {
        const std::vector<double> x{0, 1, 2, 3, 4, 5, 6, 7};
        std::vector<double> y;
        for (const double value : x)
            y.push_back(1 + 2 * value);
        y[2] = 900;
        y[6] = -40;
        const auto line = robustLine(x, y, 0.01);
        QVERIFY(line);
        QCOMPARE(line->slope, 2.0);
        QCOMPARE(line->intercept, 1.0);
        QVERIFY(line->distance(2, 900) > 1000 && std::abs(line->distance(3, 7.02) - 2) < 1e-9);
        QVERIFY(!robustLine(std::vector<double>{1, 1, 1, 1}, std::vector<double>{1, 2, 3, 4}, 0));
    }
};

QTEST_APPLESS_MAIN(SlipsTest)
#include "tst_slips.moc"
