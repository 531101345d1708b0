// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/UndoKeys.h"

#include <QApplication>
#include <QKeyEvent>
#include <QLineEdit>
#include <QSpinBox>

namespace spanwright {

namespace {

/// Whether something stands in the editor that was not handed over yet.
bool beingTyped(const QLineEdit& line) {
    if (const auto* spin = qobject_cast<const QSpinBox*>(line.parentWidget()))
        return spin->cleanText() != spin->locale().toString(spin->value()) && spin->cleanText() != QString::number(spin->value());
    return line.isModified();
}

const QLineEdit* lineOf(QObject* watched) {
    if (const auto* line = qobject_cast<const QLineEdit*>(watched))
        return line;
    const auto* spin = qobject_cast<const QSpinBox*>(watched);
    return spin != nullptr ? spin->findChild<const QLineEdit*>() : nullptr;
}

} // namespace

UndoKeys::UndoKeys(QWidget* window) : QObject(window), window_(window) {
    QApplication::instance()->installEventFilter(this);
}

bool UndoKeys::eventFilter(QObject* watched, QEvent* event) {
    if (event->type() != QEvent::ShortcutOverride)
        return false;
    const auto* key = static_cast<QKeyEvent*>(event);
    const QLineEdit* line = lineOf(watched);
    if (line == nullptr || line->window() != window_ || !(key->matches(QKeySequence::Undo) || key->matches(QKeySequence::Redo)) || beingTyped(*line))
        return false;
    event->ignore();
    return true;
}

} // namespace spanwright
