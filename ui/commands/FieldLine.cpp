// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/commands/FieldLine.h"

#include "ui/commands/Workbench.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QDate>
#include <QKeyEvent>
#include <QStyle>

namespace spanwright {

Result<std::string> parseDate(const QString& text) {
    const QString typed = text.trimmed();
    if (typed.isEmpty())
        return std::string();
    if (typed.size() != 10 || !QDate::fromString(typed, Qt::ISODate).isValid())
        return Error(ErrorCode::CellDateBad, {{"text", typed.toStdString()}});
    return typed.toStdString();
}

Result<void> checkNumber(const Decimal& value, NumberRule rule) {
    const double number = value.toDouble();
    if ((rule == NumberRule::NotNegative && number < 0) || (rule == NumberRule::Positive && number <= 0))
        return Error(ErrorCode::CellOutOfRange, {{"text", value.text()}});
    return {};
}

QString shownNumber(const std::optional<Decimal>& value) {
    return value ? typedText(*value) : QString();
}

FieldLine::FieldLine(Workbench& bench, const QString& id, const QString& name, FieldBinding binding, QWidget* parent)
    : QLineEdit(parent), bench_(bench), binding_(std::move(binding)) {
    setObjectName(id);
    setAccessibleName(name);
    setAcceptDrops(false); // a file dropped here is for the window
    connect(this, &QLineEdit::editingFinished, this, &FieldLine::commit);
    connect(&bench, &Workbench::recordChanged, this, [this] {
        setReadOnly(bench_.readOnly());
        // What is being typed is never overwritten.
        if (!refused_ && !isModified())
            show(bench_.record());
    });
    setReadOnly(bench.readOnly());
    show(bench.record());
}

void FieldLine::show(const Record& record) {
    const QString shown = binding_.read(record);
    if (shown != text())
        setText(shown);
    setModified(false);
    setCursorPosition(0);
}

void FieldLine::commit() {
    if (!isModified() && !refused_)
        return;
    if (text() == binding_.read(bench_.record())) {
        setModified(false);
        setRefusal({});
        return;
    }
    Result<std::unique_ptr<RecordCommand>> made = binding_.write(bench_.record(), text());
    if (!made) {
        setRefusal(errorText(made.error()));
        return;
    }
    setModified(false);
    setRefusal({});
    bench_.perform(std::move(made).value());
    show(bench_.record());
}

void FieldLine::setRefusal(const QString& sentence) {
    if (sentence == refusal_)
        return;
    refusal_ = sentence;
    refused_ = !sentence.isEmpty();
    setProperty("refused", refused_);
    setAccessibleDescription(sentence);
    style()->unpolish(this);
    style()->polish(this);
    emit refusalChanged(sentence);
}

bool FieldLine::event(QEvent* event) {
    // Undo and redo belong to the record unless something is being typed.
    if (event->type() == QEvent::ShortcutOverride && !isModified()) {
        const auto* key = static_cast<QKeyEvent*>(event);
        if (key->matches(QKeySequence::Undo) || key->matches(QKeySequence::Redo)) {
            event->ignore();
            return false;
        }
    }
    return QLineEdit::event(event);
}

void FieldLine::keyPressEvent(QKeyEvent* event) {
    if (event->key() == Qt::Key_Escape && (isModified() || refused_)) {
        setRefusal({});
        show(bench_.record());
        return;
    }
    QLineEdit::keyPressEvent(event);
}

} // namespace spanwright
