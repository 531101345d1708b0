// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Findings.h"
#include "core/fit/fitFunction.h"
#include "tests/support/PublishedSet.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/SampleTable.h"

#include <QTest>

#include <algorithm>
#include <cmath>
#include <random>
#include <set>

using namespace spanwright;
using namespace spanwright::test;

namespace {

std::vector<Finding> findingsOf(const Record& record, Phase phase = Phase::AsFound) {
    const Sample sample = makeSample(record, phase);
    const auto outcome = fitFunction(sample, record.choices);
    FindingsInput input{record, phase, sample};
    if (!outcome)
        return findings(input);
    const VarianceSplit split = splitVariance(sample, outcome->residuals, outcome->fit);
    const Diagnostics diagnostics =
        diagnose(sample, outcome->residuals, outcome->fit, {record.readings->ids(), 0, 0.05});
    const auto performance = processFigures(sample, record.item);
    input.fit = &outcome->fit;
    input.residuals = &outcome->residuals;
    input.split = &split;
    input.diagnostics = &diagnostics;
    input.performance = performance ? &*performance : nullptr;
    return findings(input);
}

const Finding* find(const std::vector<Finding>& found, FindingCode code) {
    const auto at =
        std::find_if(found.begin(), found.end(), [&](const Finding& finding) { return finding.code == code; });
    return at == found.end() ? nullptr : &*at;
}

double figure(const Finding& finding, const std::string& name) {
    for (const Figure& one : finding.figures)
        if (one.name == name)
            return one.value;
    return std::nan("");
}

/// A line with normal noise of 0.01 at 6 set points, rising and falling, 4 runs; `change` may spoil a reading.
template <class Change>
Record madeRecord(Change&& change, unsigned seed = 1) {
    std::mt19937 engine(seed);
    Record record;
    for (int run = 1; run <= 4; ++run)
        for (const Direction direction : {Direction::Rising, Direction::Falling})
            for (int k = 0; k < 6; ++k) {
                const int point = direction == Direction::Rising ? k : 5 - k;
                double noise = -6; // sum of twelve uniforms: the same bits everywhere
                for (int j = 0; j < 12; ++j)
                    noise += static_cast<double>(engine() >> 8) / 16777216.0;
                double y = 1 + 2.0 * point + 0.01 * noise;
                double x = point;
                change(run, direction, point, x, y);
                Reading reading;
                reading.id = record.nextReadingId++;
                reading.run = run;
                reading.direction = direction;
                reading.setPoint = number(std::to_string(point).c_str());
                reading.reference = number(QByteArray::number(x, 'f', 4).constData());
                reading.indication = number(QByteArray::number(y, 'f', 5).constData());
                record.readings.edit().append(reading);
            }
    return record;
}

void nothing(int, Direction, int, double&, double&) {}

} // namespace

class FindingsTest : public QObject {
    Q_OBJECT

  private slots:
    void pressureTransmitterHidesItsCurvatureBehindHysteresis() {
        Record record = pressureTransmitter();
        record.choices.function = {FunctionFamily::Line, 0};
        const auto found = findingsOf(record);
        QVERIFY(!found.empty());
        QCOMPARE(found.front().code, FindingCode::LackOfFit);
        QCOMPARE(found.front().severity, Severity::Serious);
        QCOMPARE(found.front().remedy, Remedy::CompareFunction);
        QVERIFY((found.front().suggestion == FunctionChoice{FunctionFamily::Polynomial, 2}));
        QVERIFY(std::abs(figure(found.front(), "f") - 19.2) < 0.05);
        const Finding* hidden = find(found, FindingCode::HiddenCurvature);
        QVERIFY(hidden && std::abs(figure(*hidden, "f_naive") - 1.15) < 0.005 &&
                std::abs(figure(*hidden, "p_naive") - 0.34) < 0.005);
        const Finding* gap = find(found, FindingCode::Hysteresis);
        QVERIFY(gap && figure(*gap, "set_point") == 5 && std::abs(figure(*gap, "percent_of_span") - 0.077) < 0.0005);
        QCOMPARE(gap->rows.size(), std::size_t{6});
        QVERIFY(find(found, FindingCode::RunZeroShift) || find(found, FindingCode::FirstRunDiffers));
        QVERIFY(!find(found, FindingCode::Outlier));

        record.choices.function = {FunctionFamily::Polynomial, 2};
        const auto curved = findingsOf(record);
        QVERIFY(!find(curved, FindingCode::LackOfFit) && !find(curved, FindingCode::HiddenCurvature) &&
                !find(curved, FindingCode::DegreeNotJustified));
        record.choices.function = {FunctionFamily::Polynomial, 3};
        const auto cubic = findingsOf(record);
        QVERIFY(find(cubic, FindingCode::DegreeNotJustified));
        QVERIFY((find(cubic, FindingCode::DegreeNotJustified)->suggestion ==
                 FunctionChoice{FunctionFamily::Polynomial, 2}));
    }

