// SPDX-License-Identifier: GPL-3.0-or-later
// How long a repaint of the line plot takes with many readings, as a ratio to that of an empty QChart with two axes of the same
// size, measured in the same run. "rebuilt" repaints after the image of the readings was thrown away, as a change of range does; "moved over" paints it
// again as it is.
#include "ui/look/Look.h"
#include "ui/plot/PlotView.h"

#include <QApplication>
#include <QElapsedTimer>
#include <QImage>
#include <QPainter>
#include <QTest>
#include <QtCharts/QChart>
#include <QtCharts/QLineSeries>

#include <algorithm>
#include <cstdio>
#include <random>
#include <vector>

using namespace spanwright;

namespace {

PlotView::Content contentOf(std::size_t n) {
    PlotView::Content content;
    std::mt19937_64 random(7);
    std::normal_distribution<double> noise(0, 0.05);
    for (std::size_t i = 0; i < n; ++i) {
        const double x = 10 * static_cast<double>(i) / static_cast<double>(n);
        content.points.ids.push_back(static_cast<ReadingId>(i + 1));
        content.points.x.push_back(x);
        content.points.y.push_back(4 + 1.6 * x + noise(random));
        content.points.directions.push_back(i % 2 == 0 ? Direction::Rising : Direction::Falling);
        content.points.excluded.push_back(0);
    }
    content.x = {-0.5, 10.5};
    content.y = {3, 21};
    for (int i = 0; i < 400; ++i) {
        const double x = -0.5 + 11 * i / 399.0;
        content.line.emplace_back(x, 4 + 1.6 * x);
        for (const auto& [edge, half] : {std::pair(&content.inner, 0.02), std::pair(&content.outer, 0.1)}) {
            edge->low.emplace_back(x, 4 + 1.6 * x - half);
            edge->high.emplace_back(x, 4 + 1.6 * x + half);
        }
    }
    return content;
}

double milliseconds(QWidget& plot, PlotView* rebuilt) {
    QImage image(plot.size(), QImage::Format_ARGB32_Premultiplied);
    std::vector<double> times;
    for (int i = 0; i < 15; ++i) {
        if (rebuilt)
            const_cast<PointCloud&>(rebuilt->cloud()).refresh();
        QElapsedTimer timer;
        timer.start();
        QPainter painter(&image);
        plot.render(&painter);
        painter.end();
        times.push_back(static_cast<double>(timer.nsecsElapsed()) / 1e6);
    }
    std::sort(times.begin(), times.end());
    return times[times.size() / 2];
}

/// Shows it and waits until it is on the screen, laid out.
void seen(QWidget& widget) {
    widget.show();
    if (!QTest::qWaitForWindowExposed(&widget))
        std::fprintf(stderr, "a window was not shown\n");
}

} // namespace

int main(int argc, char** argv) {
    QApplication application(argc, argv);
    setScheme(application, SchemeName::Light);
    const auto shown = [](std::size_t n) {
        auto plot = std::make_unique<PlotView>();
        plot->resize(1200, 700);
        plot->setContent(contentOf(n));
        seen(*plot);
        return plot;
    };
    auto* chart = new QChart;
    chart->addSeries(new QLineSeries);
    chart->createDefaultAxes();
    QChartView empty(chart);
    empty.resize(1200, 700);
    empty.setRenderHint(QPainter::Antialiasing);
    seen(empty);
    const double base = milliseconds(empty, nullptr);
    std::printf("empty chart 1200 x 700: %.2f ms\n", base);
    for (const std::size_t n : {std::size_t(66), std::size_t(10000), std::size_t(1000000)}) {
        const auto plot = shown(n);
        const double again = milliseconds(*plot, nullptr), rebuilt = milliseconds(*plot, plot.get());
        std::printf("%8zu readings: rebuilt %.2f ms = %.1f times empty; moved over %.2f ms = %.1f times empty\n", n, rebuilt, rebuilt / base, again, again / base);
    }
    return 0;
}
