// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/performance/ForceFigures.h"

#include "core/fit/DegreeLadder.h"
#include "core/fit/fitFunction.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace spanwright {
namespace {

/// Rising and falling deflections at one force by run; the mean where a run was there more than once.
struct Deflections {
    std::map<int, double> rising, falling;
};

struct Table {
    std::map<double, Deflections> at;         ///< by force
    std::map<int, std::vector<double>> zeros; ///< readings at force 0 by run, in the order taken
};

Table tableOf(const Sample& sample) {
    struct Sum {
        double sum = 0;
        int n = 0;
    };
    std::map<double, std::map<std::pair<int, bool>, Sum>> sums;
    Table table;
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const double force = sample.groupValue[static_cast<std::size_t>(sample.group[i])];
        const bool falling = !sample.direction.empty() && sample.direction[i] == Direction::Falling;
        if (!(std::abs(force) > 0)) {
            table.zeros[sample.run[i]].push_back(sample.indication.high[i]);
            continue;
        }
        Sum& sum = sums[force][{sample.run[i], falling}];
        sum.sum += sample.indication.high[i];
        ++sum.n;
    }
    // Deflections are counted from the zero before the series, where it was read.
    const auto zeroOf = [&](int run) {
        const auto zero = table.zeros.find(run);
        return zero == table.zeros.end() ? 0 : zero->second.front();
    };
    for (const auto& [force, byRun] : sums)
        for (const auto& [place, sum] : byRun)
            (place.second ? table.at[force].falling : table.at[force].rising)[place.first] =
                sum.sum / sum.n - zeroOf(place.first);
    return table;
}

/// The rising readings of given runs at forces other than 0.
Sample risingOf(const Sample& sample, const std::vector<int>& runs, const Table& table) {
    Sample part;
    part.referenceUnit = sample.referenceUnit;
    part.indicationUnit = sample.indicationUnit;
    std::map<double, std::int32_t> group;
    for (const auto& [force, deflections] : table.at) {
        group.emplace(force, static_cast<std::int32_t>(part.groupValue.size()));
        part.groupValue.push_back(force);
    }
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const double force = sample.groupValue[static_cast<std::size_t>(sample.group[i])];
        const bool falling = !sample.direction.empty() && sample.direction[i] == Direction::Falling;
        if (falling || !(std::abs(force) > 0) || std::find(runs.begin(), runs.end(), sample.run[i]) == runs.end())
            continue;
        const auto zero = table.zeros.find(sample.run[i]);
        part.rows.push_back(sample.rows[i]);
        part.reference.push_back(sample.reference[i]);
        part.indication.push_back(sample.indication[i] - (zero == table.zeros.end() ? 0 : zero->second.front()));
        part.group.push_back(group[force]);
        part.run.push_back(sample.run[i]);
    }
    return part;
}

Choices polynomialChoice(const Choices& choices, int degree) {
    Choices changed = choices;
    changed.function =
        degree < 2 ? FunctionChoice{FunctionFamily::Line, 0} : FunctionChoice{FunctionFamily::Polynomial, degree};
    changed.fit = FitDirection::Indication;
    changed.method = Method::LeastSquares;
    changed.weights = Weights::Equal;
    changed.covariance = CovarianceScale::Residuals;
    return changed;
}

ForceStep stepOf(double force, const Deflections& here, const ForceSeries& series) {
    ForceStep step;
    step.force = force;
    double low = INFINITY, high = -INFINITY, sum = 0, reversal = 0;
    int n = 0, reversals = 0;
    for (const int run : series.rotated) {
        const auto up = here.rising.find(run);
        if (up == here.rising.end())
            continue;
        low = std::min(low, up->second);
        high = std::max(high, up->second);
        sum += up->second;
        ++n;
        const auto down = here.falling.find(run);
        if (down != here.falling.end()) {
            reversal += std::abs((down->second - up->second) / up->second);
            ++reversals;
        }
    }
    if (n > 0)
        step.mean = sum / n;
    if (n > 1)
        step.reproducibility = 100 * (high - low) / std::abs(step.mean);
    if (reversals > 0)
        step.reversibility = 100 * reversal / reversals;
    const auto first = here.rising.find(series.first.value_or(0)), again = here.rising.find(series.again.value_or(0));
    if (series.again && first != here.rising.end() && again != here.rising.end())
        step.repeatability = 100 * std::abs((again->second - first->second) / ((first->second + again->second) / 2));
    return step;
}

