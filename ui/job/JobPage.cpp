// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/job/JobPage.h"

#include "ui/job/ConditionsCard.h"
#include "ui/job/JobCards.h"
#include "ui/job/PlanCard.h"
#include "ui/job/StandardsCard.h"
#include "ui/look/Look.h"

#include <QHBoxLayout>
#include <QScrollArea>
#include <QVBoxLayout>

namespace spanwright {

namespace {

constexpr int WidestSheet = 2000; ///< beyond it fields would be longer than what is typed into them

QVBoxLayout* column(QHBoxLayout* row, int stretch) {
    auto* cards = new QVBoxLayout;
    cards->setSpacing(space::step + space::half);
    row->addLayout(cards, stretch);
    return cards;
}

} // namespace

JobPage::JobPage(Workbench& bench, QWidget* parent) : QWidget(parent), scroll_(new QScrollArea), standards_(new StandardsCard(bench)) {
    setObjectName(QStringLiteral("jobPage"));
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(0, 0, 0, 0);
    all->addWidget(scroll_);
    scroll_->setWidgetResizable(true);
    scroll_->setFocusPolicy(Qt::NoFocus);
    scroll_->setHorizontalScrollBarPolicy(Qt::ScrollBarAsNeeded);

    auto* sheet = new QWidget;
    sheet->setMaximumWidth(WidestSheet);
    scroll_->setAlignment(Qt::AlignHCenter | Qt::AlignTop);
    scroll_->setWidget(sheet);
    auto* row = new QHBoxLayout(sheet);
    row->setContentsMargins(space::card, space::card, space::card, space::card);
    row->setSpacing(space::step + space::half);
    QVBoxLayout* left = column(row, 10);
    left->addWidget(itemCard(bench));
    left->addWidget(new PlanCard(bench));
    left->addStretch(1);
    QVBoxLayout* middle = column(row, 10);
    middle->addWidget(orderCard(bench));
    middle->addWidget(methodCard(bench));
    middle->addWidget(adjustmentCard(bench));
    middle->addStretch(1);
    QVBoxLayout* right = column(row, 11);
    right->addWidget(standards_);
    right->addWidget(new ConditionsCard(bench));
    right->addWidget(statementsCard(bench));
    right->addStretch(1);
}

void JobPage::prepareField(const QString& field) {
    if (field.startsWith(QLatin1String("standards.")))
        standards_->choose(field.section(QLatin1Char('.'), 1, 1).toInt());
}

void JobPage::bringIntoView(QWidget* editor) {
    scroll_->ensureWidgetVisible(editor, 40, 80);
}

} // namespace spanwright
