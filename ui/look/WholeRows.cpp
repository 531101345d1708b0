// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/WholeRows.h"

#include <QHeaderView>
#include <QScrollBar>
#include <QTableView>

#include <algorithm>

namespace spanwright {

namespace {
constexpr int FewestRows = 2;
} // namespace

WholeRows::WholeRows(QTableView* table, Fill fill, QWidget* parent) : QWidget(parent), table_(table), fill_(fill) {
    table->setParent(this);
    setSizePolicy(table->sizePolicy());
    setFocusProxy(table);
    connect(table->horizontalHeader(), &QHeaderView::geometriesChanged, this, &WholeRows::place);
    connect(table->horizontalHeader(), &QHeaderView::sectionResized, this, &WholeRows::place);
    if (fill == Fill::Rows)
        for (const auto signal : {&QAbstractItemModel::rowsInserted, &QAbstractItemModel::rowsRemoved})
            connect(table->model(), signal, this, &WholeRows::place);
    connect(table->model(), &QAbstractItemModel::modelReset, this, &WholeRows::place);
    connect(table->horizontalScrollBar(), &QScrollBar::rangeChanged, this, &WholeRows::place, Qt::QueuedConnection);
}

QSize WholeRows::sizeHint() const {
    return table_->sizeHint();
}

QSize WholeRows::minimumSizeHint() const {
    const int fewest = headHeight() + FewestRows * table_->verticalHeader()->defaultSectionSize() + table_->horizontalScrollBar()->sizeHint().height();
    return table_->minimumSizeHint().expandedTo({0, fewest});
}

int WholeRows::headHeight() const {
    return table_->horizontalHeader()->sizeHint().height() + 2 * table_->frameWidth();
}

void WholeRows::resizeEvent(QResizeEvent*) {
    place();
}

void WholeRows::place() {
    const int row = table_->verticalHeader()->defaultSectionSize();
    int head = headHeight();
    // The bar that moves the table sideways takes its height from the rows.
    if (table_->horizontalScrollBar()->maximum() > 0 && table_->horizontalScrollBarPolicy() != Qt::ScrollBarAlwaysOff)
        head += table_->horizontalScrollBar()->sizeHint().height();
    int rows = row > 0 ? (height() - head) / row : 0;
    if (fill_ == Fill::Rows)
        rows = std::min(rows, std::max(1, table_->model()->rowCount()));
    table_->setGeometry(0, 0, width(), rows > 0 ? head + rows * row : height());
}

} // namespace spanwright
