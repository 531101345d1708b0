// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/fitFunction.h"
#include "tests/support/FitHelp.h"

#include <QTest>

#include <algorithm>
#include <cmath>
#include <functional>
#include <random>

using namespace spanwright;
using namespace spanwright::test;

namespace {

Decimal number(const char* text) {
    return *Decimal::parse(text);
}

/// Ten readings of a transmitter, two at each set point.
TypedReadings transmitter() {
    return {{"0", "0", "2.5", "2.5", "5", "5", "7.5", "7.5", "10", "10"},
            {"4.003", "4.001", "8.010", "8.006", "12.013", "12.009", "16.011", "16.005", "20.004", "19.998"},
            {},
            {}};
}

/// The same readings with every reference and indication mapped.
TypedReadings mapped(const TypedReadings& readings, const std::function<std::string(const Decimal&)>& x,
                     const std::function<std::string(const Decimal&)>& y) {
    TypedReadings result;
    for (const std::string& text : readings.reference)
        result.reference.push_back(x(number(text.c_str())));
    for (const std::string& text : readings.indication)
        result.indication.push_back(y(number(text.c_str())));
    return result;
}

std::string same(const Decimal& value) {
    return value.text();
}
std::string timesThousand(const Decimal& value) {
    return Decimal{value.mantissa, value.decimals - 3, {}}.text();
}
std::string plusMillion(const Decimal& value) {
    std::int64_t power = 1;
    for (int i = 0; i < value.decimals; ++i)
        power *= 10;
    return Decimal{value.mantissa + 1'000'000 * power, value.decimals, {}}.text();
}

} // namespace

class FitCases : public QObject {
    Q_OBJECT

  private slots:
    /// By exact fractions of the eight numbers as typed, 30 digits each: slope 27/14000, Σe² = 1/560000.
    void thirtyDigitsKeepWhatTheirScatterSays() {
        const char* thousandths[] = {"003", "005", "006", "008", "011", "012", "015", "016"};
        TypedReadings typed;
        for (int i = 0; i < 8; ++i) {
            typed.reference.push_back(std::to_string(i + 1));
            typed.indication.push_back(std::string("123456789012345678901234567.") + thousandths[i]);
        }
        Record record = recordOf(typed);
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(std::fabs(fit.coefficients[1].value / (27.0 / 14000) - 1) < 0.02);
        QVERIFY(std::fabs(fit.residualSd / std::sqrt(1.0 / 560000 / 6) - 1) < 0.05);
    }

    /// On the line exactly: what 31 digits leave of a constant is none.
    void aPerfectLineThroughZeroHasNoConstant() {
        Record record = recordOf({{"1", "2", "3", "7"}, {"0.3", "0.6", "0.9", "2.1"}, {}, {}});
        const Fit fit = fitted(record, "line").fit;
        QCOMPARE(fit.coefficients[0].value, 0.0);
        QCOMPARE(fit.coefficients[1].value, 0.3);
        const Fit curve = fitted(record, "polynomial:2").fit;
        QCOMPARE(curve.coefficients[2].value, 0.0);
    }

    /// Ordinary thermistors: noise of 0.03 % on B = 3950 K, a different set for every seed. The fit settles for each.
    void iteratedFitsSettle() {
        for (unsigned seed = 1; seed <= 20; ++seed) {
            std::mt19937 random(seed);
            TypedReadings typed;
            for (int i = 0; i < 22; ++i) {
                const int t = 10 * (i / 2);
                const double noise = (static_cast<double>(random() % 2001) - 1000) * 6e-7;
                typed.reference.push_back(std::to_string(t));
                typed.indication.push_back(std::to_string(10000 * std::exp(3950 * (1 / (t + 273.15) - 1 / 298.15)) * (1 + noise)));
            }
            Record record = recordOf(typed);
            const Fit fit = fitted(record, "thermistor-b").fit;
            QVERIFY2(fit.convergence.reached, fit.convergence.reason.c_str());
            QVERIFY(std::fabs(fit.coefficients[1].value - 3950) < 10);
        }
    }

