// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/CompareDialog.h"

#include "ui/bench/FitEffect.h"
#include "ui/bench/TrialEvaluation.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QDialogButtonBox>
#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

/// Sentences of findings that only the first of two evaluations has.
QStringList onlyIn(const PhaseEvaluation& one, const PhaseEvaluation* other, const Record& record) {
    QStringList sentences;
    for (const Finding& finding : one.findings) {
        const bool both = other && std::any_of(other->findings.begin(), other->findings.end(), [&](const Finding& f) { return f.code == finding.code; });
        if (!both)
            sentences << findingWords(finding, record).sentence;
    }
    return sentences;
}

/// Values of both functions at the ends, the middle and a quarter of the range.
void addValues(std::vector<EffectRow>& rows, const PhaseEvaluation* now, const PhaseEvaluation* trial, const Item& item) {
    if (!now || !trial || !now->fit || !trial->fit || now->fit->direction != trial->fit->direction)
        return;
    const bool forward = now->fit->direction == FitDirection::Indication;
    const QString in = QString::fromStdString(forward ? item.reference.unit : item.indication.unit);
    const double low = now->fit->low, high = now->fit->high;
    const double s = now->fit->weights == Weights::Equal ? now->fit->residualSd : 0;
    const int decimals = s > 0 ? std::clamp(1 - static_cast<int>(std::floor(std::log10(s))), 0, 12) : 4;
    for (const double share : {0.0, 0.25, 0.5, 0.75, 1.0}) {
        const double x = low + share * (high - low);
        rows.push_back({CompareDialog::tr("value at %1 %2").arg(significantText(x, 4), in), fixedText(now->fit->curve->value(x), decimals), fixedText(trial->fit->curve->value(x), decimals)});
    }
}

} // namespace

CompareDialog::CompareDialog(Workbench& workbench, Other other, QWidget* parent)
    : QDialog(parent), workbench_(workbench), other_(std::move(other)), effect_(new EffectTable), findings_(new QLabel), trial_(new TrialEvaluation(this)) {
    setObjectName(QStringLiteral("compareDialog"));
    setAttribute(Qt::WA_DeleteOnClose);
    setWindowTitle(tr("Side by side"));
    setMinimumWidth(480);
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::card);
    all->addWidget(effect_);
    findings_->setObjectName(QStringLiteral("compareFindings"));
    findings_->setTextFormat(Qt::PlainText);
    findings_->setWordWrap(true);
    findings_->setFont(textFont(TextRole::Small));
    all->addWidget(findings_);
    auto* buttons = new QDialogButtonBox;
    if (!other_.takeOver.isEmpty()) {
        take_ = buttons->addButton(other_.takeOver, QDialogButtonBox::AcceptRole);
        take_->setObjectName(QStringLiteral("takeOver"));
        take_->setEnabled(false);
    }
    buttons->addButton(tr("Close"), QDialogButtonBox::RejectRole);
    connect(buttons, &QDialogButtonBox::accepted, this, [this] {
        emit takenOver();
        accept();
    });
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    all->addWidget(buttons);
    const PhaseEvaluation* now = workbench_.evaluation()->phase(workbench_.record().choices.phase);
    effect_->show(other_.nameOfNow, other_.name, effectRows(now, nullptr, workbench_.record().item));
    connect(trial_, &TrialEvaluation::ready, this, &CompareDialog::show);
    trial_->start(other_.record);
}

void CompareDialog::show(const std::shared_ptr<const Evaluation>& trial) {
    const Record& record = workbench_.record();
    const PhaseEvaluation* now = workbench_.evaluation()->phase(record.choices.phase);
    const PhaseEvaluation* then = trial->phase(record.choices.phase);
    std::vector<EffectRow> rows = effectRows(now, then, record.item);
    addValues(rows, now, then, record.item);
    effect_->show(other_.nameOfNow, other_.name, rows);
    QStringList lines;
    if (then && then->notFitted)
        lines << errorText(*then->notFitted);
    if (now && then) {
        for (const QString& sentence : onlyIn(*now, then, record))
            lines << tr("Only %1: %2").arg(other_.nameOfNow, sentence);
        for (const QString& sentence : onlyIn(*then, now, other_.record))
            lines << tr("Only %1: %2").arg(other_.name, sentence);
        if (lines.isEmpty())
            lines << tr("Both lead to the same findings.");
    }
    findings_->setText(lines.join(QLatin1Char('\n')));
    if (take_)
        take_->setEnabled(then && then->fit);
    adjustSize();
}

CompareDialog::Other CompareDialog::withFunction(const Record& record, const FunctionChoice& function) {
    Other other{functionText(function), functionText(record.choices.function), record, tr("Use %1").arg(functionText(function))};
    other.record.choices.function = function;
    return other;
}

CompareDialog::Other CompareDialog::withoutExclusions(const Record& record) {
    Other other{tr("with all readings"), tr("as it is"), record, {}};
    other.record.exclusions = Exclusions{};
    return other;
}

} // namespace spanwright
