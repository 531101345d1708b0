// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/fitFunction.h"
#include "core/interval/Bands.h"
#include "core/interval/ReadBack.h"
#include "tests/support/PublishedSet.h"

#include <QTest>

#include <cmath>

using namespace spanwright;
using namespace spanwright::test;

namespace {

Fit fitOf(Record& record, const char* function, const char* coverage = "0.95") {
    record.choices.function = *parseFunctionName(function);
    record.choices.coverage = *Decimal::parse(coverage);
    auto outcome = fitFunction(makeSample(record, Phase::AsFound), record.choices);
    if (!outcome)
        qFatal("not fitted");
    return outcome->fit;
}

struct Inverse {
    const char* set;
    const char* x;
    const char* y;
    const char* function;
    const char* prefix;
    double indication;
    int repeats; ///< 0: exact
    const char* level;
};

const std::vector<Inverse> inverses{
    {"loadcell", "load", "deflection", "polynomial:2", "calibration.", 1.239722, 1, "0.95"},
    {"loadcell", "load", "deflection", "polynomial:2", "calibration_mean.", 1.239722, 0, "0.95"},
    {"reaction_chamber", "x", "y", "line", "mean400.", 400, 0, "0.99"},
    {"thermostat", "x", "y", "line", "y104.", 104, 1, "0.95"},
    {"thermostat", "x", "y", "line", "y100.", 100, 1, "0.90"},
    {"arsenic_inverse", "x", "y", "line", "y3.", 3, 1, "0.90"},
    {"arsenic_inverse", "x", "y", "line", "mean3.", 3, 0, "0.90"},
    {"iso28037_unknown_scale", "x", "y", "line", "x.", 10.5, 1, "0.95"},
    {"din32645", "x", "y", "line", "at3500.", 3500, 1, "0.99"},
    {"miller_fluorescein", "x", "y", "line", "y2_9.", 2.9, 1, "0.95"},
};

} // namespace

class Intervals : public QObject {
    Q_OBJECT

  private slots:
    /// Inverse prediction by inverting the band: Graybill and Iyer (1994), NIST/SEMATECH 4.6.1, ISO/TS 28037 annex E,
    /// DIN 32645.
    void readsBackAsPublished_data() {
        QTest::addColumn<int>("index");
        for (std::size_t i = 0; i < inverses.size(); ++i)
            QTest::addRow("%s %s", inverses[i].set, inverses[i].prefix) << static_cast<int>(i);
    }
    void readsBackAsPublished() {
        QFETCH(int, index);
        const Inverse& wanted = inverses[static_cast<std::size_t>(index)];
        const PublishedSet set = publishedSet(wanted.set);
        Record record = recordOf(set, {wanted.x, wanted.y, "", "", ""});
        const Fit fit = fitOf(record, wanted.function, wanted.level);
        const ReadBackAnswer answer =
            readBack(fit, wanted.indication, wanted.repeats > 0 ? std::optional<int>(wanted.repeats) : std::nullopt);
        const std::string prefix = wanted.prefix;
        for (const auto& [name, got] : {std::pair{"x0", *answer.reference},
                                        {"se", answer.standardUncertainty},
                                        {"lower", answer.low},
                                        {"upper", answer.high}}) {
            const double digits = digitsAgreed(got, set.recomputed.at(prefix + name));
            QVERIFY2(digits >= 12.5,
                     qPrintable(QString("%1: %2 digits, got %3").arg(name).arg(digits).arg(got, 0, 'g', 17)));
        }
    }

    /// Kutner, Nachtsheim, Neter and Li, Toluca Company: 90 % Working–Hotelling band.
    void simultaneousBand() {
        const PublishedSet set = publishedSet("toluca_working_hotelling");
        Record record = recordOf(set, {"x", "y", "", "", ""});
        const Fit fit = fitOf(record, "line", "0.90");
        for (const char* x : {"30", "65", "100"}) {
            const BandPoint point = bandAt(fit, std::atof(x));
            QVERIFY(digitsAgreed(point.simultaneous.low, set.recomputed.at(std::string("band.lower[") + x + "]")) >=
                    13);
            QVERIFY(digitsAgreed(point.simultaneous.high, set.recomputed.at(std::string("band.upper[") + x + "]")) >=
                    13);
        }
    }

    /// R data set Formaldehyde: predict(interval =) at 0.45.
    void bandsForMeanAndNewReading() {
        const PublishedSet set = publishedSet("r_formaldehyde");
        Record record = recordOf(set, {"x", "y", "", "", ""});
        const BandPoint point = bandAt(fitOf(record, "line"), 0.45);
        for (const auto& [name, got] : {std::pair{"fit", point.value},
                                        {"ci_lower", point.mean.low},
                                        {"ci_upper", point.mean.high},
                                        {"pi_lower", point.newReading.low},
                                        {"pi_upper", point.newReading.high}})
            QVERIFY2(digitsAgreed(got, set.recomputed.at(std::string("predict.") + name)) >= 13.5, name);
    }

