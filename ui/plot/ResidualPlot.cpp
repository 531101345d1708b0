// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/ResidualPlot.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PartStrokes.h"
#include "ui/words/Words.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

ResidualPlot::ResidualPlot(QWidget* parent) : PlotView(parent) {
    setObjectName(QStringLiteral("residualPlot"));
    setDescriber([this](ReadingId id) { return readingText(subject_, id); });
    rebuild();
}

void ResidualPlot::setSubject(PlotSubject subject) {
    subject_ = std::move(subject);
    rebuild();
}

void ResidualPlot::setView(ResidualView view) {
    if (view != view_)
        forgetZoom(); // a part of one axis is no part of another
    view_ = view;
    rebuild();
}

void ResidualPlot::showPart(std::optional<SplitPart> part) {
    part_ = part;
    if (part && *part != SplitPart::Regression && view_ != ResidualView::Reference) {
        forgetZoom();
        view_ = ResidualView::Reference;
    }
    rebuild();
}

void ResidualPlot::showSelection(const std::set<ReadingId>& selection) {
    setSelection(selection);
    annotate();
}

void ResidualPlot::addBands(Content& content, AxisRange& y) const {
    for (const BandPoint& point : subject_.phase->curve) {
        if (!std::isfinite(point.newReading.high - point.newReading.low))
            continue;
        const double x = view_ == ResidualView::Fitted ? point.value : point.x;
        content.inner.low.emplace_back(x, point.mean.low - point.value);
        content.inner.high.emplace_back(x, point.mean.high - point.value);
        content.outer.low.emplace_back(x, point.newReading.low - point.value);
        content.outer.high.emplace_back(x, point.newReading.high - point.value);
        y.low = std::min(y.low, content.outer.low.back().y());
        y.high = std::max(y.high, content.outer.high.back().y());
    }
}

void ResidualPlot::rebuild() {
    Content content;
    if (subject_.empty() || !subject_.phase->fit) {
        content.emptyText = subject_.phase && subject_.phase->notFitted ? errorText(*subject_.phase->notFitted)
                                                                        : tr("Residuals appear here once a function is fitted.");
        setContent(std::move(content));
        annotate();
        return;
    }
    const PhaseEvaluation& phase = *subject_.phase;
    ResidualAbscissa abscissa = residualAbscissa(view_, subject_);
    content.emptyText = abscissa.emptyText;
    content.points = pointsOf(phase);
    content.points.x = std::move(abscissa.x);
    content.points.y = phase.rows.residual;
    content.points.x.resize(phase.rows.size(), std::numeric_limits<double>::quiet_NaN());
    AxisRange y = rangeOfUsed(content.points.y, phase);
    const double used = std::max({std::abs(y.low), std::abs(y.high), 1e-300});
    if (view_ == ResidualView::Reference || view_ == ResidualView::Fitted)
        addBands(content, y);
    // An excluded reading that is not far off widens the picture; one far off stands at its edge, so the rest stays readable.
    for (std::size_t i = 0; i < phase.rows.size(); ++i)
        if (phase.rows.excluded[i] && std::abs(phase.rows.residual[i]) <= 4 * used) {
            y.low = std::min(y.low, phase.rows.residual[i]);
            y.high = std::max(y.high, phase.rows.residual[i]);
        }
    const double half = std::max(std::abs(y.low), std::abs(y.high));
    content.y = widened({-half, half}, 0.08);
    content.x = widened(rangeOfUsed(content.points.x, phase), view_ == ResidualView::Run ? 0.2 : 0.035);
    if (view_ == ResidualView::Reference && !phase.curve.empty()) {
        content.x.low = std::min(content.x.low, phase.curve.front().x);
        content.x.high = std::max(content.x.high, phase.curve.back().x);
    }
    if (view_ == ResidualView::Run)
        content.x = {0.4, static_cast<double>(std::max<std::size_t>(abscissa.names.size(), 1)) + 0.6};
    content.xUnit = abscissa.unit;
    content.xNames = abscissa.names;
    content.yUnit = phase.fit->weights == Weights::Equal || phase.rows.size() > 0 ? QString::fromStdString(subject_.ordinate().unit) : QString();
    content.ySign = TickSign::Both;
    setContent(std::move(content));
    annotate();
}

void ResidualPlot::annotate() {
    std::vector<PlotStroke> strokes;
    std::vector<PlotNote> notes;
    if (!subject_.empty() && subject_.phase->fit && ink().emptyText().isEmpty()) {
        strokes.push_back({.points = {{-1e300, 0}, {1e300, 0}}, .color = scheme().quiet, .width = 1.1});
        strokes.front().points = {{frame().x.low - frame().x.span() * 50, 0}, {frame().x.high + frame().x.span() * 50, 0}};
        if (view_ == ResidualView::Normal)
            strokes.push_back(normalLine(subject_));
        if (part_ && view_ == ResidualView::Reference)
            for (PlotStroke& stroke : strokesOf(*part_, subject_))
                strokes.push_back(std::move(stroke));
        if (part_ && view_ == ResidualView::Reference)
            notes.push_back({partExplained(*part_, subject_), Qt::AlignLeft | Qt::AlignTop, true});
        else
            notes = notesOfExcluded();
    }
    setStrokes(std::move(strokes));
    setNotes(std::move(notes));
    setSummary(tr("Plot of residuals, %1").arg(residualViewText(view_, subject_)), summary());
}

std::vector<PlotNote> ResidualPlot::notesOfExcluded() const {
    std::vector<PlotNote> notes;
    const PhaseEvaluation& phase = *subject_.phase;
    QStringList numbers;
    for (std::size_t i = 0; i < phase.rows.size() && numbers.size() < 6; ++i)
        if (phase.rows.excluded[i])
            numbers << QString::number(phase.rows.ids[i]);
    if (phase.excluded == 1) {
        const Exclusion* exclusion = subject_.exclusions->find(numbers.value(0).toLongLong());
        QString why;
        if (exclusion)
            why = exclusion->words.empty() ? reasonText(exclusion->reason) : QString::fromStdString(exclusion->words);
        notes.push_back({tr("%1 excluded: %2").arg(numbers.value(0), why), Qt::AlignRight | Qt::AlignTop, false});
    } else if (phase.excluded > 1) {
        const QString more = phase.excluded > static_cast<std::size_t>(numbers.size()) ? QStringLiteral(" …") : QString();
        notes.push_back({tr("excluded: %1").arg(numbers.join(QStringLiteral(", ")) + more), Qt::AlignRight | Qt::AlignTop, false});
    }
    return notes;
}

QString ResidualPlot::summary() const {
    if (!ink().emptyText().isEmpty() || subject_.empty())
        return ink().emptyText();
    const PhaseEvaluation& phase = *subject_.phase;
    std::size_t worst = phase.rows.size();
    for (std::size_t i = 0; i < phase.rows.size(); ++i)
        if (!phase.rows.excluded[i] && std::isfinite(phase.rows.residual[i]) &&
            (worst == phase.rows.size() || std::abs(phase.rows.residual[i]) > std::abs(phase.rows.residual[worst])))
            worst = i;
    QString text = tr("Residual standard deviation %1.").arg(significantText(phase.fit->residualSd, 2));
    if (worst < phase.rows.size())
        text += QLatin1Char(' ') + tr("Largest residual: %1").arg(readingText(subject_, phase.rows.ids[worst])).replace(QLatin1Char('\n'), QStringLiteral(", "));
    if (part_)
        text += QLatin1Char(' ') + partExplained(*part_, subject_);
    return text;
}

} // namespace spanwright
