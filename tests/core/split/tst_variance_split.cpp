// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/fitFunction.h"
#include "core/split/NoiseChain.h"
#include "core/split/VarianceSplit.h"
#include "tests/support/Paths.h"
#include "tests/support/PublishedSet.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/SampleTable.h"

#include <QFile>
#include <QTest>

#include <algorithm>
#include <cmath>
#include <map>
#include <numeric>

using namespace spanwright;
using spanwright::test::digitsAgreed;
using spanwright::test::number;

namespace {

struct Split {
    Sample sample;
    FitOutcome outcome;
    VarianceSplit split;
};

Split splitOf(const Record& record, const FunctionChoice& function) {
    Record chosen = record;
    chosen.choices.function = function;
    Sample sample = makeSample(chosen, Phase::AsFound);
    auto outcome = fitFunction(sample, chosen.choices);
    if (!outcome)
        qFatal("no fit");
    VarianceSplit split = splitVariance(sample, outcome->residuals, outcome->fit);
    return {std::move(sample), *std::move(outcome), std::move(split)};
}

constexpr FunctionChoice line{FunctionFamily::Line, 0};
constexpr FunctionChoice quadratic{FunctionFamily::Polynomial, 2};

/// One reading as it stands in a small table of a test.
struct Row {
    const char *setPoint, *reference, *indication;
    Direction direction = Direction::Unknown;
    int run = 0;
    const char* u = nullptr;
};

Record recordOf(const std::vector<Row>& rows) {
    Record record;
    for (const Row& row : rows) {
        Reading reading;
        reading.id = record.nextReadingId++;
        reading.run = row.run;
        reading.direction = row.direction;
        reading.setPoint = number(row.setPoint);
        reading.reference = number(row.reference);
        reading.indication = number(row.indication);
        if (row.u)
            reading.uIndication = number(row.u);
        record.readings.edit().append(reading);
    }
    return record;
}

/// tests/core/split/unbalanced.csv: set_point,direction,run,reference,indication,u.
Record unbalancedRecord(bool nominal) {
    Record record;
    QFile file(QString::fromStdString(spanwright::test::sourceDir()) + "/tests/core/split/unbalanced.csv");
    if (!file.open(QIODevice::ReadOnly))
        qFatal("no unbalanced.csv");
    file.readLine();
    while (!file.atEnd()) {
        const QList<QByteArray> cells = file.readLine().trimmed().split(',');
        Reading reading;
        reading.id = record.nextReadingId++;
        reading.setPoint = number(cells[0].constData());
        reading.direction = cells[1] == "rising" ? Direction::Rising : Direction::Falling;
        reading.run = cells[2].toInt();
        reading.reference = number(cells[nominal ? 0 : 3].constData());
        reading.indication = number(cells[4].constData());
        reading.uIndication = number(cells[5].constData());
        record.readings.edit().append(reading);
    }
    return record;
}

/// What R printed: case → name → value.
std::map<std::string, std::map<std::string, double>> figuresOfR() {
    std::map<std::string, std::map<std::string, double>> figures;
    QFile file(QString::fromStdString(spanwright::test::sourceDir()) + "/tests/core/split/nested_models.txt");
    if (!file.open(QIODevice::ReadOnly))
        qFatal("no nested_models.txt");
    while (!file.atEnd()) {
        const QList<QByteArray> words = file.readLine().trimmed().split(' ');
        figures[words[0].toStdString()][words[1].toStdString()] = words[2].toDouble();
    }
    return figures;
}

/// Whether a figure rounds to what is printed, within half a unit of its last digit.
bool prints(double got, const std::string& printed) {
    return spanwright::test::agreesAsPrinted(got, printed);
}

double partsSum(const VarianceSplit& s) {
    double sum = s.regression.ss;
    for (const auto* part : {&s.lackOfFit, &s.hysteresis, &s.runOffset, &s.runSlope, &s.repeatability})
        sum += *part ? (*part)->ss : 0;
    return sum;
}

} // namespace

