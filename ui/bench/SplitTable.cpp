// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/SplitTable.h"

#include "ui/commands/FieldForm.h"
#include "ui/commands/Workbench.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QDialogButtonBox>
#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

/// Sums of squares that shares are shares of.
struct Whole {
    double total = 0, noise = 0;
};

QString shareOf(double part, double whole) {
    return whole > 0 ? shareText(part / whole) : QString();
}

FiguresRow rowOf(const QString& source, const SplitRow& row, const Whole& whole, int level) {
    FiguresRow made;
    made.level = level;
    made.cells = {source, significantText(row.ss, 5), QString::number(row.df), row.ms ? significantText(*row.ms, 5) : QString(),
                  row.f ? significantText(*row.f, 4) : QString(), row.p ? pText(*row.p) : QString(), shareOf(row.ss, whole.total), shareOf(row.ss, level > 0 ? whole.noise : 0)};
    return made;
}

/// Another test of a row that is there already: its sum of squares is no part of the total.
FiguresRow testOf(const QString& name, const SplitRow& row) {
    FiguresRow made = rowOf(name, row, {}, 3);
    made.quiet = true;
    return made;
}

} // namespace

QStringList splitHeadings(const QString& unit) {
    const QString squared = unit.isEmpty() ? QString() : QStringLiteral("\n(") + unit + QStringLiteral(")²");
    return {SplitTable::tr("source"), SplitTable::tr("sum of squares") + squared, SplitTable::tr("d.f."), SplitTable::tr("mean square") + squared,
            SplitTable::tr("F"), SplitTable::tr("p"), SplitTable::tr("share\nof total"), SplitTable::tr("share\nof noise")};
}

std::vector<FiguresRow> splitRows(const VarianceSplit& split) {
    std::vector<FiguresRow> rows;
    const Whole whole{split.total.ss, split.residual.ss};
    const auto add = [&](SplitPart part, const std::optional<SplitRow>& row, int level) {
        if (row)
            rows.push_back(rowOf(part == SplitPart::Regression ? SplitTable::tr("signal (regression)") : splitPartText(part), *row, part == SplitPart::Regression ? Whole{whole.total, 0} : whole, level));
    };
    add(SplitPart::Total, split.total, 0);
    add(SplitPart::Regression, split.regression, 1);
    add(SplitPart::Residual, split.residual, 1);
    add(SplitPart::LackOfFit, split.lackOfFit, 2);
    if (split.lackOfFitAdjusted && split.lackOfFitAdjusted->f)
        rows.push_back(testOf(SplitTable::tr("adjusted for direction and run, against %1").arg(splitPartText(split.against).toLower()), *split.lackOfFitAdjusted));
    if (split.lackOfFitNaive && split.lackOfFitNaive->f && split.against != SplitPart::PureError)
        rows.push_back(testOf(SplitTable::tr("naive, against pure error"), *split.lackOfFitNaive));
    add(SplitPart::PureError, split.pureError, 2);
    add(SplitPart::Hysteresis, split.hysteresis, 3);
    add(SplitPart::RunOffset, split.runOffset, 3);
    add(SplitPart::RunSlope, split.runSlope, 3);
    add(SplitPart::Repeatability, split.repeatability, 3);
    return rows;
}

SplitTable::SplitTable(Workbench& workbench, QWidget* parent)
    : QDialog(parent), workbench_(workbench), table_(new FiguresTable(QStringLiteral("splitFiguresTable"), tr("Variance split"))), note_(new QLabel) {
    setObjectName(QStringLiteral("splitTable"));
    setAttribute(Qt::WA_DeleteOnClose);
    setWindowTitle(tr("Variance split"));
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::step + space::half);
    all->addWidget(table_, 1);
    note_->setObjectName(QStringLiteral("splitNote"));
    note_->setForegroundRole(inkRole::quiet);
    note_->setFont(textFont(TextRole::Small));
    note_->setTextFormat(Qt::PlainText);
    note_->setWordWrap(true);
    all->addWidget(note_);
    all->addWidget(fieldCheck(workbench, QStringLiteral("choices.split_on_certificate"), tr("Print this table on the certificate"), &Record::choices,
                              [](Choices& choices) -> bool& { return choices.splitOnCertificate; }));
    auto* buttons = new QDialogButtonBox;
    QPushButton* copy = buttons->addButton(tr("Copy"), QDialogButtonBox::ActionRole);
    copy->setObjectName(QStringLiteral("copySplit"));
    copy->setAutoDefault(false);
    buttons->addButton(tr("Close"), QDialogButtonBox::RejectRole)->setDefault(true);
    connect(copy, &QPushButton::clicked, table_, &FiguresTable::copy);
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    all->addWidget(buttons);
    connect(&workbench_, &Workbench::evaluationChanged, this, &SplitTable::refresh);
    refresh();
    fitToContents(*this);
    table_->setFocus();
}

void SplitTable::refresh() {
    const Record& record = workbench_.record();
    const PhaseEvaluation* phase = workbench_.evaluation()->phase(record.choices.phase);
    if (!phase || !phase->split || !phase->fit) {
        table_->setFigures(splitHeadings({}), {});
        note_->setText(phase && phase->notFitted ? errorText(*phase->notFitted) : tr("There are no readings in this phase yet."));
        return;
    }
    const VarianceSplit& split = *phase->split;
    const std::string& unit = phase->fit->direction == FitDirection::Indication ? record.item.indication.unit : record.item.reference.unit;
    table_->setFigures(splitHeadings(phase->fit->weights == Weights::Equal ? QString::fromStdString(unit) : QString()), splitRows(split));
    QStringList lines{tr("F and p: the signal against the residual, the other sources against %1. Each source is what it adds to those above it.")
                          .arg(splitPartText(split.against).toLower())};
    for (const Warning& warning : split.warnings)
        lines << warningText(warning);
    note_->setText(lines.join(QLatin1Char('\n')));
}

} // namespace spanwright
