// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/budget/BudgetPage.h"

#include "core/record/Fields.h"
#include "ui/budget/ContributionsCard.h"
#include "ui/budget/LimitsCard.h"
#include "ui/budget/ManualLinesCard.h"
#include "ui/budget/ResultsCard.h"
#include "ui/look/Look.h"

#include <QHBoxLayout>
#include <QScrollArea>
#include <QVBoxLayout>

namespace spanwright {

BudgetPage::BudgetPage(Workbench& bench, QWidget* parent)
    : QWidget(parent), results_(new ResultsCard(bench)), contributions_(new ContributionsCard(bench)), lines_(new ManualLinesCard(bench)) {
    setObjectName(QStringLiteral("budgetPage"));
    auto* row = new QHBoxLayout(this);
    row->setContentsMargins(space::card, space::card, space::card, space::card);
    row->setSpacing(space::step + space::half);
    auto* left = new QVBoxLayout;
    left->setSpacing(space::step + space::half);
    row->addLayout(left, 21);
    left->addWidget(results_, 5);
    left->addWidget(contributions_, 5);

    auto* scroll = new QScrollArea;
    row->addWidget(scroll, 10);
    scroll->setObjectName(QStringLiteral("budget.side"));
    scroll->setWidgetResizable(true);
    scroll->setFocusPolicy(Qt::NoFocus);
    scroll->setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    auto* sheet = new QWidget;
    scroll->setWidget(sheet);
    auto* right = new QVBoxLayout(sheet);
    right->setContentsMargins(0, 0, 0, 0);
    right->setSpacing(space::step + space::half);
    right->addWidget(limitsCard(bench));
    right->addWidget(lines_);
    right->addStretch(1);
    scroll->setMinimumWidth(364);
    scroll->setMaximumWidth(396);
    connect(results_, &ResultsCard::pointChosen, contributions_, &ContributionsCard::showPoint);
}

void BudgetPage::prepareField(const QString& field) {
    if (field.startsWith(QLatin1String("budget.lines.")))
        lines_->choose(field.section(QLatin1Char('.'), 2, 2).toInt());
    if (field.startsWith(QLatin1String("budget.contributions.")))
        if (const auto line = valueOf<DerivedLine>(field.section(QLatin1Char('.'), 2).toStdString()))
            contributions_->choose(*line);
}

} // namespace spanwright
