// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/SplitTable.h"

#include "core/split/SplitLines.h"
#include "ui/bench/FiguresTable.h"
#include "ui/commands/FieldForm.h"
#include "ui/commands/Workbench.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

QString shareOf(double part, double whole) {
    return whole > 0 ? shareText(part / whole) : QString();
}

QString sourceOf(const SplitLine& line, const VarianceSplit& split) {
    switch (line.test) {
    case SplitLine::Test::Chain: return line.part == SplitPart::Regression ? SplitTable::tr("signal (regression)") : splitPartText(line.part);
    case SplitLine::Test::Adjusted: return SplitTable::tr("adjusted for direction and run, against %1").arg(splitPartText(split.against).toLower());
    case SplitLine::Test::Naive: break;
    }
    return SplitTable::tr("naive, against pure error");
}

/// Another test of a row that is there already is quiet: its sum of squares is no part of the total.
FiguresRow rowOf(const SplitLine& line, const VarianceSplit& split) {
    const SplitRow& row = line.row;
    const bool chain = line.test == SplitLine::Test::Chain, noise = chain && line.level > 0 && line.part != SplitPart::Regression;
    return {{sourceOf(line, split), significantText(row.ss, 5), QString::number(row.df), row.ms ? significantText(*row.ms, 5) : QString(),
             row.f ? significantText(*row.f, 4) : QString(), row.p ? pText(*row.p) : QString(), chain ? shareOf(row.ss, split.total.ss) : QString(),
             noise ? shareOf(row.ss, split.residual.ss) : QString()},
            line.level,
            !chain};
}

QStringList headings(const QString& unit) {
    const QString squared = unit.isEmpty() ? QString() : QStringLiteral("\n(") + unit + QStringLiteral(")²");
    return {SplitTable::tr("source"), SplitTable::tr("sum of squares") + squared, SplitTable::tr("d.f."), SplitTable::tr("mean square") + squared,
            SplitTable::tr("F"), SplitTable::tr("p"), SplitTable::tr("share\nof total"), SplitTable::tr("share\nof noise")};
}

} // namespace

SplitTable::SplitTable(Workbench& workbench, QWidget* parent)
    : SheetDialog(QStringLiteral("splitTable"), tr("Variance split"), parent), workbench_(workbench),
      table_(new FiguresTable(QStringLiteral("splitFiguresTable"), tr("Variance split"))), note_(quietNote(QStringLiteral("splitNote"))) {
    body()->addWidget(table_, 1);
    body()->addWidget(note_);
    body()->addWidget(fieldCheck(workbench, QStringLiteral("choices.split_on_certificate"), tr("Print this table on the certificate"), &Record::choices,
                                 [](Choices& choices) -> bool& { return choices.splitOnCertificate; }));
    connect(addButton(tr("Copy"), QDialogButtonBox::ActionRole, QStringLiteral("copySplit")), &QPushButton::clicked, table_, &FiguresTable::copy);
    addClose()->setDefault(true);
    connect(&workbench_, &Workbench::evaluationChanged, this, &SplitTable::refresh);
    refresh();
    fitToContents();
    table_->setFocus();
}

void SplitTable::refresh() {
    const Record& record = workbench_.record();
    const PhaseEvaluation* phase = workbench_.evaluation()->phase(record.choices.phase);
    if (!phase || !phase->split || !phase->fit) {
        table_->setFigures(headings({}), {});
        note_->setText(phase && phase->notFitted ? errorText(*phase->notFitted) : tr("There are no readings in this phase yet."));
        return;
    }
    const VarianceSplit& split = *phase->split;
    const std::string& unit = phase->fit->direction == FitDirection::Indication ? record.item.indication.unit : record.item.reference.unit;
    std::vector<FiguresRow> rows;
    for (const SplitLine& line : splitLines(split))
        rows.push_back(rowOf(line, split));
    table_->setFigures(headings(phase->fit->weights == Weights::Equal ? QString::fromStdString(unit) : QString()), rows);
    QStringList lines{tr("F and p: the signal against the residual, the other sources against %1. Each source is what it adds to those above it.")
                          .arg(splitPartText(split.against).toLower())};
    for (const Warning& warning : split.warnings)
        lines << warningText(warning);
    note_->setText(lines.join(QLatin1Char('\n')));
}

} // namespace spanwright
