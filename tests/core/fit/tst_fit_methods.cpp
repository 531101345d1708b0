// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/FitHelp.h"

#include <QTest>

#include <cmath>

using namespace spanwright;
using namespace spanwright::test;

namespace {

/// ISO/TS 28037:2010, clause 7.4, example (from memory; the results confirm the data).
TypedReadings bothUncertainExample() {
    return {{"1.2", "1.9", "2.9", "4.0", "4.7", "5.9"},
            {"3.4", "4.4", "7.2", "8.5", "10.8", "13.5"},
            {"0.2", "0.2", "0.2", "0.2", "0.2", "0.2"},
            {"0.2", "0.2", "0.2", "0.4", "0.4", "0.4"}};
}

Record bothUncertain(const TypedReadings& readings) {
    Record record = recordOf(readings);
    record.choices.method = Method::BothUncertain;
    record.choices.covariance = CovarianceScale::Stated;
    return record;
}

} // namespace

class FitMethods : public QObject {
    Q_OBJECT

  private slots:
    void bothUncertainAsInTheSpecification() {
        Record record = bothUncertain(bothUncertainExample());
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(agreesAsPrinted(fit.coefficients[0].value, "0.5788"));
        QVERIFY(agreesAsPrinted(fit.coefficients[1].value, "2.1597"));
        QVERIFY(agreesAsPrinted(fit.coefficients[0].standardUncertainty, "0.4764"));
        QVERIFY(agreesAsPrinted(fit.coefficients[1].standardUncertainty, "0.1355"));
        QVERIFY(agreesAsPrinted(fit.covariance[1], "-0.0577"));
        QVERIFY(agreesAsPrinted(*fit.chiSquared, "2.743"));
        QCOMPARE(fit.degreesOfFreedom, 4);
        QVERIFY(fit.convergence.reached);
    }

    /// Pearson's data with York's weights: a = 5.47991022, b = −0.480533407, χ² = 11.86635 (York 1966; from memory).
    void pearsonWithYorksWeights() {
        const std::vector<double> wx{1000, 1000, 500, 800, 200, 80, 60, 20, 1.8, 1},
            wy{1, 1.8, 4, 8, 20, 20, 70, 70, 100, 500};
        std::vector<double> ux, uy;
        for (std::size_t i = 0; i < wx.size(); ++i) {
            ux.push_back(1 / std::sqrt(wx[i]));
            uy.push_back(1 / std::sqrt(wy[i]));
        }
        Record record = bothUncertain({{"0", "0.9", "1.8", "2.6", "3.3", "4.4", "5.2", "6.1", "6.5", "7.4"},
                                       {"5.9", "5.4", "4.4", "4.6", "3.5", "3.7", "2.8", "2.8", "2.4", "1.5"},
                                       typed(ux),
                                       typed(uy)});
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(agreesAsPrinted(fit.coefficients[0].value, "5.47991022"));
        QVERIFY(agreesAsPrinted(fit.coefficients[1].value, "-0.480533407"));
        QVERIFY(agreesAsPrinted(*fit.chiSquared, "11.86635"));
    }

    /// The line does not depend on which quantity is called x: b and 1/b, χ² the same.
    void bothUncertainIsSymmetric() {
        const TypedReadings readings = bothUncertainExample();
        Record record = bothUncertain(readings),
               swapped =
                   bothUncertain({readings.indication, readings.reference, readings.uIndication, readings.uReference});
        const Fit fit = fitted(record, "line").fit, other = fitted(swapped, "line").fit;
        QVERIFY(std::fabs(fit.coefficients[1].value * other.coefficients[1].value - 1) < 1e-14);
        QVERIFY(std::fabs(*fit.chiSquared - *other.chiSquared) < 1e-13);
        Record reference = bothUncertain(readings);
        reference.choices.fit = FitDirection::Reference;
        QVERIFY(std::fabs(fitted(reference, "line").fit.coefficients[1].value - other.coefficients[1].value) < 1e-14);
    }

    void bothUncertainWithoutAbscissaIsWeighted() {
        TypedReadings readings = bothUncertainExample();
        readings.uReference.assign(6, "0");
        Record record = bothUncertain(readings);
        const Fit both = fitted(record, "line").fit;
        record.choices.method = Method::LeastSquares;
        record.choices.weights = Weights::Stated;
        const Fit weighted = fitted(record, "line").fit;
        for (std::size_t i = 0; i < 2; ++i) {
            QVERIFY(std::fabs(both.coefficients[i].value / weighted.coefficients[i].value - 1) < 1e-14);
            QVERIFY(std::fabs(both.coefficients[i].standardUncertainty / weighted.coefficients[i].standardUncertainty -
                              1) < 1e-14);
        }
    }

    /// Kessel, Kacker and Sommer (2012): a line through the two end points of a pressure sensor; the reference is
    /// uncertain by 115·10⁻⁶ of itself, the display by its rounding of ±0.00005. The function gives the reference.
    void pressureSensorFromTwoPoints() {
        const PublishedSet set = publishedSet("pressure_sensor_range");
        const double rounding = 0.00005 / std::sqrt(3.0);
        Record record =
            bothUncertain({{"0.0", "20.0"}, {"0.0000", "2.0410"}, {"0", "0.0023"}, typed({rounding, rounding})});
        record.choices.fit = FitDirection::Reference;
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(std::fabs(fit.coefficients[0].value) < 1e-25);
        QVERIFY(digitsAgreed(fit.coefficients[1].value, set.recomputed.at("raw.b")) >= 14.9);
        QVERIFY(digitsAgreed(fit.coefficients[0].standardUncertainty, set.recomputed.at("raw.u_a")) >= 13);
        QVERIFY(digitsAgreed(fit.coefficients[1].standardUncertainty, set.recomputed.at("raw.u_b")) >= 13);
        const double r =
            fit.covariance[1] / (fit.coefficients[0].standardUncertainty * fit.coefficients[1].standardUncertainty);
        QVERIFY(digitsAgreed(r, set.recomputed.at("raw.r_ab")) >= 12.5);
    }

