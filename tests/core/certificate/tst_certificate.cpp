// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/Rounding.h"
#include "core/budget/ReadBackBudget.h"
#include "core/certificate/Certificate.h"
#include "core/evaluate/PrintedFunction.h"
#include "tests/support/Evaluated.h"
#include "tests/support/SampleRecord.h"

#include <QTest>

#include <algorithm>
#include <cmath>

using namespace spanwright;
using test::evaluated;
using test::number;

namespace {

Certificate certificateOf(const Record& record) {
    return buildCertificate(record, evaluated(record), {"Spanwright", "2026-10-20", "sha256:00"});
}

int decimals(const Digits& text) {
    const auto point = text.find('.');
    return point == std::string::npos ? 0 : static_cast<int>(text.size() - point) - 1;
}

/// Value of the polynomial with the printed coefficients.
double polynomial(const FunctionSection& function, double x) {
    double value = 0, power = 1;
    for (const auto& term : function.terms) {
        value += std::stod(term.value) * power;
        power *= x;
    }
    return value;
}

} // namespace

class CertificateTest : public QObject {
    Q_OBJECT

  private slots:
    void staysADraftUntilAllThreeNamesAreThere() {
        Record record = test::pressureTransmitter();
        QVERIFY(certificateOf(record).state == DraftState::Draft);
        record.signOffs.push_back({SignOffRole::Authorised, "RA", "Head of laboratory", "2026-10-15"});
        QVERIFY(certificateOf(record).state == DraftState::SignedOff);
        record.job.customer.clear();
        QVERIFY(certificateOf(record).state == DraftState::Incomplete);
    }

    // U has two significant digits; error, indication and limits stand at its place, the reference at that of U in its unit
    // (JCGM 100:2008, 7.2.6).
    void roundsEveryResultOnceAtThePlaceOfItsUncertainty() {
        const Record record = test::pressureTransmitter();
        const Evaluation evaluation = evaluated(record);
        const Certificate certificate = buildCertificate(record, evaluation, {});
        QCOMPARE(certificate.phases.size(), std::size_t(2));
        for (const PhaseSection& section : certificate.phases) {
            const auto& points = evaluation.phase(section.phase)->verdict.points;
            QCOMPARE(section.results.size(), points.size());
            for (std::size_t i = 0; i < points.size(); ++i) {
                const ResultLine& line = section.results[i];
                const int place = decimals(line.expanded);
                QCOMPARE(line.expanded, roundUncertainty(points[i].expanded).text);
                for (const Digits& text : {line.error, line.indication, line.limit, line.acceptance})
                    QCOMPARE(decimals(text), place);
                QCOMPARE(decimals(line.reference), decimals(line.expandedReference));
                const double half = 0.5 * std::pow(10.0, -place) * (1 + 1e-9);
                QVERIFY(std::fabs(std::stod(line.error) - points[i].error) <= half);
                QVERIFY(std::fabs(std::stod(line.indication) - points[i].indication) <= half);
            }
        }
    }

    // However wide U is, neighbouring set points are not printed as the same number.
    void keepsSetPointsApartWhereTheUncertaintyIsWide() {
        Record record = test::pressureTransmitter();
        record.budget.lines.push_back({"wide", "", Side::Indication, Distribution::Normal, number("500"), number("2"), {}, {}});
        for (const PhaseSection& section : certificateOf(record).phases)
            for (const ResultLine& one : section.results)
                for (const ResultLine& other : section.results)
                    if (one.setPoint != other.setPoint) {
                        QVERIFY(one.reference != other.reference);
                        QVERIFY(one.indication != other.indication);
                    }
    }

    // By hand: at 5 bar rising 11.9913 mA at 4.9999 bar, error −0.0085 mA, U = 0.0042 mA, outside ±(0.012 − 0.0042) mA.
    void statesTheSampleAtMidRange() {
        const Certificate certificate = certificateOf(test::pressureTransmitter());
        const PhaseSection& found = certificate.phases[0];
        const auto line = std::find_if(found.results.begin(), found.results.end(), [](const ResultLine& one) {
            return one.setPoint == "5" && one.direction == Direction::Rising;
        });
        QVERIFY(line != found.results.end());
        QCOMPARE(line->reference, Digits("4.9999"));
        QCOMPARE(line->indication, Digits("11.9913"));
        QCOMPARE(line->error, Digits("-0.0085"));
        QCOMPARE(line->expanded, Digits("0.0042"));
        QCOMPARE(line->errorPercent, Digits("-0.053"));
        QCOMPARE(line->limit, Digits("0.0120"));
        QCOMPARE(line->acceptance, Digits("0.0078"));
        QVERIFY(line->state == ConformityState::Fail);
        QVERIFY(std::stod(line->conformance) > 95 && std::stod(line->conformance) < 96.5);
        QVERIFY(certificate.phases[1].overall == ConformityState::Pass);
        QVERIFY(found.overall == ConformityState::Fail);
        QCOMPARE(found.results[*found.largest].error, Digits("-0.0085"));
    }

