// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/evaluate.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/SampleTable.h"

#include <QTest>

using namespace spanwright;
using namespace spanwright::test;

namespace {

PhaseEvaluation evaluated(const Record& record) {
    Progress progress;
    const Result<Evaluation> result = evaluate(record, progress);
    return result && result->phase(Phase::AsFound) ? *result->phase(Phase::AsFound) : PhaseEvaluation();
}

PhaseEvaluation evaluated(Record record, const char* function) {
    record.choices.function = *parseFunctionName(function);
    return evaluated(record);
}

void setIndication(Record& record, std::size_t row, const char* value) {
    record.readings.edit().setNumber(row, NumberColumn::Indication, number(value));
}

/// Compared with a figure as printed: within half a unit of its last digit.
void compareAsPrinted(double got, const char* printed) {
    const Decimal expected = number(printed);
    const double half = 0.5 * std::pow(10.0, -expected.decimals);
    QVERIFY2(std::abs(got - expected.toDouble()) <= half * (1 + 1e-9), qPrintable(QString("%1, expected %2").arg(got, 0, 'g', 12).arg(printed)));
}

} // namespace

/// The samples show what they are said to show. The figures of the transmitter were computed apart from this program, by nested
/// least-squares models in exact rational arithmetic on the decimals as printed; those of the others by least squares in R and numpy
/// when the scenario was invented.
class SampleFiguresTest : public QObject {
    Q_OBJECT

  private slots:
    void transmitterHidesACurvatureUnderItsHysteresis() {
        const PhaseEvaluation found = evaluated(pressureTransmitter(), "line");
        QVERIFY(found.fit && found.split && found.split->lackOfFit && found.split->repeatability && found.split->lackOfFitNaive);
        compareAsPrinted(found.fit->coefficients[0].value, "3.99943170749690");
        compareAsPrinted(found.fit->coefficients[1].value, "1.60010190036904");
        compareAsPrinted(found.fit->residualSd, "0.00484338980611399");
        const VarianceSplit& split = *found.split;
        compareAsPrinted(split.lackOfFit->ss, "2.3863757637872e-4");
        compareAsPrinted(split.hysteresis->ss, "1.15958248474521e-3");
        compareAsPrinted(split.runOffset->ss, "4.6351198102407e-5");
        compareAsPrinted(split.runSlope->ss, "1.436210807548e-6");
        compareAsPrinted(split.repeatability->ss, "5.5331718060129e-5");
        QCOMPARE(split.lackOfFit->df, 9);
        QCOMPARE(split.hysteresis->df, 11);
        QCOMPARE(split.runOffset->df, 2);
        QCOMPARE(split.runSlope->df, 2);
        QCOMPARE(split.repeatability->df, 40);
        compareAsPrinted(*split.lackOfFit->f, "19.168236");
        compareAsPrinted(*split.lackOfFitNaive->f, "1.154937");
        QVERIFY(*split.lackOfFitNaive->p > 0.3);
        QVERIFY(*split.lackOfFit->p < 1e-10);
    }

    void transmitterFitsAQuadratic() {
        const PhaseEvaluation found = evaluated(pressureTransmitter(), "polynomial:2");
        QVERIFY(found.fit && found.split && found.split->lackOfFit);
        compareAsPrinted(found.fit->coefficients[2].value, "2.107648510666e-4");
        compareAsPrinted(*found.split->lackOfFit->f, "0.888009");
    }

    void probeLooksStraightAndIsNot() {
        const PhaseEvaluation line = evaluated(sampleTable("temperature-probe.csv"), "line");
        QVERIFY(line.fit && line.split && line.split->lackOfFit);
        compareAsPrinted(line.fit->residualSd, "0.333");
        QVERIFY(*line.split->lackOfFit->f > 1e5);
    }

