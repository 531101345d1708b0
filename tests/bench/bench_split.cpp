// SPDX-License-Identifier: GPL-3.0-or-later
// Prints, for data sets simulated without the effect in question: how often each F test of the variance split rejects
// at 5 %; how the variance components come out on average; how far the chain is from adding up to the total; and what
// one split and one set of diagnostics cost.
#include "core/diagnose/Diagnostics.h"
#include "core/diagnose/Findings.h"
#include "core/fit/fitFunction.h"
#include "core/split/VarianceSplit.h"
#include "tests/support/SampleRecord.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <ctime>
#include <functional>
#include <map>
#include <random>
#include <string>

using namespace spanwright;

namespace {

constexpr int points = 6, runs = 3, sets = 100'000;

struct Design {
    Sample sample;
    std::vector<double> x;
};

/// Every set point rising and falling in every run, or with one reading in nine left out.
Design designOf(bool gaps) {
    Design design;
    int count = 0;
    for (int run = 1; run <= runs; ++run)
        for (const Direction direction : {Direction::Rising, Direction::Falling})
            for (int point = 0; point < points; ++point) {
                if (gaps && ++count % 9 == 4)
                    continue;
                design.x.push_back(point);
                design.sample.rows.push_back(design.sample.rows.size());
                design.sample.group.push_back(point);
                design.sample.run.push_back(run);
                design.sample.direction.push_back(direction);
            }
    for (int point = 0; point < points; ++point)
        design.sample.groupValue.push_back(point);
    design.sample.reference.high = design.x;
    return design;
}

/// A line by the textbook's formulas, so that the simulation does not lean on the fit of the program.
struct LineFit {
    Residuals residuals;
    Fit fit;
};

LineFit lineThrough(const std::vector<double>& x, const std::vector<double>& y) {
    const double n = static_cast<double>(x.size());
    double meanX = 0, meanY = 0, sxx = 0, sxy = 0;
    for (std::size_t i = 0; i < x.size(); ++i) {
        meanX += x[i] / n;
        meanY += y[i] / n;
    }
    for (std::size_t i = 0; i < x.size(); ++i) {
        sxx += (x[i] - meanX) * (x[i] - meanX);
        sxy += (x[i] - meanX) * (y[i] - meanY);
    }
    LineFit made;
    made.fit.coefficients.resize(2);
    for (std::size_t i = 0; i < x.size(); ++i) {
        const double fitted = meanY + sxy / sxx * (x[i] - meanX);
        made.residuals.fitted.push_back(fitted);
        made.residuals.e.high.push_back(y[i] - fitted);
        made.fit.residualSs += (y[i] - fitted) * (y[i] - fitted);
        made.fit.totalSs += (y[i] - meanY) * (y[i] - meanY);
    }
    made.fit.regressionSs = sxy * sxy / sxx;
    made.fit.totalDf = static_cast<int>(x.size()) - 1;
    made.fit.regressionDf = 1;
    made.fit.degreesOfFreedom = static_cast<int>(x.size()) - 2;
    return made;
}

struct Effects {
    double run = 0, gap = 0;
};

std::vector<double> simulate(const Design& design, const Effects& effects, std::mt19937_64& engine) {
    std::normal_distribution<double> normal;
    double run[runs + 1] = {}, gap[points][2] = {};
    for (double& value : run)
        value = effects.run * normal(engine);
    for (auto& point : gap)
        for (double& value : point)
            value = effects.gap * normal(engine);
    std::vector<double> y;
    for (std::size_t i = 0; i < design.x.size(); ++i)
        y.push_back(4 + 1.6 * design.x[i] + run[design.sample.run[i]] +
                    gap[design.sample.group[i]][design.sample.direction[i] == Direction::Rising ? 0 : 1] +
                    normal(engine));
    return y;
}

void rejections(bool gaps) {
    const Design design = designOf(gaps);
    std::mt19937_64 engine(20260714);
    std::map<std::string, int> rejected;
    double worstSum = 0;
    for (int set = 0; set < sets; ++set) {
        const LineFit line = lineThrough(design.x, simulate(design, {}, engine));
        const VarianceSplit split = splitVariance(design.sample, line.residuals, line.fit);
        const auto count = [&](const char* name, const std::optional<SplitRow>& row) {
            if (row && row->p)
                rejected[name] += *row->p < 0.05 ? 1 : 0;
        };
        count("lack of fit", split.lackOfFit);
        count("lack of fit, pooled", split.lackOfFitNaive);
        count("lack of fit, adjusted", split.lackOfFitAdjusted);
        count("hysteresis", split.hysteresis);
        count("run offset", split.runOffset);
        count("run slope", split.runSlope);
        const double sum = split.regression.ss + split.lackOfFit->ss + split.hysteresis->ss + split.runOffset->ss +
                           split.runSlope->ss + split.repeatability->ss;
        worstSum = std::max(worstSum, std::abs(sum / split.total.ss - 1));
    }
    std::printf("%s, %d null sets of %zu readings: rejected at 5 %%\n", gaps ? "with gaps" : "balanced", sets,
                design.x.size());
    for (const auto& [name, times] : rejected)
        std::printf("  %-22s %5.2f %%\n", name.c_str(), 100.0 * times / sets);
    std::printf("  parts add up to the total within %.1e\n", worstSum);
}

void components(bool gaps) {
    const Design design = designOf(gaps);
    const Effects effects{1.5, 0.8};
    const double truth[] = {effects.gap * effects.gap, effects.run * effects.run, 1};
    const SplitPart parts[] = {SplitPart::Hysteresis, SplitPart::RunOffset, SplitPart::Repeatability};
    const char* names[] = {"set point x direction", "run", "repeatability"};
    std::mt19937_64 engine(7);
    double sum[3] = {}, squares[3] = {};
    int inside[3] = {};
    const int repeats = sets;
    for (int set = 0; set < repeats; ++set) {
        const LineFit line = lineThrough(design.x, simulate(design, effects, engine));
        for (const VarianceComponent& component : splitVariance(design.sample, line.residuals, line.fit).components)
            for (int k = 0; k < 3; ++k)
                if (component.part == parts[k]) {
                    sum[k] += component.estimate;
                    squares[k] += component.estimate * component.estimate;
                    inside[k] +=
                        *component.low <= std::sqrt(truth[k]) && std::sqrt(truth[k]) <= *component.high ? 1 : 0;
                }
    }
    std::printf(
        "%s, components over %d sets: true, mean, error of the mean, share of 95 %% intervals that hold the truth\n",
        gaps ? "with gaps" : "balanced", repeats);
    for (int k = 0; k < 3; ++k) {
        const double mean = sum[k] / repeats;
        std::printf("  %-22s %6.3f %7.4f %7.4f %5.1f %%\n", names[k], truth[k], mean,
                    std::sqrt((squares[k] / repeats - mean * mean) / repeats), 100.0 * inside[k] / repeats);
    }
}

double milliseconds(int repeats, const std::function<void()>& work) {
    const std::clock_t start = std::clock(); // processor time: the machine may be shared
    for (int i = 0; i < repeats; ++i)
        work();
    return 1000.0 * static_cast<double>(std::clock() - start) / CLOCKS_PER_SEC / repeats;
}

void costs() {
    Record record = test::pressureTransmitter();
    record.choices.function = {FunctionFamily::Line, 0};
    const Sample sample = makeSample(record, Phase::AsFound);
    const auto outcome = fitFunction(sample, record.choices);
    double kept = 0;
    std::printf("66 readings: fit %.3f ms, ",
                milliseconds(200, [&] { kept += fitFunction(sample, record.choices)->fit.residualSs; }));
    std::printf("split %.3f ms, ", milliseconds(200, [&] {
                    kept += splitVariance(sample, outcome->residuals, outcome->fit).residual.ss;
                }));
    std::printf(
        "diagnostics %.3f ms, ", milliseconds(200, [&] {
            kept += *diagnose(sample, outcome->residuals, outcome->fit, {record.readings->ids(), 0, 0.05}).durbinWatson;
        }));
    const VarianceSplit split = splitVariance(sample, outcome->residuals, outcome->fit);
    const Diagnostics diagnostics =
        diagnose(sample, outcome->residuals, outcome->fit, {record.readings->ids(), 0, 0.05});
    const auto performance = processFigures(sample, record.item);
    FindingsInput input{record, Phase::AsFound, sample};
    input.fit = &outcome->fit;
    input.residuals = &outcome->residuals;
    input.split = &split;
    input.diagnostics = &diagnostics;
    input.performance = &*performance;
    std::printf("performance %.3f ms, ", milliseconds(200, [&] { kept += processFigures(sample, record.item)->span; }));
    std::printf("findings %.3f ms\n", milliseconds(200, [&] { kept += static_cast<double>(findings(input).size()); }));
    if (!(kept > 0))
        std::printf("no figures\n");
}

/// A million readings of a logger at nine plateaus, against summing their two columns.
void manyReadings() {
    const std::size_t n = 1'000'000;
    Sample sample;
    std::vector<double> x, y;
    std::mt19937_64 engine(3);
    for (std::size_t i = 0; i < n; ++i) {
        const auto plateau = static_cast<std::int32_t>(i * 9 / n);
        sample.rows.push_back(i);
        sample.group.push_back(plateau);
        x.push_back(10.0 * plateau + 1e-3 * static_cast<double>(engine() % 100));
        y.push_back(2 + 3 * x.back() + 1e-3 * static_cast<double>(engine() % 1000));
    }
    for (int plateau = 0; plateau < 9; ++plateau)
        sample.groupValue.push_back(10.0 * plateau);
    LineFit line = lineThrough(x, y);
    line.residuals.leverage.assign(n, 2.0 / static_cast<double>(n));
    sample.reference.high = x;
    sample.indication.high = y;
    double kept = 0;
    const double sum = milliseconds(5, [&] {
        for (std::size_t i = 0; i < n; ++i)
            kept += x[i] + y[i];
    });
    const std::vector<ReadingId> ids(n, 1);
    std::printf("%zu readings: summing two columns %.2f ms, split %.1f times that, diagnostics %.1f times\n", n, sum,
                milliseconds(3, [&] { kept += splitVariance(sample, line.residuals, line.fit).residual.ss; }) / sum,
                milliseconds(3, [&] {
                    kept += *diagnose(sample, line.residuals, line.fit, {ids, 0, 0.05}).durbinWatson;
                }) / sum);
    if (!(kept != 0))
        std::printf("no figures\n");
}

} // namespace

int main(int argc, char**) {
    if (argc > 1) {
        manyReadings();
        return 0;
    }
    costs();
    manyReadings();
    for (const bool gaps : {false, true}) {
        rejections(gaps);
        components(gaps);
    }
    return 0;
}
