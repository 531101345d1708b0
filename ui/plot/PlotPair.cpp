// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/PlotPair.h"

#include <algorithm>

namespace spanwright {

PlotPair::PlotPair(LinePlot& line, ResidualPlot& residual, QObject* parent) : QObject(parent), line_(line), residual_(residual) {
    for (PlotView* plot : std::initializer_list<PlotView*>{&line_, &residual_})
        connect(plot, &PlotView::leftNeededChanged, this, &PlotPair::alignLeft);
    connect(&line_, &PlotView::horizontalRangeChanged, this, [this] { follow(residual_, line_); });
    connect(&residual_, &PlotView::horizontalRangeChanged, this, [this] { follow(line_, residual_); });
    alignLeft();
}

void PlotPair::alignLeft() {
    if (busy_)
        return;
    busy_ = true;
    const double left = std::max({line_.leftNeeded(), residual_.leftNeeded(), 44.0});
    line_.setLeft(left);
    residual_.setLeft(left);
    busy_ = false;
}

void PlotPair::follow(PlotView& other, const PlotView& moved) {
    if (busy_ || residual_.view() != ResidualView::Reference)
        return;
    busy_ = true;
    other.followAcross(moved);
    busy_ = false;
}

} // namespace spanwright