class VarianceSplitTest : public QObject {
    Q_OBJECT

  private slots:
    // Invented readings; the figures were computed beside them from readings moved to the nominal pressure, without run
    // slopes.
    void pressureTransmitterGivesTheFiguresOfItsDescription() {
        const VarianceSplit s = splitOf(spanwright::test::pressureTransmitter(), line).split;
        QVERIFY(s.lackOfFit && s.pureError && s.hysteresis && s.runOffset && s.runSlope && s.repeatability);
        QCOMPARE(s.total.df, 65);
        QCOMPARE(s.residual.df, 64);
        QCOMPARE(s.lackOfFit->df, 9);
        QCOMPARE(s.pureError->df, 55);
        QCOMPARE(s.hysteresis->df, 11);
        QCOMPARE(s.runOffset->df, 2);
        QCOMPARE(s.runSlope->df, 2);
        QCOMPARE(s.repeatability->df, 40);
        QVERIFY(prints(s.residual.ss, "0.001501"));
        QVERIFY(prints(s.pureError->ss, "0.001263"));
        QVERIFY(prints(s.hysteresis->ss, "0.001160"));
        QVERIFY(std::abs(s.lackOfFit->ss - 2.386e-4) < 0.0005e-4);
        QVERIFY(std::abs(s.runOffset->ss - 4.635e-5) < 0.0005e-5);
        QVERIFY(prints(*s.lackOfFit->f, "19.2"));
        QVERIFY(prints(*s.lackOfFitNaive->f, "1.15"));
        QVERIFY(prints(*s.lackOfFitNaive->p, "0.34"));
        QVERIFY(prints(*s.runSlope->f, "0.52"));
        QVERIFY(prints(*s.runSlope->p, "0.6"));
        // Without run slopes the rest is repeatability and slope together.
        const double rest = (s.runSlope->ss + s.repeatability->ss) / 42;
        QVERIFY(std::abs(rest * 42 - 5.677e-5) < 0.0005e-5);
        QVERIFY(prints(s.lackOfFit->ss / 9 / rest, "19.6"));
        QVERIFY(prints(s.runOffset->ss / 2 / rest, "17.1")); // 17.15: the quotient of 4.635e-5/2 and 5.677e-5/42
        QVERIFY(prints(s.hysteresis->ss / 11 / rest, "78"));
        QVERIFY(prints(std::sqrt(rest), "0.00116"));
        QVERIFY(!s.lackOfFitAdjusted); // balanced
        QCOMPARE(s.against, SplitPart::Repeatability);

        const VarianceSplit curved = splitOf(spanwright::test::pressureTransmitter(), quadratic).split;
        const double curvedRest = (curved.runSlope->ss + curved.repeatability->ss) / 42;
        QVERIFY(prints(curved.lackOfFit->ss / curved.lackOfFit->df / curvedRest, "0.91"));
    }

