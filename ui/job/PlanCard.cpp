// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/job/PlanCard.h"

#include "ui/commands/FieldForm.h"
#include "ui/job/SetPoints.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>

namespace spanwright {

namespace {

FieldBinding setPointsBinding() {
    return {[](const Record& record) { return numberListText(record.plan.setPoints); },
            [](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                Result<std::vector<Decimal>> points = parseSetPoints(text, record.item);
                if (!points)
                    return points.error();
                return changePart(record, &Record::plan, PlanCard::tr("set points"), [&](Plan& plan) { plan.setPoints = *points; });
            }};
}

/// Angles in the order of the runs, each as often as it was typed.
FieldBinding positionsBinding() {
    return {[](const Record& record) { return numberListText(record.plan.positions); },
            [](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                Result<std::vector<Decimal>> positions = parseNumberList(text);
                if (!positions)
                    return positions.error();
                return changePart(record, &Record::plan, PlanCard::tr("mounting positions"), [&](Plan& plan) { plan.positions = *positions; });
            }};
}

} // namespace

PlanCard::PlanCard(Workbench& bench, QWidget* parent)
    : Card(tr("Plan"), parent), bench_(bench), from_(new QLineEdit), to_(new QLineEdit), points_(new QSpinBox), refusal_(new QLabel),
      summary_(new QLabel) {
    auto* grid = new FieldGrid(3);
    FieldBox* setPoints = fieldBox(bench, QStringLiteral("plan.set_points"), tr("Set points"), setPointsBinding());
    line_ = setPoints->findChild<FieldLine*>();
    line_->setPlaceholderText(tr("0; 2.5; 5; 7.5; 10, or 0; 25; 50; 75; 100 %"));
    setPoints_ = setPoints;
    connect(line_, &QLineEdit::textChanged, this, &PlanCard::showUnderstood);
    grid->add(setPoints, 3);
    from_->setObjectName(QStringLiteral("plan.fill.from"));
    to_->setObjectName(QStringLiteral("plan.fill.to"));
    points_->setObjectName(QStringLiteral("plan.fill.points"));
    points_->setRange(2, 999);
    points_->setValue(11);
    auto* fillButton = new QPushButton(tr("&Fill"));
    fillButton->setObjectName(QStringLiteral("plan.fill"));
    auto* quick = new QWidget;
    auto* row = new QHBoxLayout(quick);
    row->setContentsMargins(0, 0, 0, 0);
    const std::pair<QString, QWidget*> parts[] = {{tr("From"), from_}, {tr("to"), to_}, {tr("in"), points_}};
    for (const auto& [word, editor] : parts) {
        auto* label = new QLabel(word);
        label->setForegroundRole(inkRole::quiet);
        label->setBuddy(editor);
        row->addWidget(label);
        row->addWidget(editor, 1);
    }
    from_->setAccessibleName(tr("First set point"));
    to_->setAccessibleName(tr("Last set point"));
    points_->setAccessibleName(tr("Number of set points"));
    auto* word = new QLabel(tr("points"));
    word->setForegroundRole(inkRole::quiet);
    row->addWidget(word);
    row->addWidget(fillButton);
    grid->add(quick, 3);
    refusal_->setObjectName(QStringLiteral("plan.fill.refusal"));
    refusal_->setFont(textFont(TextRole::Small));
    refusal_->setForegroundRole(inkRole::warning);
    refusal_->setWordWrap(true);
    refusal_->hide();
    grid->add(refusal_, 3);
    connect(fillButton, &QPushButton::clicked, this, &PlanCard::fill);

    const auto count = [&](const char* id, const QString& label, int low, int high, int Plan::*field) {
        grid->add(new FieldBox(label, fieldCount(bench, QLatin1String(id), label, low, high, &Record::plan,
                                                 [field](Plan& plan) -> int& { return plan.*field; })));
    };
    grid->add(new FieldBox(tr("Directions"),
                           fieldChoice(bench, QStringLiteral("plan.directions"), tr("Directions"),
                                       {tr("rising"), tr("falling"), tr("rising, then falling")}, &Record::plan,
                                       [](Plan& plan) -> PlanDirections& { return plan.directions; })));
    count("plan.runs", tr("Runs as found"), 0, 99, &Plan::runs);
    count("plan.as_left_runs", tr("Runs as left"), 0, 99, &Plan::asLeftRuns);
    count("plan.repeats", tr("Readings a visit"), 1, 99, &Plan::repeats);
    count("plan.dwell_seconds", tr("Least wait, seconds"), 0, 86400, &Plan::dwellSeconds);
    count("plan.preloads", tr("Preloads"), 0, 99, &Plan::preloads);
    FieldBox* positions = fieldBox(bench, QStringLiteral("plan.positions"), tr("Turned to, degrees, run by run"), positionsBinding());
    positions->findChild<FieldLine*>()->setPlaceholderText(tr("not turned; for a force transducer: 0; 0; 120; 240"));
    grid->add(positions, 3);
    grid->add(fieldCheck(bench, QStringLiteral("plan.reference_typed"), tr("The reference is typed at each reading"), &Record::plan,
                         [](Plan& plan) -> bool& { return plan.referenceTyped; }),
              3);
    body()->addWidget(grid);
    summary_->setObjectName(QStringLiteral("plan.summary"));
    summary_->setFont(textFont(TextRole::Small));
    summary_->setForegroundRole(inkRole::quiet);
    summary_->setWordWrap(true);
    body()->addWidget(summary_);
    connect(&bench, &Workbench::recordChanged, this, &PlanCard::showSummary);
    showSummary();
}

/// While something else than the record's numbers stands in the field: what is understood by it.
void PlanCard::showUnderstood() {
    const Record& record = bench_.record();
    const QString text = line_->text();
    QString hint;
    if (!text.trimmed().isEmpty() && text != numberListText(record.plan.setPoints))
        if (const Result<std::vector<Decimal>> points = parseSetPoints(text, record.item))
            hint = tr("Understood: %1 %2").arg(numberListText(*points), QString::fromStdString(record.item.reference.unit)).trimmed();
    setPoints_->setHint(hint);
}

void PlanCard::fill() {
    QString sentence;
    std::optional<Decimal> ends[2];
    const Item& item = bench_.record().item;
    const std::optional<Decimal>* known[] = {&item.rangeLow, &item.rangeHigh};
    QLineEdit* lines[] = {from_, to_};
    for (int i = 0; i < 2; ++i) {
        // An empty end is the end of the range.
        if (lines[i]->text().trimmed().isEmpty() && *known[i]) {
            ends[i] = *known[i];
            continue;
        }
        if (Result<Decimal> typed = parseTyped(lines[i]->text()))
            ends[i] = *typed;
        else
            sentence = errorText(typed.error());
    }
    if (sentence.isEmpty() && compareValue(*ends[0], *ends[1]) == 0)
        sentence = tr("The two ends are equal. Type two different ones.");
    refusal_->setText(sentence);
    refusal_->setVisible(!sentence.isEmpty());
    if (sentence.isEmpty())
        bench_.perform(changePart(bench_.record(), &Record::plan, tr("set points"),
                                  [&](Plan& plan) { plan.setPoints = evenSetPoints(*ends[0], *ends[1], points_->value()); }));
}

void PlanCard::showSummary() {
    const Plan& plan = bench_.record().plan;
    const auto counted = [&](Phase phase) { return static_cast<int>(plannedReadings(plan, phase).size()); };
    const int found = counted(Phase::AsFound), left = counted(Phase::AsLeft);
    QString text = found + left == 0 ? tr("No reading is planned. Readings can be typed all the same.")
                                     : tr("%n reading(s) as found", nullptr, found);
    if (left > 0)
        text += tr(", %n as left", nullptr, left);
    const auto turned = static_cast<int>(plan.positions.size());
    if (turned > 0 && turned < plan.runs)
        text += tr(". Runs after run %1 have no position and take no part in the force figures").arg(turned);
    summary_->setText(text);
    from_->setPlaceholderText(shownNumber(bench_.record().item.rangeLow));
    to_->setPlaceholderText(shownNumber(bench_.record().item.rangeHigh));
}

} // namespace spanwright