    /// By hand: y = 0, 2, 0, 2 at x = 0, 1, 2, 3 has b = 0.4, s² = 1.6, Sxx = 5, so g = t²·1.6/(5·0.16) > 1.
    void intervalThatIsInfinite() {
        Record record = recordOf({"0", "1", "2", "3"}, {"0", "2", "0", "2"});
        const Fit fit = fitOf(record, "line");
        const ReadBackAnswer answer = readBack(fit, 1.0, 1);
        QVERIFY(std::isinf(answer.low) && answer.low < 0);
        QVERIFY(std::isinf(answer.high) && answer.high > 0);
        QCOMPARE(answer.warnings.front().code, WarningCode::NoFiniteInterval);
        QCOMPARE(answer.warnings.front().facts.size(), std::size_t{1});
    }

    /// A slope that is not significant, read far off: the set is all values but a gap about the readings.
    void intervalInTwoParts() {
        Record record = recordOf({"0", "1", "2", "3"}, {"0", "2", "0", "2"});
        const Fit fit = fitOf(record, "line");
        const ReadBackAnswer answer = readBack(fit, 40.0, 1);
        QVERIFY(std::isinf(answer.low) && std::isinf(answer.high));
        const auto& facts = answer.warnings.front().facts;
        QCOMPARE(facts.size(), std::size_t{3});
        for (const Fact& fact : facts) {
            if (fact.name == "value")
                continue;
            const BandPoint edge = bandAt(fit, std::stod(fact.value));
            QVERIFY(std::fabs(edge.newReading.low - 40.0) < 1e-7 || std::fabs(edge.newReading.high - 40.0) < 1e-7);
        }
    }

    /// A value lies in the interval exactly when the indication lies in the band there, whatever the function.
    void intervalIsTheInvertedBand_data() {
        QTest::addColumn<QString>("function");
        QTest::newRow("line") << "line";
        QTest::newRow("quadratic") << "polynomial:2";
        QTest::newRow("cubic without constant") << "polynomial-no-constant:3";
    }
    void intervalIsTheInvertedBand() {
        QFETCH(QString, function);
        Record record =
            recordOf({"1", "2", "3", "4", "5", "6", "7"}, {"1.1", "2.0", "3.2", "4.4", "5.4", "6.9", "8.2"});
        const Fit fit = fitOf(record, function.toLatin1().constData());
        const ReadBackAnswer answer = readBack(fit, 4.1, 1);
        const BandPoint low = bandAt(fit, answer.low), high = bandAt(fit, answer.high);
        QVERIFY(std::fabs(low.newReading.high - 4.1) < 1e-12);
        QVERIFY(std::fabs(high.newReading.low - 4.1) < 1e-12);
        QVERIFY(answer.low < *answer.reference && *answer.reference < answer.high);
    }

    /// At very many places the band is a polynomial found once: the same as place by place.
    void bandInColumnsIsTheBand_data() {
        QTest::addColumn<QString>("function");
        for (const char* name : {"constant", "line", "proportional", "polynomial:2", "polynomial:4",
                                 "polynomial-no-constant:3", "square-root"})
            QTest::newRow(name) << name;
    }
    void bandInColumnsIsTheBand() {
        QFETCH(QString, function);
        Record record =
            recordOf({"1", "2", "3", "4", "5", "6", "7"}, {"1.1", "2.0", "3.2", "4.4", "5.4", "6.9", "8.2"});
        const Fit fit = fitOf(record, function.toLatin1().constData());
        std::vector<double> x;
        for (int i = 0; i < 103; ++i)
            x.push_back(0.9 + 0.06 * i);
        const BandColumns columns = newReadingBand(fit, x);
        for (std::size_t i = 0; i < x.size(); ++i) {
            const BandPoint point = bandAt(fit, x[i]);
            QVERIFY(std::fabs(columns.value[i] - point.value) < 1e-13);
            QVERIFY(std::fabs(columns.low[i] - point.newReading.low) < 1e-12);
            QVERIFY(std::fabs(columns.high[i] - point.newReading.high) < 1e-12);
        }
    }

    void severalAnswersNoneAndExtrapolation() {
        Record record = recordOf({"0", "1", "2", "3", "4", "5"}, {"0.01", "3.98", "6.01", "6.02", "3.99", "0.02"});
        const Fit fit = fitOf(record, "polynomial:2");
        QCOMPARE(fit.warnings.front().code, WarningCode::NotMonotonic);
        const ReadBackAnswer two = readBack(fit, 5.0, 1);
        QCOMPARE(two.others.size(), std::size_t{1});
        QCOMPARE(two.warnings.back().code, WarningCode::SeveralAnswers);
        const ReadBackAnswer none = readBack(fit, 9.0, 1);
        QVERIFY(!none.reference);
        QCOMPARE(none.warnings.front().code, WarningCode::NoAnswer);

        Record straight = recordOf({"0", "1", "2", "3"}, {"0.0", "1.1", "1.9", "3.0"});
        const ReadBackAnswer beyond = readBack(fitOf(straight, "line"), 5.0, 1);
        QVERIFY(!beyond.insideRange);
        QCOMPARE(beyond.warnings.back().code, WarningCode::Extrapolated);
    }
};

QTEST_APPLESS_MAIN(Intervals)
#include "tst_intervals.moc"
