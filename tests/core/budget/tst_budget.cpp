// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/Combine.h"
#include "core/budget/makeBudget.h"
#include "core/verdict/makeVerdict.h"
#include "tests/support/PublishedSet.h"
#include "tests/support/SampleRecord.h"

#include <QTest>

#include <cmath>
#include <limits>

using namespace spanwright;
using test::agreesAsPrinted;
using test::digitsAgreed;
using test::number;

namespace {

constexpr double Infinite = std::numeric_limits<double>::infinity();

class StraightLine : public FittedFunction {
  public:
    StraightLine(double constant, double slope, double s) : constant_(constant), slope_(slope), s_(s) {}
    [[nodiscard]] double value(double x) const override { return constant_ + slope_ * x; }
    [[nodiscard]] double derivative(double) const override { return slope_; }
    [[nodiscard]] double variance(double x) const override { return s_ * s_ / 66 * (1 + (x - 5) * (x - 5) / 10); }
    [[nodiscard]] double readingVariance(double) const override { return s_ * s_; }

  private:
    double constant_, slope_, s_;
};

/// The line of the sample's 66 readings (least squares, computed separately with exact rationals).
Fit sampleLine() {
    Fit fit;
    fit.curve = std::make_shared<StraightLine>(3.99943, 1.600102, 0.00484);
    fit.residualSd = 0.00484;
    fit.degreesOfFreedom = 64;
    fit.low = 0;
    fit.high = 10;
    return fit;
}

/// The split of the sample's spread by the closed forms for balanced data: 11 points, 2 directions, 3 runs.
VarianceSplit sampleSplit() {
    VarianceSplit split;
    split.repeatability = SplitRow{5.677e-5, 42, {}, {}, {}};
    split.runOffset = SplitRow{4.635e-5, 2, {}, {}, {}};
    split.hysteresis = SplitRow{1.160e-3, 11, {}, {}, {}};
    split.pureError = SplitRow{1.263e-3, 55, {}, {}, {}};
    VarianceComponent runs;
    runs.part = SplitPart::RunOffset;
    runs.variance = (4.635e-5 / 2 - 5.677e-5 / 42) / 22;
    runs.degreesOfFreedom = 2;
    split.components = {runs};
    return split;
}

Sample sampleOf(const Record& record, Phase phase) {
    Sample sample;
    const ReadingColumns& readings = *record.readings;
    for (std::size_t i = 0; i < readings.size(); ++i) {
        if (readings.phases()[i] != phase || record.exclusions->contains(readings.ids()[i]))
            continue;
        const Reading reading = readings.row(i);
        sample.rows.push_back(i);
        sample.reference.push_back(reading.reference->toDoubleDouble());
        sample.indication.push_back(reading.indication->toDoubleDouble());
        sample.run.push_back(reading.run);
        sample.direction.push_back(reading.direction);
        const double setPoint = reading.setPoint->toDouble();
        auto at = std::find(sample.groupValue.begin(), sample.groupValue.end(), setPoint);
        if (at == sample.groupValue.end())
            at = sample.groupValue.insert(at, setPoint);
        sample.group.push_back(static_cast<std::int32_t>(at - sample.groupValue.begin()));
    }
    return sample;
}

const SetPointBudget& at(const Budget& budget, double setPoint, Direction direction) {
    for (const SetPointBudget& point : budget.points)
        if (point.setPoint == setPoint && point.direction == direction)
            return point;
    qFatal("no such point");
}

double contribution(const SetPointBudget& point, DerivedLine line, const std::string& name = {}) {
    for (const BudgetItem& item : point.items)
        if (item.derived == line && (name.empty() || item.name == name))
            return item.contribution;
    return 0;
}

std::vector<BudgetItem> itemsOf(const test::PublishedSet& set, const std::vector<double>& u) {
    std::vector<BudgetItem> items;
    for (std::size_t i = 0; i < set.rows.size(); ++i) {
        const double df = set.rows[i][3] == "inf" ? Infinite : std::stod(set.rows[i][3]);
        items.push_back(budgetItem(Side::Indication, Distribution::Normal, u[i], 1, df, 1));
    }
    return items;
}

} // namespace

