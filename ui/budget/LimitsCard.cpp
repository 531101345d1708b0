// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/budget/LimitsCard.h"

#include "ui/commands/FieldForm.h"
#include "ui/look/Look.h"
#include "ui/words/Words.h"

#include <QCoreApplication>
#include <QLabel>
#include <QVBoxLayout>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("LimitsCard", text);
}

class LimitFields {
  public:
    explicit LimitFields(Workbench& bench) : bench_(bench) {}

    FieldBox* text(const char* id, const QString& label, std::string Limits::*field) const {
        return fieldBox(bench_, QLatin1String(id), label,
                        textBinding(&Record::limits, label.toLower(), [field](Limits& l) -> std::string& { return l.*field; }));
    }
    FieldBox* number(const char* id, const QString& label, std::optional<Decimal> Limits::*field) const {
        return fieldBox(bench_, QLatin1String(id), label,
                        numberBinding(&Record::limits, label.toLower(),
                                      [field](Limits& l) -> std::optional<Decimal>& { return l.*field; }, NumberRule::NotNegative));
    }

  private:
    Workbench& bench_;
};

/// The names of the rules, whatever else the limits say.
QStringList ruleNames() {
    return {tr("simple acceptance"), tr("guarded by U"), tr("guarded by r \u00b7 U"), tr("four states, guarded by U")};
}

} // namespace

Card* limitsCard(Workbench& bench) {
    const LimitFields f(bench);
    auto* card = new Card(tr("Limits and decision"));
    auto* grid = new FieldGrid(2);
    FieldBox* coverage = fieldBox(bench, QStringLiteral("budget.coverage"), tr("Coverage probability of U"),
                                  fixedNumberBinding(&Record::budget, tr("coverage probability"),
                                                     [](BudgetInput& input) -> Decimal& { return input.coverage; }, 0.5, 0.9999));
    grid->add(coverage);
    grid->add(fieldCheck(bench, QStringLiteral("choices.separate_directions"), tr("Rising and falling apart"), &Record::choices,
                         [](Choices& c) -> bool& { return c.separateDirections; }));
    grid->startRow();
    grid->add(fieldCheck(bench, QStringLiteral("limits.stated"), tr("A statement of conformity is wanted"), &Record::limits,
                         [](Limits& l) -> bool& { return l.stated; }),
              2);
    card->body()->addWidget(grid);

    auto* stated = new FieldGrid(2);
    stated->add(f.text("limits.specification", tr("Specification"), &Limits::specification), 2);
    stated->add(f.number("limits.percent_of_span", tr("\u00b1 % of span"), &Limits::percentOfSpan));
    stated->add(f.number("limits.percent_of_reading", tr("\u00b1 % of reading"), &Limits::percentOfReading));
    stated->add(f.number("limits.constant", tr("\u00b1 constant"), &Limits::constant));
    stated->add(new FieldBox(tr("Constant in the unit of"), fieldChoice(bench, QStringLiteral("limits.side"), tr("Constant in the unit of"),
                                                                        {tr("the reference"), tr("the indication")}, &Record::limits,
                                                                        [](Limits& l) -> Side& { return l.side; })));
    FieldBox* rule = new FieldBox(tr("Decision rule"), fieldChoice(bench, QStringLiteral("limits.rule"), tr("Decision rule"), ruleNames(),
                                                                   &Record::limits, [](Limits& l) -> DecisionRule& { return l.rule; }));
    stated->add(rule, 2);
    FieldBox* fraction = fieldBox(bench, QStringLiteral("limits.fraction"), tr("r of the guard band w = r \u00b7 U"),
                                  fixedNumberBinding(&Record::limits, tr("fraction of U"), [](Limits& l) -> Decimal& { return l.fraction; },
                                                     0, 3));
    stated->add(fraction);
    stated->startRow();
    stated->add(f.text("limits.agreed_with", tr("Agreed with"), &Limits::agreedWith));
    FieldBox* agreed = fieldBox(bench, QStringLiteral("limits.agreed_on"), tr("Agreed on"),
                                dateBinding(&Record::limits, tr("agreed on"), [](Limits& l) -> std::string& { return l.agreedOn; }));
    agreed->findChild<FieldLine*>()->setPlaceholderText(tr("YYYY-MM-DD"));
    stated->add(agreed);
    card->body()->addWidget(stated);
    auto* caution = new QLabel;
    caution->setObjectName(QStringLiteral("limits.caution"));
    caution->setFont(textFont(TextRole::Small));
    caution->setWordWrap(true);
    caution->setForegroundRole(inkRole::quiet);
    card->body()->addWidget(caution);

    const auto show = [&bench, stated, rule, fraction, caution] {
        const Record& record = bench.record();
        stated->setVisible(record.limits.stated);
        rule->setHint(decisionRuleText(record.limits));
        fraction->setVisible(record.limits.rule == DecisionRule::GuardedByFraction);
        caution->setVisible(record.limits.stated);
        caution->setText(record.readings->empty()
                             ? tr("Limits and rule are agreed before the first reading.")
                             : tr("Readings are there: limits and rule should be those agreed before. A change stands in the journal."));
    };
    QObject::connect(&bench, &Workbench::recordChanged, card, show);
    show();
    return card;
}

} // namespace spanwright