std::optional<ForceFigures::Largest> largestOf(const std::vector<ForceStep>& steps, std::optional<double> ForceStep::*figure) {
    std::optional<ForceFigures::Largest> largest;
    for (const ForceStep& step : steps)
        if (step.*figure && (!largest || std::abs(*(step.*figure)) > std::abs(largest->value)))
            largest = {*(step.*figure), step.force};
    return largest;
}

std::optional<double> zeroFigure(const Table& table, double largest) {
    std::optional<double> zero;
    for (const auto& [run, readings] : table.zeros)
        if (readings.size() > 1)
            zero = std::max(zero.value_or(0), 100 * std::abs((readings.back() - readings.front()) / largest));
    return zero;
}

} // namespace

std::optional<ForceSeries> turnedSeries(const std::vector<Decimal>& positions, const std::vector<std::int32_t>& runs) {
    ForceSeries series;
    std::map<double, int> firstIn; // run by position
    for (std::size_t i = 0; i < positions.size(); ++i) {
        const int run = static_cast<int>(i) + 1;
        if (std::find(runs.begin(), runs.end(), run) == runs.end())
            continue;
        const double turn = std::fmod(std::fmod(positions[i].toDouble(), 360) + 360, 360);
        const auto [place, isNew] = firstIn.emplace(turn, run);
        if (isNew) {
            series.rotated.push_back(run);
        } else if (!series.again) {
            series.first = place->second;
            series.again = run;
        }
    }
    if (series.rotated.size() < 2)
        return std::nullopt;
    return series;
}

std::optional<ForceFigures> forceFigures(const Sample& sample, const Choices& choices, double resolution,
                                         const std::vector<Decimal>& positions) {
    if (sample.run.empty() || sample.reference.size() != sample.size())
        return std::nullopt;
    const std::optional<ForceSeries> series = turnedSeries(positions, sample.run);
    if (!series)
        return std::nullopt;
    const Table table = tableOf(sample);
    if (table.at.size() < 3)
        return std::nullopt;

    const Sample turned = risingOf(sample, series->rotated, table);
    ForceFigures figures;
    figures.series = *series;
    figures.degree = degreeLadder(turned, polynomialChoice(choices, 1), resolution).byE74;
    figures.interpolationDegree = std::min(figures.degree, 3);
    const auto outcome = fitFunction(turned, polynomialChoice(choices, figures.degree));
    const auto curve = fitFunction(turned, polynomialChoice(choices, figures.interpolationDegree));
    if (!outcome || !curve)
        return std::nullopt;
    for (const auto& [force, deflections] : table.at) {
        ForceStep step = stepOf(force, deflections, *series);
        const double computed = curve->fit.curve->value(force);
        if (std::abs(computed) > 0)
            step.interpolation = 100 * (step.mean - computed) / computed;
        figures.steps.push_back(step);
    }
    figures.reproducibility = largestOf(figures.steps, &ForceStep::reproducibility);
    figures.repeatability = largestOf(figures.steps, &ForceStep::repeatability);
    figures.interpolation = largestOf(figures.steps, &ForceStep::interpolation);
    figures.reversibility = largestOf(figures.steps, &ForceStep::reversibility);
    const ForceStep& largest = figures.steps.back();
    figures.zero = zeroFigure(table, largest.mean);
    figures.residualSd = outcome->fit.residualSd;
    figures.lowerLimitFactor = std::max(2.4 * figures.residualSd, resolution);
    figures.lowerLimitForce = figures.lowerLimitFactor * std::abs(largest.force / largest.mean);
    figures.lowestForceClassA = 400 * figures.lowerLimitForce;
    figures.lowestForceClassAA = 2000 * figures.lowerLimitForce;
    return figures;
}

} // namespace spanwright
