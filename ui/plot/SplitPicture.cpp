// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/SplitPicture.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PartStrokes.h"
#include "ui/plot/PlotSubject.h"
#include "ui/words/Words.h"

#include <QHelpEvent>
#include <QKeyEvent>
#include <QPainter>
#include <QToolTip>

#include <algorithm>

namespace spanwright {

namespace {

constexpr double columnWidth = 30, gap = 36, labelGap = 11;
constexpr double thinnest = 3; ///< a part is never too thin to be seen and hit

QFont strongFont() {
    QFont font = textFont(TextRole::Small);
    font.setWeight(QFont::DemiBold);
    return font;
}

/// Whether the text has room along the bar.
bool writeUpwards(QPainter& painter, const QRectF& bar, const QString& text, const QColor& color) {
    painter.setFont(strongFont());
    const double length = QFontMetricsF(painter.font()).horizontalAdvance(text);
    if (length + 8 > bar.height())
        return false;
    painter.save();
    painter.translate(bar.center());
    painter.rotate(-90);
    painter.setPen(color);
    painter.drawText(QRectF(-length, -columnWidth / 2, 2 * length, columnWidth), Qt::AlignCenter, text);
    painter.restore();
    return true;
}

double labelHeight() {
    return QFontMetricsF(strongFont()).height() + QFontMetricsF(textFont(TextRole::Small)).height();
}

} // namespace

SplitPicture::SplitPicture(QWidget* parent) : QWidget(parent) {
    setObjectName(QStringLiteral("splitPicture"));
    setFocusPolicy(Qt::StrongFocus);
    setMouseTracking(true);
    setAccessibleName(tr("Variance split"));
    QSizePolicy policy(QSizePolicy::Expanding, QSizePolicy::Expanding);
    setSizePolicy(policy);
}

void SplitPicture::setSplit(std::optional<VarianceSplit> split, const QString& functionName, const QString& why) {
    split_ = std::move(split);
    functionName_ = functionName;
    why_ = why;
    parts_.clear();
    if (split_) {
        const double total = split_->total.ss, noise = split_->residual.ss;
        const auto add = [&](SplitPart part, const SplitRow& row, double whole) {
            parts_.push_back({part, row, whole > 0 ? row.ss / whole : 0, {}, {}});
        };
        add(SplitPart::Regression, split_->regression, total);
        const std::pair<SplitPart, const std::optional<SplitRow>*> chain[] = {{SplitPart::LackOfFit, &split_->lackOfFit},
                                                                              {SplitPart::Hysteresis, &split_->hysteresis},
                                                                              {SplitPart::RunOffset, &split_->runOffset},
                                                                              {SplitPart::RunSlope, &split_->runSlope},
                                                                              {SplitPart::Repeatability, &split_->repeatability}};
        for (const auto& [part, row] : chain)
            if (*row)
                add(part, **row, noise);
        if (split_->pureError && split_->against == SplitPart::PureError) // else its parts stand there
            add(SplitPart::PureError, *split_->pureError, noise);
        if (parts_.size() == 1)
            add(SplitPart::Residual, split_->residual, noise);
    }
    const bool still = selected_ && std::any_of(parts_.begin(), parts_.end(), [&](const Part& p) { return p.part == *selected_; });
    if (selected_ && !still)
        choose(std::nullopt);
    layOut();
    setAccessibleDescription(summary());
    update();
}

void SplitPicture::select(std::optional<SplitPart> part) {
    selected_ = part;
    update();
}

QString SplitPicture::summary() const {
    if (!split_)
        return why_;
    QStringList lines;
    for (const Part& part : parts_)
        lines << (part.part == SplitPart::Regression ? tr("%1 explains %2 of the spread").arg(functionName_, shareText(part.share))
                                                     : splitPartText(part.part) + QStringLiteral(": ") + figuresOf(part));
    return lines.join(QStringLiteral("; "));
}

QString SplitPicture::figuresOf(const Part& part) const {
    return tr("%1 of noise, %2 d.f.").arg(shareText(part.share)).arg(part.row.df);
}

QString SplitPicture::testOf(const Part& part) const {
    if (part.part == SplitPart::Regression)
        return tr("%1 of the total sum of squares").arg(shareText(part.share));
    if (!part.row.f || !part.row.p)
        return figuresOf(part);
    return figuresOf(part) + QLatin1Char('\n') + tr("F = %1, p = %2, against %3")
               .arg(significantText(*part.row.f, 3), pText(*part.row.p), splitPartText(split_->against).toLower())
               .replace(QStringLiteral("p = <"), QStringLiteral("p <"));
}

void SplitPicture::resizeEvent(QResizeEvent*) {
    layOut();
}

void SplitPicture::layOut() {
    if (parts_.empty())
        return;
    const double caption = QFontMetricsF(textFont(TextRole::Small)).height() + 4;
    const double top = 2, bottom = height() - caption;
    const double tall = std::max(20.0, bottom - top);
    const bool noNoise = parts_.size() < 2 || !(split_->residual.ss > 0);
    const double noiseShare = split_->total.ss > 0 ? split_->residual.ss / split_->total.ss : 1;
    const double sliver = noNoise ? 0 : std::clamp(noiseShare * tall, 4.0, tall);
    parts_[0].bar = {1, top, columnWidth, tall - sliver};
    sliver_ = {1, bottom - sliver, columnWidth, sliver};
    noise_ = {1 + columnWidth + gap, top, columnWidth, tall};
    // Each part is given its thinnest first; what is left is shared out by size.
    const double free = tall - thinnest * static_cast<double>(parts_.size() - 1);
    double y = top;
    for (std::size_t i = 1; i < parts_.size(); ++i) {
        const double h = thinnest + (noNoise ? 0 : parts_[i].share) * free;
        parts_[i].bar = {noise_.left(), y, columnWidth, h};
        y += h;
    }
    placeLabels(bottom);
}

/// Labels stand beside the middle of their part, pushed apart where they would overlap.
void SplitPicture::placeLabels(double lowest) {
    const double h = labelHeight(), left = noise_.right() + labelGap, width = this->width() - left;
    double next = 0;
    for (std::size_t i = 1; i < parts_.size(); ++i) {
        const double y = std::max(next, parts_[i].bar.center().y() - h / 2);
        parts_[i].label = {left, y, width, h};
        next = y + h + 3;
    }
    double limit = lowest + 2;
    for (std::size_t i = parts_.size(); i-- > 1;) {
        QRectF& label = parts_[i].label;
        if (label.bottom() > limit)
            label.moveBottom(limit);
        limit = label.top() - 3;
    }
}

void SplitPicture::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.setFont(textFont(TextRole::Small));
    if (parts_.empty()) {
        painter.setPen(scheme().quiet);
        painter.setFont(textFont(TextRole::Body));
        painter.drawText(rect().adjusted(0, 4, -4, 0), Qt::AlignTop | Qt::AlignLeft | Qt::TextWordWrap, why_);
        return;
    }
    QColor wedge = scheme().lackOfFit;
    wedge.setAlphaF(0.16F);
    if (sliver_.height() > 0) {
        QPolygonF shape;
        shape << sliver_.topRight() << noise_.topLeft() << noise_.bottomLeft() << sliver_.bottomRight();
        painter.setPen(Qt::NoPen);
        painter.setBrush(wedge);
        painter.drawPolygon(shape);
        painter.setBrush(scheme().lackOfFit);
        painter.drawRect(sliver_);
    }
    paintSignal(painter);
    for (std::size_t i = 1; i < parts_.size() && split_->residual.ss > 0; ++i)
        paintPart(painter, parts_[i]);
    painter.setFont(textFont(TextRole::Small));
    painter.setPen(scheme().quiet);
    const double base = height() - QFontMetricsF(painter.font()).descent();
    painter.drawText(QPointF(1, base), tr("signal"));
    painter.drawText(QPointF(noise_.left(), base), split_->residual.ss > 0 ? tr("noise, enlarged") : tr("no noise"));
}

