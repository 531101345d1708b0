// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ExcludeDialog.h"

#include "core/fit/fitFunction.h"
#include "ui/bench/FitEffect.h"
#include "ui/bench/TrialEvaluation.h"
#include "ui/commands/ExclusionCommands.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PlotSubject.h"
#include "ui/words/Words.h"

#include <QComboBox>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QVBoxLayout>

#include <map>
#include <set>

namespace spanwright {

namespace {

constexpr ExclusionReason reasons[] = {ExclusionReason::NotSettled,  ExclusionReason::TypingSlip,      ExclusionReason::WrongReference, ExclusionReason::Disturbance,
                                       ExclusionReason::OutOfRange, ExclusionReason::InstrumentFault, ExclusionReason::Other};

/// Set points of the phase shown that lose their last reading with these.
QStringList emptiedSetPoints(const Record& record, const std::vector<ReadingId>& ids) {
    const ReadingColumns& readings = *record.readings;
    std::map<double, std::pair<std::size_t, std::size_t>> counts; // going, staying
    std::map<double, QString> names;
    const std::set<ReadingId> going(ids.begin(), ids.end());
    for (std::size_t row = 0; row < readings.size(); ++row) {
        const ReadingId id = readings.ids()[row];
        const std::optional<Decimal> setPoint = readings.setPoint().at(row);
        if (!setPoint || readings.phases()[row] != record.choices.phase || !readings.complete(row) || record.exclusions->contains(id))
            continue;
        auto& [leaves, stays] = counts[setPoint->toDouble()];
        ++(going.contains(id) ? leaves : stays);
        names[setPoint->toDouble()] = QString::fromStdString(record.item.reference.unit).prepend(typedText(*setPoint) + QLatin1Char(' ')).trimmed();
    }
    QStringList emptied;
    for (const auto& [setPoint, count] : counts)
        if (count.first > 0 && count.second == 0)
            emptied << names[setPoint];
    return emptied;
}

} // namespace

ExcludeDialog::ExcludeDialog(Workbench& workbench, std::vector<ReadingId> ids, QWidget* parent)
    : SheetDialog(QStringLiteral("excludeDialog"), tr("Exclude %1").arg(readingsText(ids.size())), parent), workbench_(workbench), ids_(std::move(ids)), effect_(new EffectTable), trial_(new TrialEvaluation(this)) {
    setMinimumWidth(480);
    const Record& record = workbench_.record();
    const PlotSubject subject = subjectOf(record, workbench_.evaluation());
    QStringList lines;
    for (const ReadingId id : ids_) {
        if (lines.size() == 4 && ids_.size() > 5) {
            lines << tr("… and %1 more").arg(ids_.size() - 4);
            break;
        }
        lines << readingText(subject, id).replace(QLatin1Char('\n'), QStringLiteral(", "));
    }
    auto* which = new QLabel(lines.join(QLatin1Char('\n')));
    which->setTextFormat(Qt::PlainText);
    which->setWordWrap(true);
    body()->addWidget(which);
    const QStringList emptied = emptiedSetPoints(record, ids_);
    if (!emptied.isEmpty()) {
        auto* whole = new QLabel(tr("No reading is left at %1: no result will be stated there.").arg(emptied.join(QStringLiteral(", "))));
        whole->setObjectName(QStringLiteral("excludeWhole"));
        whole->setForegroundRole(inkRole::warning);
        whole->setWordWrap(true);
        body()->addWidget(whole);
    }
    buildReason();
    auto* stays = new QLabel(tr("They stay in the record and in view, and can be taken back in. What the exclusion does:"));
    stays->setForegroundRole(inkRole::quiet);
    stays->setFont(textFont(TextRole::Small));
    stays->setWordWrap(true);
    body()->addWidget(stays);
    body()->addWidget(effect_);
    exclude_ = addButton(tr("Exclude"), QDialogButtonBox::AcceptRole, QStringLiteral("excludeAccept"));
    exclude_->setDefault(true);
    addButton(tr("Keep them in"), QDialogButtonBox::RejectRole);
    connect(trial_, &TrialEvaluation::ready, this, &ExcludeDialog::showEffect);
    effect_->show(tr("now"), tr("without"), effectRows(subject.phase.get(), nullptr, record.item));
    Record without = record;
    for (const ReadingId id : ids_)
        without.exclusions.edit().add({id, ExclusionReason::Other, {}, {}, 0});
    trial_->start(std::move(without));
    complete();
    reason_->setFocus();
}

void ExcludeDialog::buildReason() {
    reason_ = new QComboBox;
    reason_->setObjectName(QStringLiteral("excludeReason"));
    reason_->addItem(tr("choose a reason"));
    for (const ExclusionReason reason : reasons)
        reason_->addItem(reasonText(reason), static_cast<int>(reason));
    words_ = new QLineEdit;
    words_->setObjectName(QStringLiteral("excludeWords"));
    words_->setAccessibleName(tr("Reason in words"));
    words_->setPlaceholderText(tr("in words, for the record and the certificate"));
    auto* why = new QLabel(tr("&Reason"));
    why->setBuddy(reason_);
    missing_ = new QLabel;
    missing_->setFont(textFont(TextRole::Small));
    missing_->setForegroundRole(inkRole::warning);
    for (QWidget* widget : std::initializer_list<QWidget*>{why, reason_, words_, missing_})
        body()->addWidget(widget);
    connect(reason_, &QComboBox::currentIndexChanged, this, &ExcludeDialog::complete);
    connect(words_, &QLineEdit::textChanged, this, &ExcludeDialog::complete);
}

/// Words alone are a reason too.
std::optional<ExclusionReason> ExcludeDialog::reason() const {
    const bool words = !words_->text().trimmed().isEmpty();
    if (reason_->currentIndex() <= 0)
        return words ? std::optional(ExclusionReason::Other) : std::nullopt;
    const auto chosen = static_cast<ExclusionReason>(reason_->currentData().toInt());
    return chosen == ExclusionReason::Other && !words ? std::nullopt : std::optional(chosen);
}

void ExcludeDialog::complete() {
    exclude_->setEnabled(reason().has_value());
    missing_->setText(reason() ? QString() : reason_->currentIndex() > 0 ? tr("Write the reason in words.") : tr("A reason is needed, from the list or in words."));
}

void ExcludeDialog::showEffect(const std::shared_ptr<const Evaluation>& trial) {
    const Phase phase = workbench_.record().choices.phase;
    effect_->show(tr("now"), tr("without"), effectRows(workbench_.evaluation()->phase(phase), trial->phase(phase), workbench_.record().item));
    adjustSize();
}

void ExcludeDialog::accept() {
    if (!reason())
        return;
    workbench_.perform(std::make_unique<Exclude>(ids_, *reason(), words_->text().trimmed().toStdString()));
    QDialog::accept();
}

} // namespace spanwright