class BudgetTest : public QObject {
    Q_OBJECT

  private slots:
    // JCGM 100:2008, table G.2 (from memory, recomputed to 30 digits).
    void coverageFactorsAreThoseOfTheStudentTable() {
        const test::PublishedSet set = test::publishedSet("gum_t_table");
        QCOMPARE(set.recomputed.size(), std::size_t(140));
        for (const auto& [name, text] : set.recomputed) {
            const auto comma = name.find(',');
            const double level = std::stod(name.substr(2, comma - 2)) / 100;
            const std::string df = name.substr(comma + 1, name.size() - comma - 2);
            const double k = coverageFactor(level, df == "inf" ? Infinite : std::stod(df));
            QVERIFY2(digitsAgreed(k, std::stod(text)) > 12.5, name.c_str());
        }
    }

    // EA-4/02 M, supplement S2 (from memory, recomputed): a 10 kg weight.
    void combinesTheWeight() {
        const test::PublishedSet set = test::publishedSet("ea402_s2_weight");
        std::vector<double> u;
        for (const auto& row : set.rows)
            u.push_back(std::stod(row[2]));
        CoverageFactors factors(0.9545);
        const SetPointBudget budget = combine(0, Direction::Unknown, itemsOf(set, u), factors, 1);
        QVERIFY(digitsAgreed(budget.combined, set.recomputedNumber("u_c")) > 14);
        QVERIFY(agreesAsPrinted(budget.combined, set.published.at("u_c")));
        QVERIFY(agreesAsPrinted(budget.expanded, set.published.at("U")));
    }

    // EA-4/02 M, supplement S4 (from memory, recomputed): a gauge block, sensitivities other than one.
    void combinesTheGaugeBlock() {
        const test::PublishedSet set = test::publishedSet("ea402_s4_gauge_block");
        std::vector<BudgetItem> items;
        for (const auto& row : set.rows)
            items.push_back(budgetItem(Side::Indication, Distribution::Normal, std::stod(row[2]), 1, Infinite, std::stod(row[4])));
        CoverageFactors factors(0.9545);
        const SetPointBudget budget = combine(0, Direction::Unknown, items, factors, 1);
        QVERIFY(digitsAgreed(budget.combined, set.recomputedNumber("u_c")) > 14);
        QVERIFY(agreesAsPrinted(budget.combined, set.published.at("u_c")));
        QVERIFY(agreesAsPrinted(budget.expanded, set.published.at("U")));
        double shares = 0;
        for (const BudgetItem& item : budget.items)
            shares += item.share;
        QVERIFY(std::fabs(shares - 1) < 1e-14);
    }

    // EA-4/02 M, supplement S9 (from memory, recomputed): one rectangular contribution dominates, k = 0.95 √3 = 1.65.
    void takesTheFactorOfADominantRectangle() {
        const test::PublishedSet set = test::publishedSet("ea402_s9_multimeter");
        const double third = std::sqrt(3.0);
        const std::vector<BudgetItem> items = {
            budgetItem(Side::Indication, Distribution::Normal, 0.001, 1, Infinite, 1),
            budgetItem(Side::Indication, Distribution::Rectangular, 0.05, third, Infinite, 1),
            budgetItem(Side::Indication, Distribution::Rectangular, 0.011, third, Infinite, 1)};
        CoverageFactors factors(0.95);
        const SetPointBudget budget = combine(100, Direction::Unknown, items, factors, 1);
        QVERIFY(budget.distribution == Distribution::Rectangular);
        QVERIFY(agreesAsPrinted(budget.coverageFactor, set.published.at("k")));
        QVERIFY(digitsAgreed(budget.combined, set.recomputedNumber("u_c")) > 14);
        QVERIFY(digitsAgreed(budget.expanded, set.recomputedNumber("U")) > 14);
    }

