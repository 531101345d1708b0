// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/LinePlot.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

/// Share of the picture's height that the departures may take when the enlargement is found by the plot.
constexpr double shareForDepartures = 0.16;

bool hasConstant(const FunctionChoice& function) {
    return function.family != FunctionFamily::Proportional && function.family != FunctionFamily::PolynomialNoConstant;
}

void include(AxisRange& range, double value) {
    if (!std::isfinite(value))
        return;
    range.low = std::min(range.low, value);
    range.high = std::max(range.high, value);
}

} // namespace

LinePlot::LinePlot(QWidget* parent) : PlotView(parent) {
    setObjectName(QStringLiteral("linePlot"));
    setDescriber([this](ReadingId id) { return readingText(subject_, id); });
    rebuild();
}

void LinePlot::setSubject(PlotSubject subject) {
    subject_ = std::move(subject);
    rebuild();
}

void LinePlot::setEnlargement(Enlargement enlargement) {
    enlargement_ = enlargement;
    rebuild();
}

void LinePlot::showMean(bool shown) {
    meanShown_ = shown;
    annotate();
}

void LinePlot::showSelection(const std::set<ReadingId>& selection) {
    selection_ = selection;
    setSelection(selection);
    annotate();
}

/// The largest power of ten with which the departures stay a small part of the picture.
int LinePlot::suitableFactor() const {
    const PhaseEvaluation& phase = *subject_.phase;
    double largest = 0;
    for (std::size_t i = 0; i < phase.rows.size(); ++i)
        if (!phase.rows.excluded[i] && std::isfinite(phase.rows.residual[i]))
            largest = std::max(largest, std::abs(phase.rows.residual[i]));
    for (const BandPoint& point : phase.curve)
        if (point.inside && std::isfinite(point.newReading.high))
            largest = std::max(largest, point.newReading.high - point.value);
    const double span = rangeOfUsed(subject_.y(), phase).span();
    if (!(largest > 0) || !(span > 0))
        return 1;
    int factor = 1;
    while (factor < 1000000 && largest * factor * 10 <= span * shareForDepartures)
        factor *= 10;
    return factor;
}

void LinePlot::rebuild() {
    Content content;
    if (subject_.empty()) {
        content.emptyText = tr("Nothing to draw yet. Type the first reading on the left, paste a block, or drop a CSV file here.");
        setContent(std::move(content));
        annotate();
        return;
    }
    const PhaseEvaluation& phase = *subject_.phase;
    factor_ = !phase.fit ? 1 : enlargement_ ? *enlargement_ : suitableFactor();
    emit enlargementChanged(factor_);
    content.points = pointsOf(phase);
    content.points.x = subject_.x();
    content.points.y = subject_.y();
    for (std::size_t i = 0; i < phase.rows.size() && factor_ != 1; ++i)
        if (std::isfinite(phase.rows.fitted[i]))
            content.points.y[i] = drawn(content.points.y[i], phase.rows.fitted[i]);
    AxisRange y = rangeOfUsed(content.points.y, phase);
    for (const BandPoint& point : phase.curve) {
        if (!std::isfinite(point.value))
            continue;
        content.line.emplace_back(point.x, point.value);
        include(y, point.value);
        if (!std::isfinite(point.newReading.high) || !std::isfinite(point.newReading.low))
            continue;
        content.inner.low.emplace_back(point.x, drawn(point.mean.low, point.value));
        content.inner.high.emplace_back(point.x, drawn(point.mean.high, point.value));
        content.outer.low.emplace_back(point.x, drawn(point.newReading.low, point.value));
        content.outer.high.emplace_back(point.x, drawn(point.newReading.high, point.value));
        include(y, content.outer.low.back().y());
        include(y, content.outer.high.back().y());
    }
    content.x = widened(rangeOfUsed(subject_.x(), phase), 0.035);
    if (!content.line.empty()) {
        include(content.x, content.line.front().x());
        include(content.x, content.line.back().x());
    }
    content.y = widened(y, 0.05);
    content.xUnit = QString::fromStdString(subject_.abscissa().unit);
    content.yUnit = QString::fromStdString(subject_.ordinate().unit);
    setContent(std::move(content));
    annotate();
}

double LinePlot::level() const {
    const PhaseEvaluation& phase = *subject_.phase;
    if (!phase.fit || !hasConstant(phase.fit->function))
        return 0;
    double sum = 0;
    std::size_t n = 0;
    for (std::size_t i = 0; i < phase.rows.size(); ++i)
        if (!phase.rows.excluded[i] && std::isfinite(subject_.y()[i])) {
            sum += subject_.y()[i];
            ++n;
        }
    return n > 0 ? sum / static_cast<double>(n) : 0;
}

