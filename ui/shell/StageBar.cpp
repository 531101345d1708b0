// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/StageBar.h"

#include "ui/look/Look.h"

#include <QAction>
#include <QButtonGroup>
#include <QHBoxLayout>
#include <QLabel>
#include <QPainter>
#include <QToolButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// A label that gives way when the window is narrow, cutting its text with an ellipsis.
class GivingLabel : public QLabel {
  public:
    using QLabel::QLabel;
    QSize minimumSizeHint() const override { return {60, QLabel::minimumSizeHint().height()}; }

  protected:
    void paintEvent(QPaintEvent*) override {
        QPainter painter(this);
        painter.setPen(palette().color(foregroundRole()));
        painter.drawText(rect(), Qt::AlignLeft | Qt::AlignVCenter, fontMetrics().elidedText(text(), Qt::ElideRight, width()));
    }
};

} // namespace

StageButton::StageButton(Stage stage, QWidget* parent) : QAbstractButton(parent) {
    setObjectName(QStringLiteral("stage.") + stageName(stage));
    setText(stageTitle(stage));
    setCheckable(true);
    setFocusPolicy(Qt::TabFocus);
    setCursor(Qt::PointingHandCursor);
    setAccessibleName(stageTitle(stage));
}

void StageButton::setMissing(std::optional<int> missing) {
    complete_ = missing == 0;
    state_ = !missing ? QString() : complete_ ? tr("complete \u2713") : tr("%n missing", nullptr, *missing);
    setAccessibleDescription(state_);
    update();
}

QSize StageButton::sizeHint() const {
    const QFontMetrics metrics(textFont(TextRole::Heading));
    const QFontMetrics small(textFont(TextRole::Small));
    const int width = std::max({metrics.horizontalAdvance(text()), small.horizontalAdvance(tr("complete \u2713")),
                                small.horizontalAdvance(state_)});
    return {width + 36, metrics.height() + small.height() + 8};
}

void StageButton::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    const Scheme& s = scheme();
    const QRectF pill = QRectF(rect()).adjusted(1.5, 1.5, -1.5, -1.5);
    if (isChecked()) {
        painter.setPen(Qt::NoPen);
        painter.setBrush(s.accent);
        painter.drawRoundedRect(pill, pill.height() / 2, pill.height() / 2);
    } else if (underMouse()) {
        painter.setPen(Qt::NoPen);
        painter.setBrush(s.selection);
        painter.drawRoundedRect(pill, pill.height() / 2, pill.height() / 2);
    }
    if (hasFocus()) {
        painter.setPen(QPen(isChecked() ? s.ink : s.accent, 1.5));
        painter.setBrush(Qt::NoBrush);
        painter.drawRoundedRect(pill, pill.height() / 2, pill.height() / 2);
    }
    const QColor ink = isChecked() ? s.onAccent : s.ink;
    painter.setPen(ink);
    painter.setFont(textFont(TextRole::Heading));
    if (state_.isEmpty()) {
        painter.drawText(rect(), Qt::AlignCenter, text());
        return;
    }
    const int half = QFontMetrics(painter.font()).height();
    painter.drawText(QRect(0, 3, width(), half), Qt::AlignCenter, text());
    painter.setFont(textFont(TextRole::Small));
    painter.setPen(isChecked() ? s.onAccent : s.quiet);
    painter.drawText(QRect(0, 2 + half, width(), height() - half - 6), Qt::AlignCenter, state_);
}

StageBar::StageBar(QWidget* parent) : QWidget(parent), name_(new GivingLabel), subtitle_(new GivingLabel) {
    setObjectName(QStringLiteral("stageBar"));
    auto* all = new QHBoxLayout(this);
    all->setContentsMargins(space::card + space::half, space::half, space::card, space::half);
    all->setSpacing(space::step);

    auto* words = new QVBoxLayout;
    words->setSpacing(0);
    name_->setObjectName(QStringLiteral("itemName"));
    name_->setFont(textFont(TextRole::Title));
    name_->setTextFormat(Qt::PlainText);
    subtitle_->setObjectName(QStringLiteral("itemSubtitle"));
    subtitle_->setFont(textFont(TextRole::Small));
    subtitle_->setForegroundRole(inkRole::quiet);
    subtitle_->setTextFormat(Qt::PlainText);
    words->addStretch(1);
    words->addWidget(name_);
    words->addWidget(subtitle_);
    words->addStretch(1);
    all->addLayout(words, 1);

    auto* group = new QButtonGroup(this);
    for (const Stage stage : allStages) {
        if (stage != Stage::Job) {
            auto* mark = new QLabel(QStringLiteral("\u203a"));
            mark->setForegroundRole(inkRole::quiet);
            all->addWidget(mark);
        }
        auto* button = new StageButton(stage);
        group->addButton(button);
        connect(button, &QAbstractButton::clicked, this, [this, stage] { emit stageChosen(stage); });
        all->addWidget(button);
        buttons_[static_cast<std::size_t>(stage)] = button;
    }

    auto* right = new QWidget;
    end_ = new QHBoxLayout(right);
    end_->setContentsMargins(0, 0, 0, 0);
    end_->setSpacing(0);
    end_->addStretch(1);
    all->addWidget(right, 1);
}

void StageBar::setItem(const QString& name, const QString& subtitle) {
    name_->setText(name);
    subtitle_->setText(subtitle);
    name_->setToolTip(name);
}

void StageBar::setCurrent(Stage stage) {
    button(stage)->setChecked(true);
}

void StageBar::addAtEnd(QAction* action, const QString& label) {
    auto* button = new QToolButton;
    button->setObjectName(QStringLiteral("bar.") + action->objectName());
    button->setText(label);
    button->setAccessibleName(action->text().remove(QLatin1Char('&')));
    button->setForegroundRole(inkRole::quiet);
    button->setFocusPolicy(Qt::TabFocus);
    const auto follow = [button, action] {
        button->setEnabled(action->isEnabled());
        button->setToolTip(action->text().remove(QLatin1Char('&')));
    };
    connect(action, &QAction::changed, button, follow);
    connect(button, &QToolButton::clicked, action, &QAction::trigger);
    follow();
    end_->addWidget(button);
}

void StageBar::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.fillRect(rect(), scheme().card);
    painter.setPen(scheme().line);
    painter.drawLine(0, height() - 1, width(), height() - 1);
}

} // namespace spanwright
