// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/Ticks.h"

#include <QRectF>

namespace spanwright {

/// Where the values of a plot lie on the screen: the axes shown over the rectangle of the plot.
struct PlotFrame {
    QRectF area;
    AxisRange x, y;

    [[nodiscard]] double toX(double value) const { return area.left() + (value - x.low) / x.span() * area.width(); }
    [[nodiscard]] double toY(double value) const { return area.bottom() - (value - y.low) / y.span() * area.height(); }
    [[nodiscard]] QPointF toPoint(const QPointF& value) const { return {toX(value.x()), toY(value.y())}; }
    [[nodiscard]] QPointF toValue(const QPointF& point) const {
        return {x.low + (point.x() - area.left()) / area.width() * x.span(),
                y.low + (area.bottom() - point.y()) / area.height() * y.span()};
    }
    [[nodiscard]] bool usable() const { return area.width() > 1 && area.height() > 1 && x.span() > 0 && y.span() > 0; }
    bool operator==(const PlotFrame&) const = default;
};

} // namespace spanwright
