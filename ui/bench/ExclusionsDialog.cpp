// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ExclusionsDialog.h"

#include "core/fit/fitFunction.h"
#include "ui/bench/FiguresTable.h"
#include "ui/bench/TrialEvaluation.h"
#include "ui/commands/ExclusionCommands.h"
#include "ui/commands/FieldForm.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PlotSubject.h"
#include "ui/words/Words.h"

#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

constexpr std::size_t MostTried = 60; ///< readings that are evaluated one by one

/// Largest distance between two functions in the range of the first.
double largestShift(const PhaseEvaluation& now, const PhaseEvaluation& then) {
    double largest = 0;
    for (const BandPoint& point : now.curve)
        if (point.inside)
            largest = std::fmax(largest, std::abs(then.fit->curve->value(point.x) - point.value));
    return largest;
}

QString reasonOf(const Exclusion& exclusion) {
    const QString words = QString::fromStdString(exclusion.words);
    if (words.isEmpty())
        return reasonText(exclusion.reason);
    return exclusion.reason == ExclusionReason::Other ? words : reasonText(exclusion.reason) + QStringLiteral(": ") + words;
}

QString placeOf(const Record& record, std::size_t row) {
    const ReadingColumns& readings = *record.readings;
    const auto at = readings.setPoint().has(row) ? readings.setPoint().at(row) : readings.reference().at(row);
    QStringList parts;
    if (at)
        parts << typedText(*at) + QLatin1Char(' ') + QString::fromStdString(record.item.reference.unit);
    if (readings.directions()[row] != Direction::Unknown)
        parts << directionText(readings.directions()[row]);
    if (readings.runs()[row] > 0)
        parts << ExclusionsDialog::tr("run %1").arg(readings.runs()[row]);
    return parts.join(QStringLiteral(", "));
}

/// The limit as a percentage, as the certificate prints it; exact both ways.
FieldBinding limitBinding() {
    return {[](const Record& record) {
                Decimal percent = record.choices.exclusionLimit;
                while (percent.decimals < 2) {
                    percent.mantissa *= 10;
                    ++percent.decimals;
                }
                percent.decimals -= 2;
                return typedText(percent);
            },
            [](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                Result<Decimal> percent = parseTyped(text);
                if (!percent)
                    return percent.error();
                if (percent->toDouble() < 0 || percent->toDouble() > 100)
                    return Error(ErrorCode::CellOutOfRange, {{"text", percent->text()}});
                Decimal share = *percent;
                share.decimals += 2;
                return changePart(record, &Record::choices, ExclusionsDialog::tr("limit of exclusions"),
                                  [&](Choices& choices) { choices.exclusionLimit = share; });
            }};
}

} // namespace

ExclusionsDialog::ExclusionsDialog(Workbench& workbench, QWidget* parent)
    : SheetDialog(QStringLiteral("exclusionsDialog"), tr("What the exclusions do"), parent), workbench_(workbench), list_(new FiguresTable(QStringLiteral("exclusionsList"), tr("Excluded readings"))),
      effect_(new EffectTable), limit_(new QLabel), evaluation_(new TrialEvaluation(this)) {
    body()->setSpacing(space::step + space::half);
    list_->setTextColumns({4, 5});
    list_->setMostRowsShown(8);
    list_->setSelectionMode(QAbstractItemView::SingleSelection);
    body()->addWidget(list_, 1);
    body()->addWidget(effect_);
    FieldBox* limit = fieldBox(workbench, QStringLiteral("choices.exclusion_limit"), tr("Limit on exclusions"), limitBinding());
    limit->setUnit(tr("% of the readings of a phase"));
    limit->findChild<FieldLine*>()->setMaximumWidth(80);
    body()->addWidget(limit);
    limit_->setObjectName(QStringLiteral("exclusionsShare"));
    limit_->setFont(textFont(TextRole::Small));
    limit_->setWordWrap(true);
    body()->addWidget(limit_);
    readmit_ = addButton({}, QDialogButtonBox::ActionRole, QStringLiteral("readmitChosen"));
    addClose()->setDefault(true);
    connect(readmit_, &QPushButton::clicked, this, &ExclusionsDialog::readmit);
    connect(list_, &QTableWidget::currentCellChanged, this, &ExclusionsDialog::showEffect);
    connect(evaluation_, &TrialEvaluation::ready, this, &ExclusionsDialog::take);
    connect(&workbench_, &Workbench::evaluationChanged, this, &ExclusionsDialog::start);
    start();
    fitToContents();
    list_->setFocus();
}

