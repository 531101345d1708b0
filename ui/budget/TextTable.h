// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QAbstractTableModel>
#include <QStringList>
#include <QStyledItemDelegate>

#include <vector>

class QTableView;

namespace spanwright {

/// A table of texts that are ready to be shown; filled anew whenever the evaluation changes.
class TextTable : public QAbstractTableModel {
    Q_OBJECT

  public:
    struct Cell {
        QString text;
        bool warning = false;
        double share = -1; ///< 0 to 1: drawn as a bar behind the text
    };
    struct Column {
        QString head;
        bool number = true; ///< at the right edge
    };
    static constexpr int ShareRole = Qt::UserRole + 1;

    TextTable(std::vector<Column> columns, QObject* parent);
    void fill(std::vector<std::vector<Cell>> rows);
    void setHead(int column, const QString& head);

    [[nodiscard]] int rowCount(const QModelIndex& parent = {}) const override;
    [[nodiscard]] int columnCount(const QModelIndex& parent = {}) const override;
    [[nodiscard]] QVariant data(const QModelIndex& index, int role) const override;
    [[nodiscard]] QVariant headerData(int section, Qt::Orientation orientation, int role) const override;

  private:
    std::vector<Column> columns_;
    std::vector<std::vector<Cell>> rows_;
};

/// Draws a share as a bar with its text beside it.
class ShareDelegate : public QStyledItemDelegate {
    Q_OBJECT

  public:
    using QStyledItemDelegate::QStyledItemDelegate;
    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override;
    [[nodiscard]] QSize sizeHint(const QStyleOptionViewItem& option, const QModelIndex& index) const override;
};

/// A quiet view of such a table: whole rows, one at a time, no grid.
QTableView* textView(TextTable* model, const QString& id, const QString& name);

} // namespace spanwright
