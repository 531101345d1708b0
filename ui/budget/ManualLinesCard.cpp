// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/budget/ManualLinesCard.h"

#include "ui/commands/FieldForm.h"
#include "ui/look/Look.h"
#include "ui/look/NumberColumns.h"
#include "ui/look/PaddedDelegate.h"
#include "ui/words/Words.h"

#include <QHeaderView>
#include <QTableWidget>
#include <QToolButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// A field of one line; a spare one while the list is shorter than the index, just before the editor goes.
template <class T>
auto access(std::size_t index, T ManualBudgetLine::*field) {
    return [index, field, spare = std::make_shared<ManualBudgetLine>()](BudgetInput& input) -> T& {
        return (index < input.lines.size() ? input.lines[index] : *spare).*field;
    };
}

QWidget* lineEditor(Workbench& bench, std::size_t index) {
    const auto tr = [](const char* text) { return ManualLinesCard::tr(text); };
    const QString path = QStringLiteral("budget.lines.%1.").arg(index);
    auto* grid = new FieldGrid(2);
    const auto text = [&](const char* name, const QString& label, std::string ManualBudgetLine::*field) {
        return fieldBox(bench, path + QLatin1String(name), label, textBinding(&Record::budget, label.toLower(), access(index, field)));
    };
    const auto number = [&](const char* name, const QString& label, std::optional<Decimal> ManualBudgetLine::*field, NumberRule rule,
                            const QString& usual) {
        FieldBox* box = fieldBox(bench, path + QLatin1String(name), label,
                                 numberBinding(&Record::budget, label.toLower(), access(index, field), rule));
        box->findChild<FieldLine*>()->setPlaceholderText(usual);
        return box;
    };
    FieldBox* name = text("name", tr("Name"), &ManualBudgetLine::name);
    grid->setFocusProxy(name->findChild<FieldLine*>());
    grid->add(name, 2);
    grid->add(text("source", tr("Where it comes from"), &ManualBudgetLine::source), 2);
    QStringList distributions;
    for (const Distribution d : {Distribution::Normal, Distribution::Rectangular, Distribution::Triangular, Distribution::UShaped,
                                 Distribution::Student})
        distributions << distributionText(d);
    grid->add(number("amount", tr("Amount"), &ManualBudgetLine::amount, NumberRule::NotNegative, tr("U, half-width or u")));
    grid->add(new FieldBox(tr("Distribution"), fieldChoice(bench, path + QStringLiteral("distribution"), tr("Distribution"), distributions,
                                                           &Record::budget, access(index, &ManualBudgetLine::distribution))));
    grid->add(new FieldBox(tr("In the unit of"), fieldChoice(bench, path + QStringLiteral("side"), tr("In the unit of"),
                                                             {tr("the reference"), tr("the indication")}, &Record::budget,
                                                             access(index, &ManualBudgetLine::side))));
    grid->add(number("divisor", tr("Divisor (normal only)"), &ManualBudgetLine::divisor, NumberRule::Positive, QStringLiteral("2")));
    grid->add(number("degrees_of_freedom", tr("Degrees of freedom"), &ManualBudgetLine::degreesOfFreedom, NumberRule::Positive,
                     QStringLiteral("\u221e")));
    grid->add(number("sensitivity", tr("Sensitivity"), &ManualBudgetLine::sensitivity, NumberRule::Any, QStringLiteral("1")));
    return grid;
}

} // namespace

