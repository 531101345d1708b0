// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingRules.h"

#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

constexpr double certain = 0.01;

double twoSided(double t, double freedom) {
    return 2 * studentAbove(std::abs(t), freedom);
}

/// p of the gap between rising and falling: F against repeatability, or, where each was read once, Student's t of the
/// gaps over the set points, which takes a gap for real when it has one sign throughout.
std::optional<double> gapProbability(const VarianceSplit& split) {
    if (split.hysteresis->p)
        return split.hysteresis->p;
    double n = 0, sum = 0, squares = 0;
    for (const SetPointMeans& point : split.setPoints)
        if (point.rising && point.falling) {
            const double gap = *point.falling - *point.rising;
            ++n;
            sum += gap;
            squares += gap * gap;
        }
    const double variance = n > 2 ? (squares - sum * sum / n) / (n - 1) : 0;
    if (!(variance > 0))
        return std::nullopt;
    return twoSided(sum / n / std::sqrt(variance / n), n - 1);
}

void hysteresis(const FindingsInput& input, std::vector<Finding>& found) {
    if (!input.split->hysteresis)
        return;
    const auto p = gapProbability(*input.split);
    if (!p || !(*p < certain))
        return;
    Finding finding;
    finding.code = FindingCode::Hysteresis;
    finding.severity = Severity::Attention;
    // Where rising and falling are stated apart, their difference is no part of U.
    finding.remedy = input.record.choices.separateDirections ? Remedy::SeeReadings : Remedy::CarryToBudget;
    double gap = 0, setPoint = 0;
    for (const SetPointMeans& point : input.split->setPoints)
        if (point.rising && point.falling && std::abs(*point.falling - *point.rising) > gap) {
            gap = std::abs(*point.falling - *point.rising);
            setPoint = point.setPoint;
        }
    if (input.performance && input.performance->hysteresis && input.fit->direction == FitDirection::Indication) {
        const ProcessFigure& figure = *input.performance->hysteresis;
        setPoint = figure.setPoint;
        finding.figures = {{"value", figure.value}, {"percent_of_span", figure.percentOfSpan}, {"set_point", setPoint}};
    } else {
        finding.figures = {{"value", gap}, {"set_point", setPoint}};
    }
    if (input.split->hysteresis->f)
        finding.figures.push_back({"f", *input.split->hysteresis->f});
    finding.figures.push_back({"p", *p});
    for (std::size_t i = 0; i < input.sample.size() && finding.rows.size() < mostRowsNamed; ++i)
        if (input.sample.groupValue[static_cast<std::size_t>(input.sample.group[i])] == setPoint)
            finding.rows.push_back(idOf(input, i));
    found.push_back(finding);
}

Finding runFinding(const FindingsInput& input, FindingCode code, const RunLine& run) {
    Finding finding;
    finding.code = code;
    finding.severity = Severity::Attention;
    finding.remedy = Remedy::CheckRun;
    for (std::size_t i = 0; i < input.sample.size() && finding.rows.size() < mostRowsNamed; ++i)
        if (input.sample.run[i] == run.run)
            finding.rows.push_back(idOf(input, i));
    return finding;
}

/// The first run against the mean of the others, which lie closer to each other than to it: an item that was not
/// exercised.
std::optional<Finding> firstRun(const FindingsInput& input) {
    const auto& runs = input.split->runs;
    const auto& error = input.split->repeatability;
    if (runs.size() < 3 || !error || !error->ms || !(*error->ms > 0) || !input.residuals->weight.empty())
        return std::nullopt;
    double n = 0, mean = 0;
    for (std::size_t i = 1; i < runs.size(); ++i) {
        n += static_cast<double>(runs[i].n);
        mean += static_cast<double>(runs[i].n) * runs[i].offset;
    }
    mean /= n;
    const auto [low, high] = std::minmax_element(
        runs.begin() + 1, runs.end(), [](const RunLine& a, const RunLine& b) { return a.offset < b.offset; });
    const double shift = runs.front().offset - mean;
    const double t = shift / std::sqrt(*error->ms * (1 / n + 1 / static_cast<double>(runs.front().n)));
    const double p = twoSided(t, error->df);
    if (!(p < certain) || std::abs(shift) < 2 * (high->offset - low->offset))
        return std::nullopt;
    Finding finding = runFinding(input, FindingCode::FirstRunDiffers, runs.front());
    finding.figures = {{"value", shift}, {"p", p}, {"run", static_cast<double>(runs.front().run)}};
    return finding;
}

void runs(const FindingsInput& input, std::vector<Finding>& found) {
    const VarianceSplit& split = *input.split;
    if (split.runs.empty() || input.sample.run.empty())
        return;
    const auto larger = [](double a, double b) { return std::abs(a) < std::abs(b); };
    if (split.runOffset && split.runOffset->p && *split.runOffset->p < certain) {
        if (const auto first = firstRun(input)) {
            found.push_back(*first);
        } else {
            const auto worst =
                std::max_element(split.runs.begin(), split.runs.end(),
                                 [&](const RunLine& a, const RunLine& b) { return larger(a.offset, b.offset); });
            Finding finding = runFinding(input, FindingCode::RunZeroShift, *worst);
            finding.figures = {{"value", worst->offset},
                               {"run", static_cast<double>(worst->run)},
                               {"f", *split.runOffset->f},
                               {"p", *split.runOffset->p}};
            found.push_back(finding);
        }
    }
    if (split.runSlope && split.runSlope->p && *split.runSlope->p < certain) {
        const auto worst =
            std::max_element(split.runs.begin(), split.runs.end(),
                             [&](const RunLine& a, const RunLine& b) { return larger(a.slope, b.slope); });
        Finding finding = runFinding(input, FindingCode::RunGainChange, *worst);
        const double overRange = worst->slope * (input.sample.groupValue.back() - input.sample.groupValue.front());
        finding.figures = {{"value", overRange},
                           {"run", static_cast<double>(worst->run)},
                           {"f", *split.runSlope->f},
                           {"p", *split.runSlope->p}};
        found.push_back(finding);
    }
}

} // namespace

void addRunFindings(const FindingsInput& input, std::vector<Finding>& found) {
    if (!input.split)
        return;
    hysteresis(input, found);
    runs(input, found);
}

} // namespace spanwright
