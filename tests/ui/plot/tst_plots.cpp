// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/evaluate.h"
#include "tests/support/SampleRecord.h"
#include "ui/look/Look.h"
#include "ui/plot/PlotPair.h"
#include "ui/plot/SplitPicture.h"

#include <QApplication>
#include <QSignalSpy>
#include <QTest>

#include <cmath>

using namespace spanwright;

namespace {

std::shared_ptr<const Evaluation> evaluated(const Record& record) {
    Progress progress;
    return std::make_shared<const Evaluation>(*evaluate(record, progress));
}

PlotSubject subjectOf(const Record& record) {
    return {phaseOf(evaluated(record), record.choices.phase), record.item, record.readings, record.exclusions, record.choices.fit};
}

/// Readings with a set point and nothing else to them.
Record plain(const std::vector<std::pair<const char*, const char*>>& readings) {
    Record record;
    record.item.reference.unit = "bar";
    record.item.indication.unit = "mA";
    for (const auto& [x, y] : readings) {
        Reading reading;
        reading.id = record.nextReadingId++;
        reading.reference = test::number(x);
        reading.indication = test::number(y);
        record.readings.edit().append(reading);
    }
    return record;
}

void shown(QWidget& widget) {
    widget.resize(640, 400);
    widget.show();
    QVERIFY(QTest::qWaitForWindowExposed(&widget));
}

void drag(PlotView& plot, const QPoint& from, const QPoint& to, Qt::KeyboardModifiers modifiers = {}) {
    QTest::mousePress(plot.viewport(), Qt::LeftButton, modifiers, from);
    QTest::mouseMove(plot.viewport(), (from + to) / 2);
    QTest::mouseMove(plot.viewport(), to);
    QTest::mouseRelease(plot.viewport(), Qt::LeftButton, modifiers, to);
}

} // namespace

