// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ResidualsCard.h"

#include "ui/bench/ChoiceMenus.h"
#include "ui/bench/SelectionBar.h"
#include "ui/plot/ResidualPlot.h"

#include <QMenu>
#include <QVBoxLayout>

namespace spanwright {

ResidualsCard::ResidualsCard(Workbench& workbench, QWidget* parent)
    : Card(tr("Residuals"), parent), plot_(new ResidualPlot), view_(new ChoiceButton(QStringLiteral("residualChoice"), tr("What the residuals are drawn against"))) {
    auto* bar = new SelectionBar(workbench);
    connect(bar, &SelectionBar::excludeRequested, this, &ResidualsCard::excludeRequested);
    connect(bar, &SelectionBar::readmitRequested, this, &ResidualsCard::readmitRequested);
    addHeadWidget(bar);
    addHeadWidget(view_);
    body()->addWidget(plot_, 1);
    for (const ResidualView view : residualViews)
        view_->menu()->addAction(residualViewText(view, {}), this, [this, view] { setView(view); });
}

void ResidualsCard::setSubject(const PlotSubject& subject) {
    plot_->setSubject(subject);
}

void ResidualsCard::setDirection(FitDirection direction) {
    direction_ = direction;
    nameView();
}

void ResidualsCard::nameView() {
    PlotSubject named;
    named.fit = direction_;
    view_->setChoice(residualViewText(plot_->view(), named));
}

void ResidualsCard::setView(ResidualView view) {
    plot_->setView(view);
    nameView();
    if (view != ResidualView::Reference)
        emit partsLeft();
}

void ResidualsCard::showPart(std::optional<SplitPart> part) {
    plot_->showPart(part);
    nameView();
}

} // namespace spanwright
