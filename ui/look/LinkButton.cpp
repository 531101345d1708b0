// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/LinkButton.h"

#include "ui/look/Look.h"

namespace spanwright {

LinkButton::LinkButton(const QString& name, const QString& text, QWidget* parent) : QToolButton(parent) {
    setObjectName(name);
    setProperty("link", true);
    QFont small = textFont(TextRole::Small);
    small.setWeight(QFont::DemiBold); // as the style draws it
    setFont(small);
    setText(text);
    setProperty("tight", true);
    setCursor(Qt::PointingHandCursor);
    setFocusPolicy(Qt::TabFocus);
}

QSize LinkButton::sizeHint() const {
    const QFontMetrics metrics(font());
    return {metrics.horizontalAdvance(text()) + 4, metrics.height() + 6};
}

} // namespace spanwright
