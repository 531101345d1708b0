// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QPolygonF>
#include <QRectF>

#include <vector>

namespace spanwright {

/// A word that belongs to a line, on the screen.
struct LabelWish {
    QSizeF size;
    QPolygonF line;
    QPointF corner; ///< where its upper left corner would be best
};

/// What words keep clear of.
struct LabelObstacles {
    std::vector<QPointF> marks;
    std::vector<QRectF> words;
};

/// Where the words stand so that they cover as few marks as can be, no line and no other word: at the wished place, or
/// beside their line, from its end towards its beginning. One rectangle a wish; a null one for a wish without words.
std::vector<QRectF> placeLabels(const std::vector<LabelWish>& wishes, const QRectF& area, const LabelObstacles& obstacles);

} // namespace spanwright
