// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Findings.h"
#include "core/evaluate/Dates.h"
#include "core/evaluate/KeyFigures.h"
#include "core/evaluate/evaluate.h"
#include "core/fit/fitFunction.h"
#include "tests/support/PublishedSet.h"
#include "tests/support/SampleRecord.h"

#include <QtTest>

#include <cmath>
#include <random>

using namespace spanwright;
using namespace spanwright::test;

namespace {

Evaluation evaluated(const Record& record) {
    Progress progress;
    const auto result = evaluate(record, progress);
    return result ? *result : Evaluation();
}

const PhaseEvaluation& asFound(const Evaluation& evaluation) {
    return evaluation.phases[0].value();
}

bool hasWarning(const PhaseEvaluation& phase, WarningCode code) {
    return std::any_of(phase.warnings.begin(), phase.warnings.end(), [&](const Warning& w) { return w.code == code; });
}

Record pairs(const std::vector<std::string>& reference, const std::vector<std::string>& indication) {
    return recordOf(reference, indication);
}

/// Four readings of y = 1 + 2 x, with one moved by 0.1, so that every figure can be found by hand.
Record fourReadings() {
    return pairs({"0", "1", "2", "3"}, {"1", "3.1", "5", "7"});
}

} // namespace

class TestEvaluate : public QObject {
    Q_OBJECT

  private slots:
    void theSampleTransmitterIsEvaluatedInBothPhases();
    void everyReadingStandsInTheTableInTheOrderTaken();
    void anExcludedReadingIsMeasuredFromTheFunctionFittedWithoutIt();
    void whatExcludingDidIsTheFitOverAllReadings();
    void veryManyReadingsAreTakenBackInFromTheirSums();
    void veryManyReadingsAreExaminedAsFewAre_data();
    void veryManyReadingsAreExaminedAsFewAre();
    void aReadingWithoutIndicationTakesNoPart();
    void figuresByHand();
    void answersStandInTheOrderAsked();
    void readingsThatCannotBeFittedSayWhyAndKeepTheirTable();
    void theOrderOfReadingsDoesNotChangeTheFunction();
    void theSameRecordGivesTheSameBits();
    void aStandardThatFellDueBeforeTheDayOfMeasurementIsNamed();
    void theDayOfMeasurementFollowsFromTheReadings();
    void evaluationStopsWhenAsked();
    void storedFiguresAreComparedToTwelveDigits();
};

void TestEvaluate::theSampleTransmitterIsEvaluatedInBothPhases() {
    const Evaluation e = evaluated(pressureTransmitter());
    QVERIFY(e.phase(Phase::AsFound) != nullptr);
    QVERIFY(e.phase(Phase::AsLeft) != nullptr);
    const PhaseEvaluation& found = asFound(e);
    QCOMPARE(found.readings, std::size_t{66});
    QCOMPARE(found.planned, std::size_t{66});
    QVERIFY(found.fit.has_value());
    // The scenario's generator y = 4.0031 + 1.6001 p and its stated line a = 3.99943, b = 1.600102, s = 0.00484 mA.
    QVERIFY(std::abs(found.fit->coefficients[0].value - 3.99943) < 0.000005);
    QVERIFY(std::abs(found.fit->coefficients[1].value - 1.600102) < 0.0000005);
    QVERIFY(std::abs(found.fit->residualSd - 0.00484) < 0.000005);
    QCOMPARE(found.fit->degreesOfFreedom, 64);
    QVERIFY(found.curve.size() > 100 && found.curve.size() <= 400);
    QVERIFY(found.curve.front().x < 0 && found.curve.back().x > 10);
    QCOMPARE(e.phase(Phase::AsLeft)->readings, std::size_t{10});
    QVERIFY(!found.budget.points.empty());
    QVERIFY(!found.verdict.points.empty());
}

void TestEvaluate::everyReadingStandsInTheTableInTheOrderTaken() {
    const Record record = pressureTransmitter();
    const Evaluation e = evaluated(record);
    const RowFigures& rows = asFound(e).rows;
    QCOMPARE(rows.size(), std::size_t{66});
    for (std::size_t i = 0; i < rows.size(); ++i) {
        QCOMPARE(rows.ids[i], record.readings->ids()[i]);
        QVERIFY(std::abs(rows.fitted[i] + rows.residual[i] - rows.indication[i]) < 1e-12);
        QCOMPARE(rows.indexOf(rows.ids[i]), i);
    }
    QCOMPARE(rows.indexOf(999), rows.size());
}

