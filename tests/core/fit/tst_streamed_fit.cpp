// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/SetPoints.h"
#include "core/fit/StreamKernel.h"
#include "core/fit/StreamedFit.h"
#include "core/fit/fitFunction.h"

#include <QTest>

#include <cmath>

using namespace spanwright;

namespace {

/// Readings on grids of 4 and 6 decimals: a curve with a scatter that a linear congruence makes.
struct Grids {
    std::vector<std::int64_t> x, y;

    [[nodiscard]] GridColumn gx() const { return {x, 4}; }
    [[nodiscard]] GridColumn gy() const { return {y, 6}; }
};

Grids makeGrids(std::size_t n, std::int64_t from) {
    Grids grids;
    std::uint64_t state = 12345;
    for (std::size_t i = 0; i < n; ++i) {
        state = state * 6364136223846793005u + 1442695040888963407u;
        const auto place = static_cast<std::int64_t>((state >> 33) % 10001);
        const auto scatter = static_cast<std::int64_t>((state >> 20) % 2001) - 1000;
        const double share = static_cast<double>(place) / 10000;
        grids.x.push_back(from + place);
        grids.y.push_back(std::llround((4 + 16 * share + 0.3 * share * share * share) * 1e6) + scatter);
    }
    return grids;
}

Record recordOf(const Grids& grids) {
    Record record;
    ReadingColumns::Block block;
    block.n = grids.x.size();
    block.reference = DecimalColumn::fromGrid(grids.x, std::vector<std::uint8_t>(block.n, 4), 4);
    block.indication = DecimalColumn::fromGrid(grids.y, std::vector<std::uint8_t>(block.n, 6), 6);
    record.readings.edit().appendBlock(std::move(block), 1);
    return record;
}

double digits(double got, double wanted) {
    return got == wanted ? 17 : -std::log10(std::fabs((got - wanted) / wanted));
}

/// Function and leverage at an integer of the grid, whatever the basis is scaled to.
struct Place {
    double value = 0, leverage = 0;
};

Place at(const StreamedFit& fit, std::int64_t x) {
    const DoubleDouble t = toDoubleDouble(x - fit.sums.map.x0) * fit.sums.map.xStep;
    std::vector<DoubleDouble> row{1.0, t};
    while (row.size() < fit.terms())
        row.push_back(2.0 * t * row.back() - row[row.size() - 2]);
    DoubleDouble value = 0.0, leverage = 0.0;
    for (std::size_t j = 0; j < fit.terms(); ++j) {
        value += fit.beta[j] * row[j];
        DoubleDouble z = 0.0;
        for (std::size_t k = 0; k <= j; ++k)
            z += row[k] * fit.inverseRoot[k * fit.terms() + j];
        leverage += z * z;
    }
    return {toDouble(value), toDouble(leverage)};
}

bool equalFits(const StreamedFit& a, const StreamedFit& b) {
    return a.beta == b.beta && a.inverseRoot == b.inverseRoot && a.residualSs == b.residualSs && a.totalSs == b.totalSs;
}

} // namespace

class StreamedFits : public QObject {
    Q_OBJECT