    // GUM-like closed forms for m points, 2 directions, R runs, one reading each (common textbook forms, balanced
    // two-way layouts).
    void balancedReadingsAgreeWithTheClosedForms() {
        const Split made = splitOf(spanwright::test::pressureTransmitter(), quadratic);
        const auto& sample = made.sample;
        const auto e = [&](std::size_t i) { return made.outcome.residuals.e.high[i]; };
        double mean[11][2] = {}, run[4] = {}, all = 0;
        for (std::size_t i = 0; i < 66; ++i) {
            mean[sample.group[i]][sample.direction[i] == Direction::Rising ? 0 : 1] += e(i) / 3;
            run[sample.run[i]] += e(i) / 22;
            all += e(i) / 66;
        }
        double hysteresis = 0, offsets = 0;
        for (auto& point : mean)
            hysteresis += 1.5 * (point[0] - point[1]) * (point[0] - point[1]);
        for (int r = 1; r <= 3; ++r)
            offsets += 22 * (run[r] - all) * (run[r] - all);
        QVERIFY(digitsAgreed(made.split.hysteresis->ss, hysteresis) > 12);
        QVERIFY(digitsAgreed(made.split.runOffset->ss, offsets) > 11);

        const double error = *made.split.repeatability->ms;
        for (const VarianceComponent& component : made.split.components) {
            if (component.part == SplitPart::RunOffset)
                QVERIFY(digitsAgreed(component.variance, (offsets / 2 - error) / 22) > 10);
            if (component.part == SplitPart::Hysteresis)
                QVERIFY(digitsAgreed(component.variance, (hysteresis / 11 - error) / 3) > 10);
            if (component.part == SplitPart::Repeatability)
                QVERIFY(digitsAgreed(component.variance, error) > 14);
            QVERIFY(component.low && component.high && *component.low < std::sqrt(component.variance) &&
                    std::sqrt(component.variance) < *component.high);
        }
        QCOMPARE(made.split.components.size(), std::size_t{3});
        double share = 0;
        for (const VarianceComponent& component : made.split.components)
            share += component.shareOfNoise;
        QVERIFY(std::abs(share - 1) < 1e-14);

        for (const RunLine& one : made.split.runs)
            QVERIFY(std::abs(one.offset - (run[one.run] - all)) < 1e-14);
        for (const SetPointMeans& point : made.split.setPoints)
            QVERIFY(std::abs(*point.rising - mean[static_cast<int>(point.setPoint)][0]) < 1e-15);
    }

    // Invented readings of a rotated load cell (runs 1, 3 and 4), figures computed beside them: sample-data/README.md.
    void rotatedLoadCellShowsThatItsRunsDifferInGain() {
        const char* force[] = {"5", "10", "15", "20", "25", "30", "35", "40", "45", "50"};
        const char* signal[3][10] = {{"0.199886", "0.399828", "0.599774", "0.799798", "0.999860", "1.199902",
                                      "1.400034", "1.600168", "1.800352", "2.000594"},
                                     {"0.199890", "0.399824", "0.599800", "0.799814", "0.999840", "1.199928",
                                      "1.400050", "1.600210", "1.800420", "2.000634"},
                                     {"0.199902", "0.399816", "0.599756", "0.799762", "0.999812", "1.199860",
                                      "1.400000", "1.600160", "1.800354", "2.000572"}};
        std::vector<Row> rows;
        for (int r = 0; r < 3; ++r)
            for (int i = 0; i < 10; ++i)
                rows.push_back({force[i], force[i], signal[r][i], Direction::Rising, r == 0 ? 1 : r + 2});
        const VarianceSplit s = splitOf(recordOf(rows), line).split;
        QVERIFY(!s.hysteresis);
        QVERIFY(prints(*s.lackOfFitNaive->f, "103"));
        QVERIFY(prints(*s.lackOfFit->f, "388"));
        QVERIFY(prints(*s.runOffset->f, "23.6"));
        QVERIFY(prints(*s.runSlope->f, "6.2"));
        QVERIFY(prints(*s.runSlope->p, "0.01"));
        QVERIFY(std::abs(std::sqrt(*s.repeatability->ms) - 1.35e-5) < 0.005e-5);
        const VarianceSplit curved = splitOf(recordOf(rows), quadratic).split;
        QVERIFY(prints(*curved.lackOfFit->f, "0.73"));
    }

