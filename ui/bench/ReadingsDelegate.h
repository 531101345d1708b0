// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <QStyledItemDelegate>

namespace spanwright {

class NumberEdit;

/// Whether the next cell is opened once a number is in.
enum class Onward { No, Yes };

/// Paints the cells of the readings and gives a number its editor. A text that is no number is refused in place: the editor stays
/// open with what was typed, and refused() says why.
class ReadingsDelegate : public QStyledItemDelegate {
    Q_OBJECT

  public:
    using QStyledItemDelegate::QStyledItemDelegate;

    QWidget* createEditor(QWidget* parent, const QStyleOptionViewItem& option, const QModelIndex& index) const override;
    void setEditorData(QWidget* editor, const QModelIndex& index) const override;
    void setModelData(QWidget* editor, QAbstractItemModel* model, const QModelIndex& index) const override;
    void updateEditorGeometry(QWidget* editor, const QStyleOptionViewItem& option, const QModelIndex& index) const override;
    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override;
    bool eventFilter(QObject* object, QEvent* event) override;

  signals:
    /// A number was typed and accepted with Enter or Tab (`onward`), or by leaving the cell.
    void typed(const QModelIndex& index, const spanwright::Decimal& value, spanwright::Onward onward) const;
    void refused(spanwright::NumberEdit* editor, const spanwright::Error& error) const;
    void editing(spanwright::NumberEdit* editor) const;
    /// The clipboard holds several cells and was to be pasted into the open one.
    void blockPasted() const;

  private:
    static void paintGround(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index);
    static void paintText(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index);
    static void paintCorners(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index);
    static void paintDirection(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index);
    bool accept(NumberEdit* editor, Onward onward);
    mutable QPersistentModelIndex index_; ///< of the open editor
};

} // namespace spanwright
