// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/performance/ProcessFigures.h"

#include "core/base/ClassSums.h"
#include "core/performance/StraightLines.h"

#include <array>
#include <cmath>
#include <map>

// Definitions, e the error of a reading, averages over the runs (IEC 61298-2 from memory; the terms hysteresis within a
// cycle and repeatability as in 43 CFR 3175.135):
//   measured error        the average of rising or of falling readings at a set point that is furthest from 0
//   inaccuracy            the largest and the smallest single e
//   hysteresis            largest |average rising − average falling| at a set point; within a run: largest such gap of
//   one run non-repeatability     largest e minus smallest e at a set point in one direction non-linearity         of
//   the mean of both averages: from the chord through both ends (terminal), from the line that makes the
//                         largest deviation smallest (independent), the same through the lower end (zero-based)

namespace spanwright {
namespace {

constexpr std::size_t mostSetPoints = 2000;

/// What a perfect item shows.
struct Ideal {
    DoubleDouble intercept = 0.0, slope = 1.0;
    double span = 0;
    const char* method = nullptr; ///< of a replacement, where nothing is stated
};

struct Spread {
    std::size_t n = 0;
    double sum = 0, least = INFINITY, most = -INFINITY;
    void add(double e) {
        ++n;
        sum += e;
        least = std::min(least, e);
        most = std::max(most, e);
    }
    void operator+=(const Spread& other) {
        n += other.n;
        sum += other.sum;
        least = std::min(least, other.least);
        most = std::max(most, other.most);
    }
    [[nodiscard]] double mean() const { return sum / static_cast<double>(n); }
};

Ideal statedIdeal(const Item& item) {
    const DoubleDouble low = item.rangeLow->toDoubleDouble(), high = item.rangeHigh->toDoubleDouble();
    const DoubleDouble outLow = item.outputLow->toDoubleDouble(), outHigh = item.outputHigh->toDoubleDouble();
    Ideal ideal;
    ideal.slope = (outHigh - outLow) / (high - low);
    ideal.intercept = outLow - ideal.slope * low;
    ideal.span = std::abs(toDouble(outHigh - outLow));
    return ideal;
}

struct EndMeans {
    std::array<DoubleDouble, 2> x, y;
};

/// Mean reference and indication at the first and the last set point. The distances from the first reading of each are short
/// numbers, which plain sums hold where the readings are plain numbers too.
EndMeans meansAtEnds(const Sample& sample, std::size_t last) {
    const bool doubles = sample.reference.low.empty() && sample.indication.low.empty();
    EndMeans from{}, sum{{0.0, 0.0}, {0.0, 0.0}};
    std::array<double, 2> n{0, 0}, plainX{0, 0}, plainY{0, 0};
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const auto group = static_cast<std::size_t>(sample.group[i]);
        if (group != 0 && group != last)
            continue;
        const std::size_t end = group == 0 ? 0 : 1;
        if (!(n[end] > 0)) {
            from.x[end] = sample.reference[i];
            from.y[end] = sample.indication[i];
        }
        n[end] += 1;
        if (doubles) {
            plainX[end] += sample.reference.high[i] - from.x[end].x[0];
            plainY[end] += sample.indication.high[i] - from.y[end].x[0];
        } else {
            sum.x[end] += sample.reference[i] - from.x[end];
            sum.y[end] += sample.indication[i] - from.y[end];
        }
    }
    for (std::size_t end = 0; end < 2; ++end) {
        from.x[end] += (sum.x[end] + plainX[end]) / n[end];
        from.y[end] += (sum.y[end] + plainY[end]) / n[end];
    }
    return from;
}

Ideal idealOf(const Sample& sample, const Item& item) {
    const bool stated = item.rangeLow && item.rangeHigh && item.outputLow && item.outputHigh &&
                        compareValue(*item.rangeLow, *item.rangeHigh) != 0 &&
                        compareValue(*item.outputLow, *item.outputHigh) != 0;
    if (stated)
        return statedIdeal(item);
    Ideal ideal;
    const std::size_t last = sample.groupValue.size() - 1;
    if (!item.indication.unit.empty() && item.indication.unit == item.reference.unit) {
        ideal.span = sample.groupValue[last] - sample.groupValue[0];
        if (item.rangeLow && item.rangeHigh)
            ideal.span = std::abs(item.rangeHigh->toDouble() - item.rangeLow->toDouble());
        ideal.method = "reference-itself";
        return ideal;
    }
    const auto [x, y] = meansAtEnds(sample, last);
    ideal.slope = (y[1] - y[0]) / (x[1] - x[0]);
    ideal.intercept = y[0] - ideal.slope * x[0];
    ideal.span = std::abs(toDouble(y[1] - y[0]));
    ideal.method = "end-points";
    return ideal;
}

/// Of a set point, by direction.
struct Spreads : std::array<Spread, 3> {
    void operator+=(const Spreads& other) {
        for (std::size_t d = 0; d < size(); ++d)
            (*this)[d] += other[d];
    }
};

/// Errors of a sample by set point and direction.
struct Errors {
    std::vector<Spreads> at;                                                      ///< by set point
    std::map<std::pair<std::int32_t, std::int32_t>, std::array<Spread, 3>> inRun; ///< by (set point, run)
};

Errors errorsOf(const Sample& sample, const Ideal& ideal) {
    const auto exactError = [&](std::size_t i) { return toDouble(sample.indication[i] - (ideal.intercept + ideal.slope * sample.reference[i])); };
    const auto plainError = [&, intercept = toDouble(ideal.intercept), slope = toDouble(ideal.slope)](std::size_t i) {
        return sample.indication.high[i] - (intercept + slope * sample.reference.high[i]);
    };
    const auto directionOf = [&](std::size_t i) {
        return sample.direction.empty() ? std::size_t{0} : static_cast<std::size_t>(sample.direction[i]);
    };
    const auto spreadsOf = [&](const auto& errorOf) {
        return classSums<Spreads>(sample.size(), sample.groupValue.size(), [&](std::vector<Spreads>& spreads, std::size_t first, std::size_t last) {
            for (std::size_t i = first; i < last; ++i)
                spreads[static_cast<std::size_t>(sample.group[i])][directionOf(i)].add(errorOf(i));
        });
    };
    Errors errors;
    const bool doubles = sample.reference.low.empty() && sample.indication.low.empty();
    errors.at = doubles ? spreadsOf(plainError) : spreadsOf(exactError);
    const bool byRun = !sample.direction.empty() && sample.size() <= 100'000;
    for (std::size_t i = 0; byRun && i < sample.size(); ++i)
        errors.inRun[{sample.group[i], sample.run.empty() ? 0 : sample.run[i]}][directionOf(i)].add(exactError(i));
    return errors;
}

constexpr std::size_t rising = 1, falling = 2;

class FigureMaker {
  public:
    FigureMaker(const Sample& sample, const Errors& errors, double span)
        : sample_(sample), errors_(errors), span_(span) {}

