// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/PaddedDelegate.h"

#include "ui/look/Look.h"

#include <QPainter>

namespace spanwright {

namespace {
constexpr int padding = 5;
} // namespace

void PaddedDelegate::paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const {
    if (option.state & QStyle::State_Selected)
        painter->fillRect(option.rect, scheme().selection);
    QStyleOptionViewItem inner = option;
    inner.state &= ~(QStyle::State_HasFocus | QStyle::State_Selected);
    inner.rect.adjust(padding, 0, -padding, 0);
    QStyledItemDelegate::paint(painter, inner, index);
}

QSize PaddedDelegate::sizeHint(const QStyleOptionViewItem& option, const QModelIndex& index) const {
    return QStyledItemDelegate::sizeHint(option, index) + QSize(2 * padding, 0);
}

} // namespace spanwright
