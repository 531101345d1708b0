// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/NumberColumns.h"

#include <QEvent>
#include <QHeaderView>
#include <QTableView>

#include <algorithm>
#include <vector>

namespace spanwright {

namespace {

constexpr int FewestLetters = 18; // of the words, when they give way

int neededWidth(const QTableView& table, int column) {
    const QAbstractItemView& view = table; // where the hint of the cells is public
    return std::max(view.sizeHintForColumn(column), table.horizontalHeader()->sectionSizeHint(column));
}

} // namespace

// It belongs to the head, which goes before a model of the table's own does.
NumberColumns::NumberColumns(QTableView* table, int words) : QObject(table->horizontalHeader()), table_(table), words_(words) {
    table->setWordWrap(false);
    table->setHorizontalScrollMode(QAbstractItemView::ScrollPerPixel);
    table->horizontalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    table->viewport()->installEventFilter(this);
    follow();
}

void NumberColumns::follow() {
    const QAbstractItemModel* model = table_->model();
    connect(model, &QAbstractItemModel::modelReset, this, &NumberColumns::place);
    connect(model, &QAbstractItemModel::dataChanged, this, &NumberColumns::place);
    connect(model, &QAbstractItemModel::headerDataChanged, this, &NumberColumns::place);
    connect(model, &QAbstractItemModel::rowsInserted, this, &NumberColumns::place);
    connect(model, &QAbstractItemModel::rowsRemoved, this, &NumberColumns::place);
    place();
}

void NumberColumns::place() {
    if (placing_)
        return;
    placing_ = true;
    const int columns = table_->model()->columnCount();
    std::vector<int> widths(static_cast<std::size_t>(columns));
    int needed = 0, shown = 0;
    for (int column = 0; column < columns; ++column) {
        if (table_->isColumnHidden(column))
            continue;
        needed += widths[static_cast<std::size_t>(column)] = neededWidth(*table_, column);
        ++shown;
    }
    int left = table_->viewport()->width() - needed;
    if (words_ != NoWords && !table_->isColumnHidden(words_)) {
        int& width = widths[static_cast<std::size_t>(words_)];
        const int fewest = std::min(width, table_->fontMetrics().averageCharWidth() * FewestLetters);
        width = std::max(fewest, width + left);
    } else if (left > 0) {
        for (int column = 0; column < columns; ++column) {
            if (table_->isColumnHidden(column))
                continue;
            const int part = left / shown--;
            widths[static_cast<std::size_t>(column)] += part;
            left -= part;
        }
    }
    for (int column = 0; column < columns; ++column)
        if (!table_->isColumnHidden(column))
            table_->setColumnWidth(column, widths[static_cast<std::size_t>(column)]);
    placing_ = false;
}

bool NumberColumns::eventFilter(QObject* watched, QEvent* event) {
    if (event->type() == QEvent::Resize || event->type() == QEvent::Show || event->type() == QEvent::FontChange)
        place();
    return QObject::eventFilter(watched, event);
}

} // namespace spanwright
