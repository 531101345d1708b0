// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/VarianceComponents.h"

#include "core/fit/Quantiles.h"

#include <cmath>

namespace spanwright {
namespace {

constexpr double tail = 0.025;

VarianceComponent repeatabilityComponent(const SplitRow& row, double meanVarianceOfReading) {
    VarianceComponent component;
    component.part = SplitPart::Repeatability;
    component.estimate = component.variance = row.ss / row.df * meanVarianceOfReading;
    component.degreesOfFreedom = row.df;
    const double sum = row.ss * meanVarianceOfReading;
    component.low = std::sqrt(sum / chiSquaredQuantileAbove(tail, row.df));
    component.high = std::sqrt(sum / chiSquaredQuantileAbove(1 - tail, row.df));
    return component;
}

/// The component behind `row`, whose mean square expects s² + weight·σ² + `other`, the share of a further component
/// known already.
VarianceComponent randomComponent(SplitPart part, const SplitRow& row, const SplitRow& error, double trace,
                                  double other) {
    VarianceComponent component;
    component.part = part;
    const double weight = trace / row.df;
    const double errorMs = error.ss / error.df + std::max(0.0, other);
    const double ms = row.ss / row.df;
    component.estimate = (ms - error.ss / error.df - other) / weight;
    component.variance = std::max(0.0, component.estimate);
    const double difference = ms - errorMs;
    component.degreesOfFreedom =
        difference > 0 ? difference * difference / (ms * ms / row.df + errorMs * errorMs / error.df) : 0;
    if (!(errorMs > 0))
        return component;
    const double f = ms / errorMs;
    const double upperF = fQuantileAbove(tail, row.df, error.df), lowerF = 1 / fQuantileAbove(tail, error.df, row.df);
    const double low = row.ss * (1 - upperF / f) / (weight * chiSquaredQuantileAbove(tail, row.df));
    const double high = row.ss * (1 - lowerF / f) / (weight * chiSquaredQuantileAbove(1 - tail, row.df));
    component.low = std::sqrt(std::max(0.0, low));
    component.high = std::sqrt(std::max(0.0, high));
    return component;
}

} // namespace

std::vector<VarianceComponent> varianceComponents(const NoiseChain& chain, const VarianceSplit& split,
                                                  double meanVarianceOfReading) {
    std::vector<VarianceComponent> components;
    const auto& error = split.repeatability ? split.repeatability : split.pureError;
    if (!error || error->df <= 0)
        return components;
    double runVariance = 0;
    if (split.runOffset && split.runOffset->df > 0 && chain.runOffsetWeight > 0) {
        components.push_back(randomComponent(SplitPart::RunOffset, *split.runOffset, *error, chain.runOffsetWeight, 0));
        runVariance = components.back().estimate;
    }
    if (split.hysteresis && split.hysteresis->df > 0 && chain.contrastWeight > 0) {
        const double leaked = chain.runInContrastWeight * runVariance / split.hysteresis->df;
        components.insert(components.begin(), randomComponent(SplitPart::Hysteresis, *split.hysteresis, *error,
                                                              chain.contrastWeight, leaked));
    }
    components.push_back(repeatabilityComponent(*error, meanVarianceOfReading));

    double noise = 0;
    for (const auto& component : components)
        noise += component.variance;
    const double all = split.total.df > 0 ? split.total.ss / split.total.df * meanVarianceOfReading : 0;
    for (auto& component : components) {
        component.shareOfNoise = noise > 0 ? component.variance / noise : 0;
        component.shareOfTotal = all > 0 ? component.variance / all : 0;
    }
    return components;
}

} // namespace spanwright