    void unbalancedReadingsAgreeWithNestedModelsInR_data() {
        QTest::addColumn<QString>("which");
        QTest::addColumn<int>("degree");
        QTest::addColumn<bool>("nominal");
        QTest::addColumn<bool>("weighted");
        QTest::newRow("line") << "line" << 1 << false << false;
        QTest::newRow("quadratic on the set points") << "nominal_quadratic" << 2 << true << false;
        QTest::newRow("weighted quadratic") << "weighted_quadratic" << 2 << false << true;
        QTest::newRow("weighted quadratic, readings excluded") << "excluded_weighted_quadratic" << 2 << false << true;
        QTest::newRow("square root, linear and no polynomial") << "square_root" << 0 << false << false;
        QTest::newRow("lm and anova") << "anova" << 2 << true << false;
    }
    void unbalancedReadingsAgreeWithNestedModelsInR() {
        QFETCH(QString, which);
        QFETCH(int, degree);
        QFETCH(bool, nominal);
        QFETCH(bool, weighted);
        const auto figures = figuresOfR().at(which.toStdString());
        Record record = unbalancedRecord(nominal);
        if (weighted)
            record.choices.weights = Weights::Stated;
        for (const ReadingId id : record.readings->ids()) {
            const bool named = id == 5 || id == 17 || id == 18 || id == 40, atZero = record.readings->row(id - 1).setPoint->mantissa == 0;
            if (degree == 0 ? atZero : named && which.startsWith("excluded"))
                record.exclusions.edit().add({id, ExclusionReason::Disturbance, {}, {}, 0});
        }
        const FunctionChoice function = degree == 0 ? FunctionChoice{FunctionFamily::SquareRoot, 0} : FunctionChoice{FunctionFamily::Polynomial, degree};
        const VarianceSplit s = splitOf(record, function).split;
        QVERIFY(std::none_of(s.warnings.begin(), s.warnings.end(), [](const Warning& w) { return w.code == WarningCode::ApproximateMethod; }));
        const std::map<std::string, const SplitRow*> rows{
            {"residual", &s.residual},     {"lack_of_fit", &*s.lackOfFit}, {"hysteresis", &*s.hysteresis},
            {"run_offset", &*s.runOffset}, {"run_slope", &*s.runSlope},    {"repeatability", &*s.repeatability},
            {"pure_error", &*s.pureError}, {"naive", &*s.lackOfFitNaive},  {"adjusted", &*s.lackOfFitAdjusted}};
        for (const auto& [name, expected] : figures) {
            const std::size_t dot = name.find('.');
            const SplitRow& row = *rows.at(name.substr(0, dot));
            const std::string part = name.substr(dot + 1);
            const double got = part == "ss" ? row.ss : part == "df" ? row.df : part == "f" ? *row.f : *row.p;
            const double digits = digitsAgreed(got, expected);
            QVERIFY2(digits > 8, qPrintable(QString("%1: %2, R has %3")
                                                .arg(QString::fromStdString(name))
                                                .arg(got, 0, 'g', 15)
                                                .arg(expected, 0, 'g', 15)));
        }
    }

    // Exact by linear theory or said to be approximate, with the reason.
    void adjustedLackOfFitSaysWhenItIsApproximate() {
        const auto reason = [](const VarianceSplit& s) {
            for (const Warning& warning : s.warnings)
                if (warning.code == WarningCode::ApproximateMethod)
                    return warning.facts.back().value;
            return std::string();
        };
        Record record = unbalancedRecord(false);
        QCOMPARE(reason(splitOf(record, line).split), std::string());
        const Split bent = splitOf(record, {FunctionFamily::ExponentialApproach, 0});
        QVERIFY(bent.split.lackOfFitAdjusted && bent.split.lackOfFitAdjusted->f);
        QCOMPARE(reason(bent.split), std::string("linearised"));
        record.choices.fit = FitDirection::Reference;
        const Split turned = splitOf(record, line);
        QVERIFY(turned.split.lackOfFitAdjusted && turned.split.lackOfFitAdjusted->f);
        QCOMPARE(reason(turned.split), std::string("mean-indication"));
        // The two ways round tell the same story: the line is bent, and by about as much.
        const VarianceSplit forward = splitOf(unbalancedRecord(false), line).split;
        QVERIFY(std::abs(*turned.split.lackOfFitAdjusted->f / *forward.lackOfFitAdjusted->f - 1) < 0.02);
    }

