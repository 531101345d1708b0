// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/interval/ReadBack.h"

#include "core/interval/Roots.h"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <limits>

namespace spanwright {

namespace {

constexpr double Infinite = std::numeric_limits<double>::infinity();

std::string textOf(double value) {
    char text[40];
    std::snprintf(text, sizeof text, "%.12g", value);
    return text;
}

Warning warn(WarningCode code, double value) {
    return {code, {{"value", textOf(value)}}};
}

/// One indication, or the mean of some, that is to be read back.
struct Asked {
    const Fit& fit;
    double indication;
    double share; ///< 1/q; 0 for an exact indication

    [[nodiscard]] double variance(double x) const {
        return fit.curve->variance(x) + (share > 0 ? share * fit.curve->readingVariance(x) : 0.0);
    }
    /// Positive where the indication lies above the edge of the band on side ±1.
    [[nodiscard]] double beyond(double x, double side) const {
        return indication - fit.curve->value(x) - side * fit.coverageFactor * std::sqrt(variance(x));
    }
    /// Not positive where the indication lies within the band.
    [[nodiscard]] double outside(double x) const {
        return std::fabs(indication - fit.curve->value(x)) - fit.coverageFactor * std::sqrt(variance(x));
    }
};

bool straight(const Fit& fit) {
    return fit.function.family == FunctionFamily::Line || fit.function.family == FunctionFamily::Proportional;
}

/// Whether the variance of a reading is the same everywhere, as the closed form needs.
bool evenNoise(const Fit& fit) {
    const double middle = fit.curve->readingVariance(fit.low + (fit.high - fit.low) / 2);
    for (int i = 0; i <= 16; ++i)
        if (fit.curve->readingVariance(fit.low + (fit.high - fit.low) * i / 16) != middle)
            return false;
    return true;
}

/// Fieller's interval about the middle c of the range, d = x − c, with V = Vaa + 2 Vab d + Vbb d²:
/// (b² − k²Vbb) d² − 2 (b D + k²Vab) d + D² − k²(Vaa + σ²/q) ≤ 0 with D = y − f(c).
void straightInterval(const Asked& asked, ReadBackAnswer& answer) {
    const Fit& fit = asked.fit;
    const double c = fit.low + (fit.high - fit.low) / 2, h = fit.high > fit.low ? (fit.high - fit.low) / 2 : 1.0;
    const double b = fit.curve->derivative(c), k2 = fit.coverageFactor * fit.coverageFactor;
    const double middle = fit.curve->variance(c), above = fit.curve->variance(c + h),
                 below = fit.curve->variance(c - h);
    const double vab = (above - below) / (4 * h), vbb = ((above - middle) + (below - middle)) / (2 * h * h);
    const double distance = asked.indication - fit.curve->value(c);
    const double a2 = b * b - k2 * vbb, a1 = b * distance + k2 * vab;
    const double a0 = distance * distance - k2 * (asked.variance(c));
    const double discriminant = a1 * a1 - a2 * a0;
    answer.low = -Infinite;
    answer.high = Infinite;
    if (!(a2 > 0)) {
        Warning gap{WarningCode::NoFiniteInterval, {{"value", textOf(asked.indication)}}};
        if (a2 < 0 && discriminant > 0) {
            const double root = std::sqrt(discriminant);
            gap.facts.push_back({"gap_low", textOf(c + (a1 + root) / a2)});
            gap.facts.push_back({"gap_high", textOf(c + (a1 - root) / a2)});
        }
        answer.warnings.push_back(gap);
        return;
    }
    const double far = a1 + std::copysign(std::sqrt(std::max(0.0, discriminant)), a1);
    const double one = far / a2, other = far != 0 ? a0 / far : 0.0;
    answer.low = c + std::min(one, other);
    answer.high = c + std::max(one, other);
}

/// Ends of the part of the set that holds `x`, sought from it outwards.
void curveInterval(const Asked& asked, const RangeOfSearch& range, double x, ReadBackAnswer& answer) {
    const auto outside = [&](double at) { return asked.outside(at); };
    const auto edge = [&](double limit, double open) {
        const auto bracket = firstCrossing(outside, x, limit);
        if (!bracket)
            return open;
        // Of the two edges the one that is crossed there: a simple root, without the corner of |y − f|.
        const double side = asked.indication > asked.fit.curve->value(bracket->outer) ? 1.0 : -1.0;
        return rootBetween([&](double at) { return asked.beyond(at, side); }, bracket->inner, bracket->outer);
    };
    answer.low = edge(range.low, -Infinite);
    answer.high = edge(range.high, Infinite);
    if (!std::isfinite(answer.low) || !std::isfinite(answer.high))
        answer.warnings.push_back(warn(WarningCode::NoFiniteInterval, asked.indication));
}

/// Nothing belongs to the indication.
void leaveOpen(ReadBackAnswer& answer, double indication) {
    answer.low = answer.high = answer.standardUncertainty = std::numeric_limits<double>::quiet_NaN();
    answer.insideRange = false;
    answer.warnings.push_back(warn(WarningCode::NoAnswer, indication));
}

/// The reference given by a function of the indication.
ReadBackAnswer evaluated(const Asked& asked) {
    const Fit& fit = asked.fit;
    ReadBackAnswer answer;
    answer.indication = asked.indication;
    answer.reference = fit.curve->value(asked.indication);
    answer.standardUncertainty = std::sqrt(asked.variance(asked.indication));
    answer.low = *answer.reference - fit.coverageFactor * answer.standardUncertainty;
    answer.high = *answer.reference + fit.coverageFactor * answer.standardUncertainty;
    answer.insideRange = asked.indication >= fit.low && asked.indication <= fit.high;
    return answer;
}

} // namespace

std::vector<double> abscissaeOf(const Fit& fit, double ordinate) {
    const double middle = fit.low + (fit.high - fit.low) / 2;
    if (straight(fit)) {
        const double b = fit.curve->derivative(middle);
        return b != 0 ? std::vector<double>{middle + (ordinate - fit.curve->value(middle)) / b} : std::vector<double>{};
    }
    const auto above = [&](double x) { return fit.curve->value(x) - ordinate; };
    std::vector<double> roots = rootsIn(above, fit.low, fit.high);
    if (roots.empty()) {
        const RangeOfSearch range = searchRange(fit);
        roots = rootsIn(above, range.low, fit.low);
        const std::vector<double> beyond = rootsIn(above, fit.high, range.high);
        roots.insert(roots.end(), beyond.begin(), beyond.end());
    }
    std::stable_sort(roots.begin(), roots.end(), [&](double a, double b) { return std::fabs(a - middle) < std::fabs(b - middle); });
    return roots;
}

ReadBackAnswer readBack(const Fit& fit, double indication, std::optional<int> repeats) {
    const Asked asked{fit, indication, repeats ? 1.0 / std::max(1, *repeats) : 0.0};
    ReadBackAnswer answer;
    if (fit.direction == FitDirection::Reference) {
        answer = evaluated(asked);
        if (std::isnan(*answer.reference)) {
            answer.reference.reset();
            leaveOpen(answer, indication);
            return answer;
        }
    } else {
        answer.indication = indication;
        const RangeOfSearch range = searchRange(fit);
        const std::vector<double> roots = abscissaeOf(fit, indication);
        if (roots.empty()) {
            leaveOpen(answer, indication);
            return answer;
        }
        const double x = roots.front();
        answer.reference = x;
        answer.others.assign(roots.begin() + 1, roots.end());
        answer.standardUncertainty = std::sqrt(asked.variance(x)) / std::fabs(fit.curve->derivative(x));
        answer.insideRange = x >= fit.low && x <= fit.high;
        if (straight(fit) && evenNoise(fit))
            straightInterval(asked, answer);
        else
            curveInterval(asked, range, x, answer);
        if (!answer.others.empty())
            answer.warnings.push_back(warn(WarningCode::SeveralAnswers, indication));
    }
    if (!answer.insideRange)
        answer.warnings.push_back(warn(WarningCode::Extrapolated, indication));
    return answer;
}

} // namespace spanwright