void ExclusionsDialog::start() {
    const Record& record = workbench_.record();
    const Phase phase = record.choices.phase;
    trials_.clear();
    next_ = 0;
    Trial every{{}, tr("all of them"), {}, {}, {}, {}, {}, {}};
    for (const Exclusion& exclusion : record.exclusions->all()) {
        const std::size_t row = record.readings->indexOf(exclusion.id);
        if (row == record.readings->size() || record.readings->phases()[row] != phase)
            continue;
        every.back.push_back(exclusion.id);
        if (trials_.size() < MostTried)
            trials_.push_back({{exclusion.id}, tr("%1: %2").arg(exclusion.id).arg(placeOf(record, row)), reasonOf(exclusion), QString::fromStdString(exclusion.by), {}, {}, {}, {}});
    }
    if (every.back.size() > 1)
        trials_.insert(trials_.begin(), every);
    const PhaseEvaluation* now = workbench_.evaluation()->phase(phase);
    const std::size_t of = now ? now->complete : 0;
    const double share = of > 0 ? static_cast<double>(every.back.size()) / static_cast<double>(of) : 0;
    const bool beyond = share > record.choices.exclusionLimit.toDouble();
    QString words = tr("Excluded %1: %2 of %3, %4.").arg(phaseText(phase)).arg(every.back.size()).arg(readingsText(of), shareText(share));
    words += QLatin1Char(' ') + (beyond ? tr("That is more than the limit: a finding and the first page of the certificate say so.")
                                        : tr("Above the limit, a finding and the first page of the certificate say so."));
    if (every.back.size() > MostTried)
        words += QLatin1Char(' ') + tr("The first %1 are shown one by one.").arg(MostTried);
    limit_->setText(words);
    limit_->setForegroundRole(beyond ? inkRole::warning : inkRole::quiet);
    showList();
    if (!trials_.empty() && list_->currentRow() < 0)
        list_->setCurrentCell(0, 0);
    showEffect();
    evaluateNext();
}

void ExclusionsDialog::evaluateNext() {
    if (next_ >= trials_.size())
        return;
    Record record = workbench_.record();
    for (const ReadingId id : trials_[next_].back)
        record.exclusions.edit().remove(id);
    evaluation_->start(std::move(record));
}

void ExclusionsDialog::take(const std::shared_ptr<const Evaluation>& evaluation) {
    const Record& record = workbench_.record();
    const PhaseEvaluation* now = workbench_.evaluation()->phase(record.choices.phase);
    const PhaseEvaluation* then = evaluation->phase(record.choices.phase);
    Trial& trial = trials_[next_++];
    trial.effect = effectRows(now, then, record.item);
    if (now && then && now->fit && then->fit) {
        trial.s = significantText(then->fit->residualSd, 3);
        trial.expanded = significantText(largestHalfWidth(then), 3);
        trial.shift = significantText(largestShift(*now, *then), 3);
    }
    showList();
    showEffect();
    if (next_ == 1)
        fitToContents();
    evaluateNext();
}

void ExclusionsDialog::showList() {
    const Record& record = workbench_.record();
    const PhaseEvaluation* now = workbench_.evaluation()->phase(record.choices.phase);
    const bool forward = directionOf(record.choices) == FitDirection::Indication;
    const QString unit = QString::fromStdString(forward ? record.item.indication.unit : record.item.reference.unit);
    const QString under = unit.isEmpty() ? QString() : QLatin1Char('\n') + unit;
    const bool weighted = now && now->fit && now->fit->weights != Weights::Equal;
    std::vector<FiguresRow> rows;
    for (const Trial& trial : trials_)
        rows.push_back({{trial.name, trial.s, trial.expanded, trial.shift, trial.reason, trial.by}});
    if (now && now->fit)
        rows.push_back({{tr("none, as it is now"), significantText(now->fit->residualSd, 3), significantText(largestHalfWidth(now), 3), QStringLiteral("–"), {}, {}}, 0, true});
    list_->setFigures({tr("taken back in"), tr("residual s") + (weighted ? QString() : under), tr("U of a new\nreading") + (unit.isEmpty() ? QString() : QStringLiteral(", ") + unit),
                       tr("function\nmoves by") + (unit.isEmpty() ? QString() : QStringLiteral(", ") + unit), tr("excluded because"), tr("by")},
                      rows);
}

void ExclusionsDialog::showEffect() {
    const int row = list_->currentRow();
    const bool one = row >= 0 && row < static_cast<int>(trials_.size());
    readmit_->setEnabled(one && !workbench_.readOnly());
    const Trial* trial = one ? &trials_[static_cast<std::size_t>(row)] : nullptr;
    readmit_->setText(trial && trial->back.size() > 1 ? tr("Take all of them back in") : tr("Take it back in"));
    effect_->setVisible(trial != nullptr && !trial->effect.empty());
    if (trial)
        effect_->show(tr("without"), trial->back.size() > 1 ? tr("with all of them") : tr("with reading %1").arg(trial->back.front()), trial->effect);
}

void ExclusionsDialog::readmit() {
    const int row = list_->currentRow();
    if (row < 0 || row >= static_cast<int>(trials_.size()))
        return;
    workbench_.perform(std::make_unique<Readmit>(trials_[static_cast<std::size_t>(row)].back));
    if (workbench_.record().exclusions->empty())
        accept();
}

} // namespace spanwright
