// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/CompareDialog.h"

#include "core/fit/CalibrationFunction.h"
#include "core/fit/fitFunction.h"
#include "ui/bench/ChoiceMenus.h"
#include "ui/bench/FiguresTable.h"
#include "ui/bench/FitEffect.h"
#include "ui/bench/TrialEvaluation.h"
#include "ui/commands/PartCommand.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PlotSubject.h"
#include "ui/words/ChoiceText.h"
#include "ui/words/Words.h"

#include <QComboBox>
#include <QHBoxLayout>
#include <QLabel>
#include <QListWidget>
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

/// Where values are compared: the reference values (or indications) that were chosen for the figures, else the ends of the range
/// and three places between.
std::vector<double> placesOf(const Fit& fit, const Choices& choices) {
    const std::vector<Decimal>& chosen = fit.direction == FitDirection::Indication ? choices.at : choices.read;
    std::vector<double> places;
    for (const Decimal& one : chosen)
        places.push_back(one.toDouble());
    if (places.empty())
        for (const double share : {0.0, 0.25, 0.5, 0.75, 1.0})
            places.push_back(fit.low + share * (fit.high - fit.low));
    std::sort(places.begin(), places.end());
    places.erase(std::unique(places.begin(), places.end()), places.end());
    return places;
}

/// As many digits as the scatter about this function leaves sense in.
QString valueText(const Fit& fit, double x) {
    const double s = std::sqrt(fit.curve->readingVariance(x));
    const int decimals = s > 0 ? std::clamp(1 - static_cast<int>(std::floor(std::log10(s))), 0, 12) : 4;
    return fixedText(fit.curve->value(x), decimals);
}

void addValues(std::vector<EffectRow>& rows, const PhaseEvaluation* now, const PhaseEvaluation* trial, const Record& record) {
    if (!now || !trial || !now->fit || !trial->fit || now->fit->direction != trial->fit->direction)
        return;
    constexpr std::size_t most = 9;
    const Item& item = record.item;
    const bool forward = now->fit->direction == FitDirection::Indication;
    const QString in = QString::fromStdString(forward ? item.reference.unit : item.indication.unit);
    const QString out = QString::fromStdString(forward ? item.indication.unit : item.reference.unit);
    std::vector<double> places = placesOf(*now->fit, record.choices);
    places.resize(std::min(places.size(), most));
    for (const double x : places)
        rows.push_back({inUnit(CompareDialog::tr("value at %1 %2").arg(placeText(x), in).trimmed(), out),
                        valueText(*now->fit, x), valueText(*trial->fit, x)});
}

QString nameOfMethod(const Choices& choices) {
    return choices.method == Method::Robust ? robustText(choices.robust) : methodText(choices.method);
}

/// The functions that give the same quantity, each family up to the order that is of use.
std::vector<FunctionChoice> functionsFor(FitDirection direction) {
    constexpr int highestPower = 5;
    std::vector<FunctionChoice> all;
    for (const FunctionFacts& facts : calibrationFunctions())
        for (int order = facts.lowestOrder; order <= std::min(facts.highestOrder, highestPower); ++order)
            if (!facts.only || *facts.only == direction)
                all.push_back({facts.family, order});
    return all;
}

} // namespace

CompareDialog::CompareDialog(Workbench& workbench, const Other& other, QWidget* parent)
    : SheetDialog(QStringLiteral("compareDialog"), tr("Side by side"), parent), workbench_(workbench), choice_(new QComboBox), effect_(new EffectTable), findings_(new QLabel),
      weighedDown_(new QListWidget), trial_(new TrialEvaluation(this)) {
    setMinimumWidth(480);
    body()->setSpacing(space::step + space::half);
    auto* with = new QLabel(tr("Compare &with"));
    with->setBuddy(choice_);
    with->setForegroundRole(inkRole::quiet);
    choice_->setObjectName(QStringLiteral("compareWith"));
    choice_->setMaxVisibleItems(24);
    auto* top = new QHBoxLayout;
    top->addWidget(with);
    top->addWidget(choice_, 1);
    body()->addLayout(top);
    body()->addWidget(effect_);
    findings_->setObjectName(QStringLiteral("compareFindings"));
    findings_->setTextFormat(Qt::PlainText);
    findings_->setWordWrap(true);
    findings_->setFont(textFont(TextRole::Small));
    findings_->setTextInteractionFlags(Qt::TextSelectableByMouse);
    body()->addWidget(findings_);
    weighedDown_->setObjectName(QStringLiteral("weighedDown"));
    weighedDown_->setAccessibleName(tr("Readings that the robust fit weighs down"));
    weighedDown_->setMaximumHeight(140);
    weighedDown_->hide();
    connect(weighedDown_, &QListWidget::currentItemChanged, this, [this](QListWidgetItem* item) {
        if (item)
            workbench_.select({item->data(Qt::UserRole).toLongLong()});
    });
    body()->addWidget(weighedDown_);
    take_ = addButton(QString(), QDialogButtonBox::AcceptRole, QStringLiteral("takeOver"));
    addClose();
    connect(trial_, &TrialEvaluation::ready, this, &CompareDialog::show);
    fillChoice(other);
    connect(choice_, &QComboBox::currentIndexChanged, this, [this](int index) { compare(others_[static_cast<std::size_t>(index)]); });
    compare(other);
}

