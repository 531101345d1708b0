// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/LinePlot.h"
#include "ui/plot/ResidualPlot.h"

#include <QObject>

namespace spanwright {

/// Holds the line plot and the residual plot to one left edge and, where both are drawn against the same quantity, to one
/// horizontal range.
class PlotPair : public QObject {
    Q_OBJECT

  public:
    PlotPair(LinePlot& line, ResidualPlot& residual, QObject* parent = nullptr);

  private:
    void alignLeft();
    void follow(PlotView& other, const PlotView& moved);

    LinePlot& line_;
    ResidualPlot& residual_;
    bool busy_ = false;
};

} // namespace spanwright