    // JCGM 100:2008, H.1.6 and table H.1: Welch and Satterthwaite, cut to the next lower integer, 99 %.
    void followsTheEndGauge() {
        const test::PublishedSet set = test::publishedSet("gum_h1");
        std::vector<BudgetItem> items = {
            budgetItem(Side::Indication, Distribution::Normal, 25e-6, 1, 18, 1),
            budgetItem(Side::Indication, Distribution::Normal, set.recomputedNumber("budget.u_i[d]"), 1, 25.6, 1),
            budgetItem(Side::Indication, Distribution::Normal, set.recomputedNumber("budget.u_i[dalpha]"), 1, 50, 1),
            budgetItem(Side::Indication, Distribution::Normal, set.recomputedNumber("budget.u_i[dtheta]"), 1, 2, 1)};
        CoverageFactors factors(0.99);
        const SetPointBudget budget = combine(50, Direction::Unknown, items, factors, 1);
        QVERIFY(digitsAgreed(budget.combined, set.recomputedNumber("budget.u_c")) > 13);
        QCOMPARE(budget.effectiveDegreesOfFreedom, 16.0); // printed 16.7, cut
        QVERIFY(agreesAsPrinted(budget.coverageFactor, set.published.at("budget.k")));
        QVERIFY(digitsAgreed(budget.expanded, set.recomputedNumber("budget.U")) > 13);
    }

    // JCGM 100:2008, 4.3.7 (rectangular), 4.3.9 (triangular).
    void dividesHalfWidths() {
        QVERIFY(std::fabs(divisorOf(Distribution::Rectangular) - 1.7320508075688772) < 1e-15);
        QVERIFY(std::fabs(divisorOf(Distribution::Triangular) - 2.4494897427831781) < 1e-15);
        QVERIFY(std::fabs(divisorOf(Distribution::UShaped) - 1.4142135623730951) < 1e-15);
        QCOMPARE(divisorOf(Distribution::Normal), 1.0);
    }

    // The sample at 5 bar rising, mean of three runs. Computed by hand: each line as stated in the comment.
    void drawsUpTheSampleAtMidRange() {
        const Record record = test::pressureTransmitter();
        const Fit fit = sampleLine();
        const VarianceSplit split = sampleSplit();
        const Budget budget = makeBudget(record, sampleOf(record, Phase::AsFound), &fit, &split);
        QCOMPARE(budget.points.size(), std::size_t(22));
        QVERIFY(budget.warnings.empty());
        const SetPointBudget& point = at(budget, 5, Direction::Rising);
        QVERIFY(agreesAsPrinted(contribution(point, DerivedLine::StandardUncertainty, "QR-P-02"), "0.00160")); // 0.0020/2 · 1.6001
        QVERIFY(agreesAsPrinted(contribution(point, DerivedLine::StandardDrift, "QR-P-02"), "0.00074"));      // 0.0008/√3 · 1.6001
        QVERIFY(agreesAsPrinted(contribution(point, DerivedLine::StandardUncertainty, "QR-E-01"), "0.00060")); // 0.0012/2
        QVERIFY(agreesAsPrinted(contribution(point, DerivedLine::StandardDrift, "QR-E-01"), "0.00029"));      // 0.0005/√3
        QVERIFY(agreesAsPrinted(contribution(point, DerivedLine::Repeatability), "0.00067"));                 // 0.00116/√3
        QVERIFY(agreesAsPrinted(contribution(point, DerivedLine::RunToRun), "0.00058"));                      // 0.000996/√3
        QVERIFY(agreesAsPrinted(contribution(point, DerivedLine::IndicationResolution), "0.00029"));          // 0.001/√12
        QVERIFY(agreesAsPrinted(point.items.back().contribution, "0.00018"));                                 // 0.0002/√3 · 1.6001
        QCOMPARE(contribution(point, DerivedLine::Hysteresis), 0.0);
        QVERIFY(agreesAsPrinted(point.combined, "0.0021"));
        QVERIFY(point.effectiveDegreesOfFreedom > 300 && point.effectiveDegreesOfFreedom < 360);
        QVERIFY(agreesAsPrinted(point.expanded, "0.0042"));
        QVERIFY(agreesAsPrinted(point.expandedReference, "0.0026"));
        for (const BudgetItem& item : point.items)
            QCOMPARE(item.common, item.derived == DerivedLine::StandardUncertainty || item.derived == DerivedLine::StandardDrift);
    }

