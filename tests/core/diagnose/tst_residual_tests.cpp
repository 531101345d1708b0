// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Autocorrelation.h"
#include "core/diagnose/Diagnostics.h"
#include "core/diagnose/EqualVariances.h"
#include "core/diagnose/Influence.h"
#include "core/diagnose/Normality.h"
#include "core/diagnose/Outliers.h"
#include "core/fit/fitFunction.h"
#include "tests/support/PublishedSet.h"
#include "tests/support/SampleRecord.h"

#include <Eigen/Eigenvalues>
#include <Eigen/QR>
#include <QTest>

#include <algorithm>
#include <cmath>
#include <numbers>
#include <numeric>

using namespace spanwright;
using namespace spanwright::test;

namespace {

struct Diagnosed {
    Sample sample;
    FitOutcome outcome;
    Diagnostics diagnostics;
};

Diagnosed diagnosed(Record record, const FunctionChoice& function, int outliers = 0) {
    record.choices.function = function;
    Sample sample = makeSample(record, Phase::AsFound);
    auto outcome = fitFunction(sample, record.choices);
    if (!outcome)
        qFatal("no fit");
    Diagnostics found = diagnose(sample, outcome->residuals, outcome->fit, {record.readings->ids(), outliers, 0.05});
    return {std::move(sample), *std::move(outcome), std::move(found)};
}

constexpr FunctionChoice line{FunctionFamily::Line, 0};
constexpr FunctionChoice quadratic{FunctionFamily::Polynomial, 2};
constexpr FunctionChoice constant{FunctionFamily::Constant, 0};

void compare(const PublishedSet& set, const std::string& name, const std::optional<double>& got, double digits) {
    QVERIFY2(got, name.c_str());
    const double agreed = digitsAgreed(*got, set.recomputed.at(name));
    QVERIFY2(agreed >= digits,
             qPrintable(
                 QString("%1: %2 digits, got %3").arg(QString::fromStdString(name)).arg(agreed).arg(*got, 0, 'g', 17)));
}

std::optional<double> statistic(const std::optional<TestResult>& test) {
    return test ? std::optional<double>(test->statistic) : std::nullopt;
}
std::optional<double> pValue(const std::optional<TestResult>& test) {
    return test ? std::optional<double>(test->p) : std::nullopt;
}

std::vector<double> doubles(const std::vector<std::string>& cells) {
    std::vector<double> values;
    for (const auto& cell : cells)
        values.push_back(std::stod(cell));
    return values;
}

/// Columns 1, x, … of a regression with k regressors whose column space is spanned by given eigenvectors of the
/// difference matrix.
std::vector<std::vector<double>> eigenvectorColumns(int n, int k, bool largest) {
    std::vector<std::vector<double>> columns(1, std::vector<double>(static_cast<std::size_t>(n), 1.0));
    for (int j = 1; j <= k; ++j) {
        std::vector<double> column;
        const int which = largest ? n - j : j;
        for (int i = 0; i < n; ++i)
            column.push_back(std::cos(std::numbers::pi * which * (i + 0.5) / n));
        columns.push_back(column);
    }
    return columns;
}

} // namespace

class ResidualTestsTest : public QObject {
    Q_OBJECT

  private slots:
    // A square root on 0, 1, 4, 9, … spans what a line spans on 0, 1, 2, 3, …: the p of Durbin and Watson is the same, and exact.
    void durbinWatsonIsExactForEveryLinearFunctionAndSaysWhenItIsNot() {
        const std::vector<std::string> roots{"0", "1", "2", "3", "4", "5", "6", "7", "8", "9"}, squares{"0", "1", "4", "9", "16", "25", "36", "49", "64", "81"};
        const std::vector<std::string> y{"1.02", "1.48", "2.05", "2.51", "2.97", "3.52", "4.05", "4.46", "5.01", "5.53"};
        const Diagnosed line = diagnosed(recordOf(roots, y), {FunctionFamily::Line, 0});
        const Diagnosed root = diagnosed(recordOf(squares, y), {FunctionFamily::SquareRoot, 0});
        QVERIFY(line.diagnostics.durbinWatsonP && root.diagnostics.durbinWatsonP);
        QVERIFY(std::abs(*line.diagnostics.durbinWatsonP - *root.diagnostics.durbinWatsonP) < 1e-10);
        QVERIFY(root.diagnostics.warnings.empty());
        const Diagnosed bent = diagnosed(recordOf(squares, y), {FunctionFamily::ExponentialApproach, 0});
        QVERIFY(bent.diagnostics.durbinWatsonP && !bent.diagnostics.warnings.empty());
        QCOMPARE(bent.diagnostics.warnings.front().facts.back().value, std::string("linearised"));
    }

