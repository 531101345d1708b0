// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/SplitSection.h"

#include "core/base/Rounding.h"
#include "core/certificate/ShortText.h"
#include "core/performance/LoadingRange.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr int SquareDigits = 4, RatioDigits = 3;

Digits significant(double value, int digits) {
    return shortText(std::stod(significantDigits(value, digits)));
}

/// Sums of squares differ by orders of magnitude: plain digits where they are few, else with an exponent.
Digits square(double value) {
    return significantDigits(value, SquareDigits);
}

Digits probability(double p) {
    return p < 0.001 ? "<0.001" : roundedText(p, 3);
}

SplitTableLine printed(const SplitLine& from, double total, double noise) {
    const SplitRow& row = from.row;
    SplitTableLine line;
    line.part = from.part;
    line.test = from.test;
    line.level = from.level;
    line.sumOfSquares = square(row.ss);
    line.degreesOfFreedom = row.df;
    if (row.ms)
        line.meanSquare = square(*row.ms);
    if (row.f)
        line.f = significantDigits(*row.f, RatioDigits);
    if (row.p)
        line.p = probability(*row.p);
    if (from.test == SplitLine::Test::Chain && total > 0)
        line.share = row.ss / total;
    if (from.test == SplitLine::Test::Chain && from.level > 0 && from.part != SplitPart::Regression && noise > 0)
        line.noiseShare = row.ss / noise;
    return line;
}

Digits percent(const std::optional<double>& value) {
    constexpr int decimals = 4;
    return value ? roundedText(*value, decimals) : Digits{};
}

} // namespace

std::optional<SplitSection> splitSection(const PhaseEvaluation& phase) {
    if (!phase.fit || !phase.split)
        return std::nullopt;
    const VarianceSplit& split = *phase.split;
    SplitSection section;
    section.function = phase.fit->function;
    section.direction = phase.fit->direction;
    section.weighted = phase.fit->weights != Weights::Equal;
    section.against = split.against;
    for (const SplitLine& line : splitLines(split))
        section.lines.push_back(printed(line, split.total.ss, split.residual.ss));
    return section;
}

std::optional<ForceSection> forceSection(const PhaseEvaluation& phase) {
    if (!phase.force)
        return std::nullopt;
    constexpr int meanDigits = 7; // of the smallest deflection
    constexpr int forceDigits = 9;
    const ForceFigures& figures = *phase.force;
    const int decimals = figures.steps.empty() ? 0 : decimalsFor(figures.steps.front().mean, meanDigits);
    ForceSection section;
    int place = 0;
    for (const ForceStep& step : figures.steps)
        place = std::max(place, decimalsIn(significant(step.force, forceDigits)));
    for (const ForceStep& step : figures.steps)
        section.steps.push_back({roundedText(step.force, place), roundedText(step.mean, decimals), percent(step.reproducibility), percent(step.repeatability),
                                 percent(step.interpolation), percent(step.reversibility)});
    section.zero = percent(figures.zero);
    section.degree = figures.degree;
    section.interpolationDegree = figures.interpolationDegree;
    section.lowerLimitFactor = significant(figures.lowerLimitFactor, RatioDigits);
    section.lowerLimitForce = significant(figures.lowerLimitForce, RatioDigits);
    section.lowestForceClassA = significant(loadingRange(figures, figures.lowestForceClassA).from, RatioDigits);
    section.lowestForceClassAA = significant(loadingRange(figures, figures.lowestForceClassAA).from, RatioDigits);
    return section;
}

} // namespace spanwright
