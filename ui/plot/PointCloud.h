// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"
#include "ui/plot/PlotFrame.h"

#include <QGraphicsObject>
#include <QImage>

#include <optional>
#include <set>
#include <vector>

namespace spanwright {

/// The readings of a plot as columns of equal length, in the units of its axes. A point without a place is NaN.
struct PlotPoints {
    std::vector<ReadingId> ids; ///< rising
    std::vector<double> x, y;
    std::vector<Direction> directions;
    std::vector<std::uint8_t> excluded;

    [[nodiscard]] std::size_t size() const { return ids.size(); }
};

/// All readings of a plot as one item of the scene: marks while they are few, density where there is more than one a pixel.
/// Painted into an image that is rebuilt only when the points, the frame or the selection change. An excluded reading that lies
/// outside the range shown stands hollow at the edge, so that it is never out of sight.
class PointCloud : public QGraphicsObject {
    Q_OBJECT

  public:
    explicit PointCloud(QGraphicsItem* parent = nullptr);

    void setPoints(PlotPoints points);
    void setFrame(const PlotFrame& frame);
    void setSelection(const std::set<ReadingId>& selection);
    /// The reading that the keyboard stands on.
    void setCurrent(std::optional<ReadingId> current);
    /// Forgets the image, when the colours changed.
    void refresh();

    [[nodiscard]] const PlotPoints& points() const { return points_; }
    [[nodiscard]] const std::set<ReadingId>& selection() const { return selection_; }
    [[nodiscard]] std::optional<ReadingId> current() const { return current_; }
    [[nodiscard]] bool showsDensity() const;
    /// Where a row stands on the screen, with excluded readings held to the edge.
    [[nodiscard]] QPointF place(std::size_t row) const;
    /// The row nearest to a place on the screen within `reach` pixels.
    [[nodiscard]] std::optional<std::size_t> nearest(const QPointF& at, double reach) const;
    [[nodiscard]] std::set<ReadingId> inside(const QRectF& rectangle) const;

    [[nodiscard]] QRectF boundingRect() const override;
    void paint(QPainter* painter, const QStyleOptionGraphicsItem* option, QWidget* widget) override;

  private:
    void rebuild(double ratio);
    void paintDensity(double ratio);
    void paintMarks(QPainter& painter, double ratio) const;
    void paintOutstanding(QPainter& painter) const;
    [[nodiscard]] double markSize() const;
    [[nodiscard]] std::size_t rowOf(ReadingId id) const;

    PlotPoints points_;
    PlotFrame frame_;
    std::set<ReadingId> selection_;
    std::optional<ReadingId> current_;
    QImage image_;
    bool stale_ = true;
};

} // namespace spanwright
