// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/FindingsCard.h"

#include "core/diagnose/FindingName.h"
#include "ui/bench/Dismissals.h"
#include "ui/bench/FindingsView.h"
#include "ui/bench/ReasonDialog.h"
#include "ui/commands/PartCommand.h"
#include "ui/commands/Workbench.h"
#include "ui/words/Words.h"

#include <QDateTime>
#include <QVBoxLayout>

#include <algorithm>

namespace spanwright {

FindingsCard::FindingsCard(Workbench& workbench, QWidget* parent) : Card(tr("Findings"), parent), workbench_(workbench), view_(new FindingsView) {
    body()->addWidget(view_);
    connect(view_, &FindingsView::remedyChosen, this, &FindingsCard::remedyChosen);
    connect(view_, &FindingsView::readingsChosen, this, [this](const std::vector<ReadingId>& ids) { workbench_.select({ids.begin(), ids.end()}); });
    connect(view_, &FindingsView::dismissChosen, this, &FindingsCard::dismiss);
    connect(view_, &FindingsView::recallChosen, this, &FindingsCard::recall);
    connect(&workbench_, &Workbench::evaluationChanged, this, &FindingsCard::refresh);
    refresh();
}

void FindingsCard::refresh() {
    const Record& record = workbench_.record();
    const auto evaluation = workbench_.evaluation();
    const PhaseEvaluation* phase = evaluation->phase(record.choices.phase);
    const std::vector<Finding> found = phase ? phase->findings : std::vector<Finding>{};
    view_->setFindings(found, record, phase && phase->fit        ? tr("Nothing stands out.")
                                             : phase && phase->readings ? tr("Findings appear here once a function is fitted.")
                                                                        : tr("Findings appear here as readings come in."));
    const auto dismissed = std::count_if(found.begin(), found.end(), [&](const Finding& finding) { return dismissalOf(finding, record) != nullptr; });
    const qsizetype open = static_cast<qsizetype>(found.size()) - dismissed;
    setNote(found.empty() ? QString() : dismissed == 0 ? QString::number(open) : tr("%1, %2 dismissed").arg(open).arg(dismissed));
}

void FindingsCard::dismiss(const Finding& finding) {
    if (workbench_.readOnly())
        return;
    const ReasonDialog::Question question{tr("Dismiss a finding"),
                                          findingWords(finding, workbench_.record()).sentence,
                                          {},
                                          tr("&Why? It stays listed, and comes back when its figures change."),
                                          {},
                                          tr("Dismiss"),
                                          tr("Keep it")};
    auto* dialog = new ReasonDialog(QStringLiteral("dismissDialog"), question, this);
    connect(dialog, &QDialog::accepted, this, [this, finding, dialog] {
        const QString date = QDateTime::fromMSecsSinceEpoch(workbench_.now()).date().toString(Qt::ISODate);
        workbench_.perform(changePart(workbench_.record(), &Record::dismissals, tr("dismiss a finding"), [&](std::vector<Dismissal>& all) {
            all.push_back({std::string(findingName(finding.code)), figuresKey(finding), dialog->reason().toStdString(), workbench_.person().toStdString(), date.toStdString()});
        }));
    });
    dialog->open();
}

void FindingsCard::recall(const Finding& finding) {
    const Dismissal* found = dismissalOf(finding, workbench_.record());
    if (!found)
        return;
    workbench_.perform(changePart(workbench_.record(), &Record::dismissals, tr("bring a finding back"), [gone = *found](std::vector<Dismissal>& all) { std::erase(all, gone); }));
}

} // namespace spanwright
