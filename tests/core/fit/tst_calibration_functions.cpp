// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/CalibrationFunction.h"
#include "core/fit/LeastSquares.h"
#include "core/interval/ReadBack.h"
#include "tests/support/FitHelp.h"

#include <QTest>

#include <cmath>
#include <functional>

using namespace spanwright;
using namespace spanwright::test;

namespace {

std::vector<double> evaluated(const std::vector<double>& x, const std::function<double(double)>& f) {
    std::vector<double> y;
    for (const double at : x)
        y.push_back(f(at));
    return y;
}

/// Slope of a curve by central differences, to check its derivative by another route.
double slopeOf(const FittedFunction& curve, double x) {
    const double h = 1e-5 * std::max(1.0, std::fabs(x));
    return (curve.value(x + h) - curve.value(x - h)) / (2 * h);
}

struct Family {
    const char* function;
    std::vector<double> x;
    std::function<double(double)> f; ///< of which the readings are made
    std::vector<double> coefficients;
};

/// Families with the coefficients that the readings are made with; read back, they must return.
std::vector<Family> families() {
    const double k = 59.15935; // mV at 25 °C; printed as 59.16 mV (IUPAC 2002)
    return {
        {"line", {0, 1, 2, 3, 4}, [](double x) { return 4 + 1.6 * x; }, {4, 1.6}},
        {"polynomial-no-constant:3",
         {1, 2, 3, 4, 5, 6},
         [](double x) { return 2 * x - 0.1 * x * x + 0.003 * x * x * x; },
         {2, -0.1, 0.003}},
        {"square-root", {0, 1, 4, 9, 16, 25}, [](double x) { return 0.5 + 3 * std::sqrt(x); }, {0.5, 3}},
        {"logarithmic", {0.01, 0.1, 1, 10, 100}, [](double x) { return 200 + 58 * std::log10(x); }, {200, 58}},
        {"power", {1, 2, 5, 10, 20, 50}, [](double x) { return 3.5 * std::pow(x, -0.62); }, {3.5, -0.62}},
        {"exponential-approach",
         {0, 5, 10, 20, 40, 60, 90},
         [](double x) { return 9.5 - 8 * std::exp(-x / 25); },
         {9.5, 8, 25}},
        {"callendar-van-dusen",
         {-180, -100, -50, 0, 100, 250, 400},
         [](double t) {
             return 100 * (1 + 3.9083e-3 * t - 5.775e-7 * t * t + (t < 0 ? -4.183e-12 * (t - 100) * t * t * t : 0.0));
         },
         {100, 3.9083e-3, -5.775e-7, -4.183e-12}},
        {"thermistor-b",
         {-20, 0, 25, 50, 85},
         [](double t) { return 10000 * std::exp(3435 * (1 / (t + 273.15) - 1 / 298.15)); },
         {10000, 3435}},
        {"nernst", {1.68, 4.01, 6.86, 9.18}, [k](double pH) { return 2 - 0.97 * k * (pH - 7); }, {2, 97}},
    };
}

} // namespace

class CalibrationFunctions : public QObject {
    Q_OBJECT

  private slots:
    void returnsTheCoefficientsItWasMadeWith_data() {
        QTest::addColumn<int>("index");
        const auto all = families();
        for (std::size_t i = 0; i < all.size(); ++i)
            QTest::newRow(all[i].function) << static_cast<int>(i);
    }
    void returnsTheCoefficientsItWasMadeWith() {
        QFETCH(int, index);
        const Family family = families()[static_cast<std::size_t>(index)];
        Record record = recordOf({typed(family.x), typed(evaluated(family.x, family.f)), {}, {}});
        record.item.indication.unit = "mV";
        const Fit fit = fitted(record, family.function).fit;
        QCOMPARE(fit.terms(), family.coefficients.size());
        for (std::size_t i = 0; i < fit.terms(); ++i)
            QVERIFY2(std::fabs(fit.coefficients[i].value - family.coefficients[i]) <=
                         std::fabs(family.coefficients[i]) * 2e-6,
                     qPrintable(QString("%1: %2")
                                    .arg(QString::fromStdString(fit.coefficients[i].name))
                                    .arg(fit.coefficients[i].value, 0, 'g', 17)));
        QVERIFY(fit.convergence.reached);
        // The derivative by central differences, and the answer that leads back.
        const double x = (family.x[1] + family.x[2]) / 2;
        QVERIFY(std::fabs(fit.curve->derivative(x) - slopeOf(*fit.curve, x)) <=
                1e-6 * std::fabs(fit.curve->derivative(x)));
        const ReadBackAnswer answer = readBack(fit, family.f(x), 1);
        QVERIFY(answer.reference && std::fabs(*answer.reference - x) < 1e-4);
    }

