// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/makeBudget.h"

#include "core/budget/BudgetLines.h"
#include "core/budget/Combine.h"
#include "core/budget/PointMeans.h"
#include "core/budget/ReadBackBudget.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr double Infinite = std::numeric_limits<double>::infinity();

/// What the readings of the phase say about their own spread.
struct Spreads {
    std::optional<Spread> repeatability, runs;
    bool otherPhase = false;
    Side side = Side::Indication; ///< the unit that they are in
};

std::optional<Spread> spreadOf(const std::optional<SplitRow>& row) {
    if (!row || row->df <= 0)
        return std::nullopt;
    return Spread{row->ss / row->df, static_cast<double>(row->df)};
}

std::optional<Spread> componentOf(const VarianceSplit& split, SplitPart part) {
    for (const VarianceComponent& component : split.components)
        if (component.part == part && component.degreesOfFreedom > 0)
            return Spread{component.variance, component.degreesOfFreedom};
    return std::nullopt;
}

/// Pooled within set point and direction (JCGM 100:2008, 4.2.4, note 3), readings moved to equal reference with the sensitivity.
std::optional<Spread> pooled(const Item& item, const Sample& sample) {
    struct Cell {
        double n = 0, mean = 0, ss = 0;
    };
    std::vector<Cell> cells(sample.groupValue.size() * 3);
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const auto group = static_cast<std::size_t>(sample.group[i]);
        const auto direction = sample.direction.empty() ? 0U : static_cast<unsigned>(sample.direction[i]);
        const double reference = toDouble(sample.reference[i]), indication = toDouble(sample.indication[i]);
        const double moved = indication - sensitivityAt(item, nullptr, reference, indication) * (reference - sample.groupValue[group]);
        Cell& cell = cells[group * 3 + direction];
        cell.n += 1;
        const double step = moved - cell.mean;
        cell.mean += step / cell.n;
        cell.ss += step * (moved - cell.mean);
    }
    double ss = 0, df = 0;
    for (const Cell& cell : cells) {
        ss += cell.ss;
        df += std::max(0.0, cell.n - 1);
    }
    return df > 0 ? std::optional(Spread{ss / df, df}) : std::nullopt;
}

/// Where direction is known, pure error holds the hysteresis and is no measure of repeatability.
void takeFrom(const VarianceSplit& split, Spreads& spreads) {
    spreads.repeatability = spreadOf(split.repeatability);
    if (!spreads.repeatability && !split.hysteresis)
        spreads.repeatability = spreadOf(split.pureError);
    spreads.runs = componentOf(split, SplitPart::RunOffset);
}

Spreads spreadsOf(const Record& record, const Sample& sample, const Fit* fit, const VarianceSplit* split,
                  const VarianceSplit* otherPhase) {
    Spreads spreads;
    if (fit == nullptr || split == nullptr) {
        spreads.repeatability = pooled(record.item, sample);
        return spreads;
    }
    spreads.side = fit->direction == FitDirection::Indication ? Side::Indication : Side::Reference;
    takeFrom(*split, spreads);
    if (!spreads.repeatability && otherPhase != nullptr) {
        takeFrom(*otherPhase, spreads);
        spreads.otherPhase = true;
    }
    return spreads;
}

SetPointBudget budgetAt(const Record& record, const PointMeans& point, const Fit* fit, const Spreads& spreads, CoverageFactors& factors) {
    const BudgetPlace place = budgetPlace(record, fit, point.reference, point.indication);
    BudgetLines lines(record, place);
    lines.addStandards();
    lines.addReferenceResolution();
    lines.addIndicationResolution();
    if (spreads.repeatability)
        lines.addSpread(DerivedLine::Repeatability, spreads.side, *spreads.repeatability, point.n, spreads.otherPhase);
    if (spreads.runs)
        lines.addSpread(DerivedLine::RunToRun, spreads.side, *spreads.runs, point.runs, spreads.otherPhase);
    if (point.gap)
        lines.add(DerivedLine::Hysteresis, Side::Indication, Distribution::Rectangular, std::fabs(*point.gap) / 2,
                  divisorOf(Distribution::Rectangular), Infinite);
    lines.addManual();
    return combine(point.setPoint, point.direction, lines.take(), factors, place.slope);
}

} // namespace

Budget makeBudget(const Record& record, const Sample& sample, const Fit* fit, const VarianceSplit* split,
                  const VarianceSplit* otherPhase) {
    Budget budget;
    budget.coverage = record.budget.coverage.toDouble();
    const Spreads spreads = spreadsOf(record, sample, fit, split, otherPhase);
    if (!spreads.repeatability)
        budget.warnings.push_back({WarningCode::FigureUndefined, {{"figure", "repeatability"}, {"reason", "no-replicates"}}});
    if (sample.groupValue.size() > MostStatedPoints)
        budget.warnings.push_back({WarningCode::FigureUndefined, {{"figure", "results"}, {"reason", "too-many-set-points"}}});
    budget.means = pointMeans(record, sample, fit);
    CoverageFactors factors(budget.coverage);
    for (const PointMeans& point : budget.means)
        budget.points.push_back(budgetAt(record, point, fit, spreads, factors));
    if (fit != nullptr && fit->curve != nullptr)
        budget.readBack = worstReadBackBudget(record, *fit);
    return budget;
}

} // namespace spanwright
