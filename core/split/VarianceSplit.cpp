// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/VarianceSplit.h"

#include "core/base/ClassSums.h"
#include "core/fit/Quantiles.h"
#include "core/split/AdjustedLackOfFit.h"
#include "core/split/NoiseChain.h"
#include "core/split/VarianceComponents.h"

#include <cmath>

namespace spanwright {
namespace {

SplitRow row(const DoubleDouble& ss, int df) {
    SplitRow made;
    made.ss = std::max(0.0, toDouble(ss));
    made.df = df;
    if (df > 0)
        made.ms = made.ss / df;
    return made;
}

/// F and p of a row against an error row; nothing when the error is nothing but rounding.
void testAgainst(SplitRow& tested, const SplitRow& error, double floor) {
    tested.f.reset();
    tested.p.reset();
    if (tested.df <= 0 || error.df <= 0 || !(error.ss > floor))
        return;
    tested.f = (tested.ss / tested.df) / (error.ss / error.df);
    tested.p = fAbove(*tested.f, tested.df, error.df);
}

void testAgainst(std::optional<SplitRow>& tested, const std::optional<SplitRow>& error, double floor) {
    if (tested && error)
        testAgainst(*tested, *error, floor);
}

Warning undefined(const char* figure, const char* reason) {
    return {WarningCode::FigureUndefined, {{"figure", figure}, {"reason", reason}}};
}

/// The rows of the chain below the residual, and why one is not there.
void addRows(VarianceSplit& split, const NoiseChain& chain, int terms) {
    if (chain.dfPure() <= 0) {
        split.warnings.push_back({WarningCode::NoReplicates, {{"figure", "pure_error"}}});
        return;
    }
    split.pureError = row(chain.s2, chain.dfPure());
    if (chain.setPoints > terms)
        split.lackOfFit = row(chain.s1 - chain.s2, chain.setPoints - terms);
    else
        split.warnings.push_back(undefined("lack_of_fit", "set-points"));
    if (chain.contrasts > 0)
        split.hysteresis = row(chain.s2 - chain.s3, chain.contrasts);
    else
        split.warnings.push_back(
            {WarningCode::OneDirection, {{"reason", chain.directionsKnown ? "one" : "not-stated"}}});
    if (chain.runOffsets > 0)
        split.runOffset = row(chain.s3 - chain.s4, chain.runOffsets);
    else
        split.warnings.push_back({WarningCode::OneRun,
                                  {{"reason", chain.runs > mostRuns ? "too-many"
                                              : chain.runs > 1      ? "no-repeats"
                                              : chain.runs == 1     ? "one"
                                                                    : "not-stated"}}});
    if (chain.runSlopes > 0)
        split.runSlope = row(chain.s4 - chain.s5, chain.runSlopes);
    if (!split.hysteresis && !split.runOffset)
        return;
    split.against = SplitPart::Repeatability;
    if (chain.dfRepeatability() > 0)
        split.repeatability = row(chain.s5, chain.dfRepeatability());
    else
        split.warnings.push_back(undefined("repeatability", "no-repeats"));
}

void addTests(VarianceSplit& split, const Sample& sample, const NoiseChain& chain, const Fit& fit, double floor) {
    testAgainst(split.regression, split.residual, floor);
    const auto& error = split.against == SplitPart::Repeatability ? split.repeatability : split.pureError;
    testAgainst(split.lackOfFit, error, floor);
    testAgainst(split.hysteresis, error, floor);
    testAgainst(split.runOffset, error, floor);
    testAgainst(split.runSlope, error, floor);
    split.lackOfFitNaive = split.lackOfFit;
    testAgainst(split.lackOfFitNaive, split.pureError, floor);
    if (split.lackOfFit) {
        AdjustedLackOfFit adjusted = adjustedLackOfFit(sample, chain, fit);
        split.lackOfFitAdjusted = adjusted.row;
        if (!adjusted.approximation.empty())
            split.warnings.push_back({WarningCode::ApproximateMethod, {{"figure", "lack_of_fit_adjusted"}, {"method", adjusted.approximation}}});
        testAgainst(split.lackOfFitAdjusted, error, floor);
    }
}

void addMeans(VarianceSplit& split, const Sample& sample, const NoiseChain& chain) {
    if (chain.cells.size() > mostListedCells)
        return;
    for (std::size_t c = 0; c < chain.cells.size();) {
        SetPointMeans means;
        const std::int32_t group = chain.cells[c].group;
        means.setPoint = sample.groupValue[static_cast<std::size_t>(group)];
        double weight = 0;
        for (; c < chain.cells.size() && chain.cells[c].group == group; ++c) {
            const NoiseChain::Cell& cell = chain.cells[c];
            means.n += cell.n;
            weight += cell.weight;
            means.mean += cell.weight * cell.mean;
            if (cell.direction == Direction::Rising)
                means.rising = cell.mean;
            if (cell.direction == Direction::Falling)
                means.falling = cell.mean;
        }
        means.mean /= weight;
        split.setPoints.push_back(means);
    }
}

double meanVarianceOfReading(const Residuals& residuals) {
    if (residuals.weight.empty())
        return 1;
    double sum = 0;
    for (const double w : residuals.weight.high)
        sum += 1 / w;
    return sum / static_cast<double>(residuals.weight.size());
}

} // namespace

double roundingSquares(const Residuals& residuals) {
    const std::vector<double>& fitted = residuals.fitted;
    const Bounds<double> bounds = fitted.empty() ? Bounds<double>{} : boundsInHalves(fitted.size(), [column = fitted.data()](auto i) { return at(column, i); });
    const double largest = std::max(-bounds.low, bounds.high);
    double weight = residuals.weight.empty() ? 1 : 0;
    for (const double w : residuals.weight.high)
        weight = std::max(weight, w);
    const double unit = largest *
                        (residuals.e.low.empty() ? 4 * 2.2e-16 : 64 * 1.3e-32);
    return static_cast<double>(residuals.e.size()) * weight * unit * unit;
}

VarianceSplit splitVariance(const Sample& sample, const Residuals& residuals, const Fit& fit) {
    VarianceSplit split;
    split.total = row(fit.totalSs, fit.totalDf);
    split.regression = row(fit.regressionSs, fit.regressionDf);
    split.residual = row(fit.residualSs, fit.degreesOfFreedom);
    if (sample.size() == 0 || sample.groupValue.empty())
        return split;

    const NoiseChain chain = noiseChain(sample, residuals);
    addRows(split, chain, static_cast<int>(fit.terms()));
    addTests(split, sample, chain, fit, roundingSquares(residuals));
    addMeans(split, sample, chain);
    for (const RunEffect& effect : chain.effects)
        split.runs.push_back({effect.run, effect.n, effect.offset, effect.slope});
    split.components = varianceComponents(chain, split, meanVarianceOfReading(residuals));
    return split;
}

} // namespace spanwright