    void loadCellRunsDifferInGain() {
        const auto found = findingsOf(sampleTableAtReferences("load-cell.csv"));
        QVERIFY(find(found, FindingCode::LackOfFit));
        QVERIFY(find(found, FindingCode::RunGainChange) || find(found, FindingCode::RunZeroShift));
    }

    void cleanFlowSensorAsksForWeightsAndTheTypedOneShowsItsSlips() {
        const auto typed = findingsOf(sampleTable("flow-sensor-as-typed.csv"));
        const Finding* outlier = find(typed, FindingCode::Outlier);
        QVERIFY(outlier && outlier->remedy == Remedy::SeeReadings);
        QCOMPARE(typed.front().severity, Severity::Serious);
        // The wild reading pulls the mean of its set point, but its sound neighbours are not called out for it.
        QVERIFY(std::find(outlier->rows.begin(), outlier->rows.end(), ReadingId(16)) != outlier->rows.end());
        for (const ReadingId sound : {13, 14, 15, 17, 18})
            QVERIFY(std::find(outlier->rows.begin(), outlier->rows.end(), sound) == outlier->rows.end());
        QVERIFY(std::find(outlier->rows.begin(), outlier->rows.end(), ReadingId(8)) != outlier->rows.end());
    }

    // Normal noise of two steps of the display: that it falls on few values is not held against it.
    void aCoarseDisplayIsNoDepartureFromNormal() {
        Record record;
        unsigned seed = 11;
        const auto uniform = [&] {
            seed = seed * 1664525u + 1013904223u;
            return static_cast<double>(seed >> 8) / 16777216.0;
        };
        for (int i = 0; i < 800; ++i) {
            double noise = -6;
            for (int k = 0; k < 12; ++k)
                noise += uniform();
            Reading reading;
            reading.id = record.nextReadingId++;
            reading.reference = reading.setPoint = Decimal{i % 200, 1, {}};
            reading.indication = Decimal{static_cast<std::int64_t>(std::lround(1000 * (4 + 0.16 * (i % 200)) + 2 * noise)), 3, {}};
            record.readings.edit().append(reading);
        }
        QVERIFY(!find(findingsOf(record), FindingCode::NonNormal));
    }

    void scatterThatGrowsAsksForWeights() {
        const auto found = findingsOf(madeRecord([](int, Direction, int point, double&, double& y) {
            y = 1 + 2.0 * point + (y - 1 - 2.0 * point) * (0.1 + 2.0 * point);
        }));
        const Finding* grows = find(found, FindingCode::ScatterGrows);
        QVERIFY(grows && grows->remedy == Remedy::ChooseWeights);
        QVERIFY(figure(*grows, "variance_ratio") > 10);
    }

    void soundReadingsRaiseNoAlarm() {
        std::map<int, int> alarms;
        for (unsigned seed = 1; seed <= 200; ++seed)
            for (const Finding& finding : findingsOf(madeRecord(nothing, seed)))
                ++alarms[static_cast<int>(finding.code)];
        for (const auto& [code, count] : alarms)
            QVERIFY2(count <= (code == static_cast<int>(FindingCode::LackOfFit) ||
                                       code == static_cast<int>(FindingCode::Straggler) ||
                                       code == static_cast<int>(FindingCode::HiddenCurvature) ||
                                       code == static_cast<int>(FindingCode::OutsideBand)
                                   ? 26
                                   : 10),
                     qPrintable(QString("code %1: %2 of 200").arg(code).arg(count)));
    }

