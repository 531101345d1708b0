// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/verdict/Conformity.h"
#include "core/verdict/makeVerdict.h"
#include "tests/support/PublishedSet.h"
#include "tests/support/SampleRecord.h"

#include <QTest>

#include <cmath>
#include <limits>

using namespace spanwright;
using test::number;

namespace {

constexpr double Infinite = std::numeric_limits<double>::infinity();

MeasuredValue normal(double value, double u) {
    return {value, u, Infinite, Distribution::Normal};
}

Limits rule(DecisionRule which, const char* fraction = "1") {
    Limits limits;
    limits.rule = which;
    limits.fraction = number(fraction);
    return limits;
}

} // namespace

class ConformityTest : public QObject {
    Q_OBJECT

  private slots:
    // JCGM 106:2012, clause 7 (from memory; recomputed): a breakdown voltage with an upper limit, an oil's viscosity with two.
    void givesTheConformanceProbability() {
        const test::PublishedSet set = test::publishedSet("jcgm106_conformance");
        const double voltage = conformanceProbability(normal(-5.47, 0.05), -Infinite, -5.40);
        QVERIFY(test::digitsAgreed(voltage, set.recomputedNumber("p_c[breakdown_voltage]")) > 13);
        QVERIFY(test::agreesAsPrinted(voltage, set.published.at("p_c[breakdown_voltage]")));
        const double oil = conformanceProbability(normal(13.6, 1.8), 12.5, 16.3);
        QVERIFY(test::digitsAgreed(oil, set.recomputedNumber("p_c[oil_viscosity]")) > 13);
        QVERIFY(test::agreesAsPrinted(oil, set.published.at("p_c[oil_viscosity]")));
    }

    // Limits ±0.012, u = 0.00225 (posterior normal; computed separately, after JCGM 106:2012, 7): standardised distances by hand.
    void givesTheConformanceProbabilityBetweenTwoLimits() {
        QVERIFY(test::agreesAsPrinted(100 * conformanceProbability(normal(-0.0110, 0.00225), -0.012, 0.012), "67.16"));
        QVERIFY(test::agreesAsPrinted(100 * conformanceProbability(normal(-0.0075, 0.00225), -0.012, 0.012), "97.72"));
        QVERIFY(test::agreesAsPrinted(100 * conformanceProbability(normal(-0.0050, 0.00225), -0.012, 0.012), "99.91"));
    }

    // Few degrees of freedom: t = 1 with 1 degree of freedom is Cauchy, P(T ≤ 1) = 3/4 exactly.
    void usesStudentForFewDegreesOfFreedom() {
        const MeasuredValue measured{0, 1, 1, Distribution::Student};
        QVERIFY(std::fabs(conformanceProbability(measured, -Infinite, 1) - 0.75) < 1e-14);
        QVERIFY(std::fabs(conformanceProbability(measured, -1, 1) - 0.5) < 1e-14);
    }

    void usesTheRectangleWhereItDominates() {
        const MeasuredValue measured{0, 1, Infinite, Distribution::Rectangular};
        QVERIFY(std::fabs(conformanceProbability(measured, -Infinite, std::sqrt(3.0) / 2) - 0.75) < 1e-14);
        QCOMPARE(conformanceProbability(measured, -2, 2), 1.0);
    }

    void isCertainWithoutUncertainty() {
        QCOMPARE(conformanceProbability(normal(1, 0), -1, 1), 1.0);
        QCOMPARE(conformanceProbability(normal(1.1, 0), -1, 1), 0.0);
    }

    // ILAC G8:09/2019, table 1 (bounds from memory), with U = 2u: Φ(−2r) recomputed to 30 digits.
    void boundsTheRiskOfFalseAcceptance() {
        const test::PublishedSet set = test::publishedSet("ilac_g8_guard_bands");
        for (const auto& row : set.rows) {
            const Limits limits = rule(DecisionRule::GuardedByFraction, row[1].c_str());
            const double risk = acceptanceRisk(limits, 2);
            QVERIFY2(test::digitsAgreed(risk, set.recomputedNumber("risk[" + row[0] + "]")) > 13, row[0].c_str());
        }
        QCOMPARE(acceptanceRisk(rule(DecisionRule::Simple), 2), 0.5);
        QVERIFY(acceptanceRisk(rule(DecisionRule::GuardedByU), 1.96) < 0.0251);
    }

