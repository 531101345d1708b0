// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/shell/CommandFinder.h"

#include "ui/look/Look.h"

#include <QAction>
#include <QCoreApplication>
#include <QKeyEvent>
#include <QLabel>
#include <QLineEdit>
#include <QListWidget>
#include <QPainter>
#include <QStyledItemDelegate>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// Draws the shortcut quietly at the right end of a row.
class ShortcutDelegate : public QStyledItemDelegate {
  public:
    using QStyledItemDelegate::QStyledItemDelegate;
    void paint(QPainter* painter, const QStyleOptionViewItem& option, const QModelIndex& index) const override {
        QStyledItemDelegate::paint(painter, option, index);
        painter->save();
        painter->setPen(scheme().quiet);
        painter->drawText(option.rect.adjusted(0, 0, -space::step, 0), Qt::AlignRight | Qt::AlignVCenter,
                          index.data(Qt::UserRole + 1).toString());
        painter->restore();
    }
};

} // namespace

CommandFinder::CommandFinder(std::vector<FindableCommand> commands, QWidget* parent)
    : QDialog(parent), commands_(std::move(commands)), words_(new QLineEdit), list_(new QListWidget) {
    setObjectName(QStringLiteral("commandFinder"));
    setWindowTitle(tr("Find a command"));
    resize(480, 420);
    auto* all = new QVBoxLayout(this);
    words_->setObjectName(QStringLiteral("commandFinder.words"));
    words_->setAccessibleName(tr("Words of the command"));
    words_->setPlaceholderText(tr("Type a word of what you want to do"));
    words_->installEventFilter(this);
    all->addWidget(words_);
    list_->setObjectName(QStringLiteral("commandFinder.list"));
    list_->setAccessibleName(tr("Commands"));
    list_->setItemDelegate(new ShortcutDelegate(list_));
    list_->setUniformItemSizes(true);
    all->addWidget(list_);
    connect(words_, &QLineEdit::textChanged, this, &CommandFinder::narrow);
    connect(words_, &QLineEdit::returnPressed, this, &CommandFinder::take);
    connect(list_, &QListWidget::itemActivated, this, &CommandFinder::take);
    narrow({});
}

void CommandFinder::narrow(const QString& words) {
    list_->clear();
    const QStringList wanted = words.split(QLatin1Char(' '), Qt::SkipEmptyParts);
    for (std::size_t i = 0; i < commands_.size(); ++i) {
        const auto& [text, action] = commands_[i];
        if (!std::all_of(wanted.begin(), wanted.end(), [&](const QString& w) { return text.contains(w, Qt::CaseInsensitive); }))
            continue;
        auto* item = new QListWidgetItem(text, list_);
        item->setData(Qt::UserRole, static_cast<int>(i));
        item->setData(Qt::UserRole + 1, action->isChecked() ? tr("in use") : action->shortcut().toString(QKeySequence::NativeText));
        if (!action->isEnabled())
            item->setFlags(item->flags() & ~Qt::ItemIsEnabled);
    }
    if (list_->count() == 0) {
        auto* nothing = new QListWidgetItem(tr("Nothing found"), list_);
        nothing->setFlags(Qt::NoItemFlags);
    }
    for (int row = 0; row < list_->count(); ++row)
        if (list_->item(row)->flags() & Qt::ItemIsEnabled) {
            list_->setCurrentRow(row);
            break;
        }
}

void CommandFinder::take() {
    const QListWidgetItem* item = list_->currentItem();
    if (!item || !(item->flags() & Qt::ItemIsEnabled))
        return;
    chosen_ = commands_[static_cast<std::size_t>(item->data(Qt::UserRole).toInt())].action;
    accept();
}

bool CommandFinder::eventFilter(QObject* watched, QEvent* event) {
    if (watched == words_ && event->type() == QEvent::KeyPress) {
        const int key = static_cast<QKeyEvent*>(event)->key();
        if (key == Qt::Key_Down || key == Qt::Key_Up || key == Qt::Key_PageDown || key == Qt::Key_PageUp) {
            QCoreApplication::sendEvent(list_, event);
            return true;
        }
    }
    return QDialog::eventFilter(watched, event);
}

} // namespace spanwright
