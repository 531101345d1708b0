// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/NumberColumns.h"

#include <QEvent>
#include <QHeaderView>
#include <QTableView>

#include <algorithm>
#include <vector>

namespace spanwright {

namespace {

constexpr int FewestLetters = 18;  // of the words, when they give way
constexpr int MostLettersMore = 8; // than a column needs

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
    if (placing_ || !table_->isVisible()) // measured when it is seen: pages that nobody looks at change with every reading
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
    const int letter = table_->fontMetrics().averageCharWidth();
    const bool words = words_ != NoWords && !table_->isColumnHidden(words_);
    if (words) {
        int& width = widths[static_cast<std::size_t>(words_)];
        const int fewest = std::min(width, letter * FewestLetters);
        const int taken = std::clamp(left, fewest - width, letter * MostLettersMore);
        width += taken;
        left -= taken;
    }
    for (int column = 0; column < columns && left > 0; ++column) {
        if (table_->isColumnHidden(column))
            continue;
        const int part = std::min(left / shown--, letter * MostLettersMore);
        widths[static_cast<std::size_t>(column)] += part;
        left -= part;
    }
    // A little that is still left would look like a fault at the edge.
    if (words && left > 0 && left < letter * MostLettersMore * 6)
        widths[static_cast<std::size_t>(words_)] += left;
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
