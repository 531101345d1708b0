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

constexpr int RowHeight = 26, CellPadding = 26;
constexpr QChar Indent(0x2003);

/// As a spreadsheet reads it: no indent, a minus that it knows.
QString plain(QString cell) {
    while (cell.startsWith(Indent))
        cell.remove(0, 1);
    return cell.replace(QChar(0x2212), QLatin1Char('-')).replace(QLatin1Char('\n'), QLatin1Char(' '));
}

} // namespace

QString headed(const QString& name, const QString& unit) {
    return unit.isEmpty() ? name : name + QLatin1Char('\n') + unit;
}

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
            else if (column == objections_)
                item->setForeground(palette().brush(inkRole::warning));
            setItem(row, column, item);
        }
    }
    int lines = 1;
    for (const QString& heading : headings)
        lines = std::max(lines, static_cast<int>(heading.count(QLatin1Char('\n'))) + 1);
    headHeight_ = lines * QFontMetrics(font()).lineSpacing() + 12;
    horizontalHeader()->setFixedHeight(headHeight_);
    horizontalHeader()->setSectionResizeMode(0, QHeaderView::Stretch);
    if (chosen >= 0 && chosen < rowCount())
        setCurrentCell(chosen, 0);
    updateGeometry();
}

void FiguresTable::setTextColumns(std::set<int> columns) {
    words_ = std::move(columns);
    words_.insert(0);
}

void FiguresTable::setObjectionColumn(int column) {
    objections_ = column;
    words_.insert(column);
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

/// Measured on the words themselves: the view measures only what it shows, and it is asked before it shows anything.
QSize FiguresTable::sizeHint() const {
    const QFontMetrics metrics(font());
    int width = 2 * frameWidth() + 2;
    for (int column = 0; column < columnCount(); ++column) {
        int widest = 0;
        for (const QString& line : horizontalHeaderItem(column)->text().split(QLatin1Char('\n')))
            widest = std::max(widest, metrics.horizontalAdvance(line));
        for (int row = 0; row < rowCount(); ++row)
            widest = std::max(widest, metrics.horizontalAdvance(item(row, column)->text()));
        width += widest + CellPadding;
    }
    const int rows = std::min(rowCount(), mostRows_);
    if (rowCount() > mostRows_)
        width += style()->pixelMetric(QStyle::PM_ScrollBarExtent) + 4;
    return {width, headHeight_ + rows * RowHeight + 2 * frameWidth() + 2};
}

QSize FiguresTable::minimumSizeHint() const {
    return {std::min(720, sizeHint().width()), sizeHint().height()}; // rows are seen whole or scrolled
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
