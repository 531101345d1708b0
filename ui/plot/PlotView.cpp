// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/PlotView.h"

#include "ui/look/Look.h"

#include <QAccessible>
#include <QApplication>
#include <QHelpEvent>
#include <QMouseEvent>
#include <QRubberBand>
#include <QToolTip>
#include <QWheelEvent>
#include <QtCharts/QChart>

#include <algorithm>
#include <cmath>
#include <numeric>

namespace spanwright {

namespace {

constexpr double reach = 11; ///< pixels within which a click finds a mark

} // namespace

PlotView::PlotView(QWidget* parent)
    : QChartView(new QChart, parent), grid_(new PlotGrid(chart())), cloud_(new PointCloud(chart())), ink_(new PlotInk(chart())), curves_(*chart()),
      rubber_(new QRubberBand(QRubberBand::Rectangle, viewport())) {
    chart()->legend()->hide();
    chart()->setBackgroundVisible(false);
    chart()->setMargins({});
    chart()->setAnimationOptions(QChart::NoAnimation);
    grid_->setZValue(1);
    cloud_->setZValue(30);
    ink_->setZValue(40);
    setRenderHint(QPainter::Antialiasing);
    setFrameShape(QFrame::NoFrame);
    setFocusPolicy(Qt::StrongFocus);
    setMouseTracking(true);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setVerticalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    rubber_->hide();
    ink_->setMarks([this] { return marks(); });
    restyle();
}

/// Where the marks stand; of very many, some that are spread over all of them.
std::vector<QPointF> PlotView::marks() const {
    constexpr std::size_t enough = 2000;
    std::vector<QPointF> places;
    const std::size_t step = points().size() / enough + 1;
    for (std::size_t row = 0; row < points().size(); row += step)
        places.push_back(cloud_->place(row));
    return places;
}

void PlotView::setContent(Content content) {
    content_ = std::move(content);
    const bool empty = !content_.emptyText.isEmpty();
    if (empty)
        zoomedAcross_ = zoomedUp_ = false;
    grid_->setVisible(!empty);
    curves_.clear();
    showRange(zoomedAcross_ ? frame_.x : content_.x, zoomedUp_ ? frame_.y : content_.y);
    curves_.set(content_.line, content_.inner, content_.outer);
    cloud_->setPoints(empty ? PlotPoints{} : std::move(content_.points));
    content_.points = {};
    ink_->marksMoved();
    ink_->setEmptyText(content_.emptyText);
}

void PlotView::setStrokes(std::vector<PlotStroke> strokes) {
    ink_->setStrokes(std::move(strokes));
}

void PlotView::setNotes(std::vector<PlotNote> notes) {
    ink_->setNotes(std::move(notes));
}

void PlotView::setSelection(const std::set<ReadingId>& selection) {
    cloud_->setSelection(selection);
    if (selection.size() == 1)
        cloud_->setCurrent(*selection.begin());
}

void PlotView::setDescriber(std::function<QString(ReadingId)> describe) {
    describe_ = std::move(describe);
}

void PlotView::setSummary(const QString& name, const QString& summary) {
    setAccessibleName(name);
    summary_ = summary;
    setAccessibleDescription(summary);
}

double PlotView::leftNeeded() const {
    return std::ceil(ink_->numbersWidth()) + 14;
}

void PlotView::setLeft(double left) {
    if (left == left_)
        return;
    left_ = left;
    layOut();
}

void PlotView::followAcross(const PlotView& other) {
    zoomedAcross_ = other.zoomedAcross_;
    if (other.frame_.x != frame_.x)
        showRange(other.frame_.x, frame_.y);
}

QPointF PlotView::placeOf(ReadingId id) const {
    const auto& ids = points().ids;
    const auto found = std::lower_bound(ids.begin(), ids.end(), id);
    if (found == ids.end() || *found != id)
        return {-1, -1};
    return cloud_->place(static_cast<std::size_t>(found - ids.begin()));
}

void PlotView::resizeEvent(QResizeEvent* event) {
    QChartView::resizeEvent(event);
    layOut();
}

void PlotView::changeEvent(QEvent* event) {
    QChartView::changeEvent(event);
    if (event->type() == QEvent::PaletteChange || event->type() == QEvent::StyleChange || event->type() == QEvent::FontChange)
        restyle();
}

void PlotView::restyle() {
    setBackgroundBrush(scheme().card);
    curves_.restyle();
    cloud_->refresh();
    ink_->update();
}

void PlotView::layOut() {
    const QFontMetricsF metrics(textFont(TextRole::Small));
    const QRectF area = QRectF(viewport()->rect()).adjusted(left_, metrics.height() + 6, -18, -metrics.height() - 12);
    if (area.width() < 20 || area.height() < 20)
        return;
    chart()->setPlotArea(area);
    frame_.area = area;
    showRange(frame_.x, frame_.y);
}

void PlotView::showRange(const AxisRange& x, const AxisRange& y) {
    const bool moved = x != frame_.x;
    frame_.x = x;
    frame_.y = y;
    const QFontMetricsF metrics(textFont(TextRole::Small));
    const int across = std::max(2, static_cast<int>(frame_.area.width() / 76));
    const int up = std::max(3, static_cast<int>(frame_.area.height() / (metrics.height() * 2.6)));
    Ticks xTicks = roundTicks(x, across), yTicks = roundTicks(y, up);
    std::vector<QString> names;
    if (!content_.xNames.empty()) {
        xTicks.places.clear();
        for (std::size_t i = 0; i < content_.xNames.size(); ++i) {
            xTicks.places.push_back(static_cast<double>(i + 1));
            names.push_back(content_.xNames[i]);
        }
        xTicks.first = xTicks.step = 1;
    }
    curves_.setRange(x.low, x.high, y.low, y.high);
    grid_->set(frame_, xTicks.places, yTicks.places);
    ink_->setAxes({xTicks, yTicks, content_.ySign, content_.xUnit, content_.yUnit, names});
    ink_->setFrame(frame_);
    cloud_->setFrame(frame_);
    emit leftNeededChanged();
    // An empty plot has no range of its own that another could follow.
    if (moved && content_.emptyText.isEmpty())
        emit horizontalRangeChanged();
}

bool PlotView::viewportEvent(QEvent* event) {
    if (event->type() == QEvent::ToolTip) {
        const auto* help = static_cast<QHelpEvent*>(event);
        const auto row = cloud_->nearest(QPointF(help->pos()), reach);
        if (row && describe_)
            QToolTip::showText(help->globalPos(), describe_(points().ids[*row]), this);
        else
            QToolTip::hideText();
        return true;
    }
    return QChartView::viewportEvent(event);
}

void PlotView::mousePressEvent(QMouseEvent* event) {
    if (event->button() == Qt::LeftButton)
        pressed_ = event->position().toPoint();
    event->accept();
}

void PlotView::mouseMoveEvent(QMouseEvent* event) {
    if (!pressed_) {
        viewport()->setCursor(cloud_->nearest(event->position(), reach) ? Qt::PointingHandCursor : Qt::CrossCursor);
        return;
    }
    const QPoint at = event->position().toPoint();
    if (rubber_->isVisible() || (at - *pressed_).manhattanLength() >= QApplication::startDragDistance()) {
        rubber_->setGeometry(QRect(*pressed_, at).normalized());
        rubber_->show();
    }
}

void PlotView::mouseReleaseEvent(QMouseEvent* event) {
    if (!pressed_ || event->button() != Qt::LeftButton)
        return;
    if (rubber_->isVisible()) {
        rubber_->hide();
        choose(cloud_->inside(QRectF(QRect(*pressed_, event->position().toPoint()).normalized())), event->modifiers());
    } else if (const auto row = cloud_->nearest(event->position(), reach)) {
        cloud_->setCurrent(points().ids[*row]);
        choose({points().ids[*row]}, event->modifiers());
    } else if (!(event->modifiers() & (Qt::ShiftModifier | Qt::ControlModifier))) {
        choose({}, Qt::NoModifier);
    }
    pressed_.reset();
}

void PlotView::mouseDoubleClickEvent(QMouseEvent*) {
    pressed_.reset();
    zoomedAcross_ = zoomedUp_ = false;
    showRange(content_.x, content_.y);
}

void PlotView::wheelEvent(QWheelEvent* event) {
    if (event->angleDelta().y() != 0)
        zoom(std::pow(0.85, event->angleDelta().y() / 120.0), event->position());
    event->accept();
}

void PlotView::zoom(double factor, const QPointF& about) {
    if (!frame_.usable())
        return;
    const QPointF value = frame_.toValue(about);
    const auto scaled = [factor](const AxisRange& range, double fixed, const AxisRange& whole) {
        const AxisRange next{fixed - (fixed - range.low) * factor, fixed + (range.high - fixed) * factor};
        const bool sensible = next.span() > whole.span() * 1e-5 && next.span() < whole.span() * 20;
        return sensible ? next : range;
    };
    zoomedAcross_ = zoomedUp_ = true;
    showRange(scaled(frame_.x, value.x(), content_.x), scaled(frame_.y, value.y(), content_.y));
}

void PlotView::keyPressEvent(QKeyEvent* event) {
    switch (event->key()) {
    case Qt::Key_Left: step(-1); break;
    case Qt::Key_Right: step(1); break;
    case Qt::Key_Up: stepVertical(true); break;
    case Qt::Key_Down: stepVertical(false); break;
    case Qt::Key_Plus:
    case Qt::Key_Equal: zoom(0.8, frame_.area.center()); break;
    case Qt::Key_Minus: zoom(1.25, frame_.area.center()); break;
    case Qt::Key_0: mouseDoubleClickEvent(nullptr); break;
    case Qt::Key_Escape: choose({}, Qt::NoModifier); break;
    case Qt::Key_Space:
        if (current())
            choose({*current()}, event->modifiers() | Qt::ControlModifier);
        break;
    case Qt::Key_X:
    case Qt::Key_Delete:
        if (cloud_->selection().empty() && current())
            choose({*current()}, Qt::NoModifier);
        if (!cloud_->selection().empty())
            emit excludeRequested();
        break;
    default: QChartView::keyPressEvent(event); return;
    }
    event->accept();
}

void PlotView::step(int direction) {
    if (points().size() == 0)
        return;
    const auto& ids = points().ids;
    if (!current()) {
        stand(direction > 0 ? 0 : ids.size() - 1);
        return;
    }
    const auto at = static_cast<std::ptrdiff_t>(std::lower_bound(ids.begin(), ids.end(), *current()) - ids.begin()) + direction;
    stand(static_cast<std::size_t>(std::clamp<std::ptrdiff_t>(at, 0, static_cast<std::ptrdiff_t>(ids.size()) - 1)));
}

/// The next reading above or below, among those that stand in the same narrow column.
void PlotView::stepVertical(bool up) {
    if (!current()) {
        step(1);
        return;
    }
    const QPointF from = placeOf(*current());
    std::optional<std::size_t> best;
    double bound = 1e9;
    for (std::size_t i = 0; i < points().size(); ++i) {
        const QPointF off = cloud_->place(i) - from;
        const double rise = up ? -off.y() : off.y();
        if (rise > 1e-6 && std::abs(off.x()) < reach && rise < bound) {
            bound = rise;
            best = i;
        }
    }
    if (best)
        stand(*best);
}

void PlotView::stand(std::size_t row) {
    const ReadingId id = points().ids[row];
    cloud_->setCurrent(id);
    if (describe_) {
        setAccessibleDescription(describe_(id) + QLatin1Char('\n') + summary_);
        QAccessibleEvent changed(this, QAccessible::DescriptionChanged);
        QAccessible::updateAccessibility(&changed);
        if (isVisible())
            QToolTip::showText(viewport()->mapToGlobal(cloud_->place(row).toPoint() + QPoint(10, 10)), describe_(id), this);
    }
}

void PlotView::choose(std::set<ReadingId> ids, Qt::KeyboardModifiers modifiers) {
    std::set<ReadingId> next;
    if (modifiers & Qt::ControlModifier) { // each one turned over
        std::set_symmetric_difference(cloud_->selection().begin(), cloud_->selection().end(), ids.begin(), ids.end(),
                                      std::inserter(next, next.end()));
    } else {
        next = std::move(ids);
        if (modifiers & Qt::ShiftModifier)
            next.insert(cloud_->selection().begin(), cloud_->selection().end());
    }
    cloud_->setSelection(next);
    emit selected(next);
}

} // namespace spanwright
