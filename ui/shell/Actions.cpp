// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/Actions.h"

#include <QMenu>

#include <algorithm>
#include <cassert>

namespace spanwright {

Actions::Actions(QWidget* window) : QObject(window), window_(window) {}

QAction* Actions::add(QMenu* menu, const ActionSpec& spec) {
    assert(!spec.shortcut.isEmpty() || spec.reason);
    auto* action = new QAction(spec.text, window_);
    action->setObjectName(QLatin1String(spec.id));
    action->setShortcut(spec.shortcut);
    if (spec.reason)
        action->setProperty("noShortcutReason", QLatin1String(spec.reason));
    menu->addAction(action);
    window_->addAction(action);
    all_.push_back(action);
    return action;
}

QAction* Actions::find(const QString& id) const {
    const auto found = std::find_if(all_.begin(), all_.end(), [&](const QAction* a) { return a->objectName() == id; });
    return found == all_.end() ? nullptr : *found;
}

void Actions::adopt(QWidget* page) {
    for (QAction* action : page->actions())
        if (!action->isSeparator() && !action->objectName().isEmpty() && !action->text().isEmpty())
            all_.push_back(action);
}

QString plainText(const QAction* action) {
    QString text = action->text();
    text.remove(QLatin1Char('&'));
    if (text.endsWith(QChar(0x2026)))
        text.chop(1);
    return text;
}

} // namespace spanwright