    void eachFaultIsFound_data() {
        QTest::addColumn<int>("fault");
        QTest::addColumn<int>("code");
        QTest::newRow("curvature") << 0 << static_cast<int>(FindingCode::LackOfFit);
        QTest::newRow("gap") << 1 << static_cast<int>(FindingCode::Hysteresis);
        QTest::newRow("zero shift") << 2 << static_cast<int>(FindingCode::RunZeroShift);
        QTest::newRow("gain") << 3 << static_cast<int>(FindingCode::RunGainChange);
        QTest::newRow("first run") << 4 << static_cast<int>(FindingCode::FirstRunDiffers);
        QTest::newRow("outlier") << 5 << static_cast<int>(FindingCode::Outlier);
        QTest::newRow("repeated reading") << 6 << static_cast<int>(FindingCode::RepeatedReading);
        QTest::newRow("drift") << 7 << static_cast<int>(FindingCode::Autocorrelated);
    }
    void eachFaultIsFound() {
        QFETCH(int, fault);
        QFETCH(int, code);
        double walk = 0, heldX = 0, heldY = 0;
        unsigned seed = 7;
        const auto found = findingsOf(madeRecord([&](int run, Direction direction, int point, double& x, double& y) {
            const double q = point / 5.0;
            seed = seed * 1664525u + 1013904223u;
            const double noise = static_cast<double>(seed >> 8) / 16777216.0 - 0.5;
            if (fault == 0)
                y += 0.05 * 4 * q * (1 - q);
            if (fault == 1 && direction == Direction::Falling)
                y += 0.03 * 4 * q * (1 - q);
            if (fault == 2)
                y += run % 2 ? 0.02 : -0.02;
            if (fault == 3)
                y += (run % 2 ? 0.04 : -0.04) * (q - 0.5);
            if (fault == 4 && run == 1)
                y += 0.05;
            if (fault == 5 && run == 2 && point == 3 && direction == Direction::Rising)
                y += 0.12;
            if (fault == 6) {
                x += 0.0004 * noise;
                if (run == 3 && point == 5 && direction == Direction::Falling) {
                    x = heldX;
                    y = heldY;
                }
                heldX = x;
                heldY = y;
            }
            if (fault == 7) {
                walk = 0.9 * walk + 0.03 * noise;
                y = 1 + 2.0 * point + 0.2 * (y - 1 - 2.0 * point) + walk;
            }
        }));
        const Finding* finding = find(found, static_cast<FindingCode>(code));
        QVERIFY(finding);
        QVERIFY(!finding->figures.empty());
        if (fault == 5) {
            QCOMPARE(finding->rows.size(), std::size_t{1});
            QCOMPARE(finding->rows.front(), ReadingId{16});
        }
    }

    void throughZeroIsDoubtedWhenTheConstantIsReal() {
        Record record = madeRecord(nothing);
        record.choices.function = {FunctionFamily::Proportional, 0};
        const Finding* finding = nullptr;
        const auto found = findingsOf(record);
        finding = find(found, FindingCode::ThroughZeroNotSupported);
        QVERIFY(finding);
        QVERIFY(std::abs(figure(*finding, "value") - 1) < 0.01); // the constant itself
        QVERIFY((finding->suggestion == FunctionChoice{FunctionFamily::Line, 0}));
        // F is the square of the constant's t in the line.
        record.choices.function = {FunctionFamily::Line, 0};
        const auto line = fitFunction(makeSample(record, Phase::AsFound), record.choices);
        const double t = line->fit.coefficients[0].value / line->fit.coefficients[0].standardUncertainty;
        QVERIFY(digitsAgreed(figure(*finding, "f"), t * t) > 9);
    }

    void statedUncertaintiesAreHeldAgainstTheResiduals() {
        Record record = madeRecord(nothing);
        record.choices.weights = Weights::Stated;
        record.choices.covariance = CovarianceScale::Stated;
        const auto state = [&](const char* u) {
            for (std::size_t i = 0; i < record.readings->size(); ++i)
                record.readings.edit().setNumber(i, NumberColumn::UIndication, *Decimal::parse(u));
            return findingsOf(record);
        };
        const auto small = state("0.000001"), large = state("1000");
        QVERIFY(find(small, FindingCode::StatedTooSmall) && !find(small, FindingCode::StatedTooLarge));
        QCOMPARE(find(small, FindingCode::StatedTooSmall)->severity, Severity::Serious);
        QVERIFY(find(large, FindingCode::StatedTooLarge) && !find(large, FindingCode::StatedTooSmall));
        record.choices.covariance = CovarianceScale::Residuals; // then only their ratios count
        const auto scaled = state("1000");
        QVERIFY(!find(scaled, FindingCode::StatedTooLarge));
    }

    void exclusionsAreListedAndTooManyAreSaid() {
        Record record = madeRecord(nothing);
        const auto exclude = [&](ReadingId id) {
            record.exclusions.edit().add({id, ExclusionReason::Disturbance, "", "TL", 0});
        };
        exclude(4);
        auto found = findingsOf(record);
        const Finding* listed = find(found, FindingCode::ExcludedReadings);
        QVERIFY(listed && listed->severity == Severity::Note && listed->rows == std::vector<ReadingId>{4});
        QVERIFY(!find(found, FindingCode::ManyExcluded) && !find(found, FindingCode::SetPointExcluded));
        for (std::size_t i = 0; i < record.readings->size(); ++i)
            if (record.readings->setPoint().toDouble(i) == 3)
                exclude(record.readings->ids()[i]);
        found = findingsOf(record);
        QVERIFY(find(found, FindingCode::SetPointExcluded) &&
                figure(*find(found, FindingCode::SetPointExcluded), "set_point") == 3);
        QVERIFY(find(found, FindingCode::ManyExcluded));
        QVERIFY(std::is_sorted(found.begin(), found.end(),
                               [](const Finding& a, const Finding& b) { return a.severity > b.severity; }));
    }