    /// By hand: x = 0, 1, 2, 3 and y = 1, 3, 4, 8 have b = 11/5, a = 7/10, Σe² = 1.8, s² = 0.9, u(b) = √(0.9/5).
    void byHand() {
        Record record = recordOf({{"0", "1", "2", "3"}, {"1", "3", "4", "8"}, {}, {}});
        const FitOutcome outcome = fitted(record, "line");
        const Fit& fit = outcome.fit;
        QCOMPARE(fit.coefficients[0].value, 0.7);
        QCOMPARE(fit.coefficients[1].value, 2.2);
        QCOMPARE(fit.residualSs, 1.8);
        QCOMPARE(fit.totalSs, 26.0);
        QCOMPARE(fit.regressionSs, 24.2);
        QCOMPARE(fit.coefficients[1].standardUncertainty, std::sqrt(0.9 / 5));
        QCOMPARE(fit.coefficients[0].standardUncertainty, std::sqrt(0.9 * (0.25 + 2.25 / 5)));
        QCOMPARE(*fit.rSquared, 24.2 / 26);
        const double wanted[] = {0.3, 0.1, -1.1, 0.7}, leverage[] = {0.7, 0.3, 0.3, 0.7};
        for (std::size_t i = 0; i < 4; ++i) {
            QVERIFY(std::fabs(outcome.residuals.e.high[i] - wanted[i]) < 1e-15);
            QVERIFY(std::fabs(outcome.residuals.leverage[i] - leverage[i]) < 1e-15);
        }
        // Student's t for 2 degrees of freedom at 95 %: 4.303 (JCGM 100:2008, table G.2).
        QVERIFY(agreesAsPrinted(fit.coverageFactor, "4.303"));
    }

    void lineGoesThroughTheTwoMeans() {
        Record record = recordOf(transmitter());
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(std::fabs(fit.curve->value(5) - 12.006) < 1e-14);
    }

    void perfectLineLeavesNothing() {
        Record record = recordOf({{"0.1", "0.2", "0.3", "0.7"}, {"1.3", "1.6", "1.9", "3.1"}, {}, {}});
        const FitOutcome outcome = fitted(record, "line");
        QCOMPARE(outcome.fit.residualSs, 0.0);
        QCOMPARE(outcome.fit.residualSd, 0.0);
        QCOMPARE(*outcome.fit.rSquared, 1.0);
        QCOMPARE(outcome.fit.coefficients[1].value, 3.0);
        QVERIFY(std::all_of(outcome.residuals.e.high.begin(), outcome.residuals.e.high.end(),
                            [](double e) { return e == 0; }));
    }

    void structurelessSetExplainsNothing() {
        Record record = recordOf({{"1", "1", "2", "2", "3", "3"}, {"4", "6", "4", "6", "4", "6"}, {}, {}});
        const Fit fit = fitted(record, "line").fit;
        QCOMPARE(fit.regressionSs, 0.0);
        QCOMPARE(*fit.rSquared, 0.0);
        QCOMPARE(fit.coefficients[0].value, 5.0);
        Record level = recordOf({{"1", "2", "3"}, {"5", "5", "5"}, {}, {}});
        QVERIFY(!fitted(level, "line").fit.rSquared);
    }

    void orderDoesNotMatter() {
        const TypedReadings readings = transmitter();
        TypedReadings reversed = readings;
        std::reverse(reversed.reference.begin(), reversed.reference.end());
        std::reverse(reversed.indication.begin(), reversed.indication.end());
        Record a = recordOf(readings), b = recordOf(reversed);
        for (const char* function : {"line", "polynomial:3"}) {
            const Fit one = fitted(a, function).fit, other = fitted(b, function).fit;
            for (std::size_t k = 0; k < one.terms(); ++k)
                QCOMPARE(one.coefficients[k].value, other.coefficients[k].value);
            QCOMPARE(one.residualSs, other.residualSs);
        }
    }

