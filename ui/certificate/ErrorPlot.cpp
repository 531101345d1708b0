// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/ErrorPlot.h"

#include "ui/certificate/Flow.h"
#include "ui/plot/Ticks.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

constexpr double LeftRoom = 17, RightRoom = 23, TopRoom = 6, BottomRoom = 10.5; // mm for labels
constexpr double Beside = 0.85; // mm by which rising and falling stand apart, so that their bars do not cover each other
constexpr TextStyle Label{7.5, false, PageInk::Quiet};

struct ErrorPlot {
    Q_DECLARE_TR_FUNCTIONS(ErrorPlot)
};

AxisRange errorRange(const PhaseSection& section) {
    double most = 0;
    for (const ResultLine& line : section.results) {
        most = std::max(most, std::fabs(line.drawn.error) + line.drawn.expanded);
        if (line.drawn.limit)
            most = std::max(most, *line.drawn.limit);
    }
    most = most > 0 ? most * 1.08 : 1;
    return {-most, most};
}

AxisRange referenceRange(const PhaseSection& section) {
    AxisRange range{INFINITY, -INFINITY};
    for (const ResultLine& line : section.results) {
        range.low = std::min(range.low, line.drawn.reference);
        range.high = std::max(range.high, line.drawn.reference);
    }
    return widened(range, 0.025);
}

class Drawing {
  public:
    Drawing(const PhaseSection& section, const QRectF& mm)
        : section_(section), box_(mm.adjusted(LeftRoom, TopRoom, -RightRoom, -BottomRoom)), x_(referenceRange(section)),
          y_(errorRange(section)) {}

    void axes(const Item& item) {
        const Ticks errors = roundTicks(y_, 7);
        for (const double place : errors.places) {
            const bool zero = std::fabs(place) < errors.step / 2;
            rule({box_.left(), atY(place)}, {box_.right(), atY(place)}, {zero ? 0.25 : 0.12, zero ? PageInk::Quiet : PageInk::Line});
            text(box_.left() - 1.5, atY(place) + 1.0, tickText(place, errors, TickSign::Both), Label, Qt::AlignRight);
        }
        const Ticks references = roundTicks(x_, 12);
        for (const double place : references.places) {
            rule({atX(place), box_.bottom()}, {atX(place), box_.bottom() + 1.0}, {0.2, PageInk::Quiet});
            text(atX(place), box_.bottom() + 4.4, tickText(place, references, TickSign::Minus), Label, Qt::AlignHCenter);
        }
        text(box_.left() - LeftRoom, box_.top() - 3.0, ErrorPlot::tr("error, %1").arg(QString::fromStdString(item.indication.unit)), Label);
        text(box_.right(), box_.bottom() + 8.6, ErrorPlot::tr("reference, %1. Bars: expanded uncertainty U.").arg(QString::fromStdString(item.reference.unit)),
             Label, Qt::AlignRight);
        legend();
    }

    /// Limits as steps through the points, so that limits that depend on the reading are true at each of them.
    void limits() {
        outline(&ResultLine::Drawn::limit, {0.35, PageInk::Warning}, ErrorPlot::tr("limit"));
        const auto& lines = section_.results;
        const bool guarded = std::any_of(lines.begin(), lines.end(), [](const ResultLine& line) {
            return line.drawn.acceptance && *line.drawn.acceptance < *line.drawn.limit && *line.drawn.acceptance > 0;
        });
        if (guarded)
            outline(&ResultLine::Drawn::acceptance, {0.25, PageInk::Warning, Qt::DashLine}, ErrorPlot::tr("acceptance limit"));
    }

    void results() {
        for (const ResultLine& line : section_.results) {
            const double x = atX(line.drawn.reference) + (line.direction == Direction::Rising ? -Beside : line.direction == Direction::Falling ? Beside : 0);
            const double top = atY(line.drawn.error + line.drawn.expanded), bottom = atY(line.drawn.error - line.drawn.expanded);
            rule({x, top}, {x, bottom}, {0.45, PageInk::Accent});
            mark({x, atY(line.drawn.error)}, line.direction);
        }
    }

    [[nodiscard]] std::vector<PageBlock> take() { return std::move(blocks_); }

  private:
    [[nodiscard]] double atX(double value) const { return box_.left() + (value - x_.low) / x_.span() * box_.width(); }
    [[nodiscard]] double atY(double value) const { return box_.bottom() - (value - y_.low) / y_.span() * box_.height(); }

    void rule(QPointF from, QPointF to, Rule how) {
        how.falls = (to.y() - from.y()) * (to.x() - from.x()) >= 0;
        blocks_.push_back({QRectF(from, to).normalized(), how});
    }
    void text(double x, double baseline, const QString& words, const TextStyle& style, Qt::Alignment end = Qt::AlignLeft) {
        blocks_.push_back(textBlock(x, baseline, words, style, end));
    }
    void mark(QPointF at, Direction direction) {
        const auto shape = direction == Direction::Rising    ? PlotMark::Shape::Up
                           : direction == Direction::Falling ? PlotMark::Shape::Down
                                                             : PlotMark::Shape::Dot;
        blocks_.push_back({QRectF(at.x() - 1.2, at.y() - 1.2, 2.4, 2.4), PlotMark{shape, PageInk::Text}});
    }

    void legend() {
        const auto& lines = section_.results;
        double x = box_.left();
        const double baseline = box_.bottom() + 8.6;
        const std::pair<Direction, QString> kinds[] = {{Direction::Rising, ErrorPlot::tr("rising")},
                                                       {Direction::Falling, ErrorPlot::tr("falling")},
                                                       {Direction::Unknown, ErrorPlot::tr("mean")}};
        for (const auto& [direction, words] : kinds) {
            const bool there = std::any_of(lines.begin(), lines.end(), [wanted = direction](const ResultLine& line) { return line.direction == wanted; });
            if (!there)
                continue;
            mark({x + 1.2, baseline - 1.0}, direction);
            text(x + 3.6, baseline, words, Label);
            x += 6 + textWidth(words, Label) + 3;
        }
    }

    void outline(std::optional<double> ResultLine::Drawn::*half, Rule how, const QString& words) {
        std::vector<std::pair<double, double>> places;
        for (const ResultLine& line : section_.results)
            if (line.drawn.*half)
                places.emplace_back(line.drawn.reference, *(line.drawn.*half));
        std::sort(places.begin(), places.end());
        if (places.empty())
            return;
        places.insert(places.begin(), {x_.low, places.front().second});
        places.emplace_back(x_.high, places.back().second);
        for (const double sign : {1.0, -1.0})
            for (std::size_t i = 0; i + 1 < places.size(); ++i)
                rule({atX(places[i].first), atY(sign * places[i].second)}, {atX(places[i + 1].first), atY(sign * places[i + 1].second)}, how);
        text(box_.right() + 1.5, atY(places.back().second) + 1.0, words, {7.5, false, PageInk::Warning});
    }

    const PhaseSection& section_;
    QRectF box_;
    AxisRange x_, y_;
    std::vector<PageBlock> blocks_;
};

} // namespace

std::vector<PageBlock> errorPlot(const PhaseSection& section, const Item& item, const QRectF& mm) {
    Drawing drawing(section, mm);
    drawing.axes(item);
    drawing.limits();
    drawing.results();
    return drawing.take();
}

} // namespace spanwright