class PlotsTest : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() { setScheme(*qApp, SchemeName::Light); }

    void ticksAreRoundAndLieInTheRange() {
        const Ticks ticks = roundTicks({-0.0117, 0.0117}, 5);
        QCOMPARE(ticks.step, 0.005);
        QCOMPARE(ticks.decimals, 3);
        QCOMPARE(ticks.places.size(), std::size_t(5));
        QCOMPARE(tickText(ticks.places.front(), ticks, TickSign::Both, QLocale::c()), QStringLiteral("−0.010"));
        QCOMPARE(tickText(ticks.places[2], ticks, TickSign::Both, QLocale::c()), QStringLiteral("0"));
        QCOMPARE(tickText(ticks.places.back(), ticks, TickSign::Both, QLocale(QLocale::German)), QStringLiteral("+0,010"));
        QCOMPARE(roundTicks({0, 600}, 7).step, 100.0);
        QVERIFY(roundTicks({3, 3}, 5).places.empty());
        const Ticks few = roundTicks({-0.028, 0.028}, 3); // 0 alone would not say how long the axis is
        QCOMPARE(few.step, 0.02);
        QCOMPARE(few.places.size(), std::size_t(3));
    }

    void theLinePlotShowsEveryReadingAndLabelsItsEnlargement() {
        LinePlot plot;
        plot.setSubject(subjectOf(test::pressureTransmitter()));
        shown(plot);
        QCOMPARE(plot.points().size(), std::size_t(66));
        QCOMPARE(plot.enlargement(), 100);
        QVERIFY(plot.ink().notes().front().text.contains(QStringLiteral("×100")));
        // Enlarged about the line: the distance drawn is a hundred times the residual.
        const PlotSubject subject = subjectOf(test::pressureTransmitter());
        const RowFigures& rows = subject.phase->rows;
        QVERIFY(std::abs(plot.points().y[4] - (rows.fitted[4] + 100 * rows.residual[4])) < 1e-12);
        plot.setEnlargement(1);
        QCOMPARE(plot.points().y[4], rows.indication[4]);
        QVERIFY(plot.ink().notes().empty());
        QVERIFY(plot.accessibleDescription().contains(QStringLiteral("66 readings")));
    }

    void bothPlotsShareTheirHorizontalAxis() {
        LinePlot line;
        ResidualPlot residual;
        PlotPair pair(line, residual);
        line.setSubject(subjectOf(test::pressureTransmitter()));
        residual.setSubject(subjectOf(test::pressureTransmitter()));
        shown(line);
        shown(residual);
        QVERIFY(residual.frame().y.low < 0 && residual.frame().y.high < 0.1);
        for (const ReadingId id : {1, 18, 66})
            QCOMPARE(line.placeOf(id).x(), residual.placeOf(id).x());
        QTest::keyClick(&line, Qt::Key_Plus);
        QVERIFY(line.frame().x.span() < 10);
        QVERIFY(residual.frame().x == line.frame().x);
        QTest::keyClick(&residual, Qt::Key_0);
        QVERIFY(residual.frame().x == line.frame().x);
        QVERIFY(line.frame().x.span() > 10);
    }

    // Also beside a line plot whose axis it follows, and after a zoom.
    // While nothing is fitted the plot of residuals is empty; it must not hold the line to a range of its own.
    void theRangeGrowsWithTheReadingsTyped() {
        LinePlot line;
        ResidualPlot residual;
        PlotPair pair(line, residual);
        shown(line);
        shown(residual);
        Record record;
        for (int i = 0; i < 5; ++i) {
            Reading reading;
            reading.id = record.nextReadingId++;
            reading.reference = Decimal{25 * i, 1, {}};
            reading.indication = Decimal{40 + 41 * i, 1, {}};
            record.readings.edit().append(reading);
            line.setSubject(subjectOf(record));
            residual.setSubject(subjectOf(record));
            QVERIFY(line.frame().x.high > 2.5 * i);
            QVERIFY(i < 2 || residual.frame().x == line.frame().x);
        }
        record.choices.weights = Weights::Stated; // nothing is stated: refused
        line.setSubject(subjectOf(record));
        residual.setSubject(subjectOf(record));
        record.choices.weights = Weights::Equal;
        line.setSubject(subjectOf(record));
        residual.setSubject(subjectOf(record));
        QVERIFY(line.frame().x.high > 10 && residual.frame().x == line.frame().x);
    }

    void everyViewOfTheResidualsShowsAllOfThem() {
        LinePlot line;
        ResidualPlot residual;
        PlotPair pair(line, residual);
        line.setSubject(subjectOf(test::flowSensorAsTyped()));
        residual.setSubject(subjectOf(test::flowSensorAsTyped()));
        shown(line);
        shown(residual);
        QTest::keyClick(&line, Qt::Key_Plus);
        for (const ResidualView view : residualViews) {
            if (view == ResidualView::Reference)
                continue;
            residual.setView(view);
            const AxisRange range = residual.frame().x;
            double low = range.high, high = range.low;
            for (const double x : residual.points().x)
                if (std::isfinite(x)) {
                    QVERIFY2(x >= range.low && x <= range.high, qPrintable(residualViewText(view, subjectOf(test::flowSensorAsTyped()))));
                    low = std::min(low, x);
                    high = std::max(high, x);
                }
            QVERIFY(view == ResidualView::Run || high - low > 0.8 * range.span());
        }
    }

    void aClickSelectsTheMarkUnderIt() {
        ResidualPlot plot;
        plot.setSubject(subjectOf(test::pressureTransmitter()));
        shown(plot);
        QSignalSpy selected(&plot, &PlotView::selected);
        QTest::mouseClick(plot.viewport(), Qt::LeftButton, {}, plot.placeOf(6).toPoint());
        QCOMPARE(selected.size(), 1);
        QCOMPARE(selected.last()[0].value<std::set<ReadingId>>(), std::set<ReadingId>{6});
    }

    void aRectangleSelectsWhatIsInside() {
        ResidualPlot plot;
        plot.setSubject(subjectOf(test::pressureTransmitter()));
        shown(plot);
        QSignalSpy selected(&plot, &PlotView::selected);
        const QPoint middle = plot.placeOf(6).toPoint();
        std::set<ReadingId> expected;
        const QRectF rectangle(middle - QPoint(20, 500), middle + QPoint(20, 500));
        for (const ReadingId id : plot.points().ids)
            if (rectangle.contains(plot.placeOf(id)))
                expected.insert(id);
        drag(plot, middle - QPoint(20, 500), middle + QPoint(20, 500));
        QCOMPARE(selected.last()[0].value<std::set<ReadingId>>(), expected);
        QCOMPARE(expected.size(), std::size_t(6)); // 5 bar, rising and falling, three runs
        QTest::keyClick(&plot, Qt::Key_Escape);
        QVERIFY(selected.last()[0].value<std::set<ReadingId>>().empty());
    }

    void keysMoveSelectAndExclude() {
        LinePlot plot;
        plot.setSubject(subjectOf(test::pressureTransmitter()));
        shown(plot);
        QSignalSpy selected(&plot, &PlotView::selected);
        QSignalSpy exclude(&plot, &PlotView::excludeRequested);
        for (int i = 0; i < 3; ++i)
            QTest::keyClick(&plot, Qt::Key_Right);
        QCOMPARE(*plot.current(), ReadingId(3));
        QVERIFY(plot.accessibleDescription().startsWith(QStringLiteral("Reading 3, run 1, rising")));
        QTest::keyClick(&plot, Qt::Key_Space);
        QCOMPARE(selected.last()[0].value<std::set<ReadingId>>(), std::set<ReadingId>{3});
        const double before = plot.placeOf(3).y();
        QTest::keyClick(&plot, Qt::Key_Up);
        QVERIFY(plot.placeOf(*plot.current()).y() < before);
        QCOMPARE(plot.placeOf(*plot.current()).x() - plot.placeOf(3).x() < 11, true);
        QTest::keyClick(&plot, Qt::Key_X);
        QCOMPARE(exclude.size(), 1);
    }

    void anExcludedReadingFarOffStaysInSight() {
        Record record = test::pressureTransmitter();
        record.readings.edit().setNumber(9, NumberColumn::Indication, test::number("184.00"));
        record.exclusions.edit().add({10, ExclusionReason::TypingSlip, "", "IO", 0});
        ResidualPlot plot;
        plot.setSubject(subjectOf(record));
        shown(plot);
        QVERIFY(plot.frame().y.high < 0.1);
        QVERIFY(plot.frame().area.contains(plot.placeOf(10)));
        QCOMPARE(plot.points().excluded[9], std::uint8_t(1));
        QVERIFY(plot.ink().notes().front().text.contains(QStringLiteral("10 excluded: typing slip")));
    }

    void aSelectedReadingShowsItsDistances() {
        const Record record = test::pressureTransmitter();
        const PlotSubject subject = subjectOf(record);
        LinePlot plot;
        plot.setSubject(subject);
        shown(plot);
        plot.showSelection({18});
        const QString said = plot.ink().notes().back().text;
        QVERIFY2(said.startsWith(QStringLiteral("Reading 18: total −1.5960 = explained −1.6003 and residual +0.0043")), qPrintable(said));
        QVERIFY(plot.ink().strokes().size() >= 7); // the mean, and three distances of two halves each
        double sum = 0;
        for (const double y : subject.phase->rows.indication)
            sum += y;
        QVERIFY(std::abs(plot.ink().strokes().front().points.front().y() - sum / 66) < 1e-12);
    }

    void aPartOfTheSplitIsDrawnOverTheResiduals() {
        const PlotSubject subject = subjectOf(test::pressureTransmitter());
        QVERIFY(subject.phase->split.has_value());
        ResidualPlot plot;
        plot.setSubject(subject);
        shown(plot);
        const std::size_t bare = plot.ink().strokes().size();
        plot.showPart(SplitPart::Hysteresis);
        QCOMPARE(plot.ink().strokes().size(), bare + 2);
        QCOMPARE(plot.ink().strokes()[bare].points.size(), std::size_t(11));
        // Rising means lie below falling ones at mid-range: the sample's hysteresis.
        QVERIFY(plot.ink().strokes()[bare].points[5].y() < plot.ink().strokes()[bare + 1].points[5].y() - 0.008);
        plot.showPart(SplitPart::RunOffset);
        QCOMPARE(plot.ink().strokes().size(), bare + 3);
        plot.showPart(SplitPart::LackOfFit);
        QCOMPARE(plot.ink().strokes().size(), bare + 1);
        plot.showPart(std::nullopt);
        QCOMPARE(plot.ink().strokes().size(), bare);
    }

    void wordsOfLinesStandClearOfMarks() {
        const PlotSubject subject = subjectOf(test::pressureTransmitter());
        for (const QSize size : {QSize(420, 220), QSize(640, 260), QSize(1400, 520)}) {
            ResidualPlot plot;
            plot.setSubject(subject);
            shown(plot);
            plot.resize(size);
            for (const SplitPart part : {SplitPart::LackOfFit, SplitPart::Hysteresis, SplitPart::RunOffset, SplitPart::RunSlope, SplitPart::Repeatability}) {
                plot.showPart(part);
                const std::vector<QRectF>& labels = plot.ink().labels();
                QCOMPARE(labels.size(), plot.ink().strokes().size());
                for (std::size_t i = 0; i < labels.size(); ++i) {
                    QVERIFY(labels[i].isNull() == plot.ink().strokes()[i].label.isEmpty());
                    for (std::size_t j = 0; j < i; ++j)
                        QVERIFY2(!labels[i].intersects(labels[j]), qPrintable(plot.ink().strokes()[i].label));
                    int covered = 0;
                    for (const ReadingId id : plot.points().ids)
                        covered += labels[i].contains(plot.placeOf(id));
                    QVERIFY2(covered <= (size.width() < 500 ? 1 : 0), qPrintable(QString("%1 at %2: %3").arg(plot.ink().strokes()[i].label).arg(size.width()).arg(covered)));
                }
            }
        }
    }

    void everyViewOfTheResidualsHasAPlaceForEachReading() {
        const PlotSubject subject = subjectOf(test::pressureTransmitter());
        ResidualPlot plot;
        plot.setSubject(subject);
        shown(plot);
        for (const ResidualView view : residualViews) {
            plot.setView(view);
            const bool timed = view != ResidualView::Time || subject.readings->enteredAt().front() != 0;
            QVERIFY(plot.ink().emptyText().isEmpty() == timed);
            for (std::size_t i = 0; timed && i < plot.points().size(); ++i)
                QVERIFY(plot.frame().area.contains(plot.cloud().place(i)));
        }
    }

    /// Blom's scores of five values, Φ⁻¹((i − 3/8)/5.25), quantiles from a table of the normal distribution.
    void normalScoresFollowBlom() {
        const auto scores = normalScores({3, 1, 2, 5, 4}, {0, 0, 0, 0, 0});
        QVERIFY(std::abs(scores[1] + 1.1798) < 5e-5);
        QVERIFY(std::abs(scores[2] + 0.4972) < 5e-5);
        QVERIFY(std::abs(scores[0]) < 1e-12);
        QVERIFY(std::abs(scores[3] - 1.1798) < 5e-5);
    }

    void theSplitPictureSharesOutTheNoise() {
        const PlotSubject subject = subjectOf(test::pressureTransmitter());
        SplitPicture picture;
        picture.setSplit(subject.phase->split, QStringLiteral("straight line"), {});
        picture.resize(250, 380);
        picture.show();
        double sum = 0;
        for (std::size_t i = 1; i < picture.parts().size(); ++i) {
            sum += picture.parts()[i].share;
            if (i > 1)
                QVERIFY(picture.parts()[i].label.top() >= picture.parts()[i - 1].label.bottom());
            QVERIFY(picture.rect().contains(picture.parts()[i].label.toRect()));
        }
        QVERIFY(std::abs(sum - 1) < 1e-9);
        QVERIFY(picture.summary().contains(QStringLiteral("99.99991 %")));
        QVERIFY(!picture.summary().contains(QStringLiteral("explains 100 %")));
    }

    /// One run, rising and falling: nothing is left to tell repeatability, and pure error is no part beside the hysteresis in it.
    void noPartOfTheSplitIsSharedOutTwice() {
        Record record;
        for (int i = 0; i < 8; ++i) {
            Reading reading;
            reading.id = record.nextReadingId++;
            reading.run = 1;
            reading.direction = i < 4 ? Direction::Rising : Direction::Falling;
            const int point = i < 4 ? i : 7 - i;
            reading.reference = Decimal{point * 10, 1, {}};
            reading.indication = Decimal{point * 100 + i * i % 5 + (i < 4 ? 0 : 7), 2, {}};
            record.readings.edit().append(reading);
        }
        const PlotSubject subject = subjectOf(record);
        QVERIFY(subject.phase->split->hysteresis && !subject.phase->split->repeatability);
        SplitPicture picture;
        picture.setSplit(subject.phase->split, QStringLiteral("straight line"), {});
        double sum = 0;
        for (std::size_t i = 1; i < picture.parts().size(); ++i)
            sum += picture.parts()[i].share;
        QVERIFY2(std::abs(sum - 1) < 1e-9, qPrintable(picture.summary()));
    }

    void aPartIsChosenByMouseAndKeys() {
        const PlotSubject subject = subjectOf(test::pressureTransmitter());
        SplitPicture picture;
        picture.setSplit(subject.phase->split, QStringLiteral("straight line"), {});
        picture.resize(250, 380);
        picture.show();
        QSignalSpy chosen(&picture, &SplitPicture::partSelected);
        QTest::mouseClick(&picture, Qt::LeftButton, {}, picture.parts()[2].bar.center().toPoint());
        QVERIFY(picture.selected() == SplitPart::Hysteresis);
        QTest::keyClick(&picture, Qt::Key_Up);
        QVERIFY(picture.selected() == SplitPart::LackOfFit);
        QTest::keyClick(&picture, Qt::Key_Escape);
        QVERIFY(!picture.selected());
        QCOMPARE(chosen.size(), 3);
    }

    void fewReadingsAreShownAndNothingFalseIsSaid() {
        for (const Record& record : {Record{}, plain({{"1", "2"}}), plain({{"1", "2"}, {"1", "2.1"}, {"1", "2.05"}}), plain({{"0", "4.0"}, {"5", "12.1"}, {"10", "20.0"}})}) {
            LinePlot line;
            ResidualPlot residual;
            PlotPair pair(line, residual);
            line.setSubject(subjectOf(record));
            residual.setSubject(subjectOf(record));
            shown(line);
            shown(residual);
            QVERIFY(!line.grab().isNull());
            QVERIFY(!residual.grab().isNull());
            const bool fitted = subjectOf(record).phase && subjectOf(record).phase->fit;
            QCOMPARE(residual.ink().emptyText().isEmpty(), fitted);
            QVERIFY(!line.accessibleDescription().isEmpty());
        }
    }
};

QTEST_MAIN(PlotsTest)
#include "tst_plots.moc"
