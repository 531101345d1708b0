// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/DegreeLadder.h"

#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

constexpr double Level = 0.05;

FunctionChoice polynomialOf(int degree) {
    return degree == 1 ? FunctionChoice{FunctionFamily::Line, 0} : FunctionChoice{FunctionFamily::Polynomial, degree};
}

/// The fits of rising degree, as far as they can be made with a degree of freedom left.
std::vector<Fit> fitsUpTo(const Sample& sample, Choices choices, int highest) {
    std::vector<Fit> fits;
    choices.method = Method::LeastSquares;
    for (int degree = 1; degree <= highest; ++degree) {
        choices.function = polynomialOf(degree);
        auto outcome = fitFunction(sample, choices);
        if (!outcome || outcome->fit.degreesOfFreedom < 1)
            break;
        fits.push_back(std::move(outcome->fit));
    }
    return fits;
}

bool monotonicInRange(const Fit& fit) {
    constexpr int Steps = 400;
    int rising = 0, falling = 0;
    for (int i = 0; i <= Steps; ++i) {
        const double slope = fit.curve->derivative(fit.low + (fit.high - fit.low) * i / Steps);
        rising += slope > 0 ? 1 : 0;
        falling += slope < 0 ? 1 : 0;
    }
    return rising == 0 || falling == 0;
}

std::optional<double> aiccOf(const Fit& fit) {
    const auto n = static_cast<double>(fit.used), k = static_cast<double>(fit.terms()) + 1;
    if (!(n - k - 1 > 0) || !(fit.residualSs > 0))
        return std::nullopt;
    return n * std::log(fit.residualSs / n) + 2 * k + 2 * k * (k + 1) / (n - k - 1);
}

/// The mean abscissa of each set point.
std::vector<double> setPointsOf(const Sample& sample, FitDirection direction) {
    const PairColumn& x = direction == FitDirection::Indication ? sample.reference : sample.indication;
    std::vector<double> sum(sample.groupValue.size(), 0.0), n(sample.groupValue.size(), 0.0);
    for (std::size_t i = 0; i < sample.size(); ++i) {
        sum[static_cast<std::size_t>(sample.group[i])] += x.high[i];
        n[static_cast<std::size_t>(sample.group[i])] += 1;
    }
    for (std::size_t g = 0; g < sum.size(); ++g)
        sum[g] /= n[g];
    return sum;
}

/// The means of the set points with a reference other than zero, as a sample of their own.
Sample meansOf(const Sample& sample) {
    const std::size_t m = sample.groupValue.size();
    std::vector<DoubleDouble> reference(m, 0.0), indication(m, 0.0);
    std::vector<double> n(m, 0.0);
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const auto g = static_cast<std::size_t>(sample.group[i]);
        reference[g] += sample.reference[i];
        indication[g] += sample.indication[i];
        n[g] += 1;
    }
    Sample means;
    for (std::size_t g = 0; g < m; ++g) {
        if (sample.groupValue[g] == 0)
            continue;
        means.group.push_back(static_cast<std::int32_t>(means.rows.size()));
        means.rows.push_back(means.rows.size());
        means.groupValue.push_back(sample.groupValue[g]);
        means.reference.push_back(reference[g] / n[g]);
        means.indication.push_back(indication[g] / n[g]);
    }
    return means;
}

/// ASTM E74-18, 8.3: ratios and factors on the means, and the degree they lead to.
void fillE74(DegreeLadder& ladder, const Sample& sample, Choices choices) {
    const Sample means = meansOf(sample);
    choices.weights = Weights::Equal;
    choices.covariance = CovarianceScale::Residuals;
    const std::vector<Fit> fits = fitsUpTo(means, choices, static_cast<int>(ladder.steps.size()));
    const auto n1 = static_cast<double>(means.size());
    bool found = false;
    for (std::size_t i = fits.size(); i-- > 1;) {
        const double d = static_cast<double>(i + 1);
        DegreeStep& step = ladder.steps[i];
        step.ratio = fits[i].residualSd > 0 ? fits[i - 1].residualSd / fits[i].residualSd : HUGE_VAL;
        step.e74 = std::sqrt(1 + (fQuantileAbove(0.025, 1, n1 - d - 1) - 1) / (n1 - d));
        if (!found && *step.ratio > *step.e74) {
            ladder.byE74 = static_cast<int>(i + 1);
            found = true;
        }
    }
}

DegreeStep stepOf(const std::vector<Fit>& fits, std::size_t i, const std::vector<double>& setPoints,
                  double resolution) {
    const Fit& fit = fits[i];
    DegreeStep step;
    step.degree = static_cast<int>(i) + 1;
    step.residualSd = fit.residualSd;
    step.aicc = aiccOf(fit);
    step.monotonic = monotonicInRange(fit);
    step.worth = true;
    if (i == 0)
        return step;
    const Fit& below = fits[i - 1];
    const double ms = fit.residualSs / fit.degreesOfFreedom;
    step.f = ms > 0 ? (below.residualSs - fit.residualSs) / ms : below.residualSs > 0 ? HUGE_VAL : 0.0;
    step.p = fAbove(*step.f, 1, fit.degreesOfFreedom);
    for (const double x : setPoints) {
        const double change = std::fabs(fit.curve->value(x) - below.curve->value(x));
        if (change > step.change) {
            step.change = change;
            step.changeAt = x;
        }
    }
    if (fit.weights == Weights::Equal)
        step.worth = below.residualSd - fit.residualSd >= resolution / std::sqrt(12.0);
    return step;
}

} // namespace

DegreeLadder degreeLadder(const Sample& sample, const Choices& choices, double resolution, int highest) {
    DegreeLadder ladder;
    const std::vector<Fit> fits = fitsUpTo(sample, choices, highest);
    if (fits.empty())
        return ladder;
    const std::vector<double> setPoints = setPointsOf(sample, fits.front().direction);
    double least = HUGE_VAL;
    for (std::size_t i = 0; i < fits.size(); ++i) {
        ladder.steps.push_back(stepOf(fits, i, setPoints, resolution));
        const DegreeStep& step = ladder.steps.back();
        if (step.p && *step.p < Level)
            ladder.byPartialF = step.degree;
        if (step.aicc && *step.aicc < least) {
            least = *step.aicc;
            ladder.byAicc = step.degree;
        }
    }
    fillE74(ladder, sample, choices);
    int degree = std::min({ladder.byPartialF, ladder.byAicc.value_or(ladder.byPartialF), ladder.byE74});
    while (degree > 1 && !(ladder.steps[static_cast<std::size_t>(degree - 1)].worth &&
                           ladder.steps[static_cast<std::size_t>(degree - 1)].monotonic))
        --degree;
    ladder.suggested = degree;
    return ladder;
}

} // namespace spanwright
