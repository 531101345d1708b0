// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/Card.h"

#include "ui/look/Look.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QPainter>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// A title that gives way to what stands beside it, and says so with an ellipsis.
class ElidedTitle : public QLabel {
  public:
    using QLabel::QLabel;
    [[nodiscard]] QSize minimumSizeHint() const override { return {QFontMetrics(font()).horizontalAdvance(QStringLiteral("Mmmm…")), QLabel::minimumSizeHint().height()}; }

  protected:
    void paintEvent(QPaintEvent*) override {
        QPainter painter(this);
        const QString shown = QFontMetrics(font()).elidedText(text(), Qt::ElideRight, width());
        painter.drawText(rect(), Qt::AlignLeft | Qt::AlignVCenter, shown);
    }
};

} // namespace

Card::Card(const QString& title, QWidget* parent) : QFrame(parent), title_(new ElidedTitle(title)), note_(new QLabel) {
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::step + space::half, space::card, space::card);
    all->setSpacing(space::step);
    head_ = new QHBoxLayout;
    head_->setSpacing(space::step);
    title_->setFont(textFont(TextRole::Heading));
    note_->setForegroundRole(inkRole::quiet);
    note_->setFont(textFont(TextRole::Small));
    head_->addWidget(title_);
    head_->addStretch(1);
    head_->addWidget(note_);
    all->addLayout(head_);
    body_ = new QVBoxLayout;
    body_->setContentsMargins(0, 0, 0, 0);
    body_->setSpacing(space::step);
    all->addLayout(body_, 1);
    setTitle(title);
    note_->hide();
}

void Card::setTitle(const QString& title) {
    title_->setText(title);
    title_->setVisible(!title.isEmpty());
    setAccessibleName(title);
}

void Card::setNote(const QString& note) {
    note_->setText(note);
    note_->setVisible(!note.isEmpty());
}

void Card::addHeadWidget(QWidget* widget) {
    head_->addWidget(widget);
}

void Card::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    painter.setPen(QPen(scheme().line, 1));
    painter.setBrush(scheme().card);
    painter.drawRoundedRect(QRectF(rect()).adjusted(0.5, 0.5, -0.5, -0.5), 5, 5);
}

} // namespace spanwright
