// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"
#include "ui/commands/PartCommand.h"
#include "ui/look/TypedNumber.h"

#include <QLineEdit>

#include <functional>

namespace spanwright {

class Workbench;

/// How a line of text stands for a field of the record.
struct FieldBinding {
    std::function<QString(const Record&)> read;
    /// The command that puts the text in; an error when the text is not what the field holds.
    std::function<Result<std::unique_ptr<RecordCommand>>(const Record&, const QString&)> write;
};

/// A line that edits one field: one command when the editing is finished. A text that the field cannot hold stays where it was
/// typed, marked, with the reason in words; the record keeps its value. Escape brings the record's value back.
class FieldLine : public QLineEdit {
    Q_OBJECT

  public:
    /// `id` is the path of the field, "item.serial", by which the certificate's checklist leads here.
    FieldLine(Workbench& bench, const QString& id, const QString& name, FieldBinding binding, QWidget* parent = nullptr);
    /// Takes in what was typed, as leaving the field does.
    void commit();
    [[nodiscard]] bool refused() const { return refused_; }
    [[nodiscard]] QString refusal() const { return refusal_; }

  signals:
    void refusalChanged(const QString& sentence);

  protected:
    bool event(QEvent* event) override;
    void keyPressEvent(QKeyEvent* event) override;

  private:
    void show(const Record& record);
    void setRefusal(const QString& sentence);

    Workbench& bench_;
    FieldBinding binding_;
    bool refused_ = false;
    QString refusal_;
};

/// Bindings of a field that `access` finds in a part; `access` takes the part by reference and returns a reference to the field.
template <class Part, class Access>
FieldBinding textBinding(Part Record::*part, const QString& undoText, Access access) {
    return {[=](const Record& record) {
                Part copy = record.*part;
                return QString::fromStdString(access(copy));
            },
            [=](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                return changePart(record, part, undoText, [&](Part& p) { access(p) = text.trimmed().toStdString(); });
            }};
}

/// A calendar date as 2026-11-30, or nothing. Error: CellDateBad.
Result<std::string> parseDate(const QString& text);

template <class Part, class Access>
FieldBinding dateBinding(Part Record::*part, const QString& undoText, Access access) {
    FieldBinding binding = textBinding(part, undoText, access);
    binding.write = [=](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
        const Result<std::string> date = parseDate(text);
        if (!date)
            return date.error();
        return changePart(record, part, undoText, [&](Part& p) { access(p) = *date; });
    };
    return binding;
}

/// What a number must be besides a number.
enum class NumberRule { Any, NotNegative, Positive };
Result<void> checkNumber(const Decimal& value, NumberRule rule);
QString shownNumber(const std::optional<Decimal>& value);

/// A number that may be missing; an empty line takes it away.
template <class Part, class Access>
FieldBinding numberBinding(Part Record::*part, const QString& undoText, Access access, NumberRule rule = NumberRule::Any) {
    return {[=](const Record& record) {
                Part copy = record.*part;
                return shownNumber(access(copy));
            },
            [=](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                std::optional<Decimal> value;
                if (!text.trimmed().isEmpty()) {
                    Result<Decimal> parsed = parseTyped(text);
                    if (!parsed)
                        return parsed.error();
                    if (const Result<void> good = checkNumber(*parsed, rule); !good)
                        return good.error();
                    value = *parsed;
                }
                return changePart(record, part, undoText, [&](Part& p) { access(p) = value; });
            }};
}

/// A number that is always there, from `low` to `high`. Error besides those of parsing: CellOutOfRange.
template <class Part, class Access>
FieldBinding fixedNumberBinding(Part Record::*part, const QString& undoText, Access access, double low, double high) {
    return {[=](const Record& record) {
                Part copy = record.*part;
                return shownNumber(access(copy));
            },
            [=](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                Result<Decimal> parsed = parseTyped(text);
                if (!parsed)
                    return parsed.error();
                if (parsed->toDouble() < low || parsed->toDouble() > high)
                    return Error(ErrorCode::CellOutOfRange, {{"text", parsed->text()}});
                return changePart(record, part, undoText, [&](Part& p) { access(p) = *parsed; });
            }};
}

} // namespace spanwright
