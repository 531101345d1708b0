// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/interval/ToleranceFactor.h"

#include "core/fit/fitFunction.h"
#include "core/interval/Bands.h"
#include "tests/support/PublishedSet.h"

#include <QTest>

#include <cmath>

using namespace spanwright;
using namespace spanwright::test;

class ToleranceFactors : public QObject {
    Q_OBJECT

  private slots:
    /// ISO 16269-6 tables and NIST/SEMATECH 7.2.6.3, as printed and to twelve digits as recomputed by exact
    /// integration.
    void agreesWithTheTables() {
        const PublishedSet set = publishedSet("tolerance_factors");
        int compared = 0;
        for (const auto& [name, wanted] : set.recomputed) {
            const QString inside = QString::fromStdString(name).section('[', 1).chopped(1);
            const double n = inside.section(',', 0, 0).toDouble(), share = inside.section(',', 1, 1).toDouble(),
                         confidence = inside.section(',', 2, 2).toDouble();
            double got = 0;
            if (name.rfind("k1", 0) == 0)
                got = toleranceFactorOneSided(n, n - 1, share, confidence);
            else if (name.rfind("k2_howe", 0) == 0)
                got = toleranceFactorHowe(n, n - 1, share, confidence);
            else
                got = toleranceFactorTwoSided(n, n - 1, share, confidence);
            QVERIFY2(digitsAgreed(got, wanted) >= 12, qPrintable(QString("%1: got %2, wanted %3")
                                                                     .arg(QString::fromStdString(name))
                                                                     .arg(got, 0, 'g', 16)
                                                                     .arg(QString::fromStdString(wanted))));
            const auto printed = set.published.find(name);
            if (printed != set.published.end())
                QVERIFY2(agreesAsPrinted(got, printed->second), name.c_str());
            compared += 1;
        }
        QCOMPARE(compared, 15);
    }

    /// A constant function is a sample: its tolerance band is mean ± k2 s.
    void bandOfAConstantIsTheInterval() {
        Record record = recordOf(std::vector<std::string>{}, {"5.1", "4.9", "5.3", "5.0", "4.8"});
        record.choices.function = {FunctionFamily::Constant, 0};
        const auto outcome = fitFunction(makeSample(record, Phase::AsFound), record.choices);
        QVERIFY(outcome.ok());
        const Interval band = toleranceAt(outcome->fit, 0, 0.95);
        const double k = (band.high - band.low) / 2 / outcome->fit.residualSd;
        QVERIFY(agreesAsPrinted(k, publishedSet("tolerance_factors").published.at("k2[5,0.95,0.95]")));
        QVERIFY(std::fabs((band.low + band.high) / 2 - 5.02) < 1e-14);
    }

    /// With ever more readings the factor becomes the normal quantile.
    void growsTowardsTheNormalQuantile() {
        QVERIFY(std::fabs(toleranceFactorTwoSided(1e7, 1e7, 0.95, 0.95) - 1.959964) < 2e-3);
        QVERIFY(std::isnan(toleranceFactorTwoSided(5, 0, 0.95, 0.95)));
        QVERIFY(std::isnan(toleranceFactorOneSided(5, 4, 1.0, 0.95)));
    }
};

QTEST_APPLESS_MAIN(ToleranceFactors)
#include "tst_tolerance_factor.moc"
