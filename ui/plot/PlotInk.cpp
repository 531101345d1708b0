// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/PlotInk.h"

#include "ui/look/Look.h"
#include "ui/plot/LabelPlaces.h"

#include <QFontMetricsF>
#include <QPainter>

#include <algorithm>
#include <utility>

namespace spanwright {

PlotInk::PlotInk(QGraphicsItem* parent) : QGraphicsObject(parent) {
    setAcceptedMouseButtons(Qt::NoButton);
}

void PlotInk::setFrame(const PlotFrame& frame) {
    prepareGeometryChange();
    frame_ = frame;
    placed_ = false;
}

void PlotInk::setAxes(Axes axes) {
    axes_ = std::move(axes);
    update();
}

void PlotInk::setStrokes(std::vector<PlotStroke> strokes) {
    strokes_ = std::move(strokes);
    marksMoved();
}

void PlotInk::setMarks(std::function<std::vector<QPointF>()> marks) {
    marks_ = std::move(marks);
    marksMoved();
}

void PlotInk::marksMoved() {
    placed_ = false;
    update();
}

void PlotInk::setNotes(std::vector<PlotNote> notes) {
    notes_ = std::move(notes);
    marksMoved();
}

void PlotInk::setEmptyText(const QString& text) {
    emptyText_ = text;
    update();
}

double PlotInk::numbersWidth() const {
    const QFontMetricsF metrics(textFont(TextRole::Small));
    double width = metrics.horizontalAdvance(axes_.yUnit);
    for (const double place : axes_.y.places)
        width = std::max(width, metrics.horizontalAdvance(tickText(place, axes_.y, axes_.ySign)));
    return width;
}

QRectF PlotInk::boundingRect() const {
    return frame_.area.adjusted(-200, -40, 60, 60);
}

void PlotInk::paint(QPainter* painter, const QStyleOptionGraphicsItem*, QWidget*) {
    painter->setFont(textFont(TextRole::Small));
    if (!emptyText_.isEmpty()) {
        painter->setPen(scheme().quiet);
        painter->setFont(textFont(TextRole::Body));
        painter->drawText(frame_.area.adjusted(16, 0, -16, 0), Qt::AlignCenter | Qt::TextWordWrap, emptyText_);
        return;
    }
    if (!frame_.usable())
        return;
    paintNumbers(*painter);
    for (const PlotStroke& stroke : strokes_)
        paintStroke(*painter, stroke);
    const std::vector<QRectF>& places = labels();
    for (std::size_t i = 0; i < strokes_.size(); ++i) // over every line, so that none runs through words
        paintLabel(*painter, strokes_[i], places[i]);
    paintNotes(*painter);
}

void PlotInk::paintNumbers(QPainter& painter) const {
    const QFontMetricsF metrics(painter.font());
    const double line = metrics.height();
    painter.setPen(scheme().quiet);
    for (const double place : axes_.y.places)
        painter.drawText(QRectF(frame_.area.left() - 208, frame_.toY(place) - line / 2, 200, line),
                         Qt::AlignRight | Qt::AlignVCenter, tickText(place, axes_.y, axes_.ySign));
    if (!axes_.yUnit.isEmpty())
        painter.drawText(QRectF(frame_.area.left() - 208, frame_.area.top() - line - 3, 200, line),
                         Qt::AlignRight | Qt::AlignBottom, axes_.yUnit);
    const double top = frame_.area.bottom() + 6;
    for (std::size_t i = 0; i < axes_.x.places.size(); ++i) {
        const bool named = i < axes_.xNames.size();
        QString text = named ? axes_.xNames[i] : tickText(axes_.x.places[i], axes_.x, TickSign::Minus);
        const double width = metrics.horizontalAdvance(text);
        double left = frame_.toX(axes_.x.places[i]) - width / 2;
        if (i + 1 == axes_.x.places.size() && !axes_.xUnit.isEmpty())
            text += QLatin1Char(' ') + axes_.xUnit;
        left = std::min(left, frame_.area.right() + 16 - metrics.horizontalAdvance(text));
        painter.drawText(QPointF(left, top + metrics.ascent()), text);
    }
}

void PlotInk::paintStroke(QPainter& painter, const PlotStroke& stroke) const {
    if (stroke.points.empty())
        return;
    const QPolygonF line = lineOf(stroke);
    painter.save();
    painter.setClipRect(frame_.area.adjusted(-4, -4, 4, 4));
    painter.setPen(QPen(stroke.color, stroke.width, stroke.style, Qt::FlatCap, Qt::RoundJoin));
    painter.setBrush(Qt::NoBrush);
    painter.drawPolyline(line);
    if (stroke.dots) {
        painter.setPen(QPen(scheme().card, 1));
        painter.setBrush(stroke.color);
        for (const QPointF& at : line)
            painter.drawEllipse(at, 3.5, 3.5);
    }
    painter.restore();
}

QPolygonF PlotInk::lineOf(const PlotStroke& stroke) const {
    QPolygonF line;
    for (const QPointF& value : stroke.points)
        line << frame_.toPoint(value);
    return line;
}

const std::vector<QRectF>& PlotInk::labels() const {
    if (std::exchange(placed_, true))
        return labels_;
    const QFontMetricsF metrics(textFont(TextRole::Small));
    std::vector<LabelWish> wishes;
    for (const PlotStroke& stroke : strokes_) {
        LabelWish wish{.size = {}, .line = lineOf(stroke), .corner = {}};
        if (!stroke.label.isEmpty() && !wish.line.isEmpty()) {
            wish.size = {metrics.horizontalAdvance(stroke.label) + 4, metrics.height()};
            wish.corner = wish.line.last() + stroke.labelOffset - QPointF(0, wish.size.height() / 2);
        }
        wishes.push_back(std::move(wish));
    }
    labels_ = placeLabels(wishes, frame_.area, {marks_ ? marks_() : std::vector<QPointF>{}, notePlaces()});
    return labels_;
}

void PlotInk::paintLabel(QPainter& painter, const PlotStroke& stroke, const QRectF& place) const {
    if (place.isNull())
        return;
    QColor ground = scheme().card;
    ground.setAlphaF(0.82F);
    painter.fillRect(place, ground);
    painter.setPen(stroke.color);
    painter.drawText(place, Qt::AlignCenter, stroke.label);
}

/// Notes of one corner stand below each other.
std::vector<QRectF> PlotInk::notePlaces() const {
    const QFontMetricsF metrics(textFont(TextRole::Small));
    std::vector<QRectF> places;
    double topUsed = 0, bottomUsed = 0;
    for (const PlotNote& note : notes_) {
        const double widest = frame_.area.width() - 12;
        const QSizeF words = metrics.boundingRect(QRectF(0, 0, std::max(widest - 8, 1.0), 1e4), Qt::TextWordWrap, note.text).size();
        const QSizeF size(std::min(words.width() + 8, widest), words.height() + 2);
        const bool right = note.corner.testFlag(Qt::AlignRight), bottom = note.corner.testFlag(Qt::AlignBottom);
        double& used = bottom ? bottomUsed : topUsed;
        const QPointF corner(right ? frame_.area.right() - size.width() - 2 : frame_.area.left() + 6,
                             bottom ? frame_.area.bottom() - size.height() - 4 - used : frame_.area.top() + 4 + used);
        used += size.height();
        places.emplace_back(corner, size);
    }
    return places;
}

/// Each on a ground of the card's colour, so that marks do not run through words.
void PlotInk::paintNotes(QPainter& painter) const {
    const std::vector<QRectF> places = notePlaces();
    QColor ground = scheme().card;
    ground.setAlphaF(0.82F);
    for (std::size_t i = 0; i < notes_.size(); ++i) {
        painter.fillRect(places[i], ground);
        painter.setPen(notes_[i].strong ? scheme().ink : scheme().quiet);
        painter.drawText(places[i].adjusted(3, 0, -3, 0), Qt::AlignVCenter | Qt::AlignLeft | Qt::TextWordWrap, notes_[i].text);
    }
}

} // namespace spanwright
