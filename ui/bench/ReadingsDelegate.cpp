// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ReadingsDelegate.h"

#include "ui/bench/NumberEdit.h"
#include "ui/bench/ReadingsModel.h"
#include "ui/look/Look.h"
#include "ui/plot/Marks.h"

#include <QApplication>
#include <QClipboard>
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
bool ReadingsDelegate::accept(NumberEdit* editor, Onward onward) {
    const Result<Decimal> number = editor->number();
    const bool untouched = !editor->isModified() || editor->text() == index_.data(Qt::EditRole).toString();
    if (!number && onward == Onward::No && editor->text().trimmed().isEmpty() && index_.data(Qt::EditRole).toString().isEmpty()) {
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
    if (!untouched || onward == Onward::Yes)
        emit typed(index, *number, onward);
    return true;
}

bool ReadingsDelegate::eventFilter(QObject* object, QEvent* event) {
    auto* editor = qobject_cast<NumberEdit*>(object);
    if (!editor)
        return QStyledItemDelegate::eventFilter(object, event);
    if (event->type() == QEvent::KeyPress) {
        const QString text = static_cast<QKeyEvent*>(event)->matches(QKeySequence::Paste) ? QApplication::clipboard()->text().trimmed() : QString();
        if (text.contains(QLatin1Char('\t')) || text.contains(QLatin1Char('\n'))) { // several cells
            emit closeEditor(editor, NoHint);
            emit blockPasted();
            return true;
        }
        switch (static_cast<QKeyEvent*>(event)->key()) {
        case Qt::Key_Return:
        case Qt::Key_Enter:
        case Qt::Key_Tab: accept(editor, Onward::Yes); return true;
        case Qt::Key_Up:
        case Qt::Key_Down: accept(editor, Onward::No); return true;
        default: break;
        }
    }
    if (event->type() == QEvent::FocusOut && editor->isVisible()) {
        const auto reason = static_cast<QFocusEvent*>(event)->reason();
        if (reason == Qt::ActiveWindowFocusReason || reason == Qt::PopupFocusReason)
            return false;
        accept(editor, Onward::No);
        return false;
    }
    return QStyledItemDelegate::eventFilter(object, event);
}

void ReadingsDelegate::paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const {
    painter->save();
    painter->setRenderHint(QPainter::Antialiasing);
    paintGround(*painter, option, index);
    if (index.column() == ReadingsModel::DirectionMark) {
        paintDirection(*painter, option, index);
    } else {
        paintText(*painter, option, index);
        paintCorners(*painter, option, index);
        if (option.state.testFlag(QStyle::State_HasFocus)) {
            painter->setPen(QPen(scheme().accent, 1));
            painter->setBrush(Qt::NoBrush);
            painter->drawRect(QRectF(option.rect).adjusted(0.5, 0.5, -0.5, -0.5));
        }
    }
    painter->restore();
}

void ReadingsDelegate::paintGround(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index) {
    if (index.data(ReadingsModel::ExcludedRole).toBool()) {
        QColor tint = scheme().warning;
        tint.setAlphaF(0.12F);
        painter.fillRect(option.rect, tint);
    }
    if (option.state.testFlag(QStyle::State_Selected))
        painter.fillRect(option.rect, scheme().selection);
}

void ReadingsDelegate::paintDirection(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index) {
    const auto direction = static_cast<Direction>(index.data(ReadingsModel::DirectionRole).toInt());
    const bool excluded = index.data(ReadingsModel::ExcludedRole).toBool(), planned = index.data(ReadingsModel::PlannedRole).toBool();
    if (direction == Direction::Unknown && planned)
        return;
    const Scheme& colours = scheme();
    paintMark(painter, QRectF(option.rect).center(), direction, {8.5, excluded ? colours.warning : planned ? colours.quiet : colours.accent, excluded || planned, {}});
}

/// An excluded reading is struck through, but not what tells of it; a number keeps free the room of the digits that it lacks.
void ReadingsDelegate::paintText(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index) {
    const Scheme& colours = scheme();
    const int column = index.column();
    const bool state = column == ReadingsModel::State, residual = column == ReadingsModel::ResidualValue;
    const bool excluded = index.data(ReadingsModel::ExcludedRole).toBool(), planned = index.data(ReadingsModel::PlannedRole).toBool();
    QFont font = textFont(state ? TextRole::Small : TextRole::Body);
    font.setStrikeOut(excluded && !state && !residual && column != ReadingsModel::Number);
    painter.setFont(font);
    const bool warns = (state && index.data(ReadingsModel::HurriedRole).toBool()) || (excluded && (residual || state));
    const bool strong = !excluded && (residual || (ReadingsModel::numberColumn(column) && !planned));
    painter.setPen(warns ? colours.warning : strong ? colours.ink : colours.quiet);
    const int missing = index.data(ReadingsModel::MissingDigitsRole).toInt();
    const int inset = missing > 0 ? QFontMetrics(font).horizontalAdvance(QString(missing, QLatin1Char('0'))) : 0;
    painter.drawText(option.rect.adjusted(side, 0, -side - inset, 0), index.data(Qt::TextAlignmentRole).toInt(), index.data(Qt::DisplayRole).toString());
}

/// A folded corner above: there is an earlier value. One below: taken early.
void ReadingsDelegate::paintCorners(QPainter& painter, const QStyleOptionViewItem& option, const QModelIndex& index) {
    const QRectF cell(option.rect);
    painter.setPen(Qt::NoPen);
    if (index.data(ReadingsModel::AmendedRole).toBool()) {
        const QPointF corner = cell.topRight();
        painter.setBrush(scheme().accent);
        painter.drawPolygon(QPolygonF() << corner << corner - QPointF(7, 0) << corner + QPointF(0, 7));
    }
    if (index.column() == ReadingsModel::IndicationValue && index.data(ReadingsModel::HurriedRole).toBool()) {
        const QPointF corner = cell.bottomLeft() + QPointF(0, 1);
        painter.setBrush(scheme().warning);
        painter.drawPolygon(QPolygonF() << corner << corner + QPointF(7, 0) << corner - QPointF(0, 7));
    }
}

} // namespace spanwright