void TestEvaluate::anExcludedReadingIsMeasuredFromTheFunctionFittedWithoutIt() {
    Record record = fourReadings();
    record.exclusions.edit().add({record.readings->ids()[1], ExclusionReason::Disturbance, {}, "IO", 0});
    const Evaluation e = evaluated(record);
    const PhaseEvaluation& found = asFound(e);
    QCOMPARE(found.fit->used, std::size_t{3});
    QCOMPARE(found.excluded, std::size_t{1});
    QCOMPARE(found.rows.size(), std::size_t{4});
    QCOMPARE(int(found.rows.excluded[1]), 1);
    // Without it the others lie on y = 1 + 2 x exactly.
    QVERIFY(std::abs(found.rows.fitted[1] - 3) < 1e-14);
    QVERIFY(std::abs(found.rows.residual[1] - 0.1) < 1e-14);
    QVERIFY(std::isnan(found.rows.leverage[1]));
}

void TestEvaluate::whatExcludingDidIsTheFitOverAllReadings() {
    Record record = pressureTransmitter();
    const Evaluation whole = evaluated(record);
    record.exclusions.edit().add({record.readings->ids()[5], ExclusionReason::NotSettled, {}, "IO", 0});
    const Evaluation less = evaluated(record);
    QVERIFY(!asFound(whole).withoutExclusions.has_value());
    QVERIFY(asFound(less).withoutExclusions.has_value());
    const WithoutExclusions& without = *asFound(less).withoutExclusions;
    QCOMPARE(without.coefficients[0].value, asFound(whole).fit->coefficients[0].value);
    QCOMPARE(without.coefficients[1].value, asFound(whole).fit->coefficients[1].value);
    QCOMPARE(without.residualSd, asFound(whole).fit->residualSd);
    QVERIFY(without.largestExpanded > 0);
    QVERIFY(asFound(less).fit->residualSd != without.residualSd);
}

void TestEvaluate::veryManyReadingsAreTakenBackInFromTheirSums() {
    std::mt19937_64 random(5);
    ReadingColumns::Block block;
    block.n = ManyReadings + 50;
    for (std::size_t i = 0; i < block.n; ++i) {
        const auto x = static_cast<std::int64_t>(random() % 10'000'000);
        block.reference.push_back(Decimal{x, 6, {}});
        block.indication.push_back(Decimal{40'000 + x * 16 / 1000 + x * x / 10'000'000'000 + static_cast<std::int64_t>(random() % 80), 4, {}});
    }
    Record record;
    record.choices.function = {FunctionFamily::Polynomial, 2};
    record.readings.edit().appendBlock(std::move(block), 1);
    const Evaluation whole = evaluated(record);
    for (const std::size_t row : {std::size_t{0}, std::size_t{7}, ManyReadings})
        record.exclusions.edit().add({record.readings->ids()[row], ExclusionReason::NotSettled, {}, "IO", 0});
    const Evaluation less = evaluated(record);
    const WithoutExclusions& without = *asFound(less).withoutExclusions;
    const Fit& fit = *asFound(whole).fit;
    QCOMPARE(asFound(less).fit->used, ManyReadings + 47);
    for (std::size_t k = 0; k < 3; ++k) {
        QVERIFY(std::abs(without.coefficients[k].value / fit.coefficients[k].value - 1) < 1e-11);
        QVERIFY(std::abs(without.coefficients[k].standardUncertainty / fit.coefficients[k].standardUncertainty - 1) < 1e-11);
    }
    QVERIFY(std::abs(without.residualSd / fit.residualSd - 1) < 1e-11);
    QVERIFY(without.residualSd != asFound(less).fit->residualSd);
}

void TestEvaluate::veryManyReadingsAreExaminedAsFewAre_data() {
    QTest::addColumn<int>("references");
    QTest::addColumn<bool>("named");
    QTest::newRow("eleven set points") << 11 << false;
    QTest::newRow("eleven set points in runs, rising and falling") << 11 << true;
    QTest::newRow("references that nearly all differ") << 10'000'000 << false;
}