    /// At the minimum, Σe² by the printed formula agrees with the fit and rises in
    /// every direction.
    void iteratedFitIsAMinimum_data() {
        QTest::addColumn<QString>("function");
        for (const char* name : {"power", "exponential-approach", "thermistor-b"})
            QTest::newRow(name) << name;
    }
    void iteratedFitIsAMinimum() {
        QFETCH(QString, function);
        Record record =
            recordOf({{"5", "10", "20", "40", "60", "90"}, {"8.02", "6.49", "4.61", "2.51", "1.83", "1.22"}, {}, {}});
        const FitOutcome outcome = fitted(record, function.toLatin1().constData());
        const Fit& fit = outcome.fit;
        QVERIFY(fit.convergence.reached);
        QCOMPARE(QString::fromStdString(fit.convergence.reason), QString("gradient"));
        const auto formula = [&](const std::vector<double>& c, double x) {
            if (function == "power")
                return c[0] * std::pow(x, c[1]);
            if (function == "thermistor-b")
                return c[0] * std::exp(c[1] * (1 / (x + 273.15) - 1 / 298.15));
            return c[0] - c[1] * std::exp(-x / c[2]);
        };
        std::vector<double> best;
        for (const Coefficient& c : fit.coefficients)
            best.push_back(c.value);
        const auto ss = [&](const std::vector<double>& c) {
            double sum = 0;
            for (std::size_t i = 0; i < outcome.residuals.e.size(); ++i) {
                const double x = std::stod(std::vector<const char*>{"5", "10", "20", "40", "60", "90"}[i]);
                const double y = std::stod(std::vector<const char*>{"8.02", "6.49", "4.61", "2.51", "1.83", "1.22"}[i]);
                sum += (y - formula(c, x)) * (y - formula(c, x));
            }
            return sum;
        };
        QVERIFY(std::fabs(ss(best) - fit.residualSs) <= 1e-12 * fit.residualSs);
        for (std::size_t k = 0; k < best.size(); ++k)
            for (const double step : {1e-4, -1e-4}) {
                std::vector<double> moved = best;
                moved[k] *= 1 + step;
                QVERIFY(ss(moved) > fit.residualSs);
            }
    }

    /// IEC 60751: the table at 1 °C or coarser returns R0, A, B, C, and the inverse the temperatures.
    void platinumTableBothWays() {
        const PublishedSet set = publishedSet("iec60751_pt100");
        std::vector<std::string> t, r;
        for (const auto& row : set.rows) {
            t.push_back(row[0]);
            r.push_back(set.recomputed.at("R[" + row[0] + "]"));
        }
        Record record = recordOf({t, r, {}, {}});
        const Fit fit = fitted(record, "callendar-van-dusen").fit;
        QVERIFY(digitsAgreed(fit.coefficients[0].value, std::string("100")) >= 14.5);
        QVERIFY(digitsAgreed(fit.coefficients[1].value, std::string("3.9083e-3")) >= 14.5);
        QVERIFY(digitsAgreed(fit.coefficients[2].value, std::string("-5.775e-7")) >= 14.5);
        QVERIFY(digitsAgreed(fit.coefficients[3].value, std::string("-4.183e-12")) >= 14.5);
        for (const auto& row : set.rows)
            QVERIFY2(agreesAsPrinted(fit.curve->value(std::stod(row[0])), set.published.at("R[" + row[0] + "]")),
                     row[0].c_str());
        for (const auto& [name, wanted] : set.recomputed) {
            if (name.rfind("t_of_R(", 0) != 0)
                continue;
            const ReadBackAnswer answer = readBack(fit, std::stod(name.substr(7)), std::nullopt);
            QVERIFY2(answer.reference && (digitsAgreed(*answer.reference, wanted) >= 11 ||
                                          std::fabs(*answer.reference - std::stod(wanted)) < 1e-10),
                     name.c_str());
        }
        // Without readings below 0 °C there is no C.
        Record above = recordOf({{"0", "100", "200", "400"}, {"100.00", "138.51", "175.86", "247.09"}, {}, {}});
        QCOMPARE(fitted(above, "callendar-van-dusen").fit.terms(), std::size_t{3});
    }

