// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/PerformanceDialog.h"

#include "core/evaluate/Evaluation.h"
#include "core/performance/LoadingRange.h"
#include "ui/bench/FiguresTable.h"
#include "ui/commands/Workbench.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QApplication>
#include <QClipboard>
#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

constexpr int PercentDecimals = 4; ///< of force figures, whose limits have three

QString dash() {
    return QStringLiteral("–");
}

QString percent(const std::optional<double>& value, SignShown sign = SignShown::Minus) {
    return value ? fixedText(*value, PercentDecimals, sign) : dash();
}

QString largest(const std::optional<ForceFigures::Largest>& figure, SignShown sign = SignShown::Minus) {
    return figure ? fixedText(figure->value, PercentDecimals, sign) : dash();
}

QString place(const std::optional<ForceFigures::Largest>& figure) {
    return figure ? placeText(figure->force) : dash();
}

QLabel* heading(const QString& text) {
    auto* label = new QLabel(text);
    label->setFont(textFont(TextRole::Heading));
    return label;
}

/// Why figures that readings in both directions, or repeated ones, would give are not there.
QStringList missing(const ProcessFigures& figures) {
    QStringList lines;
    if (!figures.hysteresis)
        lines << PerformanceDialog::tr("No hysteresis: no set point was approached from both directions.");
    else if (!figures.hysteresisInCycle)
        lines << PerformanceDialog::tr("No hysteresis within a run: no run approached a set point from both directions.");
    if (!figures.nonRepeatability)
        lines << PerformanceDialog::tr("No non-repeatability: no set point was read more than once in the same direction.");
    if (!figures.nonLinearityIndependent)
        lines << PerformanceDialog::tr("No non-linearity: it takes three set points.");
    return lines;
}

QString runsText(const std::vector<int>& runs) {
    QStringList numbers;
    for (const int run : runs)
        numbers << QString::number(run);
    return numbers.join(QStringLiteral(", "));
}

QString forceText(const ForceFigures& figures, const Item& item) {
    const auto with = [](double value, const std::string& unit) {
        return significantText(value, 3) + (unit.empty() ? QString() : QLatin1Char(' ') + QString::fromStdString(unit));
    };
    const auto from = [&](double computed) {
        const LoadingRange range = loadingRange(figures, computed);
        const QString force = with(range.from, item.reference.unit);
        return range.lowestApplied ? PerformanceDialog::tr("from %1, the lowest force applied").arg(force) : PerformanceDialog::tr("from %1").arg(force);
    };
    QStringList lines;
    lines << PerformanceDialog::tr("In % of the mean deflection of the runs %1, each in another position.").arg(runsText(figures.series.rotated));
    lines << (figures.series.again ? PerformanceDialog::tr("Repeatability from the runs %1 and %2 in one position.").arg(*figures.series.first).arg(*figures.series.again)
                                   : PerformanceDialog::tr("No repeatability: no two runs were taken in one position."));
    if (!figures.reversibility)
        lines << PerformanceDialog::tr("No reversibility: no rotated run has falling readings.");
    lines << (figures.zero ? PerformanceDialog::tr("Zero error f₀ = %1 % of the largest deflection.").arg(fixedText(*figures.zero, PercentDecimals))
                           : PerformanceDialog::tr("No zero error: no run was read at force 0 both before and after."));
    lines << PerformanceDialog::tr("Function of degree %1 (interpolation error: degree %2), residual s = %3.")
                 .arg(figures.degree)
                 .arg(figures.interpolationDegree)
                 .arg(with(figures.residualSd, item.indication.unit));
    lines << PerformanceDialog::tr("Lower limit factor %1, or %2. Loading range class AA: %3; class A: %4.")
                 .arg(with(figures.lowerLimitFactor, item.indication.unit), with(figures.lowerLimitForce, item.reference.unit),
                      from(figures.lowestForceClassAA), from(figures.lowestForceClassA));
    return lines.join(QLatin1Char('\n'));
}

/// Figures of the process industry, one row each; a figure that the readings cannot give is a dash.
QStringList processHeadings(const Item& item) {
    return {PerformanceDialog::tr("figure"), headed(PerformanceDialog::tr("value"), QString::fromStdString(item.indication.unit)), PerformanceDialog::tr("value\n% of span"),
            headed(PerformanceDialog::tr("at"), QString::fromStdString(item.reference.unit))};
}

std::vector<FiguresRow> processRows(const ProcessFigures& figures) {
    const std::pair<QString, const std::optional<ProcessFigure>*> all[] = {
        {PerformanceDialog::tr("largest measured error (means)"), &figures.measuredErrorMax},
        {PerformanceDialog::tr("inaccuracy, most positive reading"), &figures.inaccuracyHigh},
        {PerformanceDialog::tr("inaccuracy, most negative reading"), &figures.inaccuracyLow},
        {PerformanceDialog::tr("hysteresis (means)"), &figures.hysteresis},
        {PerformanceDialog::tr("hysteresis within one run"), &figures.hysteresisInCycle},
        {PerformanceDialog::tr("non-repeatability (largest spread)"), &figures.nonRepeatability},
        {PerformanceDialog::tr("non-linearity, terminal-based"), &figures.nonLinearityTerminal},
        {PerformanceDialog::tr("non-linearity, independent"), &figures.nonLinearityIndependent},
        {PerformanceDialog::tr("non-linearity, zero-based"), &figures.nonLinearityZeroBased}};
    std::vector<FiguresRow> rows;
    for (const auto& [name, figure] : all)
        if (*figure)
            rows.push_back({{name, significantText((*figure)->value, 3), fixedText((*figure)->percentOfSpan, 3), placeText((*figure)->setPoint)}});
        else
            rows.push_back({{name, dash(), dash(), dash()}, 0, true});
    return rows;
}

