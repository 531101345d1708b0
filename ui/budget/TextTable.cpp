// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/budget/TextTable.h"

#include "ui/look/Look.h"
#include "ui/look/PaddedDelegate.h"

#include <QHeaderView>
#include <QPainter>
#include <QTableView>

namespace spanwright {

TextTable::TextTable(std::vector<Column> columns, QObject* parent) : QAbstractTableModel(parent), columns_(std::move(columns)) {}

void TextTable::fill(std::vector<std::vector<Cell>> rows) {
    const bool sameShape = rows.size() == rows_.size();
    if (!sameShape)
        beginResetModel();
    rows_ = std::move(rows);
    if (!sameShape)
        endResetModel();
    else if (!rows_.empty())
        emit dataChanged(index(0, 0), index(rowCount() - 1, columnCount() - 1));
}

void TextTable::setHead(int column, const QString& head) {
    columns_[static_cast<std::size_t>(column)].head = head;
    emit headerDataChanged(Qt::Horizontal, column, column);
}

int TextTable::rowCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : static_cast<int>(rows_.size());
}

int TextTable::columnCount(const QModelIndex& parent) const {
    return parent.isValid() ? 0 : static_cast<int>(columns_.size());
}

QVariant TextTable::data(const QModelIndex& index, int role) const {
    const Cell& cell = rows_[static_cast<std::size_t>(index.row())][static_cast<std::size_t>(index.column())];
    switch (role) {
    case Qt::DisplayRole:
    case Qt::ToolTipRole: return cell.text;
    case Qt::ForegroundRole: return cell.warning ? QVariant(scheme().warning) : QVariant();
    case ShareRole: return cell.share;
    case Qt::TextAlignmentRole:
        return QVariant(Qt::AlignVCenter | (columns_[static_cast<std::size_t>(index.column())].number ? Qt::AlignRight : Qt::AlignLeft));
    default: return {};
    }
}

QVariant TextTable::headerData(int section, Qt::Orientation orientation, int role) const {
    if (orientation != Qt::Horizontal)
        return {};
    const Column& column = columns_[static_cast<std::size_t>(section)];
    if (role == Qt::DisplayRole)
        return column.head;
    if (role == Qt::TextAlignmentRole)
        return QVariant(Qt::AlignVCenter | (column.number ? Qt::AlignRight : Qt::AlignLeft));
    return {};
}

namespace {

constexpr int BarWidth = 40;

int shareTextWidth(const QFontMetrics& metrics) {
    return metrics.horizontalAdvance(QStringLiteral("< 0.01 %")) + space::step;
}

} // namespace

QSize ShareDelegate::sizeHint(const QStyleOptionViewItem& option, const QModelIndex& index) const {
    return {shareTextWidth(option.fontMetrics) + BarWidth, QStyledItemDelegate::sizeHint(option, index).height()};
}

void ShareDelegate::paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const {
    const double share = index.data(TextTable::ShareRole).toDouble();
    painter->save();
    if (option.state & QStyle::State_Selected)
        painter->fillRect(option.rect, scheme().selection);
    QRect bar = option.rect.adjusted(space::half, 7, -shareTextWidth(option.fontMetrics), -7);
    bar.setWidth(share > 0 ? std::max(2, static_cast<int>(bar.width() * share)) : 0);
    painter->fillRect(bar, scheme().accent);
    painter->setPen(scheme().ink);
    painter->drawText(option.rect.adjusted(0, 0, -space::step, 0), Qt::AlignRight | Qt::AlignVCenter, index.data().toString());
    painter->restore();
}

QTableView* textView(TextTable* model, const QString& id, const QString& name) {
    auto* view = new QTableView;
    view->setObjectName(id);
    view->setAccessibleName(name);
    view->setModel(model);
    view->setItemDelegate(new PaddedDelegate(view));
    view->setSelectionBehavior(QAbstractItemView::SelectRows);
    view->setSelectionMode(QAbstractItemView::SingleSelection);
    view->setTabKeyNavigation(false);
    view->setShowGrid(false);
    view->setWordWrap(false);
    view->verticalHeader()->hide();
    view->verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    view->verticalHeader()->setDefaultSectionSize(26);
    view->horizontalHeader()->setHighlightSections(false);
    view->horizontalHeader()->setMinimumSectionSize(36);
    return view;
}

} // namespace spanwright