  private slots:
    /// The other road is Householder QR in double-double, reading by reading.
    void agreesWithDoubleDouble_data() {
        QTest::addColumn<QString>("function");
        QTest::addColumn<qlonglong>("from");
        QTest::addColumn<double>("least");
        for (const qlonglong from : {0ll, 200'000'000ll}) {
            QTest::addRow("constant from %lld", from) << "constant" << from << 14.0;
            QTest::addRow("line from %lld", from) << "line" << from << 13.5;
            QTest::addRow("proportional from %lld", from) << "proportional" << from << 13.5;
            QTest::addRow("quadratic from %lld", from) << "polynomial:2" << from << 13.0;
            QTest::addRow("cubic without constant from %lld", from) << "polynomial-no-constant:3" << from << 10.5;
            QTest::addRow("degree 6 from %lld", from) << "polynomial:6" << from << 10.0; // its upper terms are noise
        }
    }
    void agreesWithDoubleDouble() {
        QFETCH(QString, function);
        QFETCH(qlonglong, from);
        QFETCH(double, least);
        Record record = recordOf(makeGrids(ManyReadings + 3, from));
        record.choices.function = *parseFunctionName(function.toStdString());
        const Sample sample = makeSample(record, Phase::AsFound);
        QVERIFY(sample.grids != nullptr);
        const auto streamed = fitFunction(sample, record.choices);
        const auto exact = fitFunction(withExactColumns(sample), record.choices);
        QVERIFY(streamed.ok() && exact.ok());
        for (std::size_t k = 0; k < exact->fit.terms(); ++k) {
            const double value = digits(streamed->fit.coefficients[k].value, exact->fit.coefficients[k].value);
            const double u = digits(streamed->fit.coefficients[k].standardUncertainty,
                                    exact->fit.coefficients[k].standardUncertainty);
            QVERIFY2(value >= least && u >= 12.5,
                     qPrintable(QString("b%1: %2 digits, uncertainty %3").arg(k).arg(value).arg(u)));
        }
        QVERIFY(digits(streamed->fit.residualSs, exact->fit.residualSs) >= 13);
        QVERIFY(digits(streamed->fit.totalSs, exact->fit.totalSs) >= 14);
        for (const std::size_t i : {std::size_t{0}, std::size_t{77}, sample.size() - 1}) {
            QVERIFY(std::fabs(streamed->residuals.e.high[i] - exact->residuals.e.high[i]) < 1e-12);
            QVERIFY(digits(streamed->residuals.leverage[i], exact->residuals.leverage[i]) > 9);
        }
        QVERIFY(digits(streamed->fit.curve->variance(exact->fit.high), exact->fit.curve->variance(exact->fit.high)) >
                12);
    }