    void publishedLackOfFitAndOneWaySplits_data() {
        QTest::addColumn<QString>("set");
        QTest::addColumn<QString>("x");
        QTest::addColumn<QString>("y");
        QTest::addColumn<int>("degree");
        QTest::addColumn<QString>("prefix");
        QTest::newRow("load cell, line: NIST handbook 4.6.1") << "loadcell"
                                                              << "load"
                                                              << "deflection" << 1 << "line_lof.";
        QTest::newRow("load cell, quadratic") << "loadcell"
                                              << "load"
                                              << "deflection" << 2 << "quad_lof.";
        QTest::newRow("stopping distances of cars") << "r_cars_lack_of_fit"
                                                    << "x"
                                                    << "y" << 1 << "lof.";
        QTest::newRow("arsenic") << "arsenic_inverse"
                                 << "x"
                                 << "y" << 1 << "lof.";
        QTest::newRow("Toluca company") << "toluca_working_hotelling"
                                        << "x"
                                        << "y" << 1 << "lof.";
        QTest::newRow("Alaska pipeline") << "alaska_pipeline"
                                         << "lab"
                                         << "field" << 1 << "line_lof.";
    }
    void publishedLackOfFitAndOneWaySplits() {
        QFETCH(QString, set);
        QFETCH(QString, x);
        QFETCH(QString, y);
        QFETCH(int, degree);
        QFETCH(QString, prefix);
        const auto published = spanwright::test::publishedSet(set);
        const std::string xName = x.toStdString();
        std::string yName = y.toStdString();
        if (std::find(published.columns.begin(), published.columns.end(), yName) == published.columns.end())
            yName = published.columns.back();
        const Record record = spanwright::test::recordOf(published.column(xName), published.column(yName));
        const VarianceSplit s = splitOf(record, {FunctionFamily::Polynomial, degree}).split;
        const std::string p = prefix.toStdString();
        QVERIFY(digitsAgreed(s.lackOfFit->ss, published.recomputed.at(p + "ss_lack_of_fit")) > 13);
        QVERIFY(digitsAgreed(s.pureError->ss, published.recomputed.at(p + "ss_pure_error")) > 13);
        QVERIFY(digitsAgreed(*s.lackOfFit->f, published.recomputed.at(p + "F")) > 13);
        QVERIFY(digitsAgreed(*s.lackOfFit->p, published.recomputed.at(p + "p")) > 8);
        QCOMPARE(s.against, SplitPart::PureError);
    }

    // NIST reference data sets and handbook 7.4.3, InsectSprays in R: the sum within groups is pure error, whatever the
    // line.
    void publishedOneWaySplits_data() {
        QTest::addColumn<QString>("set");
        QTest::addColumn<QString>("prefix");
        for (const char* name : {"sirstv", "smls01", "smls02", "smls04", "smls05", "smls07", "handbook_anova"})
            QTest::newRow(name) << name << "";
        QTest::newRow("r_insectsprays_variances") << "r_insectsprays_variances"
                                                  << "anova.";
    }
    void publishedOneWaySplits() {
        QFETCH(QString, set);
        QFETCH(QString, prefix);
        const auto published = spanwright::test::publishedSet(set);
        const bool first = published.columns.front() != "y";
        std::vector<std::string> group = published.column(published.columns[first ? 0 : 1]);
        std::vector<std::string> names = group;
        std::sort(names.begin(), names.end());
        names.erase(std::unique(names.begin(), names.end()), names.end());
        for (auto& name : group)
            name = std::to_string(std::find(names.begin(), names.end(), name) - names.begin() + 1);
        const Record record = spanwright::test::recordOf(group, published.column(published.columns[first ? 1 : 0]));
        const VarianceSplit s = splitOf(record, line).split;
        const std::string p = prefix.toStdString();
        QVERIFY(digitsAgreed(s.pureError->ss, published.recomputed.at(p + "ss_within")) > 14);
        QVERIFY(digitsAgreed(s.regression.ss + s.lackOfFit->ss, published.recomputed.at(p + "ss_between")) > 14);
    }