ManualLinesCard::ManualLinesCard(Workbench& bench, QWidget* parent)
    : Card(tr("Lines added by hand"), parent), bench_(bench), table_(new QTableWidget(0, 3)), remove_(new QToolButton) {
    auto* addButton = new QToolButton;
    addButton->setObjectName(QStringLiteral("budget.lines.add"));
    addButton->setText(tr("Add a line"));
    addButton->setProperty("link", true);
    addButton->setFocusPolicy(Qt::StrongFocus);
    remove_->setObjectName(QStringLiteral("budget.lines.remove"));
    remove_->setText(tr("Remove"));
    remove_->setFocusPolicy(Qt::StrongFocus);
    addHeadWidget(remove_);
    addHeadWidget(addButton);
    connect(addButton, &QToolButton::clicked, this, &ManualLinesCard::add);
    connect(remove_, &QToolButton::clicked, this, &ManualLinesCard::remove);
    table_->setObjectName(QStringLiteral("budget.lines"));
    table_->setAccessibleName(tr("Lines added by hand"));
    table_->setHorizontalHeaderLabels({tr("name"), tr("amount"), tr("distribution")});
    table_->horizontalHeader()->setDefaultAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    table_->horizontalHeader()->setHighlightSections(false);
    table_->verticalHeader()->hide();
    table_->verticalHeader()->setDefaultSectionSize(26);
    table_->setShowGrid(false);
    table_->setItemDelegate(new PaddedDelegate(table_));
    table_->setTabKeyNavigation(false);
    table_->setSelectionBehavior(QAbstractItemView::SelectRows);
    table_->setSelectionMode(QAbstractItemView::SingleSelection);
    table_->setEditTriggers(QAbstractItemView::NoEditTriggers);
    connect(table_, &QTableWidget::currentCellChanged, this, [this](int row) {
        if (row >= 0)
            choose(row);
    });
    new NumberColumns(table_, 0);
    body()->addWidget(table_);
    connect(&bench, &Workbench::recordChanged, this, &ManualLinesCard::show);
    show();
}

int ManualLinesCard::count() const {
    return static_cast<int>(bench_.record().budget.lines.size());
}

void ManualLinesCard::choose(int index) {
    chosen_ = std::clamp(index, 0, std::max(0, count() - 1));
    show();
}

void ManualLinesCard::show() {
    const QSignalBlocker quiet(table_);
    chosen_ = std::clamp(chosen_, 0, std::max(0, count() - 1));
    table_->setRowCount(count());
    for (int row = 0; row < count(); ++row) {
        const ManualBudgetLine& line = bench_.record().budget.lines[static_cast<std::size_t>(row)];
        table_->setItem(row, 0, new QTableWidgetItem(QString::fromStdString(line.name)));
        table_->setItem(row, 1, new QTableWidgetItem(line.amount ? shownNumber(line.amount) : tr("not stated")));
        table_->setItem(row, 2, new QTableWidgetItem(distributionText(line.distribution)));
    }
    if (count() > 0)
        table_->setCurrentCell(chosen_, 0);
    table_->setFixedHeight(table_->horizontalHeader()->sizeHint().height() + 2 * table_->frameWidth() +
                           table_->verticalHeader()->defaultSectionSize() * std::clamp(count(), 1, 5));
    setNote(count() == 0 ? tr("none yet") : QString());
    table_->setVisible(count() > 0);
    remove_->setVisible(count() > 0);
    remove_->setEnabled(!bench_.readOnly());
    if (editing_ != (count() > 0 ? chosen_ : -1))
        showEditor();
}

void ManualLinesCard::showEditor() {
    editing_ = count() > 0 ? chosen_ : -1;
    delete editor_;
    editor_ = nullptr;
    if (editing_ < 0)
        return;
    editor_ = lineEditor(bench_, static_cast<std::size_t>(editing_));
    body()->addWidget(editor_);
    editor_->show();
}

void ManualLinesCard::add() {
    chosen_ = count();
    bench_.perform(changePart(bench_.record(), &Record::budget, tr("add a line to the budget"),
                              [](BudgetInput& input) { input.lines.emplace_back(); }));
    if (editor_)
        editor_->setFocus();
}

void ManualLinesCard::remove() {
    const auto gone = chosen_;
    delete editor_;
    editor_ = nullptr;
    editing_ = -1;
    bench_.perform(changePart(bench_.record(), &Record::budget, tr("remove a line of the budget"),
                              [&](BudgetInput& input) { input.lines.erase(input.lines.begin() + gone); }));
    show();
}

} // namespace spanwright
