// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/PaddedDelegate.h"

#include "ui/look/Look.h"

#include <QPainter>

namespace spanwright {

void PaddedDelegate::paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const {
    if (option.state & QStyle::State_Selected)
        painter->fillRect(option.rect, scheme().selection);
    QStyleOptionViewItem inner = option;
    inner.state &= ~(QStyle::State_HasFocus | QStyle::State_Selected);
    inner.rect.adjust(5, 0, -5, 0);
    QStyledItemDelegate::paint(painter, inner, index);
}

} // namespace spanwright