    // The mean of rising and falling carries half of the gap as a rectangle. Gap at 5 bar by hand: rising mean 11.991333 at
    // 4.999867 bar, falling 12.003667 at 4.999867 bar: 0.012333 mA, half 0.006167, /√3 = 0.003560.
    void countsHalfTheGapWhenDirectionsAreStatedTogether() {
        Record record = test::pressureTransmitter();
        record.choices.separateDirections = false;
        const Fit fit = sampleLine();
        const VarianceSplit split = sampleSplit();
        const Budget budget = makeBudget(record, sampleOf(record, Phase::AsFound), &fit, &split);
        QCOMPARE(budget.points.size(), std::size_t(11));
        const SetPointBudget& point = at(budget, 5, Direction::Unknown);
        QVERIFY(std::fabs(contribution(point, DerivedLine::Hysteresis) - 0.003560) < 1e-6);
        QVERIFY(std::fabs(contribution(point, DerivedLine::Repeatability) - std::sqrt(5.677e-5 / 42 / 6)) < 1e-12);
        QVERIFY(std::fabs(contribution(point, DerivedLine::RunToRun) - std::sqrt(split.components[0].variance / 3)) < 1e-12);
    }

    void leavesOutWhatWasOmittedWithAReason() {
        Record record = test::pressureTransmitter();
        record.budget.omitted = {{DerivedLine::RunToRun, "not significant"}};
        const Fit fit = sampleLine();
        const VarianceSplit split = sampleSplit();
        const Budget budget = makeBudget(record, sampleOf(record, Phase::AsFound), &fit, &split);
        QCOMPARE(contribution(budget.points.front(), DerivedLine::RunToRun), 0.0);
        QVERIFY(contribution(budget.points.front(), DerivedLine::Repeatability) > 0);
    }

    // One pass of each set point and direction: the phase itself shows no repeatability. It comes from the other phase, and
    // without one the budget says that it is missing.
    void takesRepeatabilityFromTheOtherPhaseOrSaysItIsMissing() {
        const Record record = test::pressureTransmitter();
        const Fit fit = sampleLine();
        VarianceSplit once;
        once.pureError = SplitRow{2e-5, 5, {}, {}, {}};
        once.hysteresis = SplitRow{2e-5, 5, {}, {}, {}};
        const Sample sample = sampleOf(record, Phase::AsLeft);
        const Budget alone = makeBudget(record, sample, &fit, &once);
        QCOMPARE(alone.warnings.size(), std::size_t(1));
        QCOMPARE(contribution(alone.points[0], DerivedLine::Repeatability), 0.0);
        const VarianceSplit other = sampleSplit();
        const Budget helped = makeBudget(record, sample, &fit, &once, &other);
        QVERIFY(helped.warnings.empty());
        QVERIFY(std::fabs(contribution(helped.points[0], DerivedLine::Repeatability) - std::sqrt(5.677e-5 / 42)) < 1e-12);
        QVERIFY(std::fabs(contribution(helped.points[0], DerivedLine::RunToRun) - std::sqrt(other.components[0].variance)) < 1e-12);
        for (const BudgetItem& item : helped.points[0].items)
            QCOMPARE(item.fromOtherPhase, item.derived == DerivedLine::Repeatability || item.derived == DerivedLine::RunToRun);
    }

    void readsPercentOfReading() {
        Record record = test::pressureTransmitter();
        record.standards.resize(1);
        record.standards[0].form = UncertaintyForm::PercentOfReading;
        record.standards[0].expandedUncertainty = number("0.20");
        record.standards[0].drift = number("0.05");
        const Fit fit = sampleLine();
        const VarianceSplit split = sampleSplit();
        const Budget budget = makeBudget(record, sampleOf(record, Phase::AsFound), &fit, &split);
        const SetPointBudget& point = at(budget, 10, Direction::Rising);
        const double reference = (10.0003 + 9.9992 + 10.0003) / 3;
        QVERIFY(digitsAgreed(contribution(point, DerivedLine::StandardUncertainty), 0.002 * reference / 2 * 1.600102) > 12);
        QVERIFY(digitsAgreed(contribution(point, DerivedLine::StandardDrift), 0.0005 * reference / std::sqrt(3.0) * 1.600102) > 12);
    }