    void univariateSetsGiveTheLagOneAutocorrelation_data() {
        QTest::addColumn<QString>("set");
        for (const char* name : {"mavro", "michelso", "numacc1", "numacc2", "numacc3"})
            QTest::newRow(name) << name;
    }
    void univariateSetsGiveTheLagOneAutocorrelation() {
        QFETCH(QString, set);
        const auto published = publishedSet(set);
        const Diagnosed d = diagnosed(recordOf({}, published.column("y")), constant);
        compare(published, "autocorrelation_lag1", d.diagnostics.lag1Autocorrelation, 15);
    }

    void carsInRAgree() {
        const auto set = publishedSet("r_cars_lack_of_fit");
        const Diagnosed d = diagnosed(recordOf(set.column("x"), set.column("y")), line);
        compare(set, "dw.d", d.diagnostics.durbinWatson, 14);
        compare(set, "dw.p_positive", d.diagnostics.durbinWatsonP, 10);
        compare(set, "bp.BP", statistic(d.diagnostics.breuschPagan), 13);
        compare(set, "bp.p", pValue(d.diagnostics.breuschPagan), 12);
        compare(set, "shapiro.W", statistic(d.diagnostics.shapiroWilk), 13);
        compare(set, "shapiro.p", pValue(d.diagnostics.shapiroWilk), 10);
        const Influence influence(d.outcome.residuals, 2);
        for (const std::size_t row : {23, 49}) {
            const std::string index = "[" + std::to_string(row) + "]";
            compare(set, "influence.leverage" + index, d.outcome.residuals.leverage[row - 1], 13);
            const InfluenceFigures figures =
                influence.of(d.outcome.residuals.e.high[row - 1], d.outcome.residuals.leverage[row - 1]);
            compare(set, "influence.standardised_residual" + index, figures.standardised, 13);
            compare(set, "influence.studentised_residual" + index, figures.studentised, 13);
            compare(set, "influence.cook" + index, figures.cook, 13);
        }
    }

    // Several regressors: the exact p of Durbin and Watson by the columns themselves; d as R and lmtest give it.
    void multipleRegressionsInRAgreeOnDurbinWatson_data() {
        QTest::addColumn<QString>("set");
        QTest::newRow("Longley") << "r_longley_diagnostics";
        QTest::newRow("stack loss") << "r_stackloss_diagnostics";
    }
    void multipleRegressionsInRAgreeOnDurbinWatson() {
        QFETCH(QString, set);
        const auto published = publishedSet(set);
        std::vector<std::vector<double>> columns{std::vector<double>(published.rows.size(), 1.0)};
        for (const auto& name : published.columns)
            if (name != "y")
                columns.push_back(doubles(published.column(name)));
        const double d = published.recomputedNumber("dw.d");
        compare(published, "dw.p_positive", durbinWatsonBelow(d, columns), 9);
    }

    // Savin and White, Econometrica 45 (1977), from memory; the bounds are quantiles for regressors that are
    // eigenvectors.
    void durbinWatsonBoundsAreQuantiles() {
        const auto set = publishedSet("durbin_watson_bounds");
        for (const auto& row : set.rows) {
            const std::string key = "[" + row[0] + "," + row[1] + "," + row[2] + "]";
            const int n = std::stoi(row[1]), k = std::stoi(row[2]);
            const double lower =
                durbinWatsonBelow(std::stod(set.recomputed.at("dL" + key)), eigenvectorColumns(n, k, true));
            const double upper =
                durbinWatsonBelow(std::stod(set.recomputed.at("dU" + key)), eigenvectorColumns(n, k, false));
            const double alpha = std::stod(row[0]);
            // The lower bound belongs to the smallest roots, which are left when the regressors take the largest.
            QVERIFY2(std::abs(lower / alpha - 1) < 1e-9, (key + " " + std::to_string(lower)).c_str());
            QVERIFY2(std::abs(upper / alpha - 1) < 1e-9, (key + " " + std::to_string(upper)).c_str());
        }
    }

