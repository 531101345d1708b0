// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingRules.h"

#include "core/base/ClassSums.h"
#include "core/diagnose/Autocorrelation.h"
#include "core/diagnose/Normality.h"
#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

constexpr double certain = 0.01;

/// Standard deviations within set points and how they go with the level |set point|: exponent b of s = c·level^b by
/// least squares on logarithms; the variance at the highest level over that at the lowest (ISO 8466-1); and p of
/// Koenker's test on the level.
struct ScatterTrend {
    double exponent = 0, varianceRatio = 1, p = 1;
    std::size_t levels = 0;
};

struct Level {
    double level = 0, n = 0, squares = 0, fourth = 0; ///< Σ d², Σ d⁴
    void operator+=(const Level& other) {
        n += other.n;
        squares += other.squares;
        fourth += other.fourth;
    }
};

/// Slope of ln s over ln level.
double exponentOf(const std::vector<Level>& levels) {
    double n = 0, sumX = 0, sumY = 0, sumXX = 0, sumXY = 0;
    for (const Level& one : levels) {
        if (!(one.level > 0) || !(one.squares > 0))
            continue;
        const double x = std::log(one.level), y = std::log(one.squares / one.n) / 2;
        ++n;
        sumX += x;
        sumY += y;
        sumXX += x * x;
        sumXY += x * y;
    }
    const double spread = sumXX - sumX * sumX / n;
    return n > 1 && spread > 0 ? (sumXY - sumX * sumY / n) / spread : 0;
}

ScatterTrend scatterTrend(const Sample& sample, const std::vector<double>& deviations) {
    std::vector<Level> levels = classSums<Level>(sample.size(), sample.groupValue.size(), [&](std::vector<Level>& sums, std::size_t first, std::size_t last) {
        for (std::size_t i = first; i < last; ++i) {
            const double square = deviations[i] * deviations[i];
            sums[static_cast<std::size_t>(sample.group[i])] += {0, 1, square, square * square};
        }
    });
    for (std::size_t g = 0; g < levels.size(); ++g)
        levels[g].level = std::abs(sample.groupValue[g]);
    std::sort(levels.begin(), levels.end(), [](const Level& a, const Level& b) { return a.level < b.level; });
    ScatterTrend trend;
    trend.exponent = exponentOf(levels);
    const double n = static_cast<double>(sample.size());
    double meanLevel = 0, meanSquare = 0, fourth = 0, xx = 0, xv = 0;
    for (const Level& one : levels) {
        meanLevel += one.n * one.level / n;
        meanSquare += one.squares / n;
        fourth += one.fourth;
        trend.levels += one.squares > 0 ? 1 : 0;
    }
    for (const Level& one : levels) {
        xx += one.n * (one.level - meanLevel) * (one.level - meanLevel);
        xv += (one.level - meanLevel) * (one.squares - one.n * meanSquare);
    }
    const double vv = fourth - n * meanSquare * meanSquare;
    if (xx > 0 && vv > 0 && levels.front().squares > 0) {
        trend.p = chiSquaredAbove(n * (xv / xx) * (xv / vv), 1);
        trend.varianceRatio = (levels.back().squares / levels.back().n) / (levels.front().squares / levels.front().n);
    }
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
    const ScatterTrend trend = scatterTrend(input.sample, deviations);
    if (!(trend.p < certain) || trend.levels < 3 || !(trend.varianceRatio > 1) || !(trend.exponent > 0.2))
        return;
    finding.figures = {{"variance_ratio", trend.varianceRatio}, {"exponent", trend.exponent}, {"p", trend.p}};
    found.push_back(finding);
}

/// Neighbours in the order taken. Curvature and hysteresis make neighbours alike too, so where there are repeats the
/// correlation is that of what is left after them.
void autocorrelated(const FindingsInput& input, const std::vector<double>& deviations, std::vector<Finding>& found) {
    const double n = static_cast<double>(input.sample.size());
    if (!input.diagnostics || n < 10)
        return;
    double r = 0, p = 1;
    if (!deviations.empty()) {
        r = serialStatistics(deviations).lagOne.value_or(0);
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

/// Readings on a coarse grid fall on few values, and the ties alone look like a departure from the normal distribution. Each is
/// therefore spread over its step before the test, evenly and always in the same way.
std::vector<double> withoutGrid(const FindingsInput& input, std::vector<double> u) {
    constexpr double golden = 0.6180339887498949, coarse = 0.1;
    if (input.fit->direction != FitDirection::Indication || input.fit->weights != Weights::Equal)
        return u;
    const auto& resolution = input.record.item.resolution;
    const double step = std::max(resolution ? resolution->toDouble() : 0, std::pow(10.0, -input.record.readings->indication().scale()));
    if (step < coarse * input.fit->residualSd)
        return u;
    double turn = 0;
    for (double& value : u) {
        turn = std::fmod(turn + golden, 1);
        value += step * (turn - 0.5);
    }
    return u;
}

void nonNormal(const FindingsInput& input, const std::vector<double>& deviations, std::vector<Finding>& found) {
    if (contains(found, FindingCode::Outlier) || contains(found, FindingCode::ScatterGrows) || !input.diagnostics)
        return;
    const bool structured = contains(found, FindingCode::LackOfFit) || contains(found, FindingCode::Hysteresis) ||
                            contains(found, FindingCode::RunZeroShift) || contains(found, FindingCode::FirstRunDiffers);
    constexpr std::size_t most = 5000;
    std::optional<TestResult> test = input.diagnostics->shapiroWilk;
    if (structured)
        test = deviations.empty() || deviations.size() > most ? std::nullopt : shapiroWilk(withoutGrid(input, deviations));
    else if (test && test->p < certain && input.residuals->e.size() <= most)
        test = shapiroWilk(withoutGrid(input, input.residuals->e.high));
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

void addScatterFindings(const FindingsInput& input, const std::vector<double>& deviations,
                        std::vector<Finding>& found) {
    scatterGrows(input, deviations, found);
    autocorrelated(input, deviations, found);
    nonNormal(input, deviations, found);
}

} // namespace spanwright
