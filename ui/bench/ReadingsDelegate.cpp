// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ReadingsDelegate.h"

#include "ui/bench/NumberEdit.h"
#include "ui/bench/ReadingsModel.h"
#include "ui/look/Look.h"
#include "ui/plot/Marks.h"

#include <QKeyEvent>
#include <QPainter>

namespace spanwright {

namespace {

constexpr int side = 6; ///< room at both sides of a cell

} // namespace

QWidget* ReadingsDelegate::createEditor(QWidget* parent, const QStyleOptionViewItem&, const QModelIndex& index) const {
    auto* editor = new NumberEdit(parent);
    editor->setObjectName(QStringLiteral("cellEditor"));
    editor->setAlignment(Qt::AlignRight);
    editor->setAccessibleName(index.model()->headerData(index.column(), Qt::Horizontal, Qt::DisplayRole).toString());
    editor->setFont(textFont(TextRole::Body));
    editor->setStyleSheet(QStringLiteral("QLineEdit { padding: 0px 4px; border-radius: 2px; }"));
    index_ = index;
    emit editing(editor);
    return editor;
}

void ReadingsDelegate::setEditorData(QWidget* editor, const QModelIndex& index) const {
    auto* field = static_cast<NumberEdit*>(editor);
    if (field->isModified()) // the record changed while something is being typed here: the typing stays
        return;
    field->setText(index.data(Qt::EditRole).toString());
    field->selectAll();
}

void ReadingsDelegate::setModelData(QWidget*, QAbstractItemModel*, const QModelIndex&) const {
    // typed() has handed the number over; the table makes the command.
}

void ReadingsDelegate::updateEditorGeometry(QWidget* editor, const QStyleOptionViewItem& option, const QModelIndex&) const {
    editor->setGeometry(option.rect.adjusted(-2, 0, 0, 0));
}

/// Hands the number over. An untouched or empty planned cell is left as it was; anything that is no number is refused.
bool ReadingsDelegate::accept(NumberEdit* editor, bool onward) {
    const Result<Decimal> number = editor->number();
    const bool untouched = !editor->isModified() || editor->text() == index_.data(Qt::EditRole).toString();
    if (!number && !onward && editor->text().trimmed().isEmpty() && index_.data(Qt::EditRole).toString().isEmpty()) {
        emit closeEditor(editor, NoHint);
        return true;
    }
    if (!number) {
        editor->setRefused(true);
        emit refused(editor, number.error());
        return false;
    }
    const QPersistentModelIndex index = index_;
    emit closeEditor(editor, NoHint);
    if (!untouched || onward)
        emit typed(index, *number, onward);
    return true;
}

bool ReadingsDelegate::eventFilter(QObject* object, QEvent* event) {
    auto* editor = qobject_cast<NumberEdit*>(object);
    if (!editor)
        return QStyledItemDelegate::eventFilter(object, event);
    if (event->type() == QEvent::KeyPress) {
        switch (static_cast<QKeyEvent*>(event)->key()) {
        case Qt::Key_Return:
        case Qt::Key_Enter:
        case Qt::Key_Tab: accept(editor, true); return true;
        case Qt::Key_Up:
        case Qt::Key_Down: accept(editor, false); return true;
        default: break;
        }
    }
    if (event->type() == QEvent::FocusOut && editor->isVisible()) {
        const auto reason = static_cast<QFocusEvent*>(event)->reason();
        if (reason == Qt::ActiveWindowFocusReason || reason == Qt::PopupFocusReason)
            return false;
        accept(editor, false);
        return false;
    }
    return QStyledItemDelegate::eventFilter(object, event);
}

void ReadingsDelegate::paintMark(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const {
    const auto direction = static_cast<Direction>(index.data(ReadingsModel::DirectionRole).toInt());
    const bool excluded = index.data(ReadingsModel::ExcludedRole).toBool(), planned = index.data(ReadingsModel::PlannedRole).toBool();
    if (direction == Direction::Unknown && planned)
        return;
    const Scheme& colours = scheme();
    spanwright::paintMark(*painter, QRectF(option.rect).center(), direction,
                          {8.5, excluded ? colours.warning : planned ? colours.quiet : colours.accent, excluded || planned, {}});
}

void ReadingsDelegate::paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const {
    const Scheme& colours = scheme();
    const bool excluded = index.data(ReadingsModel::ExcludedRole).toBool();
    const bool selected = option.state.testFlag(QStyle::State_Selected);
    painter->save();
    painter->setRenderHint(QPainter::Antialiasing);
    if (excluded) {
        QColor tint = colours.warning;
        tint.setAlphaF(0.12F);
        painter->fillRect(option.rect, tint);
    }
    if (selected)
        painter->fillRect(option.rect, colours.selection);
    if (index.column() == ReadingsModel::DirectionMark) {
        paintMark(painter, option, index);
        painter->restore();
        return;
    }
    const int column = index.column();
    const bool planned = index.data(ReadingsModel::PlannedRole).toBool();
    const bool strong = ReadingsModel::numberColumn(column) && !excluded && !planned;
    QFont font = textFont(column == ReadingsModel::State ? TextRole::Small : TextRole::Body);
    font.setStrikeOut(excluded && column != ReadingsModel::State && column != ReadingsModel::ResidualValue && column != ReadingsModel::Number);
    painter->setFont(font);
    const bool hurried = column == ReadingsModel::State && index.data(ReadingsModel::HurriedRole).toBool();
    const bool warns = hurried || (excluded && (column == ReadingsModel::ResidualValue || column == ReadingsModel::State));
    painter->setPen(warns ? colours.warning : strong || (column == ReadingsModel::ResidualValue && !excluded) ? colours.ink : colours.quiet);
    const int missing = index.data(ReadingsModel::MissingDigitsRole).toInt();
    const int inset = missing > 0 ? QFontMetrics(font).horizontalAdvance(QString(missing, QLatin1Char('0'))) : 0;
    const int alignment = index.data(Qt::TextAlignmentRole).toInt();
    painter->drawText(option.rect.adjusted(side, 0, -side - inset, 0), alignment, index.data(Qt::DisplayRole).toString());
    if (index.data(ReadingsModel::AmendedRole).toBool()) { // a folded corner: there is an earlier value
        const QPointF corner = QRectF(option.rect).topRight();
        painter->setPen(Qt::NoPen);
        painter->setBrush(colours.accent);
        painter->drawPolygon(QPolygonF() << corner << corner - QPointF(7, 0) << corner + QPointF(0, 7));
    }
    if (column == ReadingsModel::IndicationValue && index.data(ReadingsModel::HurriedRole).toBool()) { // the lower corner: taken early
        const QPointF corner = QRectF(option.rect).bottomLeft() + QPointF(0, 1);
        painter->setPen(Qt::NoPen);
        painter->setBrush(colours.warning);
        painter->drawPolygon(QPolygonF() << corner << corner + QPointF(7, 0) << corner - QPointF(0, 7));
    }
    if (option.state.testFlag(QStyle::State_HasFocus)) {
        painter->setPen(QPen(colours.accent, 1));
        painter->setBrush(Qt::NoBrush);
        painter->drawRect(QRectF(option.rect).adjusted(0.5, 0.5, -0.5, -0.5));
    }
    painter->restore();
}

} // namespace spanwright
