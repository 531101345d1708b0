// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/DegreeTable.h"

#include "ui/bench/FiguresTable.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PlotSubject.h"

#include <QApplication>
#include <QClipboard>
#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

#include <cmath>

namespace spanwright {

namespace {

QString ratioText(const DegreeStep& step) {
    if (!step.ratio || !step.e74 || !std::isfinite(*step.e74))
        return QStringLiteral("–");
    return DegreeTable::tr("%1, needs %2").arg(significantText(*step.ratio, 3), significantText(*step.e74, 3));
}

QString changeText(const DegreeStep& step, const QString& inUnit) {
    return step.degree == 1 ? QStringLiteral("–")
                            : DegreeTable::tr("%1 at %2").arg(significantText(step.change, 2), withUnit(significantText(step.changeAt, 4), inUnit));
}

/// What speaks against a degree, or nothing.
QString objectionText(const DegreeStep& step) {
    if (!step.monotonic)
        return DegreeTable::tr("turns: not for reading back");
    return step.worth ? QString() : DegreeTable::tr("gains too little");
}

QString nameOf(int degree) {
    return degree == 1 ? DegreeTable::tr("Straight line") : DegreeTable::tr("Degree %1").arg(degree);
}

FiguresRow rowOf(const DegreeStep& step, const DegreeTable::Question& question) {
    QString name = nameOf(step.degree);
    if (step.degree == question.now)
        name += DegreeTable::tr(" (in use)");
    else if (step.degree == question.ladder.suggested)
        name += DegreeTable::tr(" (suggested)");
    const QString none = QStringLiteral("–");
    return {{name, significantText(step.residualSd, 3), step.f ? significantText(*step.f, 3) : none, step.p ? pText(*step.p) : none,
             step.aicc ? fixedText(*step.aicc, 1) : none, ratioText(step), changeText(step, question.inUnit), objectionText(step)}};
}

/// Which degree is suggested, and why.
QString suggestionText(const DegreeTable::Question& question) {
    const DegreeLadder& ladder = question.ladder;
    const QString words = DegreeTable::tr("Suggested: degree %1, the lowest of three (F test at 5 %: %2, AICc: %3, ASTM E74: %4) that gains enough and only rises or falls.")
                              .arg(ladder.suggested)
                              .arg(ladder.byPartialF)
                              .arg(ladder.byAicc ? QString::number(*ladder.byAicc) : QStringLiteral("–"))
                              .arg(ladder.byE74);
    const QString gain = question.resolution > 0 ? DegreeTable::tr("A degree gains enough when s falls by at least the resolution/√12 = %1.")
                                                       .arg(withUnit(significantText(question.resolution / std::sqrt(12.0), 2), question.unit))
                                                 : DegreeTable::tr("The resolution is not stated, so nobody can say whether a gain is worth it: state it on Job.");
    return words + QLatin1Char('\n') + gain;
}

} // namespace

DegreeTable::DegreeTable(const Question& question, QWidget* parent)
    : SheetDialog(QStringLiteral("degreeTable"), tr("Choosing a degree"), parent), table_(new FiguresTable(QStringLiteral("degrees"), tr("Degrees"))),
      use_(addButton(tr("&Use this degree"), QDialogButtonBox::AcceptRole, QStringLiteral("useDegree"))), now_(question.now) {
    std::vector<FiguresRow> rows;
    for (const DegreeStep& step : question.ladder.steps)
        rows.push_back(rowOf(step, question));
    table_->setSelectionMode(QAbstractItemView::SingleSelection);
    table_->setObjectionColumn(7);
    table_->setFigures({tr("function"), headed(tr("s"), question.unit), tr("F of last term"), tr("p"), tr("AICc"), tr("ratio of s, ASTM E74"),
                        headed(tr("largest change"), question.unit), tr("but")},
                       rows);
    QLabel* note = quietNote(QStringLiteral("degreeNote"));
    note->setText(suggestionText(question));
    body()->addWidget(table_, 1);
    body()->addWidget(note);
    connect(addButton(tr("Copy"), QDialogButtonBox::ActionRole, QStringLiteral("copyDegrees")), &QPushButton::clicked, this,
            [this] { QApplication::clipboard()->setText(table_->text()); });
    addClose();
    connect(table_, &QTableWidget::cellDoubleClicked, use_, &QPushButton::click);
    connect(table_, &QTableWidget::currentCellChanged, this, &DegreeTable::follow);
    table_->setCurrentCell(question.ladder.suggested - 1, 0);
    follow();
    fitToContents();
    table_->setFocus();
}

int DegreeTable::chosen() const {
    return table_->currentRow() + 1;
}

void DegreeTable::follow() {
    use_->setEnabled(chosen() > 0 && chosen() != now_);
}

void DegreeTable::accept() {
    emit degreeChosen(chosen());
    QDialog::accept();
}

} // namespace spanwright
