// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QPointF>

#include <vector>

class QAreaSeries;
class QChart;
class QLineSeries;
class QValueAxis;

namespace spanwright {

/// The line of a plot and the two bands behind it, as series of a chart whose axes show only where things are.
class PlotCurves {
  public:
    /// The edges of a band, of at most 400 points each.
    struct Edges {
        std::vector<QPointF> low, high;
    };
    explicit PlotCurves(QChart& chart);
    void setRange(double xLow, double xHigh, double yLow, double yHigh);
    /// Empties them before the range changes: the chart would lay out the old points once more for each axis.
    void clear();
    void set(const std::vector<QPointF>& line, const Edges& inner, const Edges& outer);
    /// In the colours of the scheme.
    void restyle();

  private:
    QValueAxis *xAxis_, *yAxis_;
    QLineSeries *line_, *innerHigh_, *innerLow_, *outerHigh_, *outerLow_;
    QAreaSeries *inner_, *outer_;
};

} // namespace spanwright