    // The printed coefficients in the printed form give every value in the range within 1/20 of the U of a value read back there.
    void printsCoefficientsThatCanBeUsed_data() {
        QTest::addColumn<int>("degree");
        QTest::newRow("line") << 1;
        QTest::newRow("quadratic") << 2;
        QTest::newRow("degree 4") << 4;
    }
    void printsCoefficientsThatCanBeUsed() {
        QFETCH(int, degree);
        Record record = test::pressureTransmitter();
        record.choices.function = {FunctionFamily::Polynomial, degree};
        const Evaluation evaluation = evaluated(record);
        const Certificate certificate = buildCertificate(record, evaluation, {});
        QVERIFY(certificate.function.has_value());
        const PhaseEvaluation& phase = *evaluation.phase(Phase::AsFound);
        const Fit& fit = *phase.fit;
        double smallest = 1;
        for (double x = fit.low; x <= fit.high; x += 0.01) {
            const double u = readBackBudget(record, fit, x)->expanded;
            smallest = std::min(smallest, u);
            QVERIFY(std::fabs(polynomial(*certificate.function, x) - fit.curve->value(x)) <= u / 20);
        }
        const auto logger = printedFunction(record, phase);
        QCOMPARE(certificate.function->terms.size(), logger->numbers.size());
        for (std::size_t i = 0; i < logger->numbers.size(); ++i)
            QCOMPARE(certificate.function->terms[i].value, logger->numbers[i].text);
        QCOMPARE(certificate.function->checks.size(), std::size_t(3));
        for (const auto& check : certificate.function->checks)
            QVERIFY(std::fabs(std::stod(check.y) - polynomial(*certificate.function, std::stod(check.x))) <= smallest / 100);
        for (const auto& term : certificate.function->terms)
            QVERIFY2(term.value.size() < 14, term.value.c_str()); // no more digits than it takes
    }

    // A table is of no use without its abscissae; only the ordinates have an uncertainty.
    void printsBothCoordinatesOfATable() {
        Record record = test::pressureTransmitter();
        record.choices.function = {FunctionFamily::Table, 0};
        const Certificate certificate = certificateOf(record);
        const auto& terms = certificate.function->terms;
        QCOMPARE(terms.size(), std::size_t(22));
        QCOMPARE(terms[0].name, std::string("x1"));
        QCOMPARE(terms[1].name, std::string("y1"));
        QVERIFY(terms[0].uncertainty.empty() && !terms[1].uncertainty.empty());
    }

    // The figures of the split, rounded: practice of the sample by hand (F of lack of fit 19.2 against repeatability, 1.15 naive).
    void printsTheSplitOnlyWhenItIsWanted() {
        Record record = test::pressureTransmitter();
        QVERIFY(!certificateOf(record).phases[0].split);
        record.choices.splitOnCertificate = true;
        const Certificate certificate = certificateOf(record);
        QVERIFY(certificate.phases[0].split && !certificate.phases[1].split); // of the phase that the function is taken from
        const auto& lines = certificate.phases[0].split->lines;
        const auto find = [&](SplitPart part, SplitTableLine::Test test) {
            return std::find_if(lines.begin(), lines.end(), [&](const SplitTableLine& l) { return l.part == part && l.test == test; });
        };
        const auto fit = find(SplitPart::LackOfFit, SplitTableLine::Test::Chain), naive = find(SplitPart::LackOfFit, SplitTableLine::Test::Naive);
        QVERIFY(fit != lines.end() && naive != lines.end());
        QCOMPARE(fit->f, Digits("19.2"));
        QCOMPARE(fit->p, Digits("<0.001"));
        QCOMPARE(fit->degreesOfFreedom, 9);
        QCOMPARE(naive->f, Digits("1.15"));
        QVERIFY(naive->p.starts_with("0.34"));
        QVERIFY(!naive->share && *fit->share < 1e-6);
        QCOMPARE(find(SplitPart::Total, SplitTableLine::Test::Chain)->sumOfSquares, Digits("1690"));
        QCOMPARE(find(SplitPart::Repeatability, SplitTableLine::Test::Chain)->degreesOfFreedom, 40);
    }

