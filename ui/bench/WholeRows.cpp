// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/WholeRows.h"

#include <QHeaderView>
#include <QTableView>

namespace spanwright {

WholeRows::WholeRows(QTableView* table, QWidget* parent) : QWidget(parent), table_(table) {
    table->setParent(this);
    setSizePolicy(table->sizePolicy());
    setFocusProxy(table);
    connect(table->horizontalHeader(), &QHeaderView::geometriesChanged, this, &WholeRows::place);
    connect(table->horizontalHeader(), &QHeaderView::sectionResized, this, &WholeRows::place);
}

QSize WholeRows::sizeHint() const {
    return table_->sizeHint();
}

QSize WholeRows::minimumSizeHint() const {
    return table_->minimumSizeHint();
}

void WholeRows::resizeEvent(QResizeEvent*) {
    place();
}

void WholeRows::place() {
    const int row = table_->verticalHeader()->defaultSectionSize();
    const int head = table_->horizontalHeader()->sizeHint().height() + 2 * table_->frameWidth();
    const int rows = row > 0 ? (height() - head) / row : 0;
    table_->setGeometry(0, 0, width(), rows > 0 ? head + rows * row : height());
}

} // namespace spanwright
