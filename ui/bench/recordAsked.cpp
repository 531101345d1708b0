// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/recordAsked.h"

#include "ui/bench/SuspectsDialog.h"
#include "ui/commands/ReadingCommands.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

void perform(Workbench& workbench, const EntryRequest& request, const std::vector<Suspect>& answers) {
    auto put = std::make_unique<PutReadings>(request.text, answered(request.rows, answers), request.reason);
    for (const Suspect& answer : answers)
        put->remark(answer.row, answerText(answer).toStdString());
    workbench.perform(std::move(put));
}

/// "reading 17", by the numbers that the new ones will have.
QStringList namesOf(const Record& record, const std::vector<Reading>& rows, const std::vector<Suspect>& suspects) {
    std::vector<ReadingId> ids;
    ReadingId next = record.nextReadingId;
    for (const Reading& row : rows)
        ids.push_back(row.id != 0 ? row.id : next++);
    QStringList names;
    for (const Suspect& suspect : suspects)
        names << QCoreApplication::translate("Suspects", "reading %1").arg(ids[suspect.row]);
    return names;
}

} // namespace

void recordAsked(Workbench& workbench, EntryRequest request, QWidget* parent, std::function<void()> recorded, std::function<void()> back) {
    const PhaseEvaluation* figures = request.rows.empty() ? nullptr : workbench.evaluation()->phase(request.rows.front().phase);
    const std::vector<Suspect> suspects = suspectsAmong(workbench.record(), figures, request.rows, request.columns);
    if (suspects.empty()) {
        perform(workbench, request, {});
        recorded();
        return;
    }
    auto* dialog = new SuspectsDialog(suspects, namesOf(workbench.record(), request.rows, suspects), parent);
    QObject::connect(dialog, &QDialog::accepted, parent, [&workbench, dialog, request = std::move(request), recorded = std::move(recorded)] {
        perform(workbench, request, dialog->answers());
        recorded();
    });
    QObject::connect(dialog, &QDialog::rejected, parent, std::move(back));
    dialog->open();
}

} // namespace spanwright