void SplitPicture::paintSignal(QPainter& painter) const {
    const Part& signal = parts_[0];
    painter.setPen(Qt::NoPen);
    painter.setBrush(scheme().accent);
    painter.drawRect(signal.bar);
    if (selected_ == SplitPart::Regression) {
        painter.setBrush(Qt::NoBrush);
        painter.setPen(QPen(scheme().ink, 2));
        painter.drawRect(signal.bar.adjusted(1, 1, -1, -1));
    }
    // Beside a small signal, how much the noise is.
    if (!writeUpwards(painter, signal.bar, functionName_ + QLatin1Char(' ') + shareText(signal.share), scheme().onAccent))
        writeUpwards(painter, sliver_, tr("noise %1").arg(shareText(1 - signal.share)), scheme().card);
}

void SplitPicture::paintPart(QPainter& painter, const Part& part) const {
    const bool chosen = selected_ == part.part;
    painter.setPen(Qt::NoPen);
    painter.setBrush(scheme().card);
    painter.drawRect(part.bar);
    painter.setBrush(colorOf(part.part));
    painter.drawRect(part.bar.adjusted(0, 0.5, 0, -0.5));
    if (chosen) {
        painter.setBrush(Qt::NoBrush);
        painter.setPen(QPen(scheme().ink, 2));
        painter.drawRect(part.bar.adjusted(0, 0, 0, 0));
        painter.fillRect(part.label.adjusted(-4, -1, 0, 2), scheme().selection);
    }
    painter.setPen(QPen(colorOf(part.part), 1.3));
    const double middle = part.label.top() + QFontMetricsF(strongFont()).height() / 2;
    painter.drawPolyline(QPolygonF() << QPointF(part.bar.right() + 1, part.bar.center().y())
                                     << QPointF(part.bar.right() + labelGap / 2, middle)
                                     << QPointF(part.bar.right() + labelGap - 3, middle));
    const double half = QFontMetricsF(strongFont()).height();
    painter.setFont(strongFont());
    painter.setPen(scheme().ink);
    painter.drawText(QRectF(part.label.topLeft(), QSizeF(part.label.width(), half)), Qt::AlignLeft | Qt::AlignVCenter, sentenceCase(splitPartText(part.part)));
    painter.setFont(textFont(TextRole::Small));
    painter.setPen(scheme().quiet);
    const QFontMetricsF metrics(painter.font());
    QString figures = figuresOf(part);
    if (metrics.horizontalAdvance(figures) > part.label.width())
        figures = tr("%1 of noise").arg(shareText(part.share));
    painter.drawText(QRectF(part.label.left(), part.label.top() + half, part.label.width(), part.label.height() - half), Qt::AlignLeft | Qt::AlignVCenter, figures);
}

