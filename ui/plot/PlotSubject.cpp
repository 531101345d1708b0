// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/PlotSubject.h"

#include "core/fit/fitFunction.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("PlotSubject", text);
}

QString numberAndUnit(const std::optional<Decimal>& value, const std::string& unit) {
    if (!value)
        return {};
    return unit.empty() ? typedText(*value) : typedText(*value) + QChar(QChar::Nbsp) + QString::fromStdString(unit);
}

} // namespace

const std::vector<double>& PlotSubject::x() const {
    return fit == FitDirection::Indication ? phase->rows.reference : phase->rows.indication;
}

const std::vector<double>& PlotSubject::y() const {
    return fit == FitDirection::Indication ? phase->rows.indication : phase->rows.reference;
}

std::shared_ptr<const PhaseEvaluation> phaseOf(const std::shared_ptr<const Evaluation>& evaluation, Phase phase) {
    if (!evaluation || !evaluation->phase(phase))
        return nullptr;
    return {evaluation, evaluation->phase(phase)};
}

PlotSubject subjectOf(const Record& record, const std::shared_ptr<const Evaluation>& evaluation) {
    return {phaseOf(evaluation, record.choices.phase), record.item, record.readings, record.exclusions, directionOf(record.choices)};
}

PlotPoints pointsOf(const PhaseEvaluation& phase) {
    PlotPoints points;
    points.ids = phase.rows.ids;
    points.directions = phase.rows.directions;
    points.excluded = phase.rows.excluded;
    return points;
}

int residualDecimals(const PlotSubject& subject) {
    const int typed = (subject.fit == FitDirection::Indication ? subject.readings->indication() : subject.readings->reference()).scale();
    if (!subject.phase || !subject.phase->fit || !(subject.phase->fit->residualSd > 0) || subject.phase->fit->weights != Weights::Equal)
        return typed;
    const int needed = 1 - static_cast<int>(std::floor(std::log10(subject.phase->fit->residualSd)));
    return std::clamp(needed, std::max(typed, 0), typed + 3);
}

AxisRange rangeOfUsed(const std::vector<double>& values, const PhaseEvaluation& phase) {
    AxisRange range{std::numeric_limits<double>::infinity(), -std::numeric_limits<double>::infinity()};
    const bool allExcluded = phase.excluded == phase.rows.size();
    for (std::size_t i = 0; i < values.size(); ++i) {
        if (!std::isfinite(values[i]) || (phase.rows.excluded[i] && !allExcluded))
            continue;
        range.low = std::min(range.low, values[i]);
        range.high = std::max(range.high, values[i]);
    }
    return range.low <= range.high ? range : AxisRange{0, 0};
}

QString readingText(const PlotSubject& subject, ReadingId id) {
    const std::size_t row = subject.readings->indexOf(id);
    if (row == subject.readings->size())
        return {};
    const Reading reading = subject.readings->row(row);
    QStringList parts{tr("Reading %1").arg(id)};
    if (reading.run > 0)
        parts << tr("run %1").arg(reading.run);
    if (reading.direction != Direction::Unknown)
        parts << directionText(reading.direction);
    parts << numberAndUnit(reading.reference, subject.item.reference.unit) << numberAndUnit(reading.indication, subject.item.indication.unit);
    parts.removeAll(QString());
    QString text = parts.join(QStringLiteral(", "));
    const std::size_t at = subject.phase ? subject.phase->rows.indexOf(id) : 0;
    if (subject.phase && at < subject.phase->rows.size() && std::isfinite(subject.phase->rows.residual[at]))
        text += QStringLiteral("\n") + tr("residual %1 %2").arg(fixedText(subject.phase->rows.residual[at], residualDecimals(subject), SignShown::Both),
                                                                QString::fromStdString(subject.ordinate().unit));
    if (const Exclusion* exclusion = subject.exclusions->find(id)) {
        QString why = reasonText(exclusion->reason);
        if (!exclusion->words.empty())
            why = exclusion->reason == ExclusionReason::Other ? QString::fromStdString(exclusion->words)
                                                              : why + QStringLiteral(": ") + QString::fromStdString(exclusion->words);
        text += QStringLiteral("\n") + tr("excluded: %1").arg(why);
    }
    return text;
}

QString quantityText(const Quantity& quantity, FitDirection role) {
    if (!quantity.name.empty())
        return QString::fromStdString(quantity.name);
    return role == FitDirection::Reference ? tr("reference") : tr("indication");
}

QString withUnit(const QString& name, const QString& unit) {
    return unit.isEmpty() ? name : name + QLatin1Char(' ') + unit;
}

QString readingsText(std::size_t count) {
    return count == 1 ? tr("1 reading") : tr("%1 readings").arg(count);
}

QString residualText(const Fit& fit, const PlotSubject& subject) {
    QString s = significantText(fit.residualSd, 2);
    if (fit.weights == Weights::Equal && !subject.ordinate().unit.empty())
        s += QChar(QChar::Nbsp) + QString::fromStdString(subject.ordinate().unit);
    if (fit.weights != Weights::Equal)
        s = tr("%1 (no unit)").arg(s);
    const QString name = fit.weights == Weights::Equal ? tr("residual s") : tr("weighted residual s");
    QString text = fit.degreesOfFreedom == 1 ? tr("%1 = %2, 1 degree of freedom").arg(name, s)
                                             : tr("%1 = %2, %3 degrees of freedom").arg(name, s).arg(fit.degreesOfFreedom);
    if (fit.chiSquared && fit.chiSquaredP)
        text += tr(", χ² = %1, p = %2").arg(significantText(*fit.chiSquared, 4), pText(*fit.chiSquaredP)).replace(QStringLiteral("= <"), QStringLiteral("<"));
    const QString settled = convergenceText(fit.convergence);
    return settled.isEmpty() ? text : text + QStringLiteral(", ") + settled;
}

QString sentenceCase(QString text) {
    if (!text.isEmpty())
        text[0] = text[0].toUpper();
    return text;
}

} // namespace spanwright
