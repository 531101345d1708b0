// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/PointCloud.h"

#include "ui/look/Look.h"
#include "ui/plot/Marks.h"

#include <QPaintEngine>
#include <QPainter>

#include <algorithm>
#include <array>
#include <cmath>

namespace spanwright {

namespace {

constexpr double room = 8; ///< around the plot's rectangle, so that marks at its edge are whole
constexpr std::size_t mostOutstanding = 5000;

bool drawsPixels(const QPainter& painter) {
    return painter.paintEngine() == nullptr || painter.paintEngine()->type() == QPaintEngine::Raster;
}

} // namespace

PointCloud::PointCloud(QGraphicsItem* parent) : QGraphicsObject(parent) {
    setAcceptedMouseButtons(Qt::NoButton);
}

void PointCloud::setPoints(PlotPoints points) {
    points_ = std::move(points);
    refresh();
}

void PointCloud::setFrame(const PlotFrame& frame) {
    if (frame == frame_)
        return;
    prepareGeometryChange();
    frame_ = frame;
    refresh();
}

void PointCloud::setSelection(const std::set<ReadingId>& selection) {
    if (selection == selection_)
        return;
    selection_ = selection;
    refresh();
}

void PointCloud::setCurrent(std::optional<ReadingId> current) {
    if (current == current_)
        return;
    current_ = current;
    refresh();
}

void PointCloud::refresh() {
    stale_ = true;
    update();
}

bool PointCloud::showsDensity() const {
    return static_cast<double>(points_.size()) > std::min(frame_.area.width() * frame_.area.height() / 25, 20000.0);
}

double PointCloud::markSize() const {
    return points_.size() <= 500 ? 8.5 : points_.size() <= 4000 ? 6 : 4;
}

std::size_t PointCloud::rowOf(ReadingId id) const {
    const auto found = std::lower_bound(points_.ids.begin(), points_.ids.end(), id);
    return found != points_.ids.end() && *found == id ? static_cast<std::size_t>(found - points_.ids.begin()) : points_.size();
}

QPointF PointCloud::place(std::size_t row) const {
    QPointF at(frame_.toX(points_.x[row]), frame_.toY(points_.y[row]));
    if (points_.excluded[row] && std::isfinite(at.y()))
        at.setY(std::clamp(at.y(), frame_.area.top() + 5, frame_.area.bottom() - 5));
    return at;
}

std::optional<std::size_t> PointCloud::nearest(const QPointF& at, double reach) const {
    std::optional<std::size_t> best;
    double bound = reach * reach;
    for (std::size_t i = 0; i < points_.size(); ++i) {
        const QPointF off = place(i) - at;
        const double distance = QPointF::dotProduct(off, off);
        if (distance <= bound) {
            bound = distance;
            best = i;
        }
    }
    return best;
}

std::set<ReadingId> PointCloud::inside(const QRectF& rectangle) const {
    std::set<ReadingId> ids;
    for (std::size_t i = 0; i < points_.size(); ++i)
        if (rectangle.contains(place(i)))
            ids.insert(ids.end(), points_.ids[i]);
    return ids;
}

QRectF PointCloud::boundingRect() const {
    return frame_.area.adjusted(-room, -room, room, room);
}

void PointCloud::paint(QPainter* painter, const QStyleOptionGraphicsItem*, QWidget*) {
    if (!frame_.usable() || points_.size() == 0)
        return;
    if (!drawsPixels(*painter)) { // a file or a printer gets shapes, not pixels
        paintMarks(*painter, 0);
        paintOutstanding(*painter);
        return;
    }
    const double ratio = painter->device()->devicePixelRatioF();
    if (stale_ || image_.devicePixelRatio() != ratio)
        rebuild(ratio);
    painter->drawImage(boundingRect().topLeft(), image_);
}

void PointCloud::rebuild(double ratio) {
    image_ = QImage((boundingRect().size() * ratio).toSize(), QImage::Format_ARGB32_Premultiplied);
    image_.fill(Qt::transparent);
    image_.setDevicePixelRatio(ratio);
    if (showsDensity())
        paintDensity(ratio);
    QPainter painter(&image_);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.translate(-boundingRect().topLeft());
    if (!showsDensity())
        paintMarks(painter, ratio);
    paintOutstanding(painter);
    stale_ = false;
}

void PointCloud::paintDensity(double ratio) {
    const int width = image_.width(), height = image_.height();
    std::vector<std::uint32_t> counts(static_cast<std::size_t>(width) * static_cast<std::size_t>(height));
    const QPointF origin = boundingRect().topLeft();
    const double xScale = frame_.area.width() / frame_.x.span() * ratio, xShift = (frame_.area.left() - origin.x()) * ratio;
    const double yScale = frame_.area.height() / frame_.y.span() * ratio, yShift = (frame_.area.bottom() - origin.y()) * ratio;
    std::uint32_t most = 0;
    const double* xs = points_.x.data();
    const double* ys = points_.y.data();
    const double xFrom = xShift - frame_.x.low * xScale, yFrom = yShift + frame_.y.low * yScale;
    for (std::size_t i = 0; i < points_.size(); ++i) {
        const double x = xs[i] * xScale + xFrom, y = yFrom - ys[i] * yScale;
        if (!(x >= 0 && x < width && y >= 0 && y < height) || points_.excluded[i])
            continue;
        std::uint32_t& count = counts[static_cast<std::size_t>(static_cast<int>(y) * width + static_cast<int>(x))];
        most = std::max(most, ++count);
    }
    const QColor ink = scheme().ink;
    std::array<QRgb, 256> shade{};
    for (std::size_t a = 0; a < shade.size(); ++a)
        shade[a] = qPremultiply(qRgba(ink.red(), ink.green(), ink.blue(), static_cast<int>(a)));
    std::vector<QRgb> byCount(std::min<std::size_t>(most, 4096) + 1);
    for (std::size_t c = 1; c < byCount.size(); ++c)
        byCount[c] = shade[static_cast<std::size_t>(60 + 195 * std::log1p(static_cast<double>(c)) / std::log1p(static_cast<double>(byCount.size())))];
    for (int y = 0; y < height; ++y) {
        auto* line = reinterpret_cast<QRgb*>(image_.scanLine(y));
        const std::uint32_t* row = counts.data() + static_cast<std::size_t>(y) * static_cast<std::size_t>(width);
        for (int x = 0; x < width; ++x)
            if (row[x] != 0)
                line[x] = byCount[std::min<std::size_t>(row[x], byCount.size() - 1)];
    }
}

/// Thousands of equal marks are stamped from three small pictures; the stamps sit on whole pixels of the device.
void PointCloud::paintMarks(QPainter& painter, double ratio) const {
    const MarkStyle style{markSize(), scheme().ink, false, points_.size() <= 500 ? scheme().card : QColor()};
    std::array<QImage, 3> stamps;
    const double side = std::ceil(style.size + 4);
    const bool stamping = ratio > 0;
    for (std::size_t d = 0; stamping && d < stamps.size(); ++d) {
        stamps[d] = QImage((QSizeF(side, side) * ratio).toSize(), QImage::Format_ARGB32_Premultiplied);
        stamps[d].setDevicePixelRatio(ratio);
        stamps[d].fill(Qt::transparent);
        QPainter stamp(&stamps[d]);
        stamp.setRenderHint(QPainter::Antialiasing);
        paintMark(stamp, {side / 2, side / 2}, static_cast<Direction>(d), style);
    }
    const QRectF seen = boundingRect();
    for (std::size_t i = 0; i < points_.size(); ++i) {
        if (points_.excluded[i])
            continue;
        const QPointF at = place(i);
        if (!seen.contains(at))
            continue;
        if (!stamping) {
            paintMark(painter, at, points_.directions[i], style);
            continue;
        }
        const QPointF corner = at - QPointF(side / 2, side / 2) - seen.topLeft();
        painter.drawImage(QPointF(std::round(corner.x() * ratio), std::round(corner.y() * ratio)) / ratio + seen.topLeft(),
                          stamps[static_cast<std::size_t>(points_.directions[i])]);
    }
}

/// Excluded, selected and current readings, over all others.
void PointCloud::paintOutstanding(QPainter& painter) const {
    const double size = std::max(markSize(), 7.0);
    std::size_t painted = 0;
    for (std::size_t i = 0; i < points_.size() && painted < mostOutstanding; ++i) {
        if (!points_.excluded[i])
            continue;
        ++painted;
        if (boundingRect().contains(place(i)))
            paintMark(painter, place(i), points_.directions[i], {size, scheme().warning, true, {}});
    }
    painted = 0;
    for (const ReadingId id : selection_) {
        const std::size_t row = rowOf(id);
        if (row == points_.size() || ++painted > mostOutstanding || !boundingRect().contains(place(row)))
            continue;
        const bool out = points_.excluded[row] != 0;
        paintMark(painter, place(row), points_.directions[row],
                  {size + 3, out ? scheme().warning : scheme().accent, out, out ? QColor() : scheme().card});
    }
    const std::size_t row = current_ ? rowOf(*current_) : points_.size();
    if (row != points_.size() && boundingRect().contains(place(row))) {
        painter.setPen(QPen(scheme().accent, 1.5));
        painter.setBrush(Qt::NoBrush);
        painter.drawEllipse(place(row), size + 1, size + 1);
    }
}

} // namespace spanwright