    // Independent route: Imhof's integral over the eigenvalues themselves, few and many readings.
    void durbinWatsonAgreesWithTheEigenvalues() {
        for (const int n : {4, 7, 15, 40, 150}) {
            std::vector<std::vector<double>> columns(2, std::vector<double>(static_cast<std::size_t>(n), 1.0));
            for (int i = 0; i < n; ++i)
                columns[1][static_cast<std::size_t>(i)] = i * i + 3 * (i % 4);
            Eigen::MatrixXd x(n, 2), a = Eigen::MatrixXd::Zero(n, n);
            for (int i = 0; i < n; ++i) {
                x(i, 0) = 1;
                x(i, 1) = columns[1][static_cast<std::size_t>(i)];
                a(i, i) = i == 0 || i == n - 1 ? 1 : 2;
                if (i > 0)
                    a(i, i - 1) = a(i - 1, i) = -1;
            }
            const Eigen::MatrixXd q = Eigen::HouseholderQR<Eigen::MatrixXd>(x).householderQ();
            const Eigen::MatrixXd rest = q.rightCols(n - 2);
            const Eigen::VectorXd roots =
                Eigen::SelfAdjointEigenSolver<Eigen::MatrixXd>(rest.transpose() * a * rest).eigenvalues();
            for (const double d : {1.2, 1.9, 2.6}) {
                double integral = 0;
                const double h = 0.02;
                for (double s = -30; s < 40; s += h) { // u = exp(s)
                    double angle = 0, size = 0;
                    for (const double root : roots) {
                        const double v = (root - d) * std::exp(s);
                        angle += 0.5 * std::atan(v);
                        size += 0.25 * std::log1p(v * v);
                    }
                    integral += std::sin(angle) * std::exp(-size) * h;
                }
                const double expected = 0.5 - integral / std::numbers::pi;
                QVERIFY(std::abs(durbinWatsonBelow(d, columns) - expected) < 1e-7);
                if (n == 150)
                    QVERIFY(std::abs(durbinWatsonBelowNormal(d, columns, 150) - expected) < 0.005);
            }
        }
    }

    void shapiroAndWilksExampleAgrees() {
        const auto set = publishedSet("shapiro_1965");
        const auto result = shapiroWilk(doubles(set.column("y")));
        compare(set, "W", statistic(result), 13);
        compare(set, "p", pValue(result), 12);
        QVERIFY(agreesAsPrinted(result->statistic, "0.79")); // Biometrika 52 (1965) 591
        QVERIFY(!shapiroWilk({1, 2}));
        QVERIFY(!shapiroWilk({1, 1, 1}));
        // Three values: W = 0.75 … 1 with p = 6/π (asin √W − asin √0.75), exact.
        QCOMPARE(shapiroWilk({0, 1, 2})->statistic, 1.0);
        QVERIFY(std::abs(shapiroWilk({0, 0, 1})->p) < 1e-7);
    }

    void residualsOfPublishedLinesAgree() {
        const auto din = publishedSet("din32645");
        const Diagnosed d = diagnosed(recordOf(din.column(din.columns[0]), din.column(din.columns[1])), line);
        compare(din, "shapiro.W", statistic(d.diagnostics.shapiroWilk), 12);
        compare(din, "shapiro.p", pValue(d.diagnostics.shapiroWilk), 9);
        const auto cell = publishedSet("loadcell");
        const Diagnosed q = diagnosed(recordOf(cell.column("load"), cell.column("deflection")), quadratic);
        compare(cell, "quad_shapiro.W", statistic(q.diagnostics.shapiroWilk), 12);
        compare(cell, "quad_dw.d", q.diagnostics.durbinWatson, 13);
        const auto pipeline = publishedSet("alaska_pipeline");
        const Diagnosed p = diagnosed(recordOf(pipeline.column("lab"), pipeline.column("field")), line);
        compare(pipeline, "line_bp.BP", statistic(p.diagnostics.breuschPagan), 12);
        const auto iron = publishedSet("din38402_iron");
        const Diagnosed i = diagnosed(recordOf(iron.column("x"), iron.column("y")), line);
        compare(iron, "mandel.F", statistic(i.diagnostics.linearity), 14);
        compare(iron, "mandel.p", pValue(i.diagnostics.linearity), 12);
    }