    void probeDoesNotShowAForgottenCorrection() {
        Record record = sampleTable("temperature-probe.csv");
        const PhaseEvaluation without = evaluated(record, "polynomial:2");
        Standard thermometer;
        thermometer.correctionUse = CorrectionUse::Apply;
        for (const auto& [at, correction] : {std::pair{"0", "-0.0120"}, {"40", "-0.0152"}, {"80", "-0.0183"}, {"120", "-0.0215"},
                                             {"160", "-0.0247"}, {"200", "-0.0278"}, {"240", "-0.0310"}})
            thermometer.corrections.push_back({number(at), number(correction)});
        record.standards = {thermometer};
        const PhaseEvaluation with = evaluated(record, "polynomial:2");
        QVERIFY(without.fit && with.fit);
        compareAsPrinted(without.fit->residualSd, "0.00170");
        compareAsPrinted(with.fit->residualSd, "0.00170");
        compareAsPrinted(without.fit->coefficients[0].value, "100.0158");
        compareAsPrinted(with.fit->coefficients[0].value, "100.0205");
        compareAsPrinted(with.fit->coefficients[1].value, "0.390909");
        compareAsPrinted(with.fit->coefficients[2].value, "-5.7834e-5");
    }

    void loadCellTurnsWithItsRotation() {
        Record record = sampleTable("load-cell.csv");
        for (std::size_t row = 10; row < 20; ++row)
            record.exclusions.edit().add({record.readings->ids()[row], ExclusionReason::Other, "second run at 0°", "TL", 0});
        const PhaseEvaluation line = evaluated(record, "line");
        const PhaseEvaluation quadratic = evaluated(record, "polynomial:2");
        QVERIFY(line.split && quadratic.fit && quadratic.split && quadratic.split->runOffset && quadratic.split->runSlope);
        compareAsPrinted(*line.split->lackOfFitNaive->f, "103");
        compareAsPrinted(quadratic.fit->residualSd, "2.34e-5");
        compareAsPrinted(*quadratic.split->lackOfFit->p, "0.65");
        compareAsPrinted(*quadratic.split->runOffset->f, "23.6");
        compareAsPrinted(*quadratic.split->runSlope->f, "6.2");
        compareAsPrinted(std::sqrt(*quadratic.split->repeatability->ms), "1.35e-5");
    }

    void flowSensorWithoutItsSlips() {
        Record record = sampleTable("flow-sensor-as-typed.csv");
        setIndication(record, 18, "1.487");
        setIndication(record, 7, "0.499");
        setIndication(record, 15, "0.998");
        setIndication(record, 36, "3.970");
        setIndication(record, 23, "1.509");
        setIndication(record, 29, "1.993");
        setIndication(record, 34, "2.997");
        const PhaseEvaluation equal = evaluated(record);
        QVERIFY(equal.fit);
        compareAsPrinted(equal.fit->coefficients[0].value, "-0.0004");
        compareAsPrinted(equal.fit->coefficients[0].standardUncertainty, "0.0027");
        compareAsPrinted(equal.fit->coefficients[1].value, "0.099952");
        compareAsPrinted(equal.fit->coefficients[1].standardUncertainty, "0.000100");
        record.choices.weights = Weights::Proportional;
        const PhaseEvaluation weighted = evaluated(record);
        QVERIFY(weighted.fit);
        compareAsPrinted(weighted.fit->coefficients[0].value, "0.00219");
        compareAsPrinted(weighted.fit->coefficients[1].value, "0.099770");
    }

    void humidityProbeHasAGreyPoint() {
        Record record = sampleTable("humidity-probe.csv");
        const ReadingColumns& readings = *record.readings;
        double falling = 0;
        double rising = 0;
        for (std::size_t row = 0; row < readings.size(); ++row)
            if (readings.setPoint().toDouble(row) == 60 && readings.runs()[row] == 1)
                (readings.directions()[row] == Direction::Falling ? falling : rising) =
                    readings.indication().toDouble(row) - readings.reference().toDouble(row);
        compareAsPrinted(falling, "1.7");
        QVERIFY(rising < falling - 1);
    }
};

QTEST_APPLESS_MAIN(SampleFiguresTest)
#include "tst_sample_figures.moc"