    void sameBitsForThreadsAndProcessors() {
        const Grids grids = makeGrids(200'003, 7);
        for (const int degree : {1, 2, 6}) {
            const auto one = fitStreamed(grids.gx(), grids.gy(), degree, StreamedConstant::With, 1);
            const auto three = fitStreamed(grids.gx(), grids.gy(), degree, StreamedConstant::With, 3);
            QVERIFY(one && three && equalFits(*one, *three));
        }
        if (&streamKernel() == &plain::kernel)
            QSKIP("no AVX2 here");
        const StreamBlock block{reinterpret_cast<const long*>(grids.x.data()),
                                reinterpret_cast<const long*>(grids.y.data()),
                                512,
                                5007,
                                12'000'000,
                                1 / 5000.0,
                                1e-6};
        for (std::size_t d = 0; d <= MostStreamedDegree; ++d) {
            double a[64] = {}, b[64] = {};
            StreamRange one{block.x[0], block.x[0], 0}, other = one;
            plain::kernel.moments[d](block, a, one);
            streamKernel().moments[d](block, b, other);
            QVERIFY(std::equal(a, a + 64, b));
            QVERIFY(one.low == other.low && one.high == other.high && one.wide == other.wide);
            const double c[MostStreamedDegree + 1] = {1e5, 8e6, 1, 2, 3};
            plain::kernel.residuals[d](block, c, a);
            streamKernel().residuals[d](block, c, b);
            QVERIFY(std::equal(a, a + 64, b));
        }
    }

    /// Leaving out reading after reading, and taking them in again, is the fit of what is there.
    void changesReadingByReading() {
        const Grids grids = makeGrids(20'000, 100'000);
        for (const int degree : {1, 2, 6}) {
            const StreamedFit all = *fitStreamed(grids.gx(), grids.gy(), degree, StreamedConstant::With, 1);
            StreamedFit changed = all;
            Grids rest;
            for (std::size_t i = 0; i < grids.x.size(); ++i) {
                if (i % 100 == 3 && grids.x[i] != all.sums.lowX && grids.x[i] != all.sums.highX) {
                    changed = *changedBy(changed, StreamedChange::Exclude, grids.x[i], grids.y[i]);
                } else {
                    rest.x.push_back(grids.x[i]);
                    rest.y.push_back(grids.y[i]);
                }
            }
            QVERIFY(rest.x.size() < grids.x.size() - 100);
            const StreamedFit refit = *fitStreamed(rest.gx(), rest.gy(), degree, StreamedConstant::With, 1);
            QVERIFY(digits(toDouble(changed.residualSs), toDouble(refit.residualSs)) >= 11);
            QVERIFY(digits(toDouble(changed.totalSs), toDouble(refit.totalSs)) >= 11);
            for (const std::int64_t x : {100'000, 104'321, 110'000}) {
                QVERIFY(digits(at(changed, x).value, at(refit, x).value) >= 11);
                QVERIFY(digits(at(changed, x).leverage, at(refit, x).leverage) >= 11);
            }
            for (std::size_t i = 0; i < grids.x.size(); ++i)
                if (i % 100 == 3 && grids.x[i] != all.sums.lowX && grids.x[i] != all.sums.highX)
                    changed = *changedBy(changed, StreamedChange::Include, grids.x[i], grids.y[i]);
            QVERIFY(digits(toDouble(changed.residualSs), toDouble(all.residualSs)) >= 11);
        }
    }

    void refusesWhatItWouldLose() {
        Grids same{{5, 5, 5, 5}, {1, 2, 3, 4}};
        QVERIFY(!fitStreamed(same.gx(), same.gy(), 1, StreamedConstant::With, 1));
        Grids wideIndication{{1, 2, 3, 4}, {1, 2, std::int64_t{1} << 60, 4}};
        QVERIFY(!fitStreamed(wideIndication.gx(), wideIndication.gy(), 1, StreamedConstant::With, 1));
        Grids wide{{0, 1, std::int64_t{1} << 60, 4}, {1, 2, 3, 4}};
        QVERIFY(!fitStreamed(wide.gx(), wide.gy(), 1, StreamedConstant::With, 1));
        Grids twoPlaces{{0, 0, 10, 10}, {1, 2, 3, 4}};
        QVERIFY(!fitStreamed(twoPlaces.gx(), twoPlaces.gy(), 2, StreamedConstant::With, 1));
    }

    /// A perfect line leaves exactly nothing, however many readings lie on it.
    void perfectLineOfManyReadings() {
        Grids grids = makeGrids(ManyReadings, 0);
        for (std::size_t i = 0; i < grids.x.size(); ++i)
            grids.y[i] = 4'000'000 + 160 * grids.x[i];
        Record record = recordOf(grids);
        const auto outcome = fitFunction(makeSample(record, Phase::AsFound), record.choices);
        QCOMPARE(outcome->fit.residualSs, 0.0);
        QCOMPARE(outcome->fit.coefficients[1].value, 1.6);
    }

    /// One reading far outside all that was looked at first: the moments are taken again over the whole range.
    void readingFarOutside() {
        Grids grids = makeGrids(50'001, 0);
        grids.x[17] = 900'000'000;
        grids.y[17] = 1'444'000'000'000;
        const auto streamed = fitStreamed(grids.gx(), grids.gy(), 1, StreamedConstant::With, 1);
        QVERIFY(streamed.has_value());
        QCOMPARE(streamed->sums.highX, std::int64_t{900'000'000});
        Record record = recordOf(grids);
        const auto exact = fitFunction(makeSample(record, Phase::AsFound), record.choices);
        QVERIFY(digits(toDouble(streamed->residualSs * sqr(streamed->sums.map.unit())), exact->fit.residualSs) >= 12);
    }

    void groupsByGridAsByValue_data() {
        QTest::addColumn<qlonglong>("step");
        QTest::newRow("narrow: by table") << 1ll;
        QTest::newRow("wide: by digits") << 123'456'789ll;
        QTest::newRow("very wide: by sorting") << 100'000'000'000'000ll;
    }
    void groupsByGridAsByValue() {
        QFETCH(qlonglong, step);
        std::vector<std::int64_t> grid;
        PairColumn values;
        for (std::int64_t i = 0; i < 5000; ++i) {
            grid.push_back(((i * 7919) % 1000 - 300) * step);
            values.push_back(toDoubleDouble(grid.back()) * powerOfTen(-3));
        }
        Sample byGrid, byValue;
        groupByGrid(byGrid, grid, 3);
        groupByValue(byValue, values);
        QVERIFY(byGrid.group == byValue.group);
        QCOMPARE(byGrid.groupValue.size(), std::size_t{1000});
        QVERIFY(byGrid.groupValue == byValue.groupValue);
    }
};

QTEST_APPLESS_MAIN(StreamedFits)
#include "tst_streamed_fit.moc"