    void insectSpraysAndReplicatesInRAgreeOnEqualVariances() {
        const auto set = publishedSet("r_insectsprays_variances");
        std::vector<std::string> group = set.column("group");
        for (auto& name : group)
            name = std::to_string(name[0] - 'A' + 1);
        const Diagnosed d = diagnosed(recordOf(group, set.column("y")), line);
        compare(set, "var.bartlett_K2", statistic(d.diagnostics.bartlett), 12);
        compare(set, "var.bartlett_p", pValue(d.diagnostics.bartlett), 11);
        compare(set, "var.levene_F", statistic(d.diagnostics.levene), 12);
        compare(set, "var.levene_p", pValue(d.diagnostics.levene), 11);
        compare(set, "var.cochran_C", d.diagnostics.cochran, 13);
    }

    void cadmiumReplicatesAgree() {
        const auto set = publishedSet("cadmium_aas_replicates");
        const Diagnosed d = diagnosed(recordOf(set.column("x"), set.column("y")), line);
        compare(set, "var.bartlett_K2", statistic(d.diagnostics.bartlett), 12);
        compare(set, "var.levene_F", statistic(d.diagnostics.levene), 12);
        compare(set, "var.cochran_C", d.diagnostics.cochran, 12);
        compare(set, "bp.BP", statistic(d.diagnostics.breuschPagan), 12);
    }

    // ISO 5725-2, tables 4 and 5, from memory, three decimals.
    void criticalValuesOfIso5725Agree() {
        const auto set = publishedSet("iso5725_critical_values");
        int compared = 0;
        for (const auto& [name, value] : set.recomputed) {
            const std::size_t open = name.find('[');
            std::vector<double> numbers;
            std::string rest = name.substr(open + 1);
            for (std::size_t at = 0; at < rest.size();) {
                std::size_t used = 0;
                numbers.push_back(std::stod(rest.substr(at), &used));
                at += used + 1;
            }
            const std::string kind = name.substr(0, open);
            double got = 0;
            if (kind == "cochran" || kind == "C")
                got = cochranCriticalValue(numbers[1], numbers[2], numbers[0]);
            else if (kind == "grubbs" || kind == "G")
                got = grubbsCriticalValue(static_cast<std::size_t>(numbers[1]), numbers[0]);
            else
                continue;
            QVERIFY2(digitsAgreed(got, value) > 11, name.c_str());
            ++compared;
        }
        QCOMPARE(compared, static_cast<int>(set.recomputed.size()));
        QVERIFY(agreesAsPrinted(cochranCriticalValue(8, 6, 0.05), "0.3594"));
        QVERIFY(agreesAsPrinted(cochranCriticalValue(8, 6, 0.01), "0.4227"));
    }

    void grubbsOnUraniumReadingsAgrees() {
        const auto set = publishedSet("grubbs_tietjen_moore");
        const Diagnosed d = diagnosed(recordOf({}, set.column("y")), constant);
        QVERIFY(d.diagnostics.grubbs);
        compare(set, "G", d.diagnostics.grubbs->g, 13);
        compare(set, "G_critical_two_sided", d.diagnostics.grubbs->critical, 12);
        QCOMPARE(set.rows[d.diagnostics.grubbs->row - 1][0], std::string("245.57"));
    }