    /// Shifting either quantity by a million and scaling the reference by a thousand leaves s and the slope as they
    /// were.
    void shiftAndScaleDoNotMatter() {
        Record plain = recordOf(transmitter()), scaled = recordOf(mapped(transmitter(), timesThousand, same));
        Record shifted = recordOf(mapped(transmitter(), plusMillion, plusMillion));
        const Fit a = fitted(plain, "line").fit, b = fitted(scaled, "line").fit, c = fitted(shifted, "line").fit;
        QVERIFY(std::fabs(a.coefficients[1].value / (b.coefficients[1].value * 1000) - 1) < 1e-15);
        QCOMPARE(a.coefficients[1].value, c.coefficients[1].value);
        QCOMPARE(a.residualSd, b.residualSd);
        QCOMPARE(a.residualSd, c.residualSd);
        QVERIFY(std::fabs(c.curve->value(1'000'005) - 1'000'012.006) < 1e-9);
    }

    void tooFewReadings() {
        Record none = recordOf({{}, {}, {}, {}});
        QCOMPARE(refused(none, "line").code, ErrorCode::NoReadings);
        Record one = recordOf({{"1"}, {"2"}, {}, {}});
        const Error error = refused(one, "line");
        QCOMPARE(error.code, ErrorCode::TooFewReadings);
        QVERIFY(error.fact("needed") == "2" && error.fact("got") == "1");
        QCOMPARE(fitted(one, "constant").fit.coefficients[0].value, 2.0);
        Record two = recordOf({{"1", "2"}, {"2", "4"}, {}, {}});
        const Fit exact = fitted(two, "line").fit;
        QVERIFY(std::isnan(exact.residualSd) && std::isnan(exact.coefficients[0].standardUncertainty));
        QCOMPARE(exact.warnings.front().code, WarningCode::NoDegreesOfFreedom);
    }

    void tooFewSetPoints() {
        Record same = recordOf({{"5", "5", "5"}, {"1", "2", "3"}, {}, {}});
        QCOMPARE(refused(same, "line").code, ErrorCode::ReferencesAllEqual);
        Record two = recordOf({{"1", "1", "2", "2"}, {"1", "2", "3", "4"}, {}, {}});
        const Error error = refused(two, "polynomial:2");
        QCOMPARE(error.code, ErrorCode::TooFewSetPoints);
        QVERIFY(error.fact("needed") == "3" && error.fact("got") == "2");
    }

    void rankLostNamesTheTerms() {
        Record record = recordOf({{"0", "0", "0"}, {"1", "2", "3"}, {}, {}});
        QCOMPARE(refused(record, "proportional").code, ErrorCode::RankLost);
        QVERIFY(refused(record, "proportional").fact("terms") == "b1");
        Record two = recordOf({{"-1", "0", "1", "2"}, {"1", "2", "3", "1"}, {}, {}});
        QVERIFY(fitted(two, "polynomial-no-constant:3").fit.convergence.reached);
        Record zero = recordOf({{"0", "1", "2"}, {"1", "2", "3"}, {}, {}});
        const Error error = refused(zero, "polynomial-no-constant:3");
        QCOMPARE(error.code, ErrorCode::RankLost);
        QVERIFY(error.fact("terms") == "b3");
    }

    void outsideTheDomain() {
        Record record = recordOf({{"1", "-2", "3", "0"}, {"1", "2", "3", "4"}, {}, {}});
        const Error error = refused(record, "logarithmic");
        QCOMPARE(error.code, ErrorCode::OutsideDomain);
        QVERIFY(error.fact("rows") == "2, 4");
        Record hot = recordOf({{"0", "100", "900"}, {"100", "138.5", "400"}, {}, {}});
        QVERIFY(refused(hot, "callendar-van-dusen").fact("rows") == "3");
    }