    void saysOnTheFirstPageThatTooMuchIsExcluded() {
        Record record = test::pressureTransmitter();
        const auto said = [&] {
            const auto notices = certificateOf(record).notices;
            return std::any_of(notices.begin(), notices.end(), [](const StatementLine& line) { return line.statement == Statement::ManyExcluded; });
        };
        for (ReadingId id = 1; id <= 6; ++id) // of 66: 9.1 %
            record.exclusions.edit().add({id, ExclusionReason::NotSettled, {}, "IO", 0});
        QVERIFY(!said());
        record.exclusions.edit().add({7, ExclusionReason::NotSettled, {}, "IO", 0});
        QVERIFY(said());
        record.choices.exclusionLimit = test::number("0.15");
        QVERIFY(!said());
        // All six readings at 5 bar: it is said that no result stands there.
        record.exclusions.edit() = {};
        for (std::size_t row = 0; row < 66; ++row)
            if (record.readings->setPoint().toDouble(row) == 5)
                record.exclusions.edit().add({record.readings->ids()[row], ExclusionReason::Disturbance, {}, "IO", 0});
        const auto notices = certificateOf(record).notices;
        const auto emptied = std::find_if(notices.begin(), notices.end(), [](const StatementLine& line) { return line.statement == Statement::SetPointExcluded; });
        QVERIFY(emptied != notices.end());
        QCOMPARE(emptied->facts[1].value, std::string("5"));
    }

    void statesForceFiguresWhereTheItemWasTurned() {
        QVERIFY(!certificateOf(test::pressureTransmitter()).phases[0].force);
        const auto force = certificateOf(test::loadCell()).phases[0].force;
        QVERIFY(force.has_value());
        QCOMPARE(force->steps.size(), std::size_t(10));
        QCOMPARE(force->steps[0].mean, Digits("0.1998927"));
        QCOMPARE(force->degree, 2);
        QCOMPARE(force->lowerLimitFactor, Digits("0.0000562")); // 5.62·10⁻⁵ as computed beside the readings
        QVERIFY(force->zero.empty() && force->steps[0].reversibility.empty());
    }

    void listsExcludedReadingsAsTyped() {
        Record record = test::pressureTransmitter();
        record.exclusions.edit().add({17, ExclusionReason::NotSettled, "door opened", "TL", 0});
        const Certificate certificate = certificateOf(record);
        QCOMPARE(certificate.excluded.size(), std::size_t(1));
        const ExcludedLine& line = certificate.excluded[0];
        QCOMPARE(line.row, std::size_t(17));
        QCOMPARE(line.reference, Digits("4.9999"));
        QCOMPARE(line.indication, Digits("12.003"));
        QCOMPARE(line.words, std::string("door opened"));
        QCOMPARE(certificate.phases[0].excluded, std::size_t(1));
        QCOMPARE(certificate.phases[0].used, std::size_t(65));
    }

    void saysWhatTheReaderMustKnow() {
        const Certificate certificate = certificateOf(test::pressureTransmitter());
        const auto says = [&](Statement statement) {
            const auto& lines = certificate.statements;
            return std::any_of(lines.begin(), lines.end(), [&](const StatementLine& line) { return line.statement == statement; });
        };
        for (const Statement statement :
             {Statement::ErrorSign, Statement::ExpandedUncertainty, Statement::HysteresisSeparate, Statement::RepeatabilityFromOtherPhase,
              Statement::CorrectionsAlreadyApplied, Statement::OnlyThisItem, Statement::NotReproducedInPart, Statement::NoSampling})
            QVERIFY(says(statement));
        QVERIFY(!says(Statement::Recalibration));
        QCOMPARE(certificate.notices.size(), std::size_t(2));
        QVERIFY(certificate.notices[0].statement == Statement::AsFoundNotAccepted); // every error is inside ±0.012 mA
        QVERIFY(certificate.notices[1].statement == Statement::HysteresisLeft);
    }

    void warnsOnPageOneOfErrorsOutsideTheLimits() {
        Record record = test::pressureTransmitter();
        record.limits.percentOfSpan = number("0.05"); // ±0.008 mA
        QVERIFY(certificateOf(record).notices[0].statement == Statement::AsFoundOutsideLimits);
    }

    // Nothing recorded at all: no number is made up.
    void anEmptyRecordGivesAnEmptyCertificate() {
        const Certificate certificate = certificateOf(Record());
        QVERIFY(certificate.state == DraftState::Incomplete);
        QVERIFY(certificate.phases.empty());
        QVERIFY(!certificate.function);
    }
};

QTEST_APPLESS_MAIN(CertificateTest)
#include "tst_certificate.moc"
