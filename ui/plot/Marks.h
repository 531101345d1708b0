// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"

#include <QColor>
#include <QPointF>

class QPainter;

namespace spanwright {

/// How the mark of a reading stands out. Shape tells the direction, filling tells whether the reading counts.
struct MarkStyle {
    double size = 8;
    QColor color;
    bool hollow = false;
    QColor around; ///< a thin edge that parts overlapping marks; invalid: none
};

/// Rising ▲, falling ▼, unknown ●, centred on the point.
void paintMark(QPainter& painter, const QPointF& centre, Direction direction, const MarkStyle& style);

} // namespace spanwright
