// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/PrintedGrid.h"

#include "core/budget/ReadBackBudget.h"
#include "core/evaluate/PrintedFunction.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr int Steps = 400;
constexpr std::size_t MostReadings = 400;
constexpr double Reserve = 0.999; // for what lies between two places

/// Abscissae of the readings that count, each once, thinned to at most MostReadings.
std::vector<double> ofReadings(const PhaseEvaluation& phase) {
    const RowFigures& rows = phase.rows;
    const std::vector<double>& all = phase.fit->direction == FitDirection::Indication ? rows.reference : rows.indication;
    std::vector<double> used;
    const std::size_t step = std::max<std::size_t>(1, all.size() / MostReadings);
    for (std::size_t i = 0; i < all.size(); i += step)
        if (rows.excluded[i] == 0 && std::isfinite(all[i]))
            used.push_back(all[i]);
    return used;
}

/// U of the function at a place that no value can be read back from: the smallest that is stated at a point.
double smallestStated(const PhaseEvaluation& phase) {
    double smallest = std::numeric_limits<double>::infinity();
    for (const SetPointBudget& point : phase.budget.points)
        if (point.expanded > 0)
            smallest = std::min(smallest, point.expanded);
    return smallest;
}

} // namespace

PrintedGrid::PrintedGrid(const Record& record, const PhaseEvaluation& phase, InverseHeld inverse) : fit_(*phase.fit), inverse_(inverse) {
    const Fit& fit = fit_;
    std::vector<double> at = ofReadings(phase);
    for (int i = 0; i <= Steps; ++i)
        at.push_back(i == Steps ? fit.high : fit.low + (fit.high - fit.low) * i / Steps);
    for (const double knot : fit.curve->knots())
        at.push_back(knot);
    std::sort(at.begin(), at.end());
    at.erase(std::unique(at.begin(), at.end()), at.end());
    std::erase_if(at, [&](double x) { return x < fit.low || x > fit.high; });
    const auto budgets = readBackBudgets(record, fit, at);
    for (std::size_t i = 0; i < at.size(); ++i) {
        Place place{at[i], fit.curve->value(at[i]), 0, 0};
        if (fit.function.family == FunctionFamily::Constant) {
            place.expanded = smallestStated(phase);
        } else if (const auto& budget = budgets[i]) {
            const bool forward = fit.direction == FitDirection::Indication;
            place.expanded = forward ? budget->expanded : budget->expandedReference;
            place.expandedAbscissa = forward ? budget->expandedReference : budget->expanded;
        }
        places_.push_back(place);
    }
    const auto known = [](const Place& place) { return place.expanded > 0 && std::isfinite(place.expanded); };
    bounded_ = std::any_of(places_.begin(), places_.end(), known);
    if (bounded_)
        std::erase_if(places_, [&](const Place& place) { return !known(place); });
}

void PrintedGrid::boundByScatter() {
    const bool weighted = fit_.weights != Weights::Equal || fit_.method == Method::BothUncertain;
    if (weighted || !(fit_.residualSd > 0))
        return;
    for (Place& place : places_) {
        place.expanded = fit_.residualSd;
        place.expandedAbscissa = fit_.residualSd / std::fabs(fit_.curve->derivative(place.x));
    }
    bounded_ = true;
}

double PrintedGrid::largestShare(const LoggerFunction& logger) const {
    const bool inverse = inverse_ == InverseHeld::Yes && logger.hasClosedInverse();
    double largest = 0;
    for (const Place& place : places_) {
        double share = std::fabs(logger.value(place.x) - place.y) / place.expanded;
        if (inverse && std::isfinite(place.expandedAbscissa))
            if (const double back = std::fabs(logger.inverse(place.y) - place.x) / place.expandedAbscissa; !(back <= share))
                share = back;
        if (std::isnan(share))
            return share;
        largest = std::max(largest, share);
    }
    return largest;
}

bool PrintedGrid::holds(const LoggerFunction& logger) const {
    return largestShare(logger) <= PrintedShareOfU * Reserve;
}

double PrintedGrid::smallestExpanded() const {
    double smallest = std::numeric_limits<double>::infinity();
    for (const Place& place : places_)
        smallest = std::min(smallest, place.expanded);
    return smallest;
}

double PrintedGrid::smallestExpandedAbscissa() const {
    double smallest = std::numeric_limits<double>::infinity();
    for (const Place& place : places_)
        if (place.expandedAbscissa > 0)
            smallest = std::min(smallest, place.expandedAbscissa);
    return smallest;
}

} // namespace spanwright