    void fill(ProcessFigures& figures) const {
        for (std::size_t i = 0; i < errors_.at.size(); ++i)
            for (const Spread& spread : errors_.at[i])
                if (spread.n > 0)
                    single(figures, spread, i);
        for (const auto& [place, spreads] : errors_.inRun)
            if (spreads[rising].n > 0 && spreads[falling].n > 0)
                larger(figures.hysteresisInCycle, std::abs(spreads[rising].mean() - spreads[falling].mean()),
                       static_cast<std::size_t>(place.first));
        lines(figures);
    }

  private:
    [[nodiscard]] ProcessFigure figure(double value, std::size_t at) const {
        return {value, 100 * value / span_, sample_.groupValue[at]};
    }
    void larger(std::optional<ProcessFigure>& held, double value, std::size_t at) const {
        if (!held || std::abs(value) > std::abs(held->value))
            held = figure(value, at);
    }
    void single(ProcessFigures& figures, const Spread& spread, std::size_t i) const {
        larger(figures.measuredErrorMax, spread.mean(), i);
        if (!figures.inaccuracyHigh || spread.most > figures.inaccuracyHigh->value)
            figures.inaccuracyHigh = figure(spread.most, i);
        if (!figures.inaccuracyLow || spread.least < figures.inaccuracyLow->value)
            figures.inaccuracyLow = figure(spread.least, i);
        if (spread.n > 1)
            larger(figures.nonRepeatability, spread.most - spread.least, i);
        const auto& here = errors_.at[i];
        if (here[rising].n > 0 && here[falling].n > 0)
            larger(figures.hysteresis, std::abs(here[rising].mean() - here[falling].mean()), i);
    }
    void lines(ProcessFigures& figures) const {
        std::vector<double> x, y;
        std::vector<std::size_t> group;
        for (std::size_t i = 0; i < errors_.at.size(); ++i) {
            double sum = 0;
            int n = 0;
            for (const Spread& spread : errors_.at[i])
                if (spread.n > 0) {
                    sum += spread.mean();
                    ++n;
                }
            if (n == 0)
                continue;
            x.push_back(sample_.groupValue[i]);
            y.push_back(sum / n);
            group.push_back(i);
        }
        if (x.size() < 3)
            return;
        const auto put = [&](std::optional<ProcessFigure>& held, const DeviationLine& line) {
            held = figure(line.deviation, group[line.at]);
        };
        put(figures.nonLinearityTerminal, terminalLine({x, y}));
        put(figures.nonLinearityIndependent, minimaxLine({x, y}));
        put(figures.nonLinearityZeroBased, zeroBasedLine({x, y}));
    }

    const Sample& sample_;
    const Errors& errors_;
    double span_;
};

} // namespace

std::optional<ProcessFigures> processFigures(const Sample& sample, const Item& item) {
    if (sample.groupValue.size() < 2 || sample.groupValue.size() > mostSetPoints ||
        sample.reference.size() != sample.size())
        return std::nullopt;
    const Ideal ideal = idealOf(sample, item);
    if (!(ideal.span > 0) || !std::isfinite(ideal.span))
        return std::nullopt;
    ProcessFigures figures;
    figures.span = ideal.span;
    if (ideal.method)
        figures.warnings.push_back({WarningCode::ApproximateMethod, {{"figure", "span"}, {"method", ideal.method}}});
    const Errors errors = errorsOf(sample, ideal);
    FigureMaker(sample, errors, ideal.span).fill(figures);
    return figures;
}

} // namespace spanwright
