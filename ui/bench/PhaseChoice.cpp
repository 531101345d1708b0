// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/PhaseChoice.h"

#include "ui/bench/PlanRows.h"
#include "ui/commands/PartCommand.h"
#include "ui/words/Words.h"

#include <QMenu>
#include <QMessageBox>
#include <QPushButton>

namespace spanwright {

PhaseChoice::PhaseChoice(Workbench& workbench, QWidget* parent) : ChoiceButton(QStringLiteral("phaseChoice"), tr("Phase"), parent), workbench_(workbench) {
    for (const Phase phase : bothPhases)
        menu()->addAction(sentenceCase(phaseText(phase)), this, [this, phase] { ask(phase); });
    connect(&workbench_, &Workbench::recordChanged, this, &PhaseChoice::refresh);
    refresh();
}

void PhaseChoice::refresh() {
    setChoice(sentenceCase(phaseText(workbench_.record().choices.phase)));
}

void PhaseChoice::ask(Phase phase) {
    const Record& record = workbench_.record();
    const Taken found = takenOf(record, Phase::AsFound);
    const bool untouched = takenOf(record, Phase::AsLeft).all == 0;
    if (phase != Phase::AsLeft || !untouched || found.atPlan >= found.planned || record.choices.phase == phase) {
        choose(phase);
        return;
    }
    auto* box = new QMessageBox(QMessageBox::NoIcon, tr("Readings as found are not complete"),
                                tr("%1 of %2 planned readings are taken as found. After an adjustment they cannot be taken any more.").arg(found.atPlan).arg(found.planned),
                                QMessageBox::NoButton, this);
    box->setObjectName(QStringLiteral("phaseGuard"));
    box->setAttribute(Qt::WA_DeleteOnClose);
    box->setDefaultButton(box->addButton(tr("Stay as found"), QMessageBox::RejectRole));
    connect(box->addButton(tr("Go on as left"), QMessageBox::AcceptRole), &QPushButton::clicked, this, [this, phase] { choose(phase); });
    box->open();
}

void PhaseChoice::choose(Phase phase) {
    workbench_.perform(changePart(workbench_.record(), &Record::choices, tr("show readings %1").arg(phaseText(phase)), [&](Choices& choices) { choices.phase = phase; }));
}

} // namespace spanwright
