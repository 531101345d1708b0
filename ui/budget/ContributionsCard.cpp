// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/budget/ContributionsCard.h"

#include "ui/budget/ResultsCard.h"
#include "ui/budget/TextTable.h"
#include "ui/commands/PartCommand.h"
#include "ui/look/Look.h"
#include "ui/look/NumberColumns.h"
#include "ui/look/NumberText.h"
#include "ui/look/WholeRows.h"
#include "ui/words/Words.h"

#include <QComboBox>
#include <QHBoxLayout>
#include <QLabel>
#include <QLineEdit>
#include <QPushButton>
#include <QTableView>
#include <QToolButton>
#include <QVBoxLayout>

#include <cmath>
#include <set>

namespace spanwright {

namespace {

QLabel* smallLabel(const QString& id) {
    auto* label = new QLabel;
    label->setObjectName(id);
    label->setFont(textFont(TextRole::Small));
    label->setForegroundRole(inkRole::quiet);
    label->setWordWrap(true);
    label->setTextFormat(Qt::PlainText);
    return label;
}

QString lineName(const BudgetItem& item) {
    const QString name = QString::fromStdString(item.name);
    if (!item.derived)
        return name.isEmpty() ? ContributionsCard::tr("(without a name)") : name;
    return name.isEmpty() ? derivedLineText(*item.derived) : name + QStringLiteral(" · ") + derivedLineText(*item.derived);
}

QString sumText(const SetPointBudget& budget, const Item& item) {
    const auto with = [](const QString& value, const std::string& unit) {
        return unit.empty() ? value : value + QLatin1Char(' ') + QString::fromStdString(unit);
    };
    return ContributionsCard::tr("Combined u = %1, effective degrees of freedom %2, k = %3, U = %4 = %5")
        .arg(with(significantText(budget.combined, 3), item.indication.unit),
             std::isfinite(budget.effectiveDegreesOfFreedom) ? fixedText(std::floor(budget.effectiveDegreesOfFreedom), 0) : QString(QChar(0x221e)),
             fixedText(budget.coverageFactor, 2), with(fixedText(budget.expanded, decimalsOf(budget.expanded)), item.indication.unit),
             with(fixedText(budget.expandedReference, decimalsOf(budget.expandedReference)), item.reference.unit));
}

std::vector<TextTable::Cell> rowOf(const BudgetItem& item, const Item& unit) {
    const std::string& u = item.side == Side::Reference ? unit.reference.unit : unit.indication.unit;
    std::vector<TextTable::Cell> row(8);
    row[0].text = lineName(item);
    row[1].text = significantText(item.amount, 3) + QLatin1Char(' ') + QString::fromStdString(u);
    row[2].text = distributionText(item.distribution);
    row[3].text = significantText(item.divisor, 3);
    row[4].text = significantText(item.sensitivity, 4);
    row[5].text = significantText(item.contribution, 3);
    row[6].text = std::isfinite(item.degreesOfFreedom) ? significantText(item.degreesOfFreedom, 3) : QString(QChar(0x221e));
    row[7].text = briefShareText(item.share);
    row[7].share = item.share;
    return row;
}

} // namespace

ContributionsCard::ContributionsCard(Workbench& bench, QWidget* parent)
    : Card(tr("Contributions"), parent), bench_(bench),
      table_(new TextTable({{tr("contribution"), false},
                            {tr("amount"), true},
                            {tr("distribution"), false},
                            {tr("divisor"), true},
                            {tr("sensitivity"), true},
                            {tr("contributed"), true},
                            {tr("\u03bd"), true},
                            {tr("share of\nvariance"), true}},
                           this)),
      view_(textView(table_, QStringLiteral("budget.contributions"), tr("Contributions"))), sum_(smallLabel(QStringLiteral("budget.sum"))),
      readBack_(smallLabel(QStringLiteral("budget.readBack"))), omitted_(new QVBoxLayout), line_(new QComboBox), reason_(new QLineEdit),
      leaveOut_(new QPushButton(tr("&Leave out"))) {
    view_->setItemDelegateForColumn(7, new ShareDelegate(view_));
    new NumberColumns(view_, 0);
    body()->addWidget(new WholeRows(view_, WholeRows::Fill::Rows), 1);
    sum_->setForegroundRole(QPalette::WindowText);
    body()->addWidget(sum_);
    body()->addWidget(readBack_);
    omitted_->setSpacing(2);
    body()->addLayout(omitted_);

    auto* row = new QHBoxLayout;
    line_->setObjectName(QStringLiteral("budget.omitted"));
    line_->setAccessibleName(tr("Derived line to leave out"));
    reason_->setObjectName(QStringLiteral("budget.omitted.reason"));
    reason_->setAccessibleName(tr("Reason for leaving it out"));
    reason_->setPlaceholderText(tr("because\u2026"));
    reason_->setAcceptDrops(false);
    leaveOut_->setObjectName(QStringLiteral("budget.omitted.do"));
    row->addWidget(line_, 1);
    row->addWidget(reason_, 2);
    row->addWidget(leaveOut_);
    body()->addLayout(row);
    leaveOut_->setEnabled(false);
    const auto allow = [this] {
        leaveOut_->setEnabled(line_->currentIndex() >= 0 && !reason_->text().trimmed().isEmpty() && !bench_.readOnly());
    };
    connect(reason_, &QLineEdit::textChanged, this, allow);
    connect(reason_, &QLineEdit::returnPressed, this, &ContributionsCard::leaveOut);
    connect(leaveOut_, &QPushButton::clicked, this, &ContributionsCard::leaveOut);
    connect(&bench, &Workbench::evaluationChanged, this, &ContributionsCard::show);
    show();
}

void ContributionsCard::showPoint(int point) {
    point_ = point;
    show();
}

void ContributionsCard::choose(DerivedLine line) {
    const auto evaluation = bench_.evaluation();
    const SetPointBudget* b = budget(*evaluation);
    for (std::size_t i = 0; b && i < b->items.size(); ++i)
        if (b->items[i].derived == line) {
            view_->selectRow(static_cast<int>(i));
            view_->scrollTo(table_->index(static_cast<int>(i), 0));
        }
}

const SetPointBudget* ContributionsCard::budget(const Evaluation& evaluation) const {
    const PhaseEvaluation* phase = evaluation.phase(bench_.record().choices.phase);
    if (!phase || point_ < 0 || point_ >= static_cast<int>(phase->verdict.points.size()))
        return nullptr;
    const PointResult& p = phase->verdict.points[static_cast<std::size_t>(point_)];
    for (const SetPointBudget& b : phase->budget.points)
        if (b.setPoint == p.setPoint && b.direction == p.direction)
            return &b;
    return nullptr;
}

void ContributionsCard::show() {
    const Record& record = bench_.record();
    const auto evaluation = bench_.evaluation();
    const QString x = QString::fromStdString(record.item.reference.unit), y = QString::fromStdString(record.item.indication.unit);
    const SetPointBudget* b = budget(*evaluation);
    std::vector<std::vector<TextTable::Cell>> rows;
    std::set<DerivedLine> derived;
    QString sum;
    if (b) {
        for (const BudgetItem& item : b->items) {
            rows.push_back(rowOf(item, record.item));
            if (item.derived)
                derived.insert(*item.derived);
        }
        sum = b->items.empty() ? tr("No contribution is stated yet, so nothing is known about the uncertainty: u, k and U are \u2013.")
                               : sumText(*b, record.item);
        setTitle(tr("Contributions at %1 %2").arg(placeText(b->setPoint), x));
        setNote(b->direction == Direction::Unknown ? QString() : directionText(b->direction));
    } else {
        setTitle(tr("Contributions"));
        setNote({});
    }
    table_->setHead(5, tr("contributed\n%1").arg(y).trimmed());
    table_->fill(std::move(rows));
    sum_->setText(sum);
    sum_->setVisible(!sum.isEmpty());

    const PhaseEvaluation* phase = evaluation->phase(record.choices.phase);
    QString back;
    if (phase && phase->budget.readBack)
        back = tr("A value taken from one new indication by the function: U = %1 %2 at most in the range (k = %3)")
                   .arg(fixedText(phase->budget.readBack->expandedReference, decimalsOf(phase->budget.readBack->expandedReference)), x,
                        fixedText(phase->budget.readBack->coverageFactor, 2));
    readBack_->setText(back);
    readBack_->setVisible(!back.isEmpty());

    const int chosen = line_->currentData().toInt();
    line_->clear();
    for (const DerivedLine line : derived)
        line_->addItem(derivedLineText(line), static_cast<int>(line));
    if (const int again = line_->findData(chosen); again >= 0)
        line_->setCurrentIndex(again);
    showOmitted();
}

void ContributionsCard::showOmitted() {
    while (QLayoutItem* item = omitted_->takeAt(0)) {
        if (QWidget* widget = item->widget()) {
            widget->hide();
            widget->deleteLater();
        }
        delete item;
    }
    for (const OmittedLine& omitted : bench_.record().budget.omitted) {
        auto* line = new QWidget;
        auto* row = new QHBoxLayout(line);
        row->setContentsMargins(0, 0, 0, 0);
        QLabel* words = smallLabel({});
        words->setText(tr("Left out: %1, because %2").arg(derivedLineText(omitted.line), QString::fromStdString(omitted.reason)));
        words->setForegroundRole(inkRole::warning);
        row->addWidget(words, 1);
        auto* back = new QToolButton;
        back->setText(tr("Take back"));
        back->setProperty("link", true);
        back->setFocusPolicy(Qt::StrongFocus);
        back->setAccessibleName(tr("Take back %1").arg(derivedLineText(omitted.line)));
        connect(back, &QToolButton::clicked, this, [this, which = omitted.line] { takeBack(which); });
        row->addWidget(back);
        omitted_->addWidget(line);
    }
}

void ContributionsCard::leaveOut() {
    const std::string reason = reason_->text().trimmed().toStdString();
    if (reason.empty() || line_->currentIndex() < 0)
        return;
    const auto line = static_cast<DerivedLine>(line_->currentData().toInt());
    reason_->clear();
    bench_.perform(changePart(bench_.record(), &Record::budget, tr("leave out a contribution"), [&](BudgetInput& input) {
        std::erase_if(input.omitted, [&](const OmittedLine& o) { return o.line == line; });
        input.omitted.push_back({line, reason});
    }));
}

void ContributionsCard::takeBack(DerivedLine line) {
    bench_.perform(changePart(bench_.record(), &Record::budget, tr("take back a contribution"), [&](BudgetInput& input) {
        std::erase_if(input.omitted, [&](const OmittedLine& o) { return o.line == line; });
    }));
}

} // namespace spanwright
