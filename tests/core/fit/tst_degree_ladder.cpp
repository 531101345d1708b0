// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/DegreeLadder.h"
#include "tests/support/FitHelp.h"

#include <QTest>

#include <cmath>

using namespace spanwright;
using namespace spanwright::test;

class DegreeLadders : public QObject {
    Q_OBJECT

  private slots:
    /// ASTM E74, table of C(n1, d) for n1 = 10 (from memory): 1.373, 1.455, 1.582, 1.801 for degrees 2 to 5.
    void factorsOfTheForceStandard() {
        std::vector<std::string> x, y;
        for (int i = 1; i <= 10; ++i) {
            x.push_back(std::to_string(i));
            y.push_back(std::to_string(i * 2) + "." + std::to_string((i * 37) % 10));
        }
        Record record = recordOf({x, y, {}, {}});
        const DegreeLadder ladder = degreeLadder(makeSample(record, Phase::AsFound), record.choices, 0);
        QCOMPARE(ladder.steps.size(), std::size_t{5});
        const char* const printed[] = {"1.373", "1.455", "1.582", "1.801"};
        for (std::size_t i = 1; i < 5; ++i)
            QVERIFY2(agreesAsPrinted(*ladder.steps[i].e74, printed[i - 1]), printed[i - 1]);
    }

    /// NIST/SEMATECH 4.6.1: the load cell needs a quadratic, and no more; a resolution as coarse as the gain forbids
    /// it.
    void loadCellNeedsAQuadratic() {
        const PublishedSet set = publishedSet("loadcell");
        Record record = recordOf(set, {"load", "deflection", "", "", ""});
        const Sample sample = makeSample(record, Phase::AsFound);
        const DegreeLadder ladder = degreeLadder(sample, record.choices, 0.00001);
        QCOMPARE(ladder.byPartialF, 2);
        QCOMPARE(ladder.suggested, 2);
        QVERIFY(digitsAgreed(ladder.steps[0].residualSd, set.recomputed.at("line.residual_sd")) >= 14.9);
        QVERIFY(digitsAgreed(ladder.steps[1].residualSd, set.recomputed.at("quad.residual_sd")) >= 14.9);
        const double ssLine = std::stod(set.recomputed.at("line.ss_residual")),
                     ssQuad = std::stod(set.recomputed.at("quad.ss_residual"));
        QVERIFY(std::fabs(*ladder.steps[1].f / ((ssLine - ssQuad) / (ssQuad / 37)) - 1) < 1e-11);
        QVERIFY(ladder.steps[1].change > 0.001 && ladder.steps[1].monotonic);
        QCOMPARE(degreeLadder(sample, record.choices, 0.01).suggested, 1);
    }

    void turningFunctionsAreRefused() {
        Record record = recordOf({{"0", "1", "2", "3", "4", "5", "6", "7"},
                                  {"0.0", "5.1", "7.9", "9.2", "8.8", "8.1", "5.0", "0.1"},
                                  {},
                                  {}});
        const DegreeLadder ladder = degreeLadder(makeSample(record, Phase::AsFound), record.choices, 0.01, 4);
        QVERIFY(!ladder.steps[1].monotonic);
        QCOMPARE(ladder.suggested, 1);
    }

    // Hurvich and Tsai's correction divides by n − k − 1, k with the variance: it needs two readings beyond the coefficients.
    void aiccIsEmptyWithoutReadingsToSpare() {
        Record record = recordOf({{"0", "1", "2", "3", "4", "5"}, {"0.1", "1.2", "2.1", "3.3", "4.2", "5.1"}, {}, {}});
        const DegreeLadder ladder = degreeLadder(makeSample(record, Phase::AsFound), record.choices, 0);
        QCOMPARE(ladder.steps.size(), std::size_t{4});
        QVERIFY(ladder.steps[0].aicc && ladder.steps[1].aicc);
        QVERIFY(!ladder.steps[2].aicc && !ladder.steps[3].aicc);
        QCOMPARE(ladder.byAicc, std::optional<int>(1));
        Record three = recordOf({{"0", "1", "2"}, {"0.1", "1.2", "2.1"}, {}, {}});
        const DegreeLadder shorter = degreeLadder(makeSample(three, Phase::AsFound), three.choices, 0);
        QCOMPARE(shorter.byAicc, std::optional<int>());
        QCOMPARE(shorter.suggested, 1);
    }

    void stopsWhereReadingsEnd() {
        Record record = recordOf({{"0", "1", "2", "3"}, {"0.0", "1.1", "1.9", "3.1"}, {}, {}});
        QCOMPARE(degreeLadder(makeSample(record, Phase::AsFound), record.choices, 0).steps.size(), std::size_t{2});
        Record two = recordOf({{"0", "1"}, {"0.0", "1.1"}, {}, {}});
        QVERIFY(degreeLadder(makeSample(two, Phase::AsFound), two.choices, 0).steps.empty());
    }
};

QTEST_APPLESS_MAIN(DegreeLadders)
#include "tst_degree_ladder.moc"