/// Everything that can be compared, the one asked for chosen.
void CompareDialog::fillChoice(const Other& first) {
    const Record& record = workbench_.record();
    const auto add = [&](Other other) {
        choice_->addItem(sentenceCase(other.name));
        if (other.name == first.name)
            choice_->setCurrentIndex(choice_->count() - 1);
        others_.push_back(std::move(other));
    };
    if (!record.exclusions->empty())
        add(withoutExclusions(record));
    if (record.choices.method != Method::LeastSquares)
        add(withMethod(record, Method::LeastSquares));
    for (const RobustWeight weight : {RobustWeight::Huber, RobustWeight::Bisquare})
        if (record.choices.method != Method::Robust || record.choices.robust != weight)
            add(withRobust(record, weight));
    choice_->insertSeparator(choice_->count());
    others_.emplace_back();
    for (const FunctionChoice& function : functionsFor(directionOf(record.choices)))
        if (!(function == record.choices.function))
            add(withFunction(record, function));
    if (choice_->itemText(choice_->currentIndex()) != sentenceCase(first.name)) {
        add(first);
        choice_->setCurrentIndex(choice_->count() - 1);
    }
}

void CompareDialog::compare(const Other& other) {
    other_ = other;
    take_->setVisible(static_cast<bool>(other_.takeOver));
    take_->setText(tr("Use %1").arg(other_.name));
    take_->setEnabled(false);
    const PhaseEvaluation* now = workbench_.evaluation()->phase(workbench_.record().choices.phase);
    effect_->show(other_.nameOfNow, other_.name, effectRows(now, nullptr, workbench_.record().item));
    findings_->clear();
    weighedDown_->clear();
    weighedDown_->hide();
    trial_->start(other_.record);
}

void CompareDialog::show(const std::shared_ptr<const Evaluation>& trial) {
    const Record& record = workbench_.record();
    const PhaseEvaluation* now = workbench_.evaluation()->phase(record.choices.phase);
    const PhaseEvaluation* then = trial->phase(record.choices.phase);
    std::vector<EffectRow> rows = effectRows(now, then, record.item);
    addValues(rows, now, then, record);
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
    if (then && then->fit && then->fit->method == Method::Robust) {
        listWeighedDown(*then);
        lines << (weighedDown_->count() == 0 ? tr("The robust fit weighs no reading down.")
                                             : tr("The robust fit weighs these readings down; choose one to see it in the plots:"));
    }
    findings_->setText(lines.join(QLatin1Char('\n')));
    take_->setEnabled(then && then->fit && !workbench_.readOnly());
    fitToContents();
}

void CompareDialog::accept() {
    workbench_.perform(changePart(workbench_.record(), &Record::choices, tr("choose %1").arg(other_.name), other_.takeOver));
    QDialog::accept();
}

void CompareDialog::listWeighedDown(const PhaseEvaluation& trial) {
    weighedDown_->clear();
    const std::vector<ReadingId>& ids = other_.record.readings->ids();
    for (const WeighedDown& reading : trial.fit->weighedDown) {
        auto* item = new QListWidgetItem(tr("reading %1, weight %2").arg(ids[reading.row]).arg(fixedText(reading.weight, 2)), weighedDown_);
        item->setData(Qt::UserRole, QVariant::fromValue<qlonglong>(ids[reading.row]));
    }
    weighedDown_->setVisible(weighedDown_->count() > 0);
}

CompareDialog::Other CompareDialog::withRobust(const Record& record, RobustWeight weight) {
    Other other{robustText(weight), nameOfMethod(record.choices), record, {}};
    other.record.choices.method = Method::Robust;
    other.record.choices.robust = weight;
    return other;
}

CompareDialog::Other CompareDialog::withFunction(const Record& record, const FunctionChoice& function) {
    Other other{functionText(function), functionText(record.choices.function), record, [function](Choices& choices) { choices.function = function; }};
    other.takeOver(other.record.choices);
    return other;
}

CompareDialog::Other CompareDialog::withMethod(const Record& record, Method method) {
    Other other{methodText(method), nameOfMethod(record.choices), record, [method](Choices& choices) { choices.method = method; }};
    other.takeOver(other.record.choices);
    return other;
}

CompareDialog::Other CompareDialog::withoutExclusions(const Record& record) {
    Other other{tr("with all readings"), tr("as it is"), record, {}};
    other.record.exclusions = Exclusions{};
    return other;
}

} // namespace spanwright