const SplitPicture::Part* SplitPicture::at(const QPointF& place) const {
    for (const Part& part : parts_)
        if (part.label.contains(place))
            return &part;
    for (const Part& part : parts_)
        if (part.bar.adjusted(-2, -2, 2, 2).contains(place))
            return &part;
    return nullptr;
}

void SplitPicture::mousePressEvent(QMouseEvent* event) {
    if (event->button() != Qt::LeftButton)
        return;
    const Part* hit = at(event->position());
    choose(hit && selected_ != hit->part ? std::optional(hit->part) : std::nullopt);
}

void SplitPicture::mouseMoveEvent(QMouseEvent* event) {
    setCursor(at(event->position()) ? Qt::PointingHandCursor : Qt::ArrowCursor);
}

void SplitPicture::keyPressEvent(QKeyEvent* event) {
    const auto found = std::find_if(parts_.begin(), parts_.end(), [&](const Part& p) { return selected_ == p.part; });
    if (event->key() == Qt::Key_Escape && selected_) {
        choose(std::nullopt);
    } else if (event->key() == Qt::Key_Down && !parts_.empty()) {
        choose(found == parts_.end() ? parts_.front().part : (found + 1 == parts_.end() ? found : found + 1)->part);
    } else if (event->key() == Qt::Key_Up && !parts_.empty()) {
        choose(found == parts_.end() ? parts_.back().part : (found == parts_.begin() ? found : found - 1)->part);
    } else {
        QWidget::keyPressEvent(event);
    }
}

bool SplitPicture::event(QEvent* event) {
    if (event->type() == QEvent::ToolTip) {
        const auto* help = static_cast<QHelpEvent*>(event);
        if (const Part* part = at(QPointF(help->pos())))
            QToolTip::showText(help->globalPos(), sentenceCase(splitPartText(part->part)) + QLatin1Char('\n') + testOf(*part), this);
        else
            QToolTip::hideText();
        return true;
    }
    if (event->type() == QEvent::PaletteChange || event->type() == QEvent::FocusIn || event->type() == QEvent::FocusOut)
        update();
    return QWidget::event(event);
}

void SplitPicture::choose(std::optional<SplitPart> part) {
    if (part == selected_)
        return;
    select(part);
    emit partSelected(part);
}

} // namespace spanwright
