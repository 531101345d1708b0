// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/Marks.h"

#include <QPainter>
#include <QPainterPath>

namespace spanwright {

namespace {

QPainterPath shapeOf(const QPointF& c, Direction direction, double size) {
    QPainterPath path;
    const double half = size / 2;
    if (direction == Direction::Unknown) {
        path.addEllipse(c, half * 0.92, half * 0.92);
        return path;
    }
    const double tip = direction == Direction::Rising ? -half : half;
    path.moveTo(c.x(), c.y() + tip);
    path.lineTo(c.x() + half * 1.08, c.y() - tip * 0.8);
    path.lineTo(c.x() - half * 1.08, c.y() - tip * 0.8);
    path.closeSubpath();
    return path;
}

} // namespace

void paintMark(QPainter& painter, const QPointF& centre, Direction direction, const MarkStyle& style) {
    const QPainterPath path = shapeOf(centre, direction, style.size);
    if (style.hollow) {
        QPen pen(style.color, 1.4);
        pen.setJoinStyle(Qt::MiterJoin);
        painter.setPen(pen);
        painter.setBrush(Qt::NoBrush);
    } else {
        if (style.around.isValid()) {
            painter.setPen(QPen(style.around, 1.6));
            painter.setBrush(Qt::NoBrush);
            painter.drawPath(path);
        }
        painter.setPen(Qt::NoPen);
        painter.setBrush(style.color);
    }
    painter.drawPath(path);
}

} // namespace spanwright
