// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/PagePreview.h"

#include "ui/look/Look.h"

#include <QPaintEvent>
#include <QPainter>
#include <QScrollBar>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

constexpr int Between = 2 * space::step;
constexpr int WidestSheet = 1000;

} // namespace

PageSheets::PageSheets(QWidget* parent) : QWidget(parent) {
    setObjectName(QStringLiteral("certificateSheets"));
    setAccessibleName(tr("Certificate draft"));
}

void PageSheets::setPages(Pages pages) {
    pages_ = std::move(pages);
    pictures_.clear();
    setAccessibleDescription(plainText(pages_));
    arrange();
}

void PageSheets::setSheetWidth(int width) {
    if (width == width_)
        return;
    width_ = width;
    pictures_.clear();
    arrange();
}

QRect PageSheets::sheet(std::size_t index) const {
    const int height = static_cast<int>(std::lround(width_ * pages_.size.height() / pages_.size.width()));
    return {(width() - width_) / 2, static_cast<int>(index) * (height + Between), width_, height};
}

void PageSheets::arrange() {
    const std::size_t last = std::max<std::size_t>(pages_.pages.size(), 1) - 1;
    setMinimumSize(width_, sheet(last).bottom() + 1);
    update();
}

const QPixmap& PageSheets::picture(std::size_t index, const QSize& size) {
    QPixmap& held = pictures_[index];
    const double ratio = devicePixelRatioF();
    if (held.isNull() || !qFuzzyCompare(held.devicePixelRatio(), ratio)) {
        held = QPixmap(size * ratio);
        held.setDevicePixelRatio(ratio);
        held.fill(Qt::white);
        QPainter painter(&held);
        paintPage(painter, pages_, index, QRectF(QPointF(), QSizeF(size)));
    }
    return held;
}

void PageSheets::paintEvent(QPaintEvent* event) {
    QPainter painter(this);
    for (std::size_t i = 0; i < pages_.pages.size(); ++i) {
        const QRect box = sheet(i);
        if (!box.intersects(event->rect()))
            continue;
        painter.drawPixmap(box.topLeft(), picture(i, box.size()));
        painter.setPen(scheme().line);
        painter.drawRect(box.adjusted(0, 0, -1, -1));
    }
}

PagePreview::PagePreview(QWidget* parent) : QScrollArea(parent), sheets_(new PageSheets) {
    setObjectName(QStringLiteral("certificatePreview"));
    setAccessibleName(tr("Preview of the certificate draft"));
    setWidget(sheets_);
    setWidgetResizable(true);
    setFocusPolicy(Qt::StrongFocus);
    setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    setVerticalScrollBarPolicy(Qt::ScrollBarAlwaysOn);
    verticalScrollBar()->setSingleStep(40);
    setFrameShape(QFrame::NoFrame);
}

void PagePreview::setPages(Pages pages) {
    const int at = verticalScrollBar()->value();
    sheets_->setPages(std::move(pages));
    verticalScrollBar()->setValue(at);
}

void PagePreview::resizeEvent(QResizeEvent* event) {
    QScrollArea::resizeEvent(event);
    fit();
}

void PagePreview::changeEvent(QEvent* event) {
    QScrollArea::changeEvent(event);
    if (event->type() == QEvent::PaletteChange)
        sheets_->update();
}

void PagePreview::fit() {
    sheets_->setSheetWidth(std::clamp(viewport()->width() - space::step, 200, WidestSheet));
}

} // namespace spanwright
