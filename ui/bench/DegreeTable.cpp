// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/DegreeTable.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/look/PaddedDelegate.h"
#include "ui/plot/PlotSubject.h"

#include <QDialogButtonBox>
#include <QHeaderView>
#include <QLabel>
#include <QPushButton>
#include <QTableWidget>
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
QString verdictText(const DegreeStep& step) {
    if (!step.monotonic)
        return DegreeTable::tr("turns: not for reading back");
    return step.worth ? QString() : DegreeTable::tr("gains too little");
}

QString nameOf(int degree) {
    return degree == 1 ? DegreeTable::tr("Straight line") : DegreeTable::tr("Degree %1").arg(degree);
}

} // namespace

DegreeTable::DegreeTable(const Question& question, QWidget* parent) : QDialog(parent), table_(new QTableWidget) {
    setObjectName(QStringLiteral("degreeTable"));
    setAttribute(Qt::WA_DeleteOnClose);
    setWindowTitle(tr("Choosing a degree"));
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::step);
    fill(question);
    all->addWidget(table_);
    const DegreeLadder& ladder = question.ladder;
    QString words = tr("Suggested: degree %1, the lowest of three (F test at 5 %: %2, AICc: %3, ASTM E74: %4) that gains enough and only rises or falls.")
                        .arg(ladder.suggested)
                        .arg(ladder.byPartialF)
                        .arg(ladder.byAicc ? QString::number(*ladder.byAicc) : QStringLiteral("–"))
                        .arg(ladder.byE74);
    words += QLatin1Char('\n');
    words += question.resolution > 0 ? tr("A degree gains enough when s falls by at least the resolution/√12 = %1.")
                                           .arg(withUnit(significantText(question.resolution / std::sqrt(12.0), 2), question.unit))
                                     : tr("The resolution is not stated, so nobody can say whether a gain is worth it: state it on Job.");
    auto* note = new QLabel(words);
    note->setObjectName(QStringLiteral("degreeNote"));
    note->setTextFormat(Qt::PlainText);
    note->setWordWrap(true);
    note->setForegroundRole(inkRole::quiet);
    all->addWidget(note);
    auto* buttons = new QDialogButtonBox;
    use_ = buttons->addButton(tr("&Use this degree"), QDialogButtonBox::AcceptRole);
    use_->setObjectName(QStringLiteral("useDegree"));
    buttons->addButton(tr("Close"), QDialogButtonBox::RejectRole);
    connect(buttons, &QDialogButtonBox::accepted, this, [this] {
        emit degreeChosen(table_->currentRow() + 1);
        accept();
    });
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    connect(table_, &QTableWidget::cellDoubleClicked, use_, &QPushButton::click);
    const auto follow = [this, now = question.now] { use_->setEnabled(table_->currentRow() >= 0 && table_->currentRow() + 1 != now); };
    connect(table_, &QTableWidget::currentCellChanged, this, follow);
    follow();
    all->addWidget(buttons);
}

void DegreeTable::fill(const Question& question) {
    const QStringList heads{tr("function"), withUnit(tr("s"), question.unit), tr("F of last term"), tr("p"), tr("AICc"), tr("ratio of s, ASTM E74"),
                            withUnit(tr("largest change"), question.unit), tr("but")};
    table_->setObjectName(QStringLiteral("degrees"));
    table_->setAccessibleName(tr("Degrees"));
    table_->setColumnCount(static_cast<int>(heads.size()));
    table_->setRowCount(static_cast<int>(question.ladder.steps.size()));
    table_->setHorizontalHeaderLabels(heads);
    for (int column = 0; column < heads.size(); ++column)
        table_->horizontalHeaderItem(column)->setTextAlignment(Qt::AlignVCenter | (column == 0 || column + 1 == heads.size() ? Qt::AlignLeft : Qt::AlignRight));
    table_->verticalHeader()->hide();
    table_->setShowGrid(false);
    table_->setEditTriggers(QAbstractItemView::NoEditTriggers);
    table_->setSelectionBehavior(QAbstractItemView::SelectRows);
    table_->setSelectionMode(QAbstractItemView::SingleSelection);
    table_->setTabKeyNavigation(false);
    table_->setItemDelegate(new PaddedDelegate(table_));
    table_->horizontalHeader()->setHighlightSections(false);
    table_->verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    table_->verticalHeader()->setDefaultSectionSize(QFontMetrics(textFont(TextRole::Body)).height() + 10);
    for (int row = 0; row < table_->rowCount(); ++row) {
        const DegreeStep& step = question.ladder.steps[static_cast<std::size_t>(row)];
        QString name = nameOf(step.degree);
        if (step.degree == question.now)
            name += tr(" (in use)");
        else if (step.degree == question.ladder.suggested)
            name += tr(" (suggested)");
        const QStringList cells{name,
                                significantText(step.residualSd, 3),
                                step.f ? significantText(*step.f, 3) : QStringLiteral("–"),
                                step.p ? pText(*step.p) : QStringLiteral("–"),
                                step.aicc ? fixedText(*step.aicc, 1) : QStringLiteral("–"),
                                ratioText(step),
                                changeText(step, question.inUnit),
                                verdictText(step)};
        for (int column = 0; column < cells.size(); ++column) {
            auto* item = new QTableWidgetItem(cells[column]);
            item->setTextAlignment(Qt::AlignVCenter | (column == 0 || column == cells.size() - 1 ? Qt::AlignLeft : Qt::AlignRight));
            if (column == cells.size() - 1)
                item->setForeground(scheme().warning);
            table_->setItem(row, column, item);
        }
    }
    table_->resizeColumnsToContents();
    int width = 4, height = table_->horizontalHeader()->sizeHint().height() + 6;
    for (int column = 0; column < table_->columnCount(); ++column) {
        table_->setColumnWidth(column, table_->columnWidth(column) + space::step);
        width += table_->columnWidth(column);
    }
    height += table_->rowCount() * table_->verticalHeader()->defaultSectionSize();
    table_->setMinimumHeight(height);
    table_->setMinimumWidth(std::min(width, 1000));
    table_->setCurrentCell(question.ladder.suggested - 1, 0);
}

} // namespace spanwright