    // ILAC G8:09/2019, 4.2.1 to 4.2.3, limit 12, U 4.
    void decidesByEveryRule_data() {
        QTest::addColumn<double>("error");
        QTest::addColumn<int>("simple");
        QTest::addColumn<int>("guarded");
        QTest::addColumn<int>("half");
        QTest::addColumn<int>("fourState");
        const int pass = int(ConformityState::Pass), fail = int(ConformityState::Fail);
        const int conditionalPass = int(ConformityState::ConditionalPass), conditionalFail = int(ConformityState::ConditionalFail);
        QTest::newRow("well inside") << 5.0 << pass << pass << pass << pass;
        QTest::newRow("on the acceptance limit") << 8.0 << pass << pass << pass << pass;
        QTest::newRow("in the guard band") << 9.0 << pass << fail << pass << conditionalPass;
        QTest::newRow("on the limit") << -12.0 << pass << fail << fail << conditionalPass;
        QTest::newRow("on the limit but for a rounding") << 12 * (1 + 1e-15) << pass << fail << fail << conditionalPass;
        QTest::newRow("just outside") << -12.1 << fail << fail << fail << conditionalFail;
        QTest::newRow("clearly outside") << 16.1 << fail << fail << fail << fail;
    }
    void decidesByEveryRule() {
        QFETCH(double, error);
        QFETCH(int, simple);
        QFETCH(int, guarded);
        QFETCH(int, half);
        QFETCH(int, fourState);
        const auto by = [error](const Limits& limits) {
            return int(decide(error, 12, guardBand(limits, 4), limits.rule, 1e-12));
        };
        QCOMPARE(by(rule(DecisionRule::Simple)), simple);
        QCOMPARE(by(rule(DecisionRule::GuardedByU)), guarded);
        QCOMPARE(by(rule(DecisionRule::GuardedByFraction, "0.5")), half);
        QCOMPARE(by(rule(DecisionRule::FourState)), fourState);
    }

    // U beyond the limit leaves no room to accept, not even for an error of zero.
    void acceptsNothingWhenTheGuardBandIsWiderThanTheLimit() {
        QCOMPARE(int(decide(0, 1, 1.5, DecisionRule::GuardedByU, 1e-12)), int(ConformityState::Fail));
        QCOMPARE(int(decide(0, 1, 1.5, DecisionRule::FourState, 1e-12)), int(ConformityState::ConditionalPass));
    }

    // 0.1 % of 12 mA + 0.075 % of 16 mA + 0.002 mA = 0.026 mA; of the reference 0.1 % of 5 bar + 0.075 % of 10 bar + 0.002 bar
    // = 0.0145 bar, times 1.6 mA/bar = 0.0232 mA.
    void addsUpTheLimits() {
        const Item item = test::pressureTransmitter().item;
        Limits limits;
        limits.percentOfReading = number("0.1");
        limits.percentOfSpan = number("0.075");
        limits.constant = number("0.002");
        QVERIFY(std::fabs(*limitHalfWidth(limits, item, 5, 12, 1.6) - 0.026) < 1e-15);
        QVERIFY(std::fabs(*limitHalfWidth(limits, item, -5, -12, 1.6) - 0.026) < 1e-15);
        limits.side = Side::Reference;
        QVERIFY(std::fabs(*limitHalfWidth(limits, item, 5, 12, 1.6) - 0.0232) < 1e-15);
        QVERIFY(!limitHalfWidth(Limits{}, item, 5, 12, 1.6));
        Item bare;
        QVERIFY(!limitHalfWidth(limits, bare, 5, 12, 1.6));
    }
};

QTEST_APPLESS_MAIN(ConformityTest)
#include "tst_conformity.moc"
