// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/FitEffect.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PlotSubject.h"

#include <QCoreApplication>
#include <QGridLayout>
#include <QLabel>

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("FitEffect", text);
}

const Coefficient* coefficientNamed(const PhaseEvaluation* phase, const std::string& name) {
    if (!phase || !phase->fit)
        return nullptr;
    const auto& all = phase->fit->coefficients;
    const auto found = std::find_if(all.begin(), all.end(), [&](const Coefficient& c) { return c.name == name; });
    return found == all.end() ? nullptr : &*found;
}

QString coefficientName(const std::string& name, const PhaseEvaluation* phase) {
    const QString text = QString::fromStdString(name);
    const bool straight = phase && phase->fit && (phase->fit->function.family == FunctionFamily::Line || phase->fit->function.family == FunctionFamily::Proportional);
    return straight && name == "b1" ? tr("slope %1").arg(text) : straight && name == "b0" ? tr("constant %1").arg(text) : text;
}

/// To one digit beyond the first that its uncertainty touches.
QString coefficientText(const Coefficient* c) {
    if (!c)
        return QStringLiteral("–");
    if (!(c->standardUncertainty > 0))
        return significantText(c->value, 8);
    return fixedText(c->value, std::clamp(1 - static_cast<int>(std::floor(std::log10(c->standardUncertainty))), 0, 20));
}

double largestResidual(const PhaseEvaluation* phase) {
    double largest = std::numeric_limits<double>::quiet_NaN();
    for (std::size_t i = 0; phase && i < phase->rows.size(); ++i)
        if (!phase->rows.excluded[i] && std::isfinite(phase->rows.residual[i]) && !(std::abs(phase->rows.residual[i]) <= std::abs(largest)))
            largest = phase->rows.residual[i];
    return largest;
}

} // namespace

QString inUnit(const QString& name, const QString& unit) {
    return unit.isEmpty() ? name : name + QStringLiteral(", ") + unit;
}

double largestHalfWidth(const PhaseEvaluation* phase) {
    double largest = std::numeric_limits<double>::quiet_NaN();
    for (const BandPoint& point : phase ? phase->curve : std::vector<BandPoint>{})
        if (point.inside)
            largest = std::fmax(largest, (point.newReading.high - point.newReading.low) / 2);
    return largest;
}

std::vector<EffectRow> effectRows(const PhaseEvaluation* before, const PhaseEvaluation* after, const Item& item) {
    std::vector<EffectRow> rows;
    std::vector<std::string> names;
    for (const PhaseEvaluation* phase : {before, after})
        for (const Coefficient& c : phase && phase->fit ? phase->fit->coefficients : std::vector<Coefficient>{})
            if (std::find(names.begin(), names.end(), c.name) == names.end())
                names.push_back(c.name);
    for (const std::string& name : names)
        rows.push_back({coefficientName(name, after ? after : before), coefficientText(coefficientNamed(before, name)), coefficientText(coefficientNamed(after, name))});
    const auto figure = [&](const QString& name, auto&& of) { rows.push_back({name, of(before), of(after)}); };
    const bool forward = !after || !after->fit || after->fit->direction == FitDirection::Indication;
    const QString unit = QString::fromStdString(forward ? item.indication.unit : item.reference.unit);
    const PhaseEvaluation* named = after ? after : before;
    const bool weighted = named && named->fit && named->fit->weights != Weights::Equal;
    figure(weighted ? tr("weighted residual s, no unit") : inUnit(tr("residual s"), unit), [](const PhaseEvaluation* p) { return p && p->fit ? significantText(p->fit->residualSd, 3) : QStringLiteral("–"); });
    figure(inUnit(tr("U of a new reading, largest"), unit), [](const PhaseEvaluation* p) { return significantText(largestHalfWidth(p), 3); });
    figure(inUnit(tr("largest residual"), unit), [](const PhaseEvaluation* p) { return significantText(largestResidual(p), 3); });
    figure(tr("readings used"), [](const PhaseEvaluation* p) { return p && p->fit ? QString::number(p->fit->used) : QStringLiteral("–"); });
    return rows;
}

EffectTable::EffectTable(QWidget* parent) : QWidget(parent), grid_(new QGridLayout(this)) {
    setObjectName(QStringLiteral("effectTable"));
    grid_->setContentsMargins(0, 0, 0, 0);
    grid_->setHorizontalSpacing(space::card);
    grid_->setVerticalSpacing(space::half);
    grid_->setColumnStretch(0, 1);
}

void EffectTable::show(const QString& before, const QString& after, const std::vector<EffectRow>& rows) {
    while (QLayoutItem* item = grid_->takeAt(0)) {
        delete item->widget();
        delete item;
    }
    text_.clear();
    const auto put = [&](int row, int column, const QString& words, QPalette::ColorRole role) {
        auto* cell = new QLabel(words);
        cell->setTextFormat(Qt::PlainText);
        cell->setForegroundRole(role);
        // A window that is too low for its sentences takes nothing from these lines.
        cell->setMinimumHeight(cell->fontMetrics().height());
        if (column > 0)
            cell->setAlignment(Qt::AlignRight | Qt::AlignVCenter);
        grid_->addWidget(cell, row, column);
        text_ += (column == 0 ? QString() : QStringLiteral("\t")) + words + (column == 2 ? QStringLiteral("\n") : QString());
    };
    put(0, 0, {}, inkRole::quiet);
    put(0, 1, before, inkRole::quiet);
    put(0, 2, after, inkRole::quiet);
    int row = 1;
    for (const EffectRow& effect : rows) {
        put(row, 0, effect.name, inkRole::quiet);
        put(row, 1, effect.before, QPalette::WindowText);
        put(row++, 2, effect.after, effect.before == effect.after ? QPalette::WindowText : inkRole::accent);
    }
    setAccessibleDescription(text_);
}

} // namespace spanwright