    void bothUncertainRefuses() {
        TypedReadings readings = bothUncertainExample();
        readings.uReference.clear();
        Record missing = bothUncertain(readings);
        QCOMPARE(refused(missing, "line").code, ErrorCode::UncertaintyMissing);
        Record curve = bothUncertain(bothUncertainExample());
        QCOMPARE(refused(curve, "polynomial:2").code, ErrorCode::MethodUnfit);
        readings = bothUncertainExample();
        readings.uReference[2] = readings.uIndication[2] = "0";
        Record zero = bothUncertain(readings);
        const Error error = refused(zero, "line");
        QCOMPARE(error.code, ErrorCode::UncertaintyNotPositive);
        QCOMPARE(QString::fromStdString(std::string(error.fact("rows"))), QString("3"));
    }

    /// By hand: spreads 0.1 at 0 and 0.2 at 10 (two readings each, s = difference/√2) weigh as 4 to 1.
    void weightsFromReplicates() {
        Record record = recordOf({{"0", "0", "10", "10"}, {"0.9", "1.1", "20.8", "21.2"}, {}, {}});
        record.choices.weights = Weights::Replicates;
        const Residuals residuals = fitted(record, "line").residuals;
        QVERIFY(std::fabs(residuals.weight.high[0] / residuals.weight.high[2] - 4) < 1e-9);
        record.choices.weights = Weights::VarianceFunction;
        const Residuals modelled = fitted(record, "line").residuals;
        QVERIFY(std::fabs(modelled.weight.high[0] / modelled.weight.high[2] - 4) < 1e-9);
    }

    /// u ∝ x: the proportional function is then the mean of the ratios y/x.
    void proportionalWeights() {
        Record record = recordOf({{"1", "2", "4"}, {"2.1", "3.9", "8.4"}, {}, {}});
        record.choices.weights = Weights::Proportional;
        const Fit fit = fitted(record, "proportional").fit;
        QVERIFY(std::fabs(fit.coefficients[0].value - (2.1 + 1.95 + 2.1) / 3) < 1e-15);
        Record zero = recordOf({{"0", "2", "4"}, {"0.1", "3.9", "8.4"}, {}, {}});
        zero.choices.weights = Weights::Proportional;
        QCOMPARE(refused(zero, "line").code, ErrorCode::LevelZero);
    }

    /// Equal stated uncertainties change nothing but the scale.
    void equalStatedUncertaintiesAreEqualWeights() {
        Record record =
            recordOf({{"1", "2", "3", "4"}, {"1.1", "1.9", "3.2", "3.9"}, {}, {"0.2", "0.2", "0.2", "0.2"}});
        const Fit equal = fitted(record, "line").fit;
        record.choices.weights = Weights::Stated;
        const Fit stated = fitted(record, "line").fit;
        QVERIFY(std::fabs(stated.coefficients[1].standardUncertainty / equal.coefficients[1].standardUncertainty - 1) <
                1e-15);
        QVERIFY(std::fabs(stated.residualSd * 0.2 / equal.residualSd - 1) < 1e-14);
        QVERIFY(std::fabs(std::sqrt(stated.curve->readingVariance(2.5)) / equal.residualSd - 1) < 1e-14);
        record.choices.covariance = CovarianceScale::Stated;
        const Fit known = fitted(record, "line").fit;
        QVERIFY(std::fabs(std::sqrt(known.curve->readingVariance(2.5)) - 0.2) < 1e-15);
        QVERIFY(std::fabs(known.coverageFactor - 1.959963984540054) < 1e-14);
    }

    void robustKeepsToTheMany() {
        Record record = recordOf({{"0", "1", "2", "3", "4", "5", "6", "7", "8", "9"},
                                  {"0.01", "1.02", "1.99", "3.00", "4.01", "4.98", "6.02", "7.01", "7.99", "12.0"},
                                  {},
                                  {}});
        const double plain = fitted(record, "line").fit.coefficients[1].value;
        record.choices.method = Method::Robust;
        for (const RobustWeight kind : {RobustWeight::Huber, RobustWeight::Bisquare}) {
            record.choices.robust = kind;
            const Fit fit = fitted(record, "line").fit;
            QVERIFY(std::fabs(fit.coefficients[1].value - 1) < 0.01);
            QVERIFY(std::fabs(plain - 1) > 0.1);
            QVERIFY(!fit.weighedDown.empty());
            QCOMPARE(fit.weighedDown.back().row, std::size_t{9});
            QCOMPARE(fit.warnings.front().code, WarningCode::ApproximateMethod);
        }
        // Without an outlier Huber's estimate is least squares.
        Record clean = recordOf({{"0", "1", "2", "3"}, {"0.1", "0.9", "2.1", "2.9"}, {}, {}});
        const double ordinary = fitted(clean, "line").fit.coefficients[1].value;
        clean.choices.method = Method::Robust;
        QVERIFY(std::fabs(fitted(clean, "line").fit.coefficients[1].value - ordinary) < 1e-12);
    }
};

QTEST_APPLESS_MAIN(FitMethods)
#include "tst_fit_methods.moc"
