// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/PlotFrame.h"

#include <QGraphicsItem>

namespace spanwright {

/// The grid under everything else in a plot, one line a tick.
class PlotGrid : public QGraphicsItem {
  public:
    using QGraphicsItem::QGraphicsItem;
    void set(const PlotFrame& frame, std::vector<double> across, std::vector<double> up);
    [[nodiscard]] QRectF boundingRect() const override { return frame_.area.adjusted(-1, -1, 1, 1); }
    void paint(QPainter* painter, const QStyleOptionGraphicsItem* option, QWidget* widget) override;

  private:
    PlotFrame frame_;
    std::vector<double> across_, up_;
};

} // namespace spanwright
