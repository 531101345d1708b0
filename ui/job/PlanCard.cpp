// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/job/PlanCard.h"

#include "ui/commands/FieldForm.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>
#include <QRegularExpression>

#include <algorithm>
#include <charconv>
#include <cmath>

namespace spanwright {

namespace {

QString numbersText(const std::vector<Decimal>& points) {
    QStringList texts;
    for (const Decimal& point : points)
        texts << typedText(point);
    return texts.join(QStringLiteral("; "));
}

Result<std::vector<Decimal>> parseNumbers(const QString& text) {
    // A comma followed by a blank separates; any other comma is a decimal mark.
    static const QRegularExpression between(QStringLiteral("\\s*;\\s*|,\\s+|\\s+"));
    std::vector<Decimal> numbers;
    for (const QString& piece : text.trimmed().split(between, Qt::SkipEmptyParts)) {
        Result<Decimal> number = parseTyped(piece);
        if (!number)
            return number.error();
        numbers.push_back(*number);
    }
    return numbers;
}

FieldBinding setPointsBinding() {
    return {[](const Record& record) { return numbersText(record.plan.setPoints); },
            [](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                Result<std::vector<Decimal>> points = parseSetPoints(text);
                if (!points)
                    return points.error();
                return changePart(record, &Record::plan, PlanCard::tr("set points"), [&](Plan& plan) { plan.setPoints = *points; });
            }};
}

/// Angles in the order of the runs, each as often as it was typed.
FieldBinding positionsBinding() {
    return {[](const Record& record) { return numbersText(record.plan.positions); },
            [](const Record& record, const QString& text) -> Result<std::unique_ptr<RecordCommand>> {
                Result<std::vector<Decimal>> positions = parseNumbers(text);
                if (!positions)
                    return positions.error();
                return changePart(record, &Record::plan, PlanCard::tr("mounting positions"), [&](Plan& plan) { plan.positions = *positions; });
            }};
}

void sortAndUnite(std::vector<Decimal>& points) {
    std::stable_sort(points.begin(), points.end(), [](const Decimal& a, const Decimal& b) { return compareValue(a, b) < 0; });
    points.erase(std::unique(points.begin(), points.end(), [](const Decimal& a, const Decimal& b) { return compareValue(a, b) == 0; }),
                 points.end());
}

} // namespace

Result<std::vector<Decimal>> parseSetPoints(const QString& text) {
    Result<std::vector<Decimal>> points = parseNumbers(text);
    if (!points)
        return points;
    std::vector<Decimal> sorted = *points;
    sortAndUnite(sorted);
    return sorted;
}

std::vector<Decimal> evenSetPoints(const Decimal& from, const Decimal& to, int count) {
    std::vector<Decimal> points{from};
    const double low = from.toDouble(), step = (to.toDouble() - low) / (count - 1);
    for (int i = 1; i < count - 1; ++i) {
        // To ten digits of the step, which leaves a round step round.
        const double grain = std::pow(10, std::floor(std::log10(std::abs(step))) - 9);
        const double value = std::round((low + step * i) / grain) * grain;
        char buffer[64];
        const auto end = std::to_chars(buffer, buffer + sizeof buffer, value, std::chars_format::general, 10).ptr;
        if (Result<Decimal> point = Decimal::parse(std::string_view(buffer, static_cast<std::size_t>(end - buffer))))
            points.push_back(*point);
    }
    points.push_back(to);
    sortAndUnite(points);
    return points;
}

PlanCard::PlanCard(Workbench& bench, QWidget* parent)
    : Card(tr("Plan"), parent), bench_(bench), from_(new QLineEdit), to_(new QLineEdit), points_(new QSpinBox), refusal_(new QLabel),
      summary_(new QLabel) {
    auto* grid = new FieldGrid(3);
    FieldBox* setPoints = fieldBox(bench, QStringLiteral("plan.set_points"), tr("Set points"), setPointsBinding());
    setPoints->findChild<FieldLine*>()->setPlaceholderText(tr("0; 2.5; 5; 7.5; 10"));
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
