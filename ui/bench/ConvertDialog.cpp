// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ConvertDialog.h"

#include "core/base/Rounding.h"
#include "core/budget/ReadBackBudget.h"
#include "core/evaluate/Calibration.h"
#include "ui/bench/NumberEdit.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QFormLayout>
#include <QLabel>
#include <QSpinBox>
#include <QVBoxLayout>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

constexpr int DigitsOfSeveral = 6; // where no uncertainty says how many to trust

} // namespace

ConvertDialog::ConvertDialog(Workbench& workbench, QWidget* parent)
    : SheetDialog(QStringLiteral("convertDialog"), tr("Value from a reading"), parent), workbench_(workbench), indication_(new NumberEdit), repeats_(new QSpinBox), value_(new QLabel), interval_(new QLabel), warnings_(new QLabel) {
    setMinimumWidth(380);
    auto* form = new QFormLayout;
    indication_->setObjectName(QStringLiteral("convertIndication"));
    indication_->setAccessibleName(tr("Indication"));
    repeats_->setObjectName(QStringLiteral("convertRepeats"));
    repeats_->setRange(1, 1000);
    repeats_->setValue(workbench_.record().choices.repeats.value_or(1));
    form->addRow(tr("&Indication"), indication_);
    form->addRow(tr("&Mean of so many readings"), repeats_);
    body()->addLayout(form);
    value_->setObjectName(QStringLiteral("convertValue"));
    value_->setFont(textFont(TextRole::Title));
    interval_->setObjectName(QStringLiteral("convertInterval"));
    interval_->setForegroundRole(inkRole::quiet);
    warnings_->setObjectName(QStringLiteral("convertWarnings"));
    warnings_->setForegroundRole(inkRole::warning);
    for (QLabel* label : {value_, interval_, warnings_}) {
        label->setTextFormat(Qt::PlainText);
        label->setWordWrap(true);
        label->setTextInteractionFlags(Qt::TextSelectableByMouse);
        body()->addWidget(label);
    }
    body()->addStretch(1);
    connect(indication_, &QLineEdit::textChanged, this, &ConvertDialog::convert);
    connect(repeats_, &QSpinBox::valueChanged, this, &ConvertDialog::convert);
    connect(&workbench_, &Workbench::evaluationChanged, this, &ConvertDialog::convert);
    convert();
}

void ConvertDialog::convert() {
    const Record& record = workbench_.record();
    const PhaseEvaluation* phase = calibrationOf(*workbench_.evaluation(), record.choices.phase);
    const QString unit = QString::fromStdString(record.item.reference.unit);
    indication_->setUnit(QString::fromStdString(record.item.indication.unit));
    for (QLabel* label : {value_, interval_, warnings_})
        label->clear();
    const Result<Decimal> typed = indication_->number();
    if (phase == nullptr) {
        warnings_->setText(tr("There is no calibration function yet."));
        return;
    }
    if (!typed) {
        if (!indication_->text().trimmed().isEmpty())
            warnings_->setText(errorText(typed.error()));
        return;
    }
    const ReadValue value = readValue(record, *phase->fit, phase->split ? &*phase->split : nullptr, typed->toDouble(), repeats_->value());
    showValue(value, statedValue(value, phase->budget.readBack), unit);
    showInterval(value, *phase, unit);
    QStringList said;
    for (const Warning& warning : value.warnings)
        said << warningText(warning);
    if (repeats_->value() > 1 && !repeatableShare(*phase->fit, phase->split ? &*phase->split : nullptr))
        said << tr("No reading was repeated under the same conditions, so nothing tells which part of the scatter averages out: U is that of one reading.");
    const QString state = valueStateText(value.state);
    if (value.warnings.empty() && !state.isEmpty())
        said << tr("No uncertainty can be stated: %1.").arg(state);
    warnings_->setText(said.join(QLatin1Char('\n')));
}

void ConvertDialog::showValue(const ReadValue& value, const StatedValue& stated, const QString& unit) {
    const auto shown = [](const std::string& digits) {
        const auto number = Decimal::parse(digits);
        return number ? typedText(*number) : QString();
    };
    if (value.state == ValueState::Sound)
        value_->setText(tr("%1 %2, U = %3 %2 (k = %4)").arg(shown(stated.value), unit, shown(stated.expanded), shown(stated.coverageFactor)));
    else if (!stated.value.empty())
        value_->setText(tr("%1 %2, without an uncertainty").arg(shown(stated.value), unit));
    else if (value.state == ValueState::SeveralAnswers) {
        QStringList answers{significantText(*value.reference, DigitsOfSeveral)};
        for (const double other : value.others)
            answers << significantText(other, DigitsOfSeveral);
        value_->setText(tr("%1 %2, without an uncertainty").arg(answers.join(tr(" or ")), unit));
    }
}

void ConvertDialog::showInterval(const ReadValue& value, const PhaseEvaluation& phase, const QString& unit) {
    if (!value.reference || !std::isfinite(value.low) || !std::isfinite(value.high))
        return;
    const int decimals = std::max(0, decimalsFor(value.high - value.low, 3));
    interval_->setText(tr("Function of the readings %1; it alone says between %2 and %3 %4 with a probability of %5.")
                           .arg(phaseText(phase.phase), fixedText(value.low, decimals), fixedText(value.high, decimals), unit, shareText(phase.fit->coverage)));
}

} // namespace spanwright