    void uncertaintiesThatAreMissingOrZero() {
        Record missing = recordOf({{"1", "2", "3"}, {"1", "2", "3"}, {}, {"0.1", "", "0.1"}});
        missing.choices.weights = Weights::Stated;
        const Error error = refused(missing, "line");
        QCOMPARE(error.code, ErrorCode::UncertaintyMissing);
        QVERIFY(error.fact("rows") == "2");
        Record zero = recordOf({{"1", "2", "3"}, {"1", "2", "3"}, {}, {"0.1", "0.1", "0"}});
        zero.choices.weights = Weights::Stated;
        QCOMPARE(refused(zero, "line").code, ErrorCode::UncertaintyNotPositive);
        QVERIFY(refused(zero, "line").fact("rows") == "3");
    }

    void sampleLeavesOutWhatDoesNotCount() {
        Record record = recordOf({{"1", "2", "", "4", "5"}, {"1", "2", "3", "4", "50"}, {}, {}});
        record.exclusions.edit().add({5, ExclusionReason::TypingSlip, "", "nb", 0});
        const Sample sample = makeSample(record, Phase::AsFound);
        std::vector<std::size_t> rows;
        for (const std::size_t row : sample.rows) {
            QCOMPARE(sample.rows.indexOf(row), rows.size());
            rows.push_back(row);
        }
        QVERIFY((rows == std::vector<std::size_t>{0, 1, 3}));
        QCOMPARE(sample.rows.indexOf(2), sample.rows.size());
        QCOMPARE(sample.excluded, std::size_t{1});
        QCOMPARE(sample.warnings.front().code, WarningCode::IncompleteReadings);
        QCOMPARE(makeSampleWithExcluded(record, Phase::AsFound).size(), std::size_t{4});
        QCOMPARE(makeSample(record, Phase::AsLeft).size(), std::size_t{0});
        record.choices.function = {FunctionFamily::Constant, 0};
        QCOMPARE(makeSample(record, Phase::AsFound).size(), std::size_t{4});
    }

    void correctionsAreInterpolatedExactly() {
        Record record = recordOf({{"0", "5", "10", "12", "-1"}, {"0", "5", "10", "12", "-1"}, {}, {}});
        Standard standard;
        standard.correctionUse = CorrectionUse::Apply;
        standard.corrections = {{number("10"), number("0.03")}, {number("0"), number("0.01")}};
        record.standards.push_back(standard);
        const Sample sample = makeSample(record, Phase::AsFound);
        const char* const wanted[] = {"0.01", "5.02", "10.03", "12.03", "-0.99"};
        for (std::size_t i = 0; i < 5; ++i)
            QVERIFY(std::fabs(toDouble(sample.reference[i] - number(wanted[i]).toDoubleDouble())) < 1e-29);
        record.standards[0].correctionUse = CorrectionUse::AlreadyApplied;
        QCOMPARE(makeSample(record, Phase::AsFound).reference.high[1], 5.0);
    }

    void setPointsAreStatedOrEqualReferences() {
        Record record = recordOf({{"1.0", "1.00", "0.5", "2"}, {"1", "2", "3", "4"}, {}, {}});
        const Sample sample = makeSample(record, Phase::AsFound);
        QVERIFY((sample.group == std::vector<std::int32_t>{1, 1, 0, 2}));
        QVERIFY((sample.groupValue == std::vector<double>{0.5, 1, 2}));
        for (std::size_t i = 0; i < 4; ++i)
            record.readings.edit().setNumber(i, NumberColumn::SetPoint, number(i < 3 ? "1" : "2"));
        QVERIFY((makeSample(record, Phase::AsFound).group == std::vector<std::int32_t>{0, 0, 0, 1}));
    }
};

QTEST_APPLESS_MAIN(FitCases)
#include "tst_fit_cases.moc"
