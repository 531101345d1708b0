// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/LabelPlaces.h"

#include <QLineF>

#include <algorithm>
#include <array>
#include <limits>

namespace spanwright {

namespace {

constexpr double MarkRadius = 5, Gap = 7;
constexpr int PlacesAlong = 24;
// What it costs to stand on something; a step away from the end costs one.
constexpr double OnWord = 1000, OnMark = 40, OnLine = 8, AtAnother = 40;

bool touches(const QRectF& box, const QLineF& line) {
    if (box.contains(line.p1()) || box.contains(line.p2()))
        return true;
    const std::array<QPointF, 4> corners{box.topLeft(), box.topRight(), box.bottomRight(), box.bottomLeft()};
    for (std::size_t i = 0; i < corners.size(); ++i)
        if (line.intersects(QLineF(corners[i], corners[(i + 1) % corners.size()])) == QLineF::BoundedIntersection)
            return true;
    return false;
}

bool touches(const QRectF& box, const QPolygonF& line) {
    for (qsizetype i = 1; i < line.size(); ++i)
        if (touches(box, QLineF(line[i - 1], line[i])))
            return true;
    return false;
}

double distance(const QPointF& at, const QPolygonF& line) {
    double least = QLineF(at, line.first()).length();
    for (qsizetype i = 1; i < line.size(); ++i) {
        const QPointF along = line[i] - line[i - 1], out = at - line[i - 1];
        const double length = QPointF::dotProduct(along, along);
        const double share = length > 0 ? std::clamp(QPointF::dotProduct(out, along) / length, 0.0, 1.0) : 0;
        least = std::min(least, QLineF(at, line[i - 1] + share * along).length());
    }
    return least;
}

/// A point of a line, from its end (0) to its beginning (1).
QPointF pointAlong(const QPolygonF& line, double share) {
    double length = 0;
    for (qsizetype i = 1; i < line.size(); ++i)
        length += QLineF(line[i - 1], line[i]).length();
    double left = share * length;
    for (qsizetype i = line.size() - 1; i > 0; --i) {
        const QLineF piece(line[i], line[i - 1]);
        if (left <= piece.length() && piece.length() > 0)
            return piece.pointAt(left / piece.length());
        left -= piece.length();
    }
    return line.first();
}

QRectF heldInside(QRectF box, const QRectF& area) {
    box.moveLeft(std::clamp(box.left(), area.left(), std::max(area.left(), area.right() - box.width())));
    box.moveTop(std::clamp(box.top(), area.top(), std::max(area.top(), area.bottom() - box.height())));
    return box;
}

std::vector<QRectF> candidates(const LabelWish& wish, const QRectF& area) {
    std::vector<QRectF> boxes{heldInside(QRectF(wish.corner, wish.size), area)};
    const double w = wish.size.width(), h = wish.size.height();
    for (int i = 0; i <= PlacesAlong; ++i) {
        const QPointF at = pointAlong(wish.line, static_cast<double>(i) / PlacesAlong);
        for (const QPointF& corner : {at + QPointF(-w / 2, -h - Gap), at + QPointF(-w / 2, Gap), at + QPointF(Gap, -h / 2), at + QPointF(-w - Gap, -h / 2)})
            boxes.push_back(heldInside(QRectF(corner, wish.size), area));
    }
    return boxes;
}

} // namespace

std::vector<QRectF> placeLabels(const std::vector<LabelWish>& wishes, const QRectF& area, const LabelObstacles& obstacles) {
    std::vector<QRectF> placed, words = obstacles.words;
    for (const LabelWish& wish : wishes) {
        if (wish.size.isEmpty() || wish.line.isEmpty()) {
            placed.emplace_back();
            continue;
        }
        QRectF best;
        double least = std::numeric_limits<double>::infinity(), away = 0;
        for (const QRectF& box : candidates(wish, area)) {
            const QRectF wide = box.adjusted(-MarkRadius, -MarkRadius, MarkRadius, MarkRadius);
            double cost = away++ / 4;
            for (const QRectF& other : words)
                cost += other.intersects(box) ? OnWord : 0;
            const double own = distance(box.center(), wish.line);
            for (const LabelWish& other : wishes)
                if (!other.line.isEmpty()) {
                    cost += touches(box, other.line) ? OnLine : 0;
                    cost += distance(box.center(), other.line) < own ? AtAnother : 0; // it would be read as the other's
                }
            if (cost < least)
                cost += OnMark * static_cast<double>(std::count_if(obstacles.marks.begin(), obstacles.marks.end(), [&](const QPointF& mark) { return wide.contains(mark); }));
            if (cost < least) {
                least = cost;
                best = box;
            }
        }
        placed.push_back(best);
        words.push_back(best);
    }
    return placed;
}

} // namespace spanwright
