// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/SplitTable.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QApplication>
#include <QClipboard>
#include <QDialogButtonBox>
#include <QGridLayout>
#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("SplitTable", text);
}

SplitLine lineOf(const QString& source, const SplitRow& row, double total, int level) {
    SplitLine line{source, significantText(row.ss, 5), QString::number(row.df), {}, {}, {}, {}, level};
    if (row.ms)
        line.meanSquare = significantText(*row.ms, 5);
    if (row.f)
        line.f = significantText(*row.f, 4);
    if (row.p)
        line.p = pText(*row.p);
    if (total > 0)
        line.share = shareText(row.ss / total);
    return line;
}

QStringList cellsOf(const SplitLine& line) {
    return {line.source, line.sumOfSquares, line.degreesOfFreedom, line.meanSquare, line.f, line.p, line.share};
}

QStringList headings(const QString& unit) {
    const QString squared = unit.isEmpty() ? QString() : QStringLiteral(" (") + unit + QStringLiteral(")²");
    return {tr("source"), tr("sum of squares") + squared, tr("d.f."), tr("mean square"), tr("F"), tr("p"), tr("share")};
}

} // namespace

std::vector<SplitLine> splitLines(const VarianceSplit& split) {
    std::vector<SplitLine> lines;
    const double total = split.total.ss;
    const auto add = [&](SplitPart part, const std::optional<SplitRow>& row, int level) {
        if (row)
            lines.push_back(lineOf(splitPartText(part), *row, total, level));
    };
    add(SplitPart::Total, split.total, 0);
    add(SplitPart::Regression, split.regression, 1);
    add(SplitPart::Residual, split.residual, 1);
    add(SplitPart::LackOfFit, split.lackOfFit, 2);
    if (split.lackOfFitNaive && split.against != SplitPart::PureError)
        lines.push_back(lineOf(tr("lack of fit against pure error, pooled"), *split.lackOfFitNaive, 0, 3));
    if (split.lackOfFitAdjusted)
        lines.push_back(lineOf(tr("lack of fit after direction and run"), *split.lackOfFitAdjusted, 0, 3));
    add(SplitPart::PureError, split.pureError, 2);
    add(SplitPart::Hysteresis, split.hysteresis, 3);
    add(SplitPart::RunOffset, split.runOffset, 3);
    add(SplitPart::RunSlope, split.runSlope, 3);
    add(SplitPart::Repeatability, split.repeatability, 3);
    return lines;
}

QString splitTableText(const VarianceSplit& split, const QString& unit) {
    QStringList rows{headings(unit).join(QLatin1Char('\t'))};
    for (const SplitLine& line : splitLines(split))
        rows << cellsOf(line).join(QLatin1Char('\t')).replace(QChar(0x2212), QLatin1Char('-'));
    return rows.join(QLatin1Char('\n')) + QLatin1Char('\n');
}

SplitTable::SplitTable(const VarianceSplit& split, const QString& unit, QWidget* parent) : QDialog(parent) {
    setObjectName(QStringLiteral("splitTable"));
    setAttribute(Qt::WA_DeleteOnClose);
    setWindowTitle(tr("Variance split"));
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::card);
    auto* grid = new QGridLayout;
    grid->setHorizontalSpacing(space::card + space::step);
    grid->setVerticalSpacing(space::half + 1);
    const auto put = [&](int row, const QStringList& cells, QPalette::ColorRole role, int level) {
        for (int column = 0; column < cells.size(); ++column) {
            auto* cell = new QLabel(cells[column]);
            cell->setTextFormat(Qt::PlainText);
            cell->setForegroundRole(role);
            if (column == 0)
                cell->setContentsMargins(level * space::card, 0, 0, 0);
            grid->addWidget(cell, row, column, column == 0 ? Qt::AlignLeft : Qt::AlignRight);
        }
    };
    put(0, headings(unit), inkRole::quiet, 0);
    int row = 1;
    for (const SplitLine& line : splitLines(split))
        put(row++, cellsOf(line), QPalette::WindowText, line.level);
    all->addLayout(grid);
    auto* note = new QLabel(tr("F and p: the signal against the residual, the other sources against %1.").arg(splitPartText(split.against)));
    note->setForegroundRole(inkRole::quiet);
    note->setFont(textFont(TextRole::Small));
    all->addWidget(note);
    auto* buttons = new QDialogButtonBox;
    QPushButton* copy = buttons->addButton(tr("Copy"), QDialogButtonBox::ActionRole);
    copy->setObjectName(QStringLiteral("copySplit"));
    QPushButton* close = buttons->addButton(tr("Close"), QDialogButtonBox::RejectRole);
    close->setDefault(true);
    close->setFocus();
    connect(copy, &QPushButton::clicked, this, [text = splitTableText(split, unit)] { QApplication::clipboard()->setText(text); });
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    all->addWidget(buttons);
}

} // namespace spanwright