    // GUM H.5: ten days of five voltages, known by daily mean and standard deviation; mean − s twice, mean, mean + s
    // twice have both. Days as set points of a constant give its F, days as runs its between-day component.
    void voltagesOfTenDaysSplitAsInTheGum() {
        const auto set = spanwright::test::publishedSet("gum_h5");
        Record days, runs;
        for (const auto& row : set.rows)
            for (const int step : {-1, -1, 0, 1, 1}) {
                Decimal value = number(row[1].c_str());
                value.mantissa += step * number(row[2].c_str()).mantissa;
                Reading reading;
                reading.id = days.nextReadingId++;
                reading.indication = value;
                reading.setPoint = number(row[0].c_str());
                days.readings.edit().append(reading);
                reading.setPoint = number("10");
                reading.run = std::stoi(row[0]);
                runs.readings.edit().append(reading);
            }
        const VarianceSplit byDay = splitOf(days, {FunctionFamily::Constant, 0}).split;
        QCOMPARE(byDay.lackOfFit->df, 9);
        QCOMPARE(byDay.pureError->df, 40);
        QVERIFY(digitsAgreed(*byDay.lackOfFit->f, set.recomputed.at("F")) > 12);
        QVERIFY(digitsAgreed(*byDay.lackOfFit->p, set.recomputed.at("p")) > 10);
        QVERIFY(digitsAgreed(std::sqrt(*byDay.pureError->ms), set.recomputed.at("s_b")) > 13);
        const VarianceSplit byRun = splitOf(runs, {FunctionFamily::Constant, 0}).split;
        QVERIFY(digitsAgreed(*byRun.runOffset->f, set.recomputed.at("F")) > 12);
        QVERIFY(!byRun.lackOfFit && !byRun.runSlope);
        QCOMPARE(byRun.components.front().part, SplitPart::RunOffset);
        QVERIFY(digitsAgreed(std::sqrt(byRun.components.front().variance), set.recomputed.at("s_between")) > 12);
    }

    // sample-data/temperature-probe.csv: invented platinum readings with the curvature of IEC 60751, figures computed
    // beside them.
    void temperatureProbeBendsThoughItLooksStraight() {
        const Record record = spanwright::test::sampleTable("temperature-probe.csv");
        const Split straight = splitOf(record, line), curved = splitOf(record, quadratic);
        QVERIFY(std::abs(straight.outcome.fit.residualSd - 0.333) < 0.0005);
        QVERIFY(std::abs(*straight.split.lackOfFit->f / 1.8e5 - 1) < 0.03);
        QVERIFY(std::abs(curved.outcome.fit.residualSd - 0.00170) < 0.00001);
        QVERIFY(std::abs(*curved.split.lackOfFit->f - 0.16) < 0.05);
        QCOMPARE(straight.split.against, SplitPart::PureError);
    }

    // By hand: at 0, 1, 2 the readings 0 2 | 1 1 | 0 4 about the line through their means.
    void aSmallSetComesOutAsByHand() {
        const Record record = recordOf(
            {{"0", "0", "0"}, {"0", "0", "2"}, {"1", "1", "1"}, {"1", "1", "1"}, {"2", "2", "0"}, {"2", "2", "4"}});
        // Means 1, 1, 2: line 5/6 + x/2, so 1/6, −1/3, 1/6 twice each: lack of fit 2(1/36 + 4/36 + 1/36) = 1/3; within
        // 2 + 0 + 8.
        const VarianceSplit s = splitOf(record, line).split;
        QVERIFY(std::abs(s.lackOfFit->ss - 1.0 / 3) < 1e-15);
        QVERIFY(std::abs(s.pureError->ss - 10) < 1e-14);
        QVERIFY(std::abs(s.regression.ss - 1) < 1e-14);
        QVERIFY(std::abs(*s.lackOfFit->f - 0.1) < 1e-15);
        QCOMPARE(s.lackOfFit->df, 1);
        QCOMPARE(s.pureError->df, 3);
    }