    /// NIST StRD MGH10 (Meyer 1970), linearised: 1/T on ln R and (ln R)³ by ordinary least squares, as recomputed in
    /// the set.
    void thermistorLinearised() {
        const PublishedSet set = publishedSet("mgh10_thermistor");
        const auto r = set.column("y"), t = set.column("x");
        const std::size_t n = r.size();
        LinearProblem problem{3, std::vector<DoubleDouble>(3 * n, 1.0), {}, {}};
        for (std::size_t i = 0; i < n; ++i) {
            const DoubleDouble l = log(Decimal::parse(r[i])->toDoubleDouble());
            problem.design[n + i] = l;
            problem.design[2 * n + i] = l * l * l;
            problem.ordinate.push_back(
                1.0 / (Decimal::parse(t[i])->toDoubleDouble() + Decimal::parse("273.15")->toDoubleDouble()));
        }
        const LinearSolution solution = solveLeastSquares(problem);
        for (std::size_t k = 0; k < 3; ++k)
            QVERIFY(digitsAgreed(toDouble(solution.beta[k]), set.recomputed.at("steinhart.b" + std::to_string(k))) >=
                    14.9);
    }

    /// Fitted in the temperature, the three terms differ from the linearised ones by far less than their uncertainty,
    /// and the residuals are in degrees.
    void thermistorInDegrees() {
        const PublishedSet set = publishedSet("mgh10_thermistor");
        Record record = recordOf(set, {"x", "y", "", "", ""}); // reference: temperature, indication: resistance
        const FitOutcome outcome = fitted(record, "steinhart-hart");
        const Fit& fit = outcome.fit;
        QCOMPARE(fit.direction, FitDirection::Reference);
        for (std::size_t k = 0; k < 3; ++k) {
            const std::string name = "b" + std::to_string(k);
            QVERIFY(std::fabs(fit.coefficients[k].value - std::stod(set.recomputed.at("steinhart." + name))) <
                    std::stod(set.recomputed.at("steinhart.sd_" + name)));
        }
        QVERIFY(fit.residualSd < 0.05); // °C
        QVERIFY(std::fabs(fit.curve->value(34780) - 50) < 0.1);
        const double x = 10000;
        QVERIFY(std::fabs(fit.curve->derivative(x) - slopeOf(*fit.curve, x)) <=
                1e-6 * std::fabs(fit.curve->derivative(x)));
        // Two terms are the B equation, four hold three.
        QVERIFY(fitted(record, "steinhart-hart:2").fit.residualSs > fit.residualSs);
        QVERIFY(fitted(record, "steinhart-hart:4").fit.residualSs < fit.residualSs);
        const Fit four = fitted(record, "steinhart-hart:4").fit;
        const double l = std::log(x);
        const double direct = 1 / (four.coefficients[0].value + four.coefficients[1].value * l +
                                   four.coefficients[2].value * l * l * l + four.coefficients[3].value * l * l) -
                              273.15;
        QVERIFY(std::fabs(four.curve->value(x) - direct) < 1e-7);
    }

    void tableGoesThroughTheMeans() {
        Record record =
            recordOf({{"0", "0", "5", "5", "10", "10"}, {"1.0", "1.2", "2.0", "2.4", "2.9", "3.1"}, {}, {}});
        const Fit fit = fitted(record, "table").fit;
        QCOMPARE(fit.terms(), std::size_t{3});
        for (const auto& [x, y] : {std::pair{0.0, 1.1}, {5.0, 2.2}, {10.0, 3.0}, {2.5, 1.65}})
            QVERIFY(std::fabs(fit.curve->value(x) - y) < 1e-14);
        QCOMPARE(fit.degreesOfFreedom, 3);
    }

    void givesTheReferenceFromTheIndication() {
        Record record = recordOf({{"0", "2", "4", "6"}, {"4.0", "7.2", "10.4", "13.6"}, {}, {}});
        record.choices.fit = FitDirection::Reference;
        const Fit fit = fitted(record, "line").fit;
        QVERIFY(std::fabs(fit.curve->value(10.4) - 4) < 1e-14);
        QCOMPARE(*readBack(fit, 7.2, 1).reference, fit.curve->value(7.2));
    }

    void everyFamilyIsDescribed() {
        QCOMPARE(calibrationFunctions().size(), std::size_t{14});
        for (const FunctionFacts& facts : calibrationFunctions()) {
            QCOMPARE(&factsOf(facts.family), &facts);
            QVERIFY(!facts.formula.empty() && !facts.source.empty());
        }
        QCOMPARE(leastSetPoints(*parseFunctionName("polynomial:4")), std::size_t{5});
        QCOMPARE(leastSetPoints(*parseFunctionName("steinhart-hart")), std::size_t{3});
        const auto names = coefficientNames(*parseFunctionName("polynomial:2"), "bar", "mA", 3);
        QCOMPARE(QString::fromStdString(names[2].unit), QString("mA/bar²"));
    }
};

QTEST_APPLESS_MAIN(CalibrationFunctions)
#include "tst_calibration_functions.moc"
