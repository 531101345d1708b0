// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ConvertDialog.h"

#include "core/interval/ReadBack.h"
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

ConvertDialog::ConvertDialog(Workbench& workbench, QWidget* parent)
    : QDialog(parent), workbench_(workbench), indication_(new NumberEdit), repeats_(new QSpinBox), value_(new QLabel), interval_(new QLabel), warnings_(new QLabel) {
    setObjectName(QStringLiteral("convertDialog"));
    setWindowTitle(tr("Value from a reading"));
    setAttribute(Qt::WA_DeleteOnClose);
    setMinimumWidth(380);
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::step);
    auto* form = new QFormLayout;
    indication_->setObjectName(QStringLiteral("convertIndication"));
    indication_->setAccessibleName(tr("Indication"));
    repeats_->setObjectName(QStringLiteral("convertRepeats"));
    repeats_->setRange(1, 1000);
    repeats_->setValue(workbench_.record().choices.repeats.value_or(1));
    form->addRow(tr("&Indication"), indication_);
    form->addRow(tr("&Mean of so many readings"), repeats_);
    all->addLayout(form);
    value_->setObjectName(QStringLiteral("convertValue"));
    value_->setFont(textFont(TextRole::Title));
    interval_->setObjectName(QStringLiteral("convertInterval"));
    interval_->setForegroundRole(inkRole::quiet);
    warnings_->setForegroundRole(inkRole::warning);
    for (QLabel* label : {value_, interval_, warnings_}) {
        label->setTextFormat(Qt::PlainText);
        label->setWordWrap(true);
        label->setTextInteractionFlags(Qt::TextSelectableByMouse);
        all->addWidget(label);
    }
    all->addStretch(1);
    connect(indication_, &QLineEdit::textChanged, this, &ConvertDialog::convert);
    connect(repeats_, &QSpinBox::valueChanged, this, &ConvertDialog::convert);
    connect(&workbench_, &Workbench::evaluationChanged, this, &ConvertDialog::convert);
    convert();
}

void ConvertDialog::convert() {
    const Record& record = workbench_.record();
    const PhaseEvaluation* phase = workbench_.evaluation()->phase(record.choices.phase);
    const QString unit = QString::fromStdString(record.item.reference.unit);
    indication_->setUnit(QString::fromStdString(record.item.indication.unit));
    for (QLabel* label : {value_, interval_, warnings_})
        label->clear();
    const Result<Decimal> typed = indication_->number();
    if (!phase || !phase->fit) {
        warnings_->setText(tr("There is no calibration function yet."));
        return;
    }
    if (!typed) {
        if (!indication_->text().trimmed().isEmpty())
            warnings_->setText(errorText(typed.error()));
        return;
    }
    const ReadBackAnswer answer = readBack(*phase->fit, typed->toDouble(), repeats_->value());
    const double u = answer.standardUncertainty;
    const int decimals = u > 0 && std::isfinite(u) ? std::clamp(1 - static_cast<int>(std::floor(std::log10(u))), 0, 12) : 4;
    if (answer.reference) {
        value_->setText(tr("%1 %2, U = %3 %2 (k = %4)")
                            .arg(fixedText(*answer.reference, decimals), unit, significantText(u * phase->fit->coverageFactor, 2), fixedText(phase->fit->coverageFactor, 2)));
        interval_->setText(tr("between %1 and %2 %3 with a probability of %4, from the calibration function alone")
                               .arg(fixedText(answer.low, decimals), fixedText(answer.high, decimals), unit, shareText(phase->fit->coverage)));
    }
    QStringList warned;
    for (const Warning& warning : answer.warnings)
        warned << warningText(warning);
    if (!answer.insideRange && warned.isEmpty())
        warned << tr("This lies outside the calibrated range.");
    warnings_->setText(warned.join(QLatin1Char('\n')));
}

} // namespace spanwright
