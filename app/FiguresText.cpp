// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/FiguresText.h"

#include "app/TextTable.h"
#include "core/performance/LoadingRange.h"
#include "core/split/SplitLines.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

#include <cmath>

namespace spanwright {

namespace {

struct Text {
    Q_DECLARE_TR_FUNCTIONS(FiguresText)
};

QString tr(const char* text) {
    return Text::tr(text);
}

QString figure(double value, int digits = 6) {
    return significantText(value, digits);
}

QString interval(double low, double high) {
    return figure(low) + QStringLiteral(" … ") + figure(high);
}

QString percent(double probability) {
    return QString::number(100 * probability, 'g', 6) + QStringLiteral(" %");
}

QString withUnit(const QString& name, const std::string& unit) {
    return unit.empty() ? name : name + QStringLiteral(" / ") + QString::fromStdString(unit);
}

QString headText(const Record& record, const PhaseEvaluation& e) {
    QString text;
    const QString item = QString::fromStdString(record.item.description);
    if (!item.isEmpty())
        text += item + (record.item.serial.empty() ? QString() : tr(", serial %1").arg(QString::fromStdString(record.item.serial))) +
                QLatin1Char('\n');
    const QString phase = phaseText(e.phase);
    text += phase.left(1).toUpper() + phase.mid(1) + QStringLiteral(": ") +
            tr("%1 readings used, %2 excluded, %3 set points").arg(e.fit->used).arg(e.excluded).arg(e.fit->setPoints) +
            QStringLiteral("\n\n");
    const QString function = functionText(e.fit->function);
    return text + function.left(1).toUpper() + function.mid(1) + QLatin1Char('\n') +
           equationText(*e.fit, record.item) + QStringLiteral("\n\n");
}

QString coefficientsText(const Fit& fit) {
    TextTable table({tr("Coefficient"), tr("unit"), tr("value"), tr("standard uncertainty"), tr("%1 interval").arg(percent(fit.coverage)),
                     tr("%1, all together").arg(percent(fit.coverage))});
    for (const Coefficient& c : fit.coefficients)
        table.add({QString::fromStdString(c.name), QString::fromStdString(c.unit), figure(c.value, 10), figure(c.standardUncertainty, 4),
                   interval(c.low, c.high), interval(c.jointLow, c.jointHigh)});
    return table.text();
}

/// Readings that a robust fit weighs down, on one line.
QString weighedDownText(const Record& record, const Fit& fit) {
    if (fit.method != Method::Robust)
        return {};
    QStringList rows;
    for (const WeighedDown& reading : fit.weighedDown)
        rows << tr("%1 (weight %2)").arg(reading.row + 1).arg(figure(reading.weight, 2));
    const QString name = record.choices.robust == RobustWeight::Huber ? tr("Robust after Huber") : tr("Robust, bisquare");
    return rows.isEmpty() ? tr("%1, for comparison only: no reading is weighed down.").arg(name) + QStringLiteral("\n\n")
                          : tr("%1, for comparison only: weighs down row %2.").arg(name, rows.join(QStringLiteral(", "))) + QStringLiteral("\n\n");
}

QString spreadText(const Record& record, const PhaseEvaluation& e) {
    const Fit& fit = *e.fit;
    const std::string& unit = fit.direction == FitDirection::Indication ? record.item.indication.unit : record.item.reference.unit;
    QString text = tr("Residual s = %1").arg(figure(fit.residualSd, 5));
    if (fit.weights == Weights::Equal && !unit.empty())
        text += QLatin1Char(' ') + QString::fromStdString(unit);
    text += tr(" with %1 degrees of freedom").arg(fit.degreesOfFreedom);
    if (fit.chiSquared)
        text += tr("; χ² = %1").arg(figure(*fit.chiSquared, 5));
    if (fit.chiSquared && fit.chiSquaredP)
        text += QStringLiteral(", p = ") + pText(*fit.chiSquaredP);
    text += QLatin1Char('\n');
    if (const QString settled = convergenceText(fit.convergence); !settled.isEmpty())
        text += tr("The fit %1.").arg(settled) + QLatin1Char('\n');
    if (fit.correlated)
        text += fit.sharedError == SharedError::Fit
                    ? tr("The calibration error that the readings of a standard share is in the fit, and not in the budget of a value read back.")
                    : tr("Covariances between readings, from %1, are in the fit.").arg(QString::fromStdString(record.uncertaintyMatrix.source));
    return text.trimmed() + QStringLiteral("\n\n") + weighedDownText(record, fit);
}

QString degreesText(const DegreeLadder& ladder) {
    TextTable table({tr("Degree"), tr("s"), tr("F"), tr("p"), tr("AICc"), tr("ratio of s"), tr("ASTM E74 needs"), tr("largest change"), tr("at"), {}});
    for (const DegreeStep& step : ladder.steps)
        table.add({QString::number(step.degree), figure(step.residualSd, 4), step.f ? figure(*step.f, 4) : QString(), step.p ? pText(*step.p) : QString(),
                   step.aicc ? figure(*step.aicc, 5) : QString(), step.ratio ? figure(*step.ratio, 4) : QString(),
                   step.e74 && std::isfinite(*step.e74) ? figure(*step.e74, 4) : QString(), step.degree > 1 ? figure(step.change, 3) : QString(),
                   step.degree > 1 ? figure(step.changeAt, 6) : QString(),
                   !step.monotonic ? tr("turns in the range") : step.worth ? QString() : tr("gain below resolution/√12")});
    return table.text() + tr("Suggested degree: %1.").arg(ladder.suggested) + QStringLiteral("\n\n");
}

QString nameOf(const SplitLine& line) {
    switch (line.test) {
    case SplitLine::Test::Chain: return splitPartText(line.part);
    case SplitLine::Test::Adjusted: return tr("  adjusted for direction and run");
    case SplitLine::Test::Naive: break;
    }
    return tr("  naive, against pure error");
}

QString splitText(const VarianceSplit& split) {
    TextTable table({tr("Variance split"), tr("sum of squares"), tr("df"), tr("mean square"), tr("F"), tr("p")});
    for (const SplitLine& line : splitLines(split)) {
        const SplitRow& row = line.row;
        table.add({nameOf(line), figure(row.ss), QString::number(row.df), row.ms ? figure(*row.ms, 5) : QString(), row.f ? figure(*row.f, 4) : QString(),
                   row.p ? pText(*row.p) : QString()});
    }
    QString text = table.text();
    if (split.lackOfFit && split.lackOfFit->f)
        text += tr("F is taken against %1.").arg(splitPartText(split.against)) + QLatin1Char('\n');
    return text + QLatin1Char('\n');
}

QString toleranceText(const Fit& fit, double x, double share) {
    const Interval tolerance = toleranceAt(fit, x, share);
    return interval(tolerance.low, tolerance.high);
}

QString answersText(const Record& record, const PhaseEvaluation& e) {
    const QString coverage = percent(e.fit->coverage);
    const bool forward = e.fit->direction == FitDirection::Indication;
    const bool ofMean = record.choices.repeats != 1 && !e.at.empty();
    const bool tolerance = !e.at.empty() && e.fit->covarianceScale == CovarianceScale::Residuals && e.fit->degreesOfFreedom > 0;
    QStringList heads{tr("At ") + withUnit(tr("reference"), record.item.reference.unit), withUnit(tr("indication"), record.item.indication.unit),
                      tr("function, %1").arg(coverage), tr("new reading, %1").arg(coverage)};
    if (ofMean)
        heads << (record.choices.repeats ? tr("mean of %1, %2").arg(*record.choices.repeats).arg(coverage) : tr("exact mean, %1").arg(coverage));
    if (tolerance)
        heads << tr("%1 of all readings").arg(percent(record.choices.toleranceShare.toDouble()));
    TextTable at(heads);
    for (const BandPoint& p : e.at) {
        QStringList cells{figure(forward ? p.x : p.value, 10), figure(forward ? p.value : p.x, 10), interval(p.mean.low, p.mean.high),
                          interval(p.newReading.low, p.newReading.high)};
        if (ofMean)
            cells << (p.meanOfRepeats ? interval(p.meanOfRepeats->low, p.meanOfRepeats->high) : QString());
        if (tolerance)
            cells << toleranceText(*e.fit, p.x, record.choices.toleranceShare.toDouble());
        at.add(cells);
    }
    TextTable read({tr("Read ") + withUnit(tr("indication"), record.item.indication.unit), withUnit(tr("reference"), record.item.reference.unit),
                    tr("standard uncertainty"), tr("%1 interval").arg(coverage), tr("U of the budget"), tr("k"), {}});
    for (const ReadValue& r : e.read) {
        const StatedValue stated = statedValue(r, e.budget.readBack);
        read.add({figure(r.indication, 10), r.reference ? figure(*r.reference, 10) : tr("none"), figure(r.standardUncertainty, 4),
                  interval(r.low, r.high), QString::fromStdString(stated.expanded), QString::fromStdString(stated.coverageFactor), valueStateText(r.state)});
    }
    QString text;
    for (const TextTable* table : {&at, &read})
        if (!table->empty())
            text += table->text() + QLatin1Char('\n');
    return text;
}

QString performanceText(const Record& record, const ProcessFigures& figures) {
    const std::pair<QString, const std::optional<ProcessFigure>*> all[] = {
        {tr("largest measured error (means)"), &figures.measuredErrorMax},
        {tr("inaccuracy, most positive reading"), &figures.inaccuracyHigh},
        {tr("inaccuracy, most negative reading"), &figures.inaccuracyLow},
        {tr("hysteresis (means)"), &figures.hysteresis},
        {tr("hysteresis within one run"), &figures.hysteresisInCycle},
        {tr("non-repeatability (largest spread)"), &figures.nonRepeatability},
        {tr("non-linearity, terminal-based"), &figures.nonLinearityTerminal},
        {tr("non-linearity, independent"), &figures.nonLinearityIndependent},
        {tr("non-linearity, zero-based"), &figures.nonLinearityZeroBased}};
    TextTable table({tr("Performance figure"), withUnit(tr("value"), record.item.indication.unit), tr("% of span"), withUnit(tr("at"), record.item.reference.unit)});
    for (const auto& [name, one] : all)
        if (*one)
            table.add({name, figure((*one)->value, 3), fixedText((*one)->percentOfSpan, 3), placeText((*one)->setPoint)});
    return table.text() + QLatin1Char('\n');
}

QString forceText(const Record& record, const ForceFigures& figures) {
    const auto percent4 = [](const std::optional<double>& value) { return value ? fixedText(*value, 4) : QStringLiteral("–"); };
    const auto from = [&](double computed) {
        const LoadingRange range = loadingRange(figures, computed);
        const QString force = figure(range.from, 3) + QLatin1Char(' ') + QString::fromStdString(record.item.reference.unit);
        return range.lowestApplied ? tr("from %1, the lowest force applied").arg(force) : tr("from %1").arg(force);
    };
    TextTable table({withUnit(tr("Force"), record.item.reference.unit), withUnit(tr("mean deflection"), record.item.indication.unit), tr("b / %"), tr("b′ / %"),
                     tr("interpolation / %"), tr("v / %")});
    for (const ForceStep& step : figures.steps)
        table.add({placeText(step.force), figure(step.mean, 7), percent4(step.reproducibility), percent4(step.repeatability), percent4(step.interpolation),
                   percent4(step.reversibility)});
    QString text = table.text();
    if (figures.zero)
        text += tr("Zero error f0 = %1 %").arg(percent4(figures.zero)) + QLatin1Char('\n');
    return text + tr("Lower limit factor %1 %2, or %3 %4; loading range class AA: %5; class A: %6; function of degree %7\n\n")
                      .arg(figure(figures.lowerLimitFactor, 3), QString::fromStdString(record.item.indication.unit), figure(figures.lowerLimitForce, 3),
                           QString::fromStdString(record.item.reference.unit), from(figures.lowestForceClassAA), from(figures.lowestForceClassA))
                      .arg(figures.degree);
}

QString findingsText(const Record& record, const PhaseEvaluation& e) {
    if (e.findings.empty())
        return {};
    QString text = tr("Findings") + QLatin1Char('\n');
    for (const Finding& finding : e.findings) {
        const FindingWords words = findingWords(finding, record);
        text += QStringLiteral("  ") + words.sentence;
        if (!words.figures.isEmpty())
            text += QStringLiteral(" (") + words.figures + QLatin1Char(')');
        text += QLatin1Char('\n');
    }
    return text + QLatin1Char('\n');
}

QString rowsText(const Record& record, const RowFigures& rows) {
    TextTable table({tr("Row"), tr("reference"), tr("indication"), tr("fitted"), tr("residual"), tr("standardised"), tr("studentised"),
                     tr("leverage"), tr("Cook"), {}});
    for (std::size_t i = 0; i < rows.size(); ++i) {
        const InfluenceFigures influence = rows.influenceOf(i);
        table.add({QString::number(record.readings->indexOf(rows.ids[i]) + 1), figure(rows.reference[i], 10), figure(rows.indication[i], 10),
                   figure(rows.fitted[i], 10), figure(rows.residual[i], 4), figure(influence.standardised, 4),
                   figure(influence.studentised, 4), figure(rows.leverage[i], 4), figure(influence.cook, 4),
                   rows.excluded[i] != 0 ? tr("excluded") : QString()});
    }
    return table.text() + QLatin1Char('\n');
}

} // namespace

QString figuresText(const Record& record, const PhaseEvaluation& evaluation, RowsShown rows) {
    QString text = headText(record, evaluation) + coefficientsText(*evaluation.fit) + spreadText(record, evaluation);
    if (evaluation.degrees)
        text += degreesText(*evaluation.degrees);
    if (evaluation.split)
        text += splitText(*evaluation.split);
    if (evaluation.performance)
        text += performanceText(record, *evaluation.performance);
    if (evaluation.force)
        text += forceText(record, *evaluation.force);
    text += answersText(record, evaluation) + findingsText(record, evaluation);
    if (rows == RowsShown::Yes)
        text += rowsText(record, evaluation.rows);
    for (const Warning& warning : evaluation.warnings)
        text += warningText(warning) + QLatin1Char('\n');
    return text;
}

} // namespace spanwright
