// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/commands/FieldForm.h"

#include "ui/look/Look.h"

#include <QGridLayout>
#include <QHBoxLayout>
#include <QKeyEvent>
#include <QLabel>
#include <QVBoxLayout>

namespace spanwright {

namespace {

QLabel* smallLabel(QPalette::ColorRole role) {
    auto* label = new QLabel;
    label->setFont(textFont(TextRole::Small));
    label->setForegroundRole(role);
    label->setWordWrap(true);
    label->setTextFormat(Qt::PlainText);
    label->hide();
    return label;
}

} // namespace

FieldBox::FieldBox(const QString& label, QWidget* editor, QWidget* parent)
    : QWidget(parent), unit_(new QLabel), hint_(smallLabel(inkRole::quiet)), refusal_(smallLabel(inkRole::warning)) {
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(0, 0, 0, 0);
    all->setSpacing(2);
    // A box that is ticked carries its words itself.
    if (!qobject_cast<QCheckBox*>(editor)) {
        auto* name = new QLabel(label);
        name->setFont(textFont(TextRole::Small));
        name->setForegroundRole(inkRole::quiet);
        name->setBuddy(editor);
        all->addWidget(name);
    } else {
        auto* level = new QLabel(QStringLiteral(" "));
        level->setFont(textFont(TextRole::Small));
        all->addWidget(level);
    }
    auto* row = new QHBoxLayout;
    row->setSpacing(space::half);
    row->addWidget(editor, 1);
    unit_->setForegroundRole(inkRole::quiet);
    unit_->setTextFormat(Qt::PlainText);
    unit_->hide();
    row->addWidget(unit_);
    all->addLayout(row);
    refusal_->setObjectName(editor->objectName() + QStringLiteral(".refusal"));
    all->addWidget(refusal_);
    all->addWidget(hint_);
    all->addStretch(1);
    if (auto* line = qobject_cast<FieldLine*>(editor))
        connect(line, &FieldLine::refusalChanged, this, [this](const QString& sentence) {
            refusal_->setText(sentence);
            refusal_->setVisible(!sentence.isEmpty());
        });
}

void FieldBox::setUnit(const QString& unit) {
    unit_->setText(unit);
    unit_->setVisible(!unit.isEmpty());
}

void FieldBox::setHint(const QString& hint) {
    hint_->setText(hint);
    hint_->setVisible(!hint.isEmpty());
}

FieldGrid::FieldGrid(int columns, QWidget* parent) : QWidget(parent), grid_(new QGridLayout(this)), columns_(columns) {
    grid_->setContentsMargins(0, 0, 0, 0);
    grid_->setHorizontalSpacing(space::card);
    grid_->setVerticalSpacing(space::step);
    for (int i = 0; i < columns; ++i) {
        grid_->setColumnStretch(i, 1);
        grid_->setColumnMinimumWidth(i, 60);
    }
}

void FieldGrid::add(QWidget* box, int span) {
    if (column_ + span > columns_)
        startRow();
    grid_->addWidget(box, row_, column_, 1, span, Qt::AlignTop);
    column_ += span;
}

void FieldGrid::startRow() {
    if (column_ == 0)
        return;
    ++row_;
    column_ = 0;
}

FieldText::FieldText(Workbench& bench, const QString& id, const QString& name, FieldBinding binding, QWidget* parent)
    : QPlainTextEdit(parent), bench_(bench), binding_(std::move(binding)) {
    setObjectName(id);
    setAccessibleName(name);
    setTabChangesFocus(true);
    setAcceptDrops(false); // a file dropped here is for the window
    setSizePolicy(QSizePolicy::Expanding, QSizePolicy::Fixed);
    connect(&bench, &Workbench::recordChanged, this, [this] {
        setReadOnly(bench_.readOnly());
        if (!document()->isModified())
            show();
    });
    setReadOnly(bench.readOnly());
    show();
}

void FieldText::show() {
    const QString text = binding_.read(bench_.record());
    if (text != toPlainText())
        setPlainText(text);
    document()->setModified(false);
}

void FieldText::commit() {
    if (!document()->isModified())
        return;
    document()->setModified(false);
    if (Result<std::unique_ptr<RecordCommand>> made = binding_.write(bench_.record(), toPlainText()))
        bench_.perform(std::move(made).value());
}

bool FieldText::event(QEvent* event) {
    if (event->type() == QEvent::ShortcutOverride && !document()->isModified()) {
        const auto* key = static_cast<QKeyEvent*>(event);
        if (key->matches(QKeySequence::Undo) || key->matches(QKeySequence::Redo)) {
            event->ignore();
            return false;
        }
    }
    return QPlainTextEdit::event(event);
}

void FieldText::focusOutEvent(QFocusEvent* event) {
    QPlainTextEdit::focusOutEvent(event);
    commit();
}

QSize FieldText::sizeHint() const {
    return {200, fontMetrics().lineSpacing() * 3 + 16};
}

FieldBox* fieldBox(Workbench& bench, const QString& id, const QString& label, FieldBinding binding) {
    return new FieldBox(label, new FieldLine(bench, id, label, std::move(binding)));
}

FieldBox* longFieldBox(Workbench& bench, const QString& id, const QString& label, FieldBinding binding) {
    return new FieldBox(label, new FieldText(bench, id, label, std::move(binding)));
}

} // namespace spanwright