    /// 1/x² gives the reading at 0.001 a million times the weight of that at 1: the line is made to pass through it.
    void weightsByLevelLetReadingsNearZeroDecide() {
        Record record = recordOf(std::vector<std::string>{"0.001", "2", "4", "6", "8", "10"}, {"0.3", "2.1", "3.9", "6.2", "8.0", "10.1"});
        record.choices.weights = Weights::Proportional;
        const auto found = findingsOf(record);
        const Finding* outweigh = find(found, FindingCode::LowestOutweigh);
        QVERIFY(outweigh && outweigh->rows == std::vector<ReadingId>{1} && outweigh->remedy == Remedy::ChooseWeights);
        // By hand: 10⁶ of 10⁶ + 1/4 + 1/16 + 1/36 + 1/64 + 1/100.
        QVERIFY(std::abs(figure(*outweigh, "weight_share") - 1e6 / (1e6 + 0.25 + 0.0625 + 1 / 36.0 + 0.015625 + 0.01)) < 1e-12);
        record.choices.weights = Weights::Equal;
        QVERIFY(!find(findingsOf(record), FindingCode::LowestOutweigh));
        // Decades, as of a flow or a concentration, are what such weights are for.
        Record decades = recordOf(std::vector<std::string>{"0.1", "1", "10", "100"}, {"0.102", "0.99", "10.1", "99"});
        decades.choices.weights = Weights::Proportional;
        QVERIFY(!find(findingsOf(decades), FindingCode::LowestOutweigh));
        // Scatter of 1 % would be 0.001 at 0.1, which a display in steps of 0.02 cannot show.
        decades.item.resolution = number("0.02");
        QVERIFY(find(findingsOf(decades), FindingCode::LowestOutweigh));
    }

    /// Three plateaus of twenty readings and ten on the way from each to the next.
    void readingsBetweenPlateausAreNamed() {
        std::vector<std::string> reference, indication;
        unsigned seed = 3;
        const auto add = [&](double x) {
            seed = seed * 1664525u + 1013904223u;
            const double noise = static_cast<double>(seed >> 8) / 16777216.0 - 0.5;
            reference.push_back(QByteArray::number(x + 0.02 * noise, 'f', 4).toStdString());
            indication.push_back(QByteArray::number(2 * x + 0.03 * noise, 'f', 4).toStdString());
        };
        for (int plateau = 0; plateau < 3; ++plateau) {
            for (int i = 0; i < 20; ++i)
                add(10.0 * plateau);
            for (int i = 0; i < 10 && plateau < 2; ++i)
                add(10.0 * plateau + 0.8 + 0.9 * i);
        }
        const auto found = findingsOf(recordOf(reference, indication));
        const Finding* between = find(found, FindingCode::BetweenPlateaus);
        QVERIFY(between && between == &found.front()); // what else is found follows from it
        QCOMPARE(figure(*between, "plateaus"), 3.0);
        QCOMPARE(figure(*between, "count"), 20.0);
        QVERIFY(between->rows.front() == 21 && between->rows.back() == 60);
        // A sweep has no plateaus; readings whose set points are stated were taken there.
        std::vector<std::string> sweep, answer;
        for (int i = 0; i < 80; ++i) {
            sweep.push_back(std::to_string(i));
            answer.push_back(std::to_string(2 * i + i % 3));
        }
        QVERIFY(!find(findingsOf(recordOf(sweep, answer)), FindingCode::BetweenPlateaus));
        QVERIFY(!find(findingsOf(madeRecord(nothing)), FindingCode::BetweenPlateaus));
    }

    void fewReadingsAndExtrapolationAreSaid() {
        Record record = recordOf(std::vector<std::string>{"0", "1", "2"}, {"0.1", "1.0", "2.2"});
        record.choices.at = {number("3")};
        const auto found = findingsOf(record);
        QVERIFY(find(found, FindingCode::TooFewReadings) && find(found, FindingCode::Extrapolation));
        QCOMPARE(figure(*find(found, FindingCode::Extrapolation), "asked_for"), 3.0);
        const auto none = findingsOf(recordOf(std::vector<std::string>{"0"}, {"0.1"}));
        QVERIFY(find(none, FindingCode::TooFewReadings) && none.front().severity == Severity::Serious);
        QVERIFY(findingsOf(Record{}).empty());
    }

    void aReadingFarOutIsInfluentialAndOutsideTheBand() {
        const auto found = findingsOf(recordOf(std::vector<std::string>{"0", "1", "2", "3", "4", "20"},
                                               {"0.0", "1.1", "1.9", "3.1", "3.9", "25"}));
        QVERIFY(find(found, FindingCode::Influential));
        QCOMPARE(find(found, FindingCode::Influential)->rows.back(), ReadingId{6});
    }
};

QTEST_APPLESS_MAIN(FindingsTest)
#include "tst_findings.moc"