    // Function, one new reading and standards, at the end of the range where the variance of the function is largest.
    void readsBackAtTheWorstPlace() {
        const Record record = test::pressureTransmitter();
        const Fit fit = sampleLine();
        const VarianceSplit split = sampleSplit();
        const Budget budget = makeBudget(record, sampleOf(record, Phase::AsFound), &fit, &split);
        QVERIFY(budget.readBack.has_value());
        const SetPointBudget& worst = *budget.readBack;
        QVERIFY(worst.setPoint == 0 || worst.setPoint == 10);
        const double s2 = 0.00484 * 0.00484;
        QVERIFY(digitsAgreed(std::pow(contribution(worst, DerivedLine::Fit), 2), s2 / 66 * 3.5) > 12);
        QVERIFY(digitsAgreed(contribution(worst, DerivedLine::Repeatability), 0.00484) > 12);
        QCOMPARE(contribution(worst, DerivedLine::IndicationResolution), 0.0); // in the scatter already
        double variance = 0;
        for (const BudgetItem& item : worst.items)
            variance += item.contribution * item.contribution;
        QVERIFY(digitsAgreed(worst.expandedReference, worst.coverageFactor * std::sqrt(variance) / 1.600102) > 12);
    }

    // Without a function there is still a budget: the perfect item gives the sensitivity, the cells the pooled repeatability.
    void drawsUpWithoutAFunction() {
        const Record record = test::pressureTransmitter();
        const Budget budget = makeBudget(record, sampleOf(record, Phase::AsFound), nullptr, nullptr);
        const SetPointBudget& point = at(budget, 5, Direction::Rising);
        QVERIFY(digitsAgreed(contribution(point, DerivedLine::StandardUncertainty, "QR-P-02"), 0.0016) > 12);
        // Pooled within point and direction: (5.677e-5 + 4.635e-5)/44, by the same closed forms; the slope 1.6 moves it a little.
        QVERIFY(std::fabs(contribution(point, DerivedLine::Repeatability) / std::sqrt((5.677e-5 + 4.635e-5) / 44 / 3) - 1) < 0.005);
        QVERIFY(!budget.readBack);
    }

    // ±0.075 % of 16 mA = 0.012 mA. Error at 5 bar rising: 11.991333 − (4 + 1.6 · 4.999867) = −0.008454 mA.
    void decidesAtMidRangeByEveryRule_data() {
        QTest::addColumn<int>("rule");
        QTest::addColumn<int>("state");
        QTest::newRow("simple") << int(DecisionRule::Simple) << int(ConformityState::Pass);
        QTest::newRow("guarded") << int(DecisionRule::GuardedByU) << int(ConformityState::Fail);
        QTest::newRow("four-state") << int(DecisionRule::FourState) << int(ConformityState::ConditionalPass);
    }
    void decidesAtMidRangeByEveryRule() {
        QFETCH(int, rule);
        QFETCH(int, state);
        Record record = test::pressureTransmitter();
        record.limits.rule = static_cast<DecisionRule>(rule);
        const Fit fit = sampleLine();
        const VarianceSplit split = sampleSplit();
        const Sample sample = sampleOf(record, Phase::AsFound);
        const Verdict verdict = makeVerdict(record, &fit, makeBudget(record, sample, &fit, &split));
        QCOMPARE(verdict.points.size(), std::size_t(22));
        for (const PointResult& point : verdict.points) {
            if (point.setPoint != 5 || point.direction != Direction::Rising)
                continue;
            QVERIFY(std::fabs(point.error + 0.0084533) < 1e-6);
            QVERIFY(std::fabs(*point.limit - 0.012) < 1e-12);
            QCOMPARE(int(*point.state), state);
            QVERIFY(*point.conformanceProbability > 0.950 && *point.conformanceProbability < 0.960);
            if (rule != int(DecisionRule::Simple))
                QVERIFY(agreesAsPrinted(*point.acceptance, "0.0078"));
        }
    }
};

QTEST_APPLESS_MAIN(BudgetTest)
#include "tst_budget.moc"