    void theChainAddsUpAndDoesNotMindOrderShiftOrScale() {
        const Record record = unbalancedRecord(false);
        const VarianceSplit s = splitOf(record, line).split;
        QVERIFY(std::abs(partsSum(s) / s.total.ss - 1) < 1e-15);
        QVERIFY(std::abs((s.hysteresis->ss + s.runOffset->ss + s.runSlope->ss + s.repeatability->ss) / s.pureError->ss -
                         1) < 1e-13);

        Record moved;
        for (std::size_t i = record.readings->size(); i-- > 0;) {
            Reading reading = record.readings->row(i);
            reading.id = moved.nextReadingId++;
            reading.run += 40;
            reading.indication->mantissa = reading.indication->mantissa * 10 + 70000; // thrice decimals, ×1; +7.0000
            reading.indication->decimals += 1;
            moved.readings.edit().append(reading);
        }
        const VarianceSplit t = splitOf(moved, line).split;
        QVERIFY(digitsAgreed(t.lackOfFit->ss, s.lackOfFit->ss) > 13);
        QVERIFY(digitsAgreed(t.hysteresis->ss, s.hysteresis->ss) > 13);
        QVERIFY(digitsAgreed(t.runOffset->ss, s.runOffset->ss) > 13);
        QVERIFY(digitsAgreed(t.runSlope->ss, s.runSlope->ss) > 13);
        QVERIFY(digitsAgreed(*t.lackOfFitAdjusted->f, *s.lackOfFitAdjusted->f) > 10);
    }

    void whatTheReadingsCannotGiveIsSaid() {
        const auto has = [](const VarianceSplit& s, WarningCode code) {
            return std::any_of(s.warnings.begin(), s.warnings.end(), [&](const Warning& w) { return w.code == code; });
        };
        const VarianceSplit lone = splitOf(recordOf({{"0", "0", "0"}, {"1", "1", "1.1"}, {"2", "2", "2"}}), line).split;
        QVERIFY(!lone.pureError && !lone.lackOfFit && !lone.repeatability);
        QVERIFY(has(lone, WarningCode::NoReplicates));

        // One run up and down: the gap takes every degree of freedom, so nothing is left to test against.
        std::vector<Row> once;
        const char* x[] = {"0", "1", "2", "3"};
        const char* up[] = {"0.0", "1.0", "2.1", "3.0"};
        const char* down[] = {"0.1", "1.2", "2.2", "3.0"};
        for (int i = 0; i < 4; ++i) {
            once.push_back({x[i], x[i], up[i], Direction::Rising, 1});
            once.push_back({x[i], x[i], down[i], Direction::Falling, 1});
        }
        const VarianceSplit single = splitOf(recordOf(once), line).split;
        QVERIFY(single.hysteresis && !single.repeatability && !single.runOffset);
        QCOMPARE(single.hysteresis->df, 4);
        QVERIFY(!single.hysteresis->f && !single.lackOfFit->f && single.lackOfFitNaive->f);
        QVERIFY(has(single, WarningCode::OneRun) && has(single, WarningCode::FigureUndefined));

        // Two set points under a line: nothing is left over for lack of fit.
        const VarianceSplit two =
            splitOf(recordOf({{"0", "0", "0"}, {"0", "0", "0.2"}, {"1", "1", "1"}, {"1", "1", "1.1"}}), line).split;
        QVERIFY(two.pureError && !two.lackOfFit);
        QVERIFY(has(two, WarningCode::OneDirection));
    }

    void aPerfectLineLeavesNothingAndIsNotTested() {
        const VarianceSplit s =
            splitOf(
                recordOf(
                    {{"0", "0", "0.1"}, {"0", "0", "0.1"}, {"1", "1", "0.4"}, {"1", "1", "0.4"}, {"2", "2", "0.7"}}),
                line)
                .split;
        QCOMPARE(s.residual.ss, 0.0);
        QCOMPARE(s.lackOfFit->ss, 0.0);
        QCOMPARE(s.pureError->ss, 0.0);
        QVERIFY(!s.lackOfFit->f && !s.regression.f);
    }
};

QTEST_APPLESS_MAIN(VarianceSplitTest)
#include "tst_variance_split.moc"