void LinePlot::annotate() {
    std::vector<PlotStroke> strokes;
    std::vector<PlotNote> notes;
    QString summary = ink().emptyText();
    if (!subject_.empty()) {
        const PhaseEvaluation& phase = *subject_.phase;
        summary = tr("%1, %2 excluded.").arg(readingsText(phase.rows.size())).arg(phase.excluded);
        if (phase.fit) {
            const QString equation = equationText(*phase.fit, subject_.item);
            const QString spread = residualText(*phase.fit, subject_);
            summary += QLatin1Char(' ') + equation + QStringLiteral("; ") + spread;
            if (factor_ != 1) {
                notes.push_back({tr("departures from the line drawn ×%1").arg(factor_), Qt::AlignLeft | Qt::AlignTop, false});
                summary += QLatin1Char(' ') + notes.back().text + QLatin1Char('.');
            }
        } else if (phase.notFitted) {
            notes.push_back({errorText(*phase.notFitted), Qt::AlignLeft | Qt::AlignTop, false});
            summary += QLatin1Char(' ') + notes.back().text;
        }
        if (meanShown_)
            meanLine(strokes);
        const std::size_t row = selection_.size() == 1 ? phase.rows.indexOf(*selection_.begin()) : phase.rows.size();
        if (row < phase.rows.size() && phase.fit && std::isfinite(phase.rows.residual[row])) {
            distancesOf(row, strokes);
            notes.push_back({distancesText(row), Qt::AlignRight | Qt::AlignBottom, true});
            summary += QLatin1Char(' ') + notes.back().text + QLatin1Char('.');
        }
    }
    setStrokes(std::move(strokes));
    setNotes(std::move(notes));
    setSummary(tr("Plot of %1 against %2")
                   .arg(quantityText(subject_.ordinate(), FitDirection::Indication), quantityText(subject_.abscissa(), FitDirection::Reference)),
               summary);
}

void LinePlot::meanLine(std::vector<PlotStroke>& strokes) const {
    const double mean = level();
    strokes.push_back({.points = {{frame().x.low, mean}, {frame().x.high, mean}},
                       .color = scheme().quiet,
                       .width = 1.2,
                       .style = Qt::DashLine,
                       .label = mean == 0 ? tr("zero") : tr("mean"),
                       .labelOffset = {-60, -10}});
}

/// Total, explained and residual distance of a reading, as three upright lines beside it.
void LinePlot::distancesOf(std::size_t row, std::vector<PlotStroke>& strokes) const {
    const PhaseEvaluation& phase = *subject_.phase;
    const double x = subject_.x()[row], y = subject_.y()[row], fitted = phase.rows.fitted[row], mean = level();
    if (!meanShown_)
        meanLine(strokes);
    const double step = frame().x.span() / std::max(1.0, frame().area.width()) * 9;
    const bool right = x < (frame().x.low + frame().x.high) / 2;
    const double out = right ? step : -step;
    const auto upright = [&](double at, double from, double to, const QColor& color, const QString& word, double offset) {
        const bool roomy = std::abs(frame().toY(from) - frame().toY(to)) > 30;
        strokes.push_back({.points = {{at, from}, {at, (from + to) / 2}}, .color = color, .width = 2.4, .label = roomy ? word : QString(), .labelOffset = {offset, 0}});
        strokes.push_back({.points = {{at, (from + to) / 2}, {at, to}}, .color = color, .width = 2.4});
    };
    upright(x + out, mean, fitted, scheme().accent, tr("explained"), right ? 8 : -66);
    upright(x + out, fitted, drawn(y, fitted), scheme().warning, tr("residual"), right ? 8 : -58);
    upright(x - out, mean, drawn(y, fitted), scheme().quiet, tr("total"), right ? -42 : 8);
}

QString LinePlot::distancesText(std::size_t row) const {
    const double y = subject_.y()[row], fitted = subject_.phase->rows.fitted[row], mean = level();
    const int decimals = residualDecimals(subject_);
    const auto signedText = [&](double value) { return fixedText(value, decimals, SignShown::Both); };
    return tr("Reading %1: total %2 = explained %3 and residual %4 %5")
        .arg(QString::number(subject_.phase->rows.ids[row]), signedText(y - mean), signedText(fitted - mean), signedText(y - fitted),
             QString::fromStdString(subject_.ordinate().unit));
}

} // namespace spanwright
