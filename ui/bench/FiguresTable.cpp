// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/FiguresTable.h"

#include "ui/look/Look.h"
#include "ui/look/PaddedDelegate.h"

#include <QApplication>
#include <QClipboard>
#include <QContextMenuEvent>
#include <QHeaderView>
#include <QKeyEvent>
#include <QMenu>

#include <algorithm>
#include <numeric>

namespace spanwright {

namespace {

constexpr int RowHeight = 26;
constexpr QChar Indent(0x2003);

/// As a spreadsheet reads it: no indent, a minus that it knows.
QString plain(QString cell) {
    while (cell.startsWith(Indent))
        cell.remove(0, 1);
    return cell.replace(QChar(0x2212), QLatin1Char('-')).replace(QLatin1Char('\n'), QLatin1Char(' '));
}

} // namespace

FiguresTable::FiguresTable(const QString& id, const QString& name, QWidget* parent) : QTableWidget(parent) {
    setObjectName(id);
    setAccessibleName(name);
    setItemDelegate(new PaddedDelegate(this));
    setEditTriggers(QAbstractItemView::NoEditTriggers);
    setSelectionBehavior(QAbstractItemView::SelectRows);
    setSelectionMode(QAbstractItemView::ExtendedSelection);
    setTabKeyNavigation(false);
    setShowGrid(false);
    setWordWrap(false);
    verticalHeader()->hide();
    verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    verticalHeader()->setDefaultSectionSize(RowHeight);
    horizontalHeader()->setHighlightSections(false);
    horizontalHeader()->setSectionResizeMode(QHeaderView::ResizeToContents);
    horizontalHeader()->setMinimumSectionSize(36);
    setHorizontalScrollMode(QAbstractItemView::ScrollPerPixel);
}

void FiguresTable::setFigures(const QStringList& headings, const std::vector<FiguresRow>& rows) {
    const int chosen = currentRow();
    clear();
    setColumnCount(static_cast<int>(headings.size()));
    setRowCount(static_cast<int>(rows.size()));
    setHorizontalHeaderLabels(headings);
    for (int column = 0; column < columnCount(); ++column)
        horizontalHeaderItem(column)->setTextAlignment(sideOf(column) | Qt::AlignBottom);
    for (int row = 0; row < rowCount(); ++row) {
        const FiguresRow& figures = rows[static_cast<std::size_t>(row)];
        for (int column = 0; column < columnCount(); ++column) {
            const QString cell = figures.cells.value(column);
            auto* item = new QTableWidgetItem(column == 0 ? QString(figures.level, Indent) + cell : cell);
            item->setTextAlignment(sideOf(column) | Qt::AlignVCenter);
            if (figures.quiet)
                item->setForeground(palette().brush(inkRole::quiet));
            setItem(row, column, item);
        }
    }
    horizontalHeader()->setSectionResizeMode(0, QHeaderView::Stretch);
    if (chosen >= 0 && chosen < rowCount())
        setCurrentCell(chosen, 0);
    updateGeometry();
}

void FiguresTable::setTextColumns(std::set<int> columns) {
    words_ = std::move(columns);
    words_.insert(0);
}

Qt::Alignment FiguresTable::sideOf(int column) const {
    return words_.contains(column) ? Qt::AlignLeft : Qt::AlignRight;
}

void FiguresTable::setMostRowsShown(int rows) {
    mostRows_ = rows;
    updateGeometry();
}

QString FiguresTable::textOf(const std::vector<int>& rows) const {
    QStringList lines;
    QStringList cells;
    for (int column = 0; column < columnCount(); ++column)
        cells << plain(horizontalHeaderItem(column)->text());
    lines << cells.join(QLatin1Char('\t'));
    for (const int row : rows) {
        cells.clear();
        for (int column = 0; column < columnCount(); ++column)
            cells << plain(item(row, column)->text());
        lines << cells.join(QLatin1Char('\t'));
    }
    return lines.join(QLatin1Char('\n')) + QLatin1Char('\n');
}

QString FiguresTable::text() const {
    std::vector<int> rows(static_cast<std::size_t>(rowCount()));
    std::iota(rows.begin(), rows.end(), 0);
    return textOf(rows);
}

QString FiguresTable::selectedText() const {
    std::vector<int> rows;
    for (const QModelIndex& index : selectionModel()->selectedRows())
        rows.push_back(index.row());
    std::sort(rows.begin(), rows.end());
    return rows.empty() ? text() : textOf(rows);
}

void FiguresTable::copy() {
    QApplication::clipboard()->setText(selectedText());
}

QSize FiguresTable::sizeHint() const {
    int width = 2 * frameWidth() + 2;
    for (int column = 0; column < columnCount(); ++column)
        width += std::max(sizeHintForColumn(column) + 4, horizontalHeader()->sectionSizeHint(column));
    const int rows = std::min(rowCount(), mostRows_);
    if (rowCount() > mostRows_)
        width += style()->pixelMetric(QStyle::PM_ScrollBarExtent) + 4;
    return {width, horizontalHeader()->sizeHint().height() + rows * RowHeight + 2 * frameWidth() + 2};
}

QSize FiguresTable::minimumSizeHint() const {
    return {std::min(320, sizeHint().width()), std::min(sizeHint().height(), horizontalHeader()->sizeHint().height() + 4 * RowHeight)};
}

void FiguresTable::keyPressEvent(QKeyEvent* event) {
    if (event->matches(QKeySequence::Copy)) {
        copy();
        event->accept();
        return;
    }
    if (event->key() == Qt::Key_Escape || event->key() == Qt::Key_Return || event->key() == Qt::Key_Enter) {
        event->ignore(); // for the dialog
        return;
    }
    QTableWidget::keyPressEvent(event);
}

void FiguresTable::contextMenuEvent(QContextMenuEvent* event) {
    QMenu menu(this);
    QAction* some = menu.addAction(tr("Copy the selected rows"), this, &FiguresTable::copy);
    some->setEnabled(selectionModel()->hasSelection());
    menu.addAction(tr("Copy the whole table"), this, [this] { QApplication::clipboard()->setText(text()); });
    menu.exec(event->globalPos());
}

} // namespace spanwright