/// Force figures at every force, under them the largest of each and the force at which it occurs.
QStringList forceHeadings(const Item& item) {
    return {headed(PerformanceDialog::tr("force"), QString::fromStdString(item.reference.unit)),
            headed(PerformanceDialog::tr("mean deflection"), QString::fromStdString(item.indication.unit)),
            PerformanceDialog::tr("reproduc-\nibility b, %"), PerformanceDialog::tr("repeat-\nability b′, %"), PerformanceDialog::tr("interpolation\nerror, %"),
            PerformanceDialog::tr("reversi-\nbility v, %")};
}

std::vector<FiguresRow> forceRows(const ForceFigures& figures) {
    std::vector<FiguresRow> rows;
    for (const ForceStep& step : figures.steps)
        rows.push_back({{placeText(step.force), significantText(step.mean, 7), percent(step.reproducibility), percent(step.repeatability),
                         percent(step.interpolation, SignShown::Both), percent(step.reversibility)}});
    rows.push_back({{PerformanceDialog::tr("largest"), {}, largest(figures.reproducibility), largest(figures.repeatability),
                     largest(figures.interpolation, SignShown::Both), largest(figures.reversibility)}});
    rows.push_back({{PerformanceDialog::tr("at"), {}, place(figures.reproducibility), place(figures.repeatability), place(figures.interpolation),
                     place(figures.reversibility)}, 0, true});
    return rows;
}

} // namespace

PerformanceDialog::PerformanceDialog(Workbench& workbench, QWidget* parent)
    : SheetDialog(QStringLiteral("performanceDialog"), tr("Performance figures"), parent), workbench_(workbench),
      process_(new FiguresTable(QStringLiteral("processFigures"), tr("Performance figures"))), processNote_(quietNote(QStringLiteral("processNote"))),
      processHead_(heading(tr("In % of span"))), forceHead_(heading(tr("Force figures"))),
      force_(new FiguresTable(QStringLiteral("forceFigures"), tr("Force figures"))), forceNote_(quietNote(QStringLiteral("forceNote"))),
      noForce_(quietNote(QStringLiteral("noForce"))) {
    auto* sides = new QHBoxLayout;
    sides->setSpacing(2 * space::card);
    const auto column = [&](std::initializer_list<QWidget*> widgets) {
        auto* made = new QVBoxLayout;
        made->setSpacing(space::step);
        for (QWidget* widget : widgets)
            made->addWidget(widget);
        made->addStretch(1);
        sides->addLayout(made);
    };
    column({processHead_, process_, processNote_});
    column({forceHead_, force_, forceNote_});
    body()->addLayout(sides);
    body()->addWidget(noForce_);
    connect(addButton(tr("Copy"), QDialogButtonBox::ActionRole, QStringLiteral("copyPerformance")), &QPushButton::clicked, this, &PerformanceDialog::copy);
    addClose()->setDefault(true);
    connect(&workbench_, &Workbench::evaluationChanged, this, &PerformanceDialog::refresh);
    refresh();
    fitToContents();
    process_->setFocus();
}

void PerformanceDialog::copy() {
    QStringList tables;
    for (const FiguresTable* table : {process_, force_})
        if (!table->isHidden())
            tables << table->text();
    QApplication::clipboard()->setText(tables.join(QLatin1Char('\n')));
}

void PerformanceDialog::refresh() {
    const Record& record = workbench_.record();
    const PhaseEvaluation* phase = workbench_.evaluation()->phase(record.choices.phase);
    const ProcessFigures* figures = phase && phase->performance ? &*phase->performance : nullptr;
    process_->setVisible(figures != nullptr);
    if (figures) {
        process_->setFigures(processHeadings(record.item), processRows(*figures));
        QStringList lines{tr("Readings %1; output span %2. Terms of IEC 61298-2 and IEC 62828.")
                              .arg(phaseText(record.choices.phase), placeText(figures->span) + QLatin1Char(' ') + QString::fromStdString(record.item.indication.unit))};
        lines << missing(*figures);
        for (const Warning& warning : figures->warnings)
            lines << warningText(warning);
        processNote_->setText(lines.join(QLatin1Char('\n')));
    } else {
        processNote_->setText(tr("There are no performance figures: they take readings at two set points or more, and at no more than 2000."));
    }
    showForce(phase);
}

void PerformanceDialog::showForce(const PhaseEvaluation* phase) {
    const Record& record = workbench_.record();
    const bool wanted = !record.plan.positions.empty();
    const ForceFigures* figures = phase && phase->force ? &*phase->force : nullptr;
    for (QWidget* widget : std::initializer_list<QWidget*>{forceHead_, force_, forceNote_, processHead_})
        widget->setVisible(figures != nullptr);
    noForce_->setVisible(figures == nullptr);
    if (figures) {
        force_->setFigures(forceHeadings(record.item), forceRows(*figures));
        forceNote_->setText(forceText(*figures, record.item));
    } else {
        noForce_->setText(wanted ? tr("There are no force figures: they take runs in two positions or more, three forces, and a function that fits.")
                                 : tr("Force figures are added when the plan on the Job stage says how the item is turned from run to run."));
    }
}

} // namespace spanwright