void TestEvaluate::veryManyReadingsAreExaminedAsFewAre() {
    QFETCH(int, references);
    QFETCH(bool, named);
    std::mt19937_64 random(7);
    std::normal_distribution<double> noise(0, 20);
    ReadingColumns::Block block;
    block.n = ManyReadings + 51;
    for (std::size_t i = 0; i < block.n; ++i) {
        const std::int64_t step = 10'000'000 / references;
        const auto x = static_cast<std::int64_t>(random() % static_cast<std::uint64_t>(references)) * step;
        block.reference.push_back(Decimal{x, 6, {}});
        const double bent = static_cast<double>(x) * static_cast<double>(x) * 2e-13 + (i < 3 ? 150 : 0);
        block.indication.push_back(Decimal{40'000 + x * 16 / 1000 + static_cast<std::int64_t>(bent + noise(random)), 4, {}});
        if (named) {
            block.runs.push_back(static_cast<std::int32_t>(1 + 7 * i / block.n));
            block.directions.push_back(random() % 2 == 0 ? Direction::Rising : Direction::Falling);
        }
    }
    Record record;
    record.readings.edit().appendBlock(std::move(block), 1);
    const Evaluation evaluation = evaluated(record);
    const PhaseEvaluation& found = asFound(evaluation);

    // The same steps with every number in double-double, in one thread.
    const Sample exact = withExactColumns(makeSample(record, Phase::AsFound));
    const auto fitted = fitFunction(exact, record.choices);
    QVERIFY(bool(fitted));
    const auto same = [](double a, double b) { return std::abs(a - b) <= 1e-8 * std::abs(b); };
    const VarianceSplit split = splitVariance(exact, fitted->residuals, fitted->fit);
    for (const auto row : {&VarianceSplit::lackOfFit, &VarianceSplit::pureError, &VarianceSplit::hysteresis, &VarianceSplit::runOffset,
                           &VarianceSplit::runSlope, &VarianceSplit::repeatability}) {
        QCOMPARE(((*found.split).*row).has_value(), (split.*row).has_value());
        if (!(split.*row))
            continue;
        QCOMPARE(((*found.split).*row)->df, (split.*row)->df);
        QVERIFY(same(((*found.split).*row)->ss, (split.*row)->ss));
    }
    const Diagnostics tests = diagnose(exact, fitted->residuals, fitted->fit, {record.readings->ids(), 0, 0.05});
    const Diagnostics& many = *found.diagnostics;
    QVERIFY(same(*many.durbinWatson, *tests.durbinWatson));
    QVERIFY(std::abs(*many.lag1Autocorrelation - *tests.lag1Autocorrelation) < 1e-10);
    QVERIFY(same(many.linearity->statistic, tests.linearity->statistic));
    QVERIFY(same(many.breuschPagan->statistic, tests.breuschPagan->statistic));
    QCOMPARE(many.levene.has_value(), tests.levene.has_value());
    if (tests.levene) {
        QVERIFY(same(many.levene->statistic, tests.levene->statistic));
        QVERIFY(same(many.bartlett->statistic, tests.bartlett->statistic));
    }
    QCOMPARE(many.esd.size(), tests.esd.size());
    for (std::size_t k = 0; k < tests.esd.size(); ++k) {
        QCOMPARE(many.esd[k].row, tests.esd[k].row);
        QVERIFY(same(many.esd[k].r, tests.esd[k].r));
    }
    const auto performance = processFigures(exact, record.item);
    QCOMPARE(found.performance.has_value(), performance.has_value());
    if (performance) {
        QVERIFY(same(found.performance->measuredErrorMax->value, performance->measuredErrorMax->value));
        QVERIFY(same(found.performance->inaccuracyLow->value, performance->inaccuracyLow->value));
        QVERIFY(same(found.performance->nonRepeatability->value, performance->nonRepeatability->value));
    }
    FindingsInput input{record, Phase::AsFound, exact};
    input.fit = &fitted->fit;
    input.residuals = &fitted->residuals;
    input.split = &split;
    input.diagnostics = &tests;
    input.performance = performance ? &*performance : nullptr;
    const std::vector<Finding> expected = findings(input);
    QCOMPARE(found.findings.size(), expected.size());
    for (std::size_t k = 0; k < expected.size(); ++k) {
        QVERIFY(found.findings[k].code == expected[k].code);
        QCOMPARE(found.findings[k].rows, expected[k].rows);
    }
    for (std::size_t i = 0; i < exact.size(); i += 4999) {
        QCOMPARE(found.rows.ids[i], record.readings->ids()[i]);
        QVERIFY(std::abs(found.rows.residual[i] - fitted->residuals.e.high[i]) < 1e-12);
        QVERIFY(same(found.rows.leverage[i], fitted->residuals.leverage[i]));
        QVERIFY(same(found.rows.fitted[i], fitted->residuals.fitted[i]));
    }
}

void TestEvaluate::aReadingWithoutIndicationTakesNoPart() {
    Record record = fourReadings();
    Reading half;
    half.id = record.nextReadingId++;
    half.reference = number("4");
    record.readings.edit().append(half);
    const Evaluation e = evaluated(record);
    QCOMPARE(asFound(e).readings, std::size_t{5});
    QCOMPARE(asFound(e).complete, std::size_t{4});
    QCOMPARE(asFound(e).rows.size(), std::size_t{5});
    QCOMPARE(asFound(e).rows.reference[4], 4.0);
    QVERIFY(std::isnan(asFound(e).rows.residual[4]));
    QVERIFY(hasWarning(asFound(e), WarningCode::IncompleteReadings));
}

void TestEvaluate::figuresByHand() {
    // x = 0…3, y = 1, 3.1, 5, 7: slope 9.95/5, intercept 4.025 − 1.5 · 1.99; Σe² = 0.007; h = 1/4 + (x − 1.5)²/5.
    const Evaluation e = evaluated(fourReadings());
    const PhaseEvaluation& found = asFound(e);
    QVERIFY(std::abs(found.fit->coefficients[1].value - 1.99) < 1e-15);
    QVERIFY(std::abs(found.fit->coefficients[0].value - 1.04) < 1e-15);
    QVERIFY(std::abs(found.fit->residualSd - std::sqrt(0.007 / 2)) < 1e-16);
    const double leverage[] = {0.7, 0.3, 0.3, 0.7};
    const double residual[] = {-0.04, 0.07, -0.02, -0.01};
    for (std::size_t i = 0; i < 4; ++i) {
        QVERIFY(std::abs(found.rows.leverage[i] - leverage[i]) < 1e-14);
        QVERIFY(std::abs(found.rows.residual[i] - residual[i]) < 1e-14);
        const double standardised = residual[i] / std::sqrt(0.0035 * (1 - leverage[i]));
        QVERIFY(std::abs(found.rows.influenceOf(i).standardised - standardised) < 1e-12);
        QVERIFY(std::abs(found.rows.influenceOf(i).cook - standardised * standardised * leverage[i] / (2 * (1 - leverage[i]))) < 1e-12);
    }
    // The second reading alone is off: the others leave almost nothing.
    const double without = 0.007 - 0.07 * 0.07 / 0.7;
    QVERIFY(without < 1e-12);
    QVERIFY(!(found.rows.influenceOf(1).studentised < 1e6)); // as good as infinite, or said not to exist
    const double left = 0.007 - 0.04 * 0.04 / 0.3;
    QVERIFY(std::abs(found.rows.influenceOf(0).studentised + 0.04 / std::sqrt(left * 0.3)) < 1e-10);
}

void TestEvaluate::answersStandInTheOrderAsked() {
    Record record = fourReadings();
    record.choices.at = {number("2"), number("0.5"), number("10")};
    record.choices.read = {number("3.03"), number("1.04")};
    const Evaluation e = evaluated(record);
    const PhaseEvaluation& found = asFound(e);
    QCOMPARE(found.at.size(), std::size_t{3});
    QVERIFY(std::abs(found.at[0].value - 5.02) < 1e-14);
    QVERIFY(std::abs(found.at[1].value - 2.035) < 1e-14);
    QVERIFY(!found.at[2].inside);
    QVERIFY(hasWarning(found, WarningCode::Extrapolated));
    QCOMPARE(found.read.size(), std::size_t{2});
    QVERIFY(std::abs(*found.read[0].reference - 1) < 1e-14);
    QVERIFY(std::abs(*found.read[1].reference) < 1e-14);
}

void TestEvaluate::readingsThatCannotBeFittedSayWhyAndKeepTheirTable() {
    const Evaluation equal = evaluated(pairs({"2", "2", "2"}, {"1", "2", "3"}));
    QVERIFY(!asFound(equal).fit.has_value());
    QVERIFY(asFound(equal).notFitted.has_value());
    QCOMPARE(asFound(equal).notFitted->code, ErrorCode::ReferencesAllEqual);
    QCOMPARE(asFound(equal).rows.size(), std::size_t{3});
    QCOMPARE(asFound(equal).rows.indication[2], 3.0);
    QVERIFY(std::isnan(asFound(equal).rows.residual[2]));

    const Evaluation one = evaluated(pairs({"1"}, {"5"}));
    QVERIFY(asFound(one).notFitted.has_value());
    QCOMPARE(asFound(one).notFitted->code, ErrorCode::TooFewReadings);

    const Evaluation none = evaluated(Record());
    QVERIFY(!none.phases[0].has_value() && !none.phases[1].has_value());
}

void TestEvaluate::theOrderOfReadingsDoesNotChangeTheFunction() {
    const Evaluation rising = evaluated(pairs({"0", "1", "2", "3"}, {"1", "3.1", "5", "7"}));
    const Evaluation mixed = evaluated(pairs({"2", "0", "3", "1"}, {"5", "1", "7", "3.1"}));
    for (std::size_t i = 0; i < 2; ++i) {
        QCOMPARE(asFound(mixed).fit->coefficients[i].value, asFound(rising).fit->coefficients[i].value);
        QCOMPARE(asFound(mixed).fit->coefficients[i].standardUncertainty, asFound(rising).fit->coefficients[i].standardUncertainty);
    }
}

void TestEvaluate::theSameRecordGivesTheSameBits() {
    const Record record = pressureTransmitter();
    QCOMPARE(keyFigures(evaluated(record)), keyFigures(evaluated(record)));
    QVERIFY(keyFigures(evaluated(record)).size() > 20);
}

void TestEvaluate::aStandardThatFellDueBeforeTheDayOfMeasurementIsNamed() {
    Record record = pressureTransmitter();
    QVERIFY(evaluated(record).overdue.empty());
    record.standards[1].due = "2026-10-01";
    record.standards[0].due = record.job.calibrated; // the last day on which it may be used
    const Evaluation e = evaluated(record);
    QCOMPARE(e.overdue.size(), std::size_t{1});
    QCOMPARE(e.overdue[0].index, std::size_t{1});
    QCOMPARE(e.overdue[0].days, 12);
}

void TestEvaluate::theDayOfMeasurementFollowsFromTheReadings() {
    Record record = pressureTransmitter();
    record.job.calibrated.clear();
    QCOMPARE(evaluated(record).calibrated, std::string("2026-10-13"));
    QCOMPARE(evaluated(fourReadings()).calibrated, std::string());
    QCOMPARE(dateOf(0), std::string("1970-01-01"));
    QCOMPARE(dateOf(-1), std::string("1969-12-31"));
    QCOMPARE(dayNumber("2000-03-01").value() - dayNumber("2000-02-28").value(), std::int64_t{2}); // a leap year
    QVERIFY(!dayNumber("2026-02-29").has_value());
    QVERIFY(!dayNumber("13.10.2026").has_value());
}

void TestEvaluate::evaluationStopsWhenAsked() {
    Progress progress;
    progress.cancel();
    const auto result = evaluate(pressureTransmitter(), progress);
    QVERIFY(!result.ok());
    QCOMPARE(result.error().code, ErrorCode::Cancelled);
}

void TestEvaluate::storedFiguresAreComparedToTwelveDigits() {
    const Evaluation e = evaluated(fourReadings());
    auto stored = keyFigures(e);
    QVERIFY(differingFigures(stored, e).empty());
    const auto slope = std::find_if(stored.begin(), stored.end(), [](const auto& f) { return f.first.find(".b1") != std::string::npos; });
    QVERIFY(slope != stored.end());
    slope->second = "1.9900000000000002";
    QVERIFY(differingFigures(stored, e).empty());
    slope->second = "1.99000001";
    stored.emplace_back("as-found.figure-of-another-program", "3");
    const auto differences = differingFigures(stored, e);
    QCOMPARE(differences.size(), std::size_t{2});
    QCOMPARE(differences[0].code, WarningCode::ResultsDiffer);
    QCOMPARE(differences[0].facts[1].value, std::string("1.99000001"));
}

QTEST_APPLESS_MAIN(TestEvaluate)
#include "tst_evaluate.moc"