    // Rosner's 54 values (Technometrics 25 (1983) 165; NIST handbook 1.3.5.17.3), from memory, with R and λ as printed
    // there.
    void rosnersExampleFindsThreeOutliers() {
        const char* values[] = {"-0.25", "0.68", "0.94", "1.15", "1.20", "1.26", "1.26", "1.34", "1.38", "1.43", "1.49",
                                "1.49",  "1.55", "1.56", "1.58", "1.65", "1.69", "1.70", "1.76", "1.77", "1.81", "1.91",
                                "1.94",  "1.96", "1.99", "2.06", "2.09", "2.10", "2.14", "2.15", "2.23", "2.24", "2.26",
                                "2.35",  "2.37", "2.40", "2.47", "2.54", "2.62", "2.64", "2.90", "2.92", "2.92", "2.93",
                                "3.21",  "3.26", "3.30", "3.59", "3.68", "4.30", "4.64", "5.34", "5.42", "6.01"};
        const std::vector<std::string> y(std::begin(values), std::end(values));
        const Diagnosed d = diagnosed(recordOf({}, y), constant, 10);
        const char* r[] = {"3.118", "2.942", "3.179", "2.810", "2.815", "2.848", "2.279", "2.310", "2.101", "2.067"};
        const char* lambda[] = {"3.158", "3.151", "3.143", "3.136", "3.128",
                                "3.120", "3.111", "3.103", "3.094", "3.085"};
        QCOMPARE(d.diagnostics.esd.size(), std::size_t{10});
        for (std::size_t i = 0; i < 10; ++i) {
            QVERIFY2(std::abs(d.diagnostics.esd[i].r - std::stod(r[i])) <= 0.00101,
                     r[i]); // the handbook truncates some
            QVERIFY2(std::abs(d.diagnostics.esd[i].lambda - std::stod(lambda[i])) <= 0.00101, lambda[i]);
        }
        QCOMPARE(d.diagnostics.esdCount, 3);
        QCOMPARE(d.diagnostics.esd[0].row, std::size_t{54});
    }

    // Invented readings, figures computed beside them: six readings at eight flows, scatter in proportion to the flow.
    void scatterInProportionToFlowIsSeen() {
        const std::vector<std::pair<const char*, const char*>> rows{
            {"2.002", "0.203"},  {"1.995", "0.200"},  {"2.004", "0.202"},  {"2.002", "0.203"},  {"1.998", "0.201"},
            {"1.999", "0.203"},  {"5.002", "0.497"},  {"4.997", "0.499"},  {"4.999", "0.498"},  {"5.003", "0.500"},
            {"5.005", "0.502"},  {"4.989", "0.499"},  {"10.005", "1.003"}, {"9.997", "1.000"},  {"10.004", "1.000"},
            {"9.985", "0.998"},  {"10.005", "1.002"}, {"9.993", "0.998"},  {"14.991", "1.487"}, {"14.986", "1.500"},
            {"14.977", "1.491"}, {"15.025", "1.501"}, {"14.994", "1.494"}, {"14.992", "1.509"}, {"19.995", "1.985"},
            {"19.966", "1.994"}, {"19.982", "2.002"}, {"20.002", "1.996"}, {"20.017", "2.011"}, {"19.972", "1.993"},
            {"29.974", "2.965"}, {"30.011", "2.996"}, {"30.017", "3.001"}, {"30.089", "3.024"}, {"30.047", "2.997"},
            {"30.005", "2.997"}, {"39.934", "3.970"}, {"39.994", "4.018"}, {"40.000", "3.992"}, {"40.056", "4.026"},
            {"39.919", "3.982"}, {"39.973", "3.969"}, {"49.911", "5.011"}, {"50.003", "4.979"}, {"50.005", "5.010"},
            {"50.062", "4.997"}, {"49.961", "5.015"}, {"50.081", "5.002"}};
        const char* nominal[] = {"2", "5", "10", "15", "20", "30", "40", "50"};
        Record record;
        for (std::size_t i = 0; i < rows.size(); ++i) {
            Reading reading;
            reading.id = record.nextReadingId++;
            reading.setPoint = number(nominal[i / 6]);
            reading.reference = number(rows[i].first);
            reading.indication = number(rows[i].second);
            record.readings.edit().append(reading);
        }
        const Diagnosed d = diagnosed(record, line);
        QVERIFY2(std::abs(*d.diagnostics.cochran - 0.397) < 0.0006,
                 qPrintable(QString::number(*d.diagnostics.cochran)));
        QVERIFY(agreesAsPrinted(*d.diagnostics.cochranCritical, "0.359"));
        QVERIFY(agreesAsPrinted(*d.diagnostics.cochranCriticalOutlier, "0.423"));
        QVERIFY(d.diagnostics.bartlett->p < 1e-6);
        QVERIFY(d.diagnostics.breuschPagan->p < 0.05);
    }

