// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/PlotGrid.h"

#include "ui/look/Look.h"

#include <QPainter>

#include <cmath>

namespace spanwright {

void PlotGrid::set(const PlotFrame& frame, std::vector<double> across, std::vector<double> up) {
    prepareGeometryChange();
    frame_ = frame;
    across_ = std::move(across);
    up_ = std::move(up);
    update();
}

void PlotGrid::paint(QPainter* painter, const QStyleOptionGraphicsItem*, QWidget*) {
    if (!frame_.usable())
        return;
    painter->setPen(QPen(scheme().line, 1));
    for (const double place : across_) {
        const double x = std::floor(frame_.toX(place)) + 0.5;
        painter->drawLine(QPointF(x, frame_.area.top()), QPointF(x, frame_.area.bottom()));
    }
    for (const double place : up_) {
        const double y = std::floor(frame_.toY(place)) + 0.5;
        painter->drawLine(QPointF(frame_.area.left(), y), QPointF(frame_.area.right(), y));
    }
}

} // namespace spanwright
