// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/PlotCurves.h"
#include "ui/plot/PlotFrame.h"
#include "ui/plot/PlotGrid.h"
#include "ui/plot/PlotInk.h"
#include "ui/plot/PointCloud.h"

#include <QtCharts/QChartView>

#include <functional>
#include <optional>
#include <set>

class QRubberBand;

namespace spanwright {

/// A plot of readings with a line and bands, driven by mouse and keys alike: a click or Space selects a reading, a rectangle
/// selects those inside it, the arrows move between readings, X or Delete asks to exclude, the wheel or + and − enlarge, a double
/// click or 0 shows all. What it shows is also there as text (accessible description).
class PlotView : public QChartView {
    Q_OBJECT

  public:
    explicit PlotView(QWidget* parent = nullptr);

    struct Content {
        PlotPoints points;
        std::vector<QPointF> line;
        PlotCurves::Edges inner, outer;
        AxisRange x, y; ///< the whole picture
        QString xUnit, yUnit;
        TickSign ySign = TickSign::Minus;
        std::vector<QString> xNames; ///< names of the whole numbers from 1 on the horizontal axis, instead of numbers
        QString emptyText;           ///< shown instead of everything else
    };

    void setContent(Content content);
    void setStrokes(std::vector<PlotStroke> strokes);
    void setNotes(std::vector<PlotNote> notes);
    void setSelection(const std::set<ReadingId>& selection);
    /// Words about one reading, for the tip and for screen readers.
    void setDescriber(std::function<QString(ReadingId)> describe);
    /// The plot as text.
    void setSummary(const QString& name, const QString& summary);

    /// Both plots of a pair take the same left edge and horizontal range.
    [[nodiscard]] double leftNeeded() const;
    void setLeft(double left);
    /// Shows the same abscissae, as zoomed as the other is.
    void followAcross(const PlotView& other);

    [[nodiscard]] const PlotFrame& frame() const { return frame_; }
    [[nodiscard]] const PlotPoints& points() const { return cloud_->points(); }
    [[nodiscard]] const PointCloud& cloud() const { return *cloud_; }
    [[nodiscard]] const PlotInk& ink() const { return *ink_; }
    [[nodiscard]] std::optional<ReadingId> current() const { return cloud_->current(); }
    /// Where a reading stands, in the coordinates of the viewport.
    [[nodiscard]] QPointF placeOf(ReadingId id) const;

    QSize minimumSizeHint() const override { return {240, 140}; }
    QSize sizeHint() const override { return {640, 360}; }

  signals:
    void selected(const std::set<ReadingId>& ids);
    void excludeRequested();
    void horizontalRangeChanged();
    void leftNeededChanged();

  protected:
    /// The next content is shown whole.
    void forgetZoom() { zoomedAcross_ = zoomedUp_ = false; }
    void resizeEvent(QResizeEvent* event) override;
    void changeEvent(QEvent* event) override;
    bool viewportEvent(QEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    void mouseMoveEvent(QMouseEvent* event) override;
    void mouseReleaseEvent(QMouseEvent* event) override;
    void mouseDoubleClickEvent(QMouseEvent* event) override;
    void wheelEvent(QWheelEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;

  private:
    void restyle();
    [[nodiscard]] std::vector<QPointF> marks() const;
    void layOut();
    void showRange(const AxisRange& x, const AxisRange& y);
    void zoom(double factor, const QPointF& about);
    void step(int direction);
    void stepVertical(bool up);
    void stand(std::size_t row);
    void choose(std::set<ReadingId> ids, Qt::KeyboardModifiers modifiers);

    PlotGrid* grid_;
    PointCloud* cloud_;
    PlotInk* ink_;
    PlotCurves curves_;
    QRubberBand* rubber_;
    Content content_;
    PlotFrame frame_;
    double left_ = 64;
    bool zoomedAcross_ = false, zoomedUp_ = false;
    std::optional<QPoint> pressed_;
    QString summary_;
    std::function<QString(ReadingId)> describe_;
};

} // namespace spanwright
