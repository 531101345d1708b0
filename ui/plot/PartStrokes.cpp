// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/PartStrokes.h"

#include "ui/look/Look.h"
#include "ui/look/NumberText.h"

#include <QCoreApplication>

#include <cmath>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("PartStrokes", text);
}

std::vector<PlotStroke> setPointMeans(const VarianceSplit& split) {
    PlotStroke means{.points = {}, .color = scheme().lackOfFit, .width = 2, .dots = true, .label = tr("means"), .labelOffset = {8, -14}};
    for (const SetPointMeans& at : split.setPoints)
        means.points.emplace_back(at.setPoint, at.mean);
    return {means};
}

std::vector<PlotStroke> directionMeans(const VarianceSplit& split) {
    PlotStroke rising{.points = {}, .color = scheme().hysteresis, .width = 2, .dots = true, .label = tr("rising ▲"), .labelOffset = {8, 12}};
    PlotStroke falling{.points = {}, .color = scheme().hysteresis, .width = 2, .style = Qt::DashLine, .dots = true, .label = tr("falling ▼"), .labelOffset = {8, -12}};
    for (const SetPointMeans& at : split.setPoints) {
        if (at.rising)
            rising.points.emplace_back(at.setPoint, *at.rising);
        if (at.falling)
            falling.points.emplace_back(at.setPoint, *at.falling);
    }
    return {rising, falling};
}

std::vector<PlotStroke> runLines(const VarianceSplit& split, bool sloping, const AxisRange& x) {
    std::vector<PlotStroke> lines;
    const double middle = split.setPoints.empty() ? (x.low + x.high) / 2 : (split.setPoints.front().setPoint + split.setPoints.back().setPoint) / 2;
    const Qt::PenStyle styles[] = {Qt::SolidLine, Qt::DashLine, Qt::DotLine, Qt::DashDotLine};
    for (const RunLine& run : split.runs) {
        const double slope = sloping ? run.slope : 0;
        lines.push_back({.points = {{x.low, run.offset + slope * (x.low - middle)}, {x.high, run.offset + slope * (x.high - middle)}},
                         .color = scheme().runs,
                         .width = 2,
                         .style = styles[lines.size() % 4],
                         .label = tr("run %1").arg(run.run),
                         .labelOffset = {-46.0 - 52.0 * static_cast<double>(lines.size()), -11}});
    }
    return lines;
}

std::vector<PlotStroke> plusMinus(double s, const AxisRange& x) {
    const auto level = [&](double y, const QString& label) {
        return PlotStroke{.points = {{x.low, y}, {x.high, y}}, .color = scheme().repeatability, .width = 2, .style = Qt::DashLine, .label = label, .labelOffset = {-40, y > 0 ? -9.0 : 9.0}};
    };
    return {level(s, tr("+s")), level(-s, tr("−s"))};
}

} // namespace

QColor colorOf(SplitPart part) {
    switch (part) {
    case SplitPart::LackOfFit: return scheme().lackOfFit;
    case SplitPart::Hysteresis: return scheme().hysteresis;
    case SplitPart::RunOffset: return scheme().runs;
    case SplitPart::RunSlope: {
        QColor paler = scheme().runs;
        paler.setAlphaF(0.6F);
        return paler;
    }
    case SplitPart::Total:
    case SplitPart::Regression: return scheme().accent;
    case SplitPart::Residual:
    case SplitPart::PureError:
    case SplitPart::Repeatability: break;
    }
    return scheme().repeatability;
}

std::vector<PlotStroke> strokesOf(SplitPart part, const PlotSubject& subject) {
    if (!subject.phase || !subject.phase->split)
        return {};
    const VarianceSplit& split = *subject.phase->split;
    const AxisRange x = rangeOfUsed(subject.x(), *subject.phase);
    switch (part) {
    case SplitPart::LackOfFit: return setPointMeans(split);
    case SplitPart::Hysteresis: return directionMeans(split);
    case SplitPart::RunOffset: return runLines(split, false, x);
    case SplitPart::RunSlope: return runLines(split, true, x);
    case SplitPart::PureError:
    case SplitPart::Repeatability: {
        const std::optional<SplitRow>& row = part == SplitPart::PureError ? split.pureError : split.repeatability;
        return row && row->ms ? plusMinus(std::sqrt(*row->ms), x) : std::vector<PlotStroke>{};
    }
    case SplitPart::Total:
    case SplitPart::Regression:
    case SplitPart::Residual: break;
    }
    return {};
}

QString partExplained(SplitPart part, const PlotSubject&) {
    switch (part) {
    case SplitPart::LackOfFit: return tr("Lack of fit: the mean at each set point, which a right function would bring to zero");
    case SplitPart::Hysteresis: return tr("Hysteresis: the means of rising and of falling readings at each set point");
    case SplitPart::RunOffset: return tr("Run offset: each run lies a little higher or lower as a whole");
    case SplitPart::RunSlope: return tr("Run slope: each run rises a little more or less steeply");
    case SplitPart::Repeatability: return tr("Repeatability: what is left, drawn as plus and minus its standard deviation");
    case SplitPart::PureError: return tr("Pure error: the spread within a set point, drawn as plus and minus its standard deviation");
    case SplitPart::Regression: return tr("Signal: what the function explains");
    case SplitPart::Total:
    case SplitPart::Residual: break;
    }
    return tr("Noise: what the function does not explain");
}

PlotStroke normalLine(const PlotSubject& subject) {
    double sum = 0;
    double n = 0;
    const RowFigures& rows = subject.phase->rows;
    for (std::size_t i = 0; i < rows.size(); ++i)
        if (!rows.excluded[i] && std::isfinite(rows.residual[i])) {
            sum += rows.residual[i] * rows.residual[i];
            ++n;
        }
    const double s = n > 1 ? std::sqrt(sum / (n - 1)) : 0;
    return {.points = {{-4, -4 * s}, {4, 4 * s}}, .color = scheme().accent, .width = 1.5};
}

} // namespace spanwright
