// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/PlotCurves.h"

#include "ui/look/Look.h"

#include <QPen>
#include <QtCharts/QAreaSeries>
#include <QtCharts/QChart>
#include <QtCharts/QLineSeries>
#include <QtCharts/QValueAxis>

namespace spanwright {

namespace {

QList<QPointF> listOf(const std::vector<QPointF>& points) {
    return {points.begin(), points.end()};
}

} // namespace

PlotCurves::PlotCurves(QChart& chart)
    : xAxis_(new QValueAxis(&chart)), yAxis_(new QValueAxis(&chart)), line_(new QLineSeries(&chart)), innerHigh_(new QLineSeries(&chart)),
      innerLow_(new QLineSeries(&chart)), outerHigh_(new QLineSeries(&chart)), outerLow_(new QLineSeries(&chart)), inner_(new QAreaSeries(innerHigh_, innerLow_)),
      outer_(new QAreaSeries(outerHigh_, outerLow_)) {
    for (QAbstractSeries* series : std::initializer_list<QAbstractSeries*>{outer_, inner_, line_})
        chart.addSeries(series);
    chart.addAxis(xAxis_, Qt::AlignBottom);
    chart.addAxis(yAxis_, Qt::AlignLeft);
    for (QAbstractSeries* series : std::initializer_list<QAbstractSeries*>{outer_, inner_, line_}) {
        series->attachAxis(xAxis_);
        series->attachAxis(yAxis_);
    }
    for (QValueAxis* axis : {xAxis_, yAxis_}) {
        axis->setLabelsVisible(false);
        axis->setLineVisible(false);
        axis->setGridLineVisible(false);
    }
}

void PlotCurves::setRange(double xLow, double xHigh, double yLow, double yHigh) {
    xAxis_->setRange(xLow, xHigh);
    yAxis_->setRange(yLow, yHigh);
}

void PlotCurves::clear() {
    for (QLineSeries* series : {line_, innerLow_, innerHigh_, outerLow_, outerHigh_})
        series->clear();
}

void PlotCurves::set(const std::vector<QPointF>& line, const Edges& inner, const Edges& outer) {
    line_->replace(listOf(line));
    innerLow_->replace(listOf(inner.low));
    innerHigh_->replace(listOf(inner.high));
    outerLow_->replace(listOf(outer.low));
    outerHigh_->replace(listOf(outer.high));
    line_->setVisible(!line.empty());
    inner_->setVisible(!inner.low.empty());
    outer_->setVisible(!outer.low.empty());
}

void PlotCurves::restyle() {
    const Scheme& colours = scheme();
    line_->setPen(QPen(colours.accent, 1.6));
    inner_->setPen(Qt::NoPen);
    inner_->setBrush(colours.band);
    outer_->setPen(Qt::NoPen);
    outer_->setBrush(colours.outerBand);
}

} // namespace spanwright
