// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/NumberEdit.h"

#include "ui/look/TypedNumber.h"
#include "ui/look/Look.h"

#include <QEvent>
#include <QKeyEvent>
#include <QPainter>
#include <QStyle>

namespace spanwright {

NumberEdit::NumberEdit(QWidget* parent) : QLineEdit(parent) {
    setInputMethodHints(Qt::ImhFormattedNumbersOnly);
    connect(this, &QLineEdit::textEdited, this, [this] { setRefused(false); });
}

void NumberEdit::setUnit(const QString& unit) {
    unit_ = unit;
    makeRoom();
    update();
}

void NumberEdit::makeRoom() {
    setTextMargins(0, 0, unit_.isEmpty() ? 0 : fontMetrics().horizontalAdvance(unit_) + 8, 0);
}

Result<Decimal> NumberEdit::number() const {
    return parseTyped(text());
}

void NumberEdit::setRefused(bool refused) {
    if (this->refused() == refused)
        return;
    setProperty("refused", refused);
    style()->unpolish(this);
    style()->polish(this);
    makeRoom();
    update();
}

bool NumberEdit::event(QEvent* event) {
    // Undo and redo belong to the record unless something is being typed.
    if (event->type() == QEvent::ShortcutOverride && !isModified()) {
        const auto* key = static_cast<QKeyEvent*>(event);
        if (key->matches(QKeySequence::Undo) || key->matches(QKeySequence::Redo)) {
            event->ignore();
            return true;
        }
    }
    return QLineEdit::event(event);
}

void NumberEdit::changeEvent(QEvent* event) {
    QLineEdit::changeEvent(event);
    if (event->type() == QEvent::FontChange)
        makeRoom();
}

void NumberEdit::paintEvent(QPaintEvent* event) {
    QLineEdit::paintEvent(event);
    if (unit_.isEmpty())
        return;
    QPainter painter(this);
    painter.setPen(scheme().quiet);
    painter.drawText(rect().adjusted(0, 0, -8, 0), Qt::AlignRight | Qt::AlignVCenter, unit_);
}

} // namespace spanwright