    void orderShiftAndScaleDoNotMatterWhereTheyShouldNot() {
        const auto set = publishedSet("r_cars_lack_of_fit");
        const Diagnosed d = diagnosed(recordOf(set.column("x"), set.column("y")), line);
        std::vector<std::string> x = set.column("x"), y = set.column("y");
        std::reverse(x.begin(), x.end());
        std::reverse(y.begin(), y.end());
        for (auto& value : y)
            value += "000"; // a thousand times larger
        const Diagnosed r = diagnosed(recordOf(x, y), line);
        QVERIFY(digitsAgreed(*r.diagnostics.durbinWatson, *d.diagnostics.durbinWatson) > 13);
        QVERIFY(digitsAgreed(*r.diagnostics.lag1Autocorrelation, *d.diagnostics.lag1Autocorrelation) > 13);
        QVERIFY(digitsAgreed(r.diagnostics.shapiroWilk->statistic, d.diagnostics.shapiroWilk->statistic) > 13);
        QVERIFY(digitsAgreed(r.diagnostics.breuschPagan->statistic, d.diagnostics.breuschPagan->statistic) > 12);
        QVERIFY(digitsAgreed(r.diagnostics.linearity->statistic, d.diagnostics.linearity->statistic) > 13);
        QCOMPARE(r.diagnostics.grubbs->row, 51 - d.diagnostics.grubbs->row);
    }

    // Very many readings are computed in plain doubles, by other routes.
    void plainDoublesAgreeWithDoubleDoubles() {
        const auto set = publishedSet("alaska_pipeline");
        Diagnosed d = diagnosed(recordOf(set.column("lab"), set.column("field")), line);
        const auto exact = d.diagnostics;
        d.sample.reference.low.clear();
        d.sample.indication.low.clear();
        d.outcome.residuals.e.low.clear();
        const Diagnostics plain = diagnose(d.sample, d.outcome.residuals, d.outcome.fit, {{}, 0, 0.05});
        QVERIFY(digitsAgreed(*plain.durbinWatson, *exact.durbinWatson) > 12);
        QVERIFY(digitsAgreed(*plain.lag1Autocorrelation, *exact.lag1Autocorrelation) > 12);
        QVERIFY(digitsAgreed(plain.linearity->statistic, exact.linearity->statistic) > 9);
        QVERIFY(digitsAgreed(plain.grubbs->g, exact.grubbs->g) > 12);
        QCOMPARE(plain.grubbs->row, exact.grubbs->row);
    }

    void manyReadingsInGroupsHaveExactMedians() {
        std::vector<double> u;
        std::vector<std::int32_t> group;
        unsigned seed = 5;
        for (int i = 0; i < 30'001; ++i) {
            seed = seed * 1664525u + 1013904223u;
            u.push_back(std::floor(static_cast<double>(seed >> 8) / 4096) * (1 + i % 7)); // with ties
            group.push_back(i / 5000);
        }
        const EqualVariances fast = equalVariances({u, group, 7});
        double n = 0, sum = 0, within = 0, between = 0;
        std::vector<std::vector<double>> parts(6);
        for (std::size_t i = 0; i < 30'000; ++i) // the last group has one value and takes no part
            parts[static_cast<std::size_t>(group[i])].push_back(u[i]);
        for (auto& part : parts) {
            std::sort(part.begin(), part.end());
            const double median = (part[2499] + part[2500]) / 2;
            for (double& value : part) {
                value = std::abs(value - median);
                sum += value;
            }
            n += static_cast<double>(part.size());
        }
        for (const auto& part : parts) {
            const double mean = std::accumulate(part.begin(), part.end(), 0.0) / 5000;
            between += 5000 * (mean - sum / n) * (mean - sum / n);
            for (const double value : part)
                within += (value - mean) * (value - mean);
        }
        QVERIFY(digitsAgreed(fast.levene->statistic, (between / 5) / (within / (n - 6))) > 11);
        std::vector<double> x(u.size());
        for (std::size_t i = 0; i < x.size(); ++i)
            x[i] = static_cast<double>(i % 100);
        QVERIFY(digitsAgreed(breuschPagan(u, std::span<const double>(x))->statistic,
                             breuschPagan(u, std::vector<std::vector<double>>{x})->statistic) > 9);
    }

    void aPerfectLineIsNotDiagnosed() {
        const Diagnosed d = diagnosed(recordOf({"0", "1", "2", "3"}, {"0.1", "0.4", "0.7", "1.0"}), line);
        QVERIFY(!d.diagnostics.durbinWatson && !d.diagnostics.shapiroWilk && !d.diagnostics.grubbs);
    }
};

QTEST_APPLESS_MAIN(ResidualTestsTest)
#include "tst_residual_tests.moc"
