// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingRules.h"

#include "core/diagnose/Autocorrelation.h"
#include "core/diagnose/EqualVariances.h"
#include "core/diagnose/Normality.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

constexpr double certain = 0.01;

/// Standard deviations within set points and how they go with the level: exponent b of s = c·|x|^b by least squares on logarithms,
/// and the variance at the highest level over that at the lowest (ISO 8466-1).
struct ScatterTrend {
    double exponent = 0, varianceRatio = 1;
    std::size_t levels = 0;
};

ScatterTrend scatterTrend(const Sample& sample, const std::vector<double>& deviations) {
    std::vector<double> squares(sample.groupValue.size(), 0.0), count(sample.groupValue.size(), 0.0);
    for (std::size_t i = 0; i < sample.size(); ++i) {
        squares[static_cast<std::size_t>(sample.group[i])] += deviations[i] * deviations[i];
        ++count[static_cast<std::size_t>(sample.group[i])];
    }
    ScatterTrend trend;
    double n = 0, sumX = 0, sumY = 0, sumXX = 0, sumXY = 0;
    std::optional<double> lowest, highest;
    for (std::size_t g = 0; g < squares.size(); ++g) {
        if (!(squares[g] > 0))
            continue;
        const double variance = squares[g] / count[g];
        if (!lowest)
            lowest = variance;
        highest = variance;
        ++trend.levels;
        if (!(std::abs(sample.groupValue[g]) > 0))
            continue;
        const double x = std::log(std::abs(sample.groupValue[g])), y = std::log(variance) / 2;
        ++n;
        sumX += x;
        sumY += y;
        sumXX += x * x;
        sumXY += x * y;
    }
    const double spread = sumXX - sumX * sumX / n;
    if (n > 1 && spread > 0)
        trend.exponent = (sumXY - sumX * sumY / n) / spread;
    if (lowest && *lowest > 0)
        trend.varianceRatio = *highest / *lowest;
    return trend;
}

void scatterGrows(const FindingsInput& input, const std::vector<double>& deviations, std::vector<Finding>& found) {
    if (input.fit->weights != Weights::Equal || input.fit->method != Method::LeastSquares)
        return;
    Finding finding;
    finding.code = FindingCode::ScatterGrows;
    finding.severity = Severity::Attention;
    finding.remedy = Remedy::ChooseWeights;
    if (deviations.empty()) {
        const auto& test = input.diagnostics ? input.diagnostics->breuschPagan : std::nullopt;
        if (!test || !(test->p < certain) || input.sample.size() < 20 || contains(found, FindingCode::Outlier) ||
            (input.diagnostics->linearity && input.diagnostics->linearity->p < certain))
            return;
        finding.figures = {{"p", test->p}};
        found.push_back(finding);
        return;
    }
    std::vector<double> level(input.sample.size());
    for (std::size_t i = 0; i < level.size(); ++i)
        level[i] = std::abs(input.sample.groupValue[static_cast<std::size_t>(input.sample.group[i])]);
    const auto test = breuschPagan(deviations, {level});
    const ScatterTrend trend = scatterTrend(input.sample, deviations);
    if (!test || !(test->p < certain) || trend.levels < 3 || !(trend.varianceRatio > 1) || !(trend.exponent > 0.2))
        return;
    finding.figures = {{"variance_ratio", trend.varianceRatio}, {"exponent", trend.exponent}, {"p", test->p}};
    found.push_back(finding);
}

/// Neighbours in the order taken. Curvature and hysteresis make neighbours alike too, so where there are repeats the correlation is
/// that of what is left after them.
void autocorrelated(const FindingsInput& input, const std::vector<double>& deviations, std::vector<Finding>& found) {
    const double n = static_cast<double>(input.sample.size());
    if (!input.diagnostics || n < 10)
        return;
    double r = 0, p = 1;
    if (!deviations.empty()) {
        const auto lag = lagOneAutocorrelation(std::span<const double>(deviations));
        r = lag.value_or(0);
        p = 0.5 * std::erfc(r * std::sqrt(n / 2));
    } else if (input.diagnostics->durbinWatsonP && input.diagnostics->lag1Autocorrelation) {
        r = *input.diagnostics->lag1Autocorrelation;
        p = *input.diagnostics->durbinWatsonP;
        if (input.diagnostics->linearity && input.diagnostics->linearity->p < certain)
            return;
    }
    if (!(p < certain) || r < 0.2)
        return;
    Finding finding;
    finding.code = FindingCode::Autocorrelated;
    finding.severity = r > 0.5 ? Severity::Serious : Severity::Attention;
    finding.figures = {{"lag_1", r}, {"effective_readings", n * (1 - r) / (1 + r)}, {"p", p}};
    finding.remedy = Remedy::TakeMoreReadings;
    found.push_back(finding);
}

void nonNormal(const FindingsInput& input, const std::vector<double>& deviations, std::vector<Finding>& found) {
    if (contains(found, FindingCode::Outlier) || contains(found, FindingCode::ScatterGrows) || !input.diagnostics)
        return;
    const bool structured = contains(found, FindingCode::LackOfFit) || contains(found, FindingCode::Hysteresis) ||
                            contains(found, FindingCode::RunZeroShift) || contains(found, FindingCode::FirstRunDiffers);
    std::optional<TestResult> test = input.diagnostics->shapiroWilk;
    if (structured)
        test = deviations.empty() ? std::nullopt : shapiroWilk(deviations.size() <= 5000 ? deviations : std::vector<double>{});
    if (!test || !(test->p < certain) || input.sample.size() < 8)
        return;
    Finding finding;
    finding.code = FindingCode::NonNormal;
    finding.severity = Severity::Note;
    finding.figures = {{"w", test->statistic}, {"p", test->p}};
    finding.remedy = Remedy::SeeReadings;
    found.push_back(finding);
}

} // namespace

void addScatterFindings(const FindingsInput& input, std::vector<Finding>& found) {
    const std::vector<double> deviations = repeatabilityDeviations(input);
    scatterGrows(input, deviations, found);
    autocorrelated(input, deviations, found);
    nonNormal(input, deviations, found);
}

} // namespace spanwright
