// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/PlotFrame.h"

#include <QColor>
#include <QGraphicsObject>

#include <functional>
#include <vector>

namespace spanwright {

/// A line drawn over a plot, in the units of its axes, with a word at its end.
struct PlotStroke {
    std::vector<QPointF> points;
    QColor color;
    double width = 1.5;
    Qt::PenStyle style = Qt::SolidLine;
    bool dots = false;  ///< a dot at every point
    QString label{};    ///< beside the last point
    QPointF labelOffset{6, 0};
};

/// Words inside a plot, at a corner of its rectangle.
struct PlotNote {
    QString text;
    Qt::Alignment corner = Qt::AlignRight | Qt::AlignBottom;
    bool strong = true;
};

/// Numbers at the axes, their units, lines over the plot and words in it.
class PlotInk : public QGraphicsObject {
    Q_OBJECT

  public:
    explicit PlotInk(QGraphicsItem* parent = nullptr);

    struct Axes {
        Ticks x, y;
        TickSign ySign = TickSign::Minus;
        QString xUnit, yUnit;
        std::vector<QString> xNames; ///< instead of numbers, one a tick; may be empty
    };

    void setFrame(const PlotFrame& frame);
    void setAxes(Axes axes);
    void setStrokes(std::vector<PlotStroke> strokes);
    void setNotes(std::vector<PlotNote> notes);
    /// Where the marks stand that words of strokes keep clear of; asked for again when `marksMoved` says so.
    void setMarks(std::function<std::vector<QPointF>()> marks);
    void marksMoved();
    /// Words in the middle of a plot that has nothing to show.
    void setEmptyText(const QString& text);

    [[nodiscard]] const std::vector<PlotStroke>& strokes() const { return strokes_; }
    /// The rectangles of the words of the strokes; null where there are none.
    [[nodiscard]] const std::vector<QRectF>& labels() const;
    [[nodiscard]] const std::vector<PlotNote>& notes() const { return notes_; }
    [[nodiscard]] const QString& emptyText() const { return emptyText_; }
    /// Width that the numbers at the vertical axis need.
    [[nodiscard]] double numbersWidth() const;

    [[nodiscard]] QRectF boundingRect() const override;
    void paint(QPainter* painter, const QStyleOptionGraphicsItem* option, QWidget* widget) override;

  private:
    void paintNumbers(QPainter& painter) const;
    void paintStroke(QPainter& painter, const PlotStroke& stroke) const;
    void paintLabel(QPainter& painter, const PlotStroke& stroke, const QRectF& place) const;
    [[nodiscard]] std::vector<QRectF> notePlaces() const;
    [[nodiscard]] QPolygonF lineOf(const PlotStroke& stroke) const;
    void paintNotes(QPainter& painter) const;

    PlotFrame frame_;
    Axes axes_;
    std::vector<PlotStroke> strokes_;
    std::vector<PlotNote> notes_;
    QString emptyText_;
    std::function<std::vector<QPointF>()> marks_;
    mutable std::vector<QRectF> labels_; ///< found when they are first asked for
    mutable bool placed_ = false;
};

} // namespace spanwright
