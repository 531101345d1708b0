// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/PlanOfReadings.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr std::size_t MostSetPoints = 1000;
constexpr std::size_t MostFollowed = 5000; ///< more readings come from a logger, which follows no plan of runs and visits

bool below(const Decimal& a, const Decimal& b) {
    return compareValue(a, b) < 0;
}

/// Each once, in rising order; empty when there are too many for a plan.
std::vector<Decimal> setPointsIn(const DecimalColumn& column) {
    std::vector<Decimal> points;
    for (std::size_t i = 0; i < column.size(); ++i) {
        const std::optional<Decimal> value = column.at(i);
        if (!value)
            continue;
        const auto place = std::lower_bound(points.begin(), points.end(), *value, below);
        if (place != points.end() && compareValue(*place, *value) == 0)
            continue;
        points.insert(place, *value);
        if (points.size() > MostSetPoints)
            return {};
    }
    return points;
}

/// Set points in the order taken as passes over them in one sense.
struct Passes {
    bool onlyThatWay = true; ///< every step the other way returns to the first set point
    int count = 1;
};

Passes passesOver(const DecimalColumn& column, const Decimal& first, bool rising) {
    Passes passes;
    std::optional<Decimal> before;
    for (std::size_t i = 0; i < column.size(); ++i) {
        const std::optional<Decimal> value = column.at(i);
        if (!value)
            continue;
        const int step = before ? compareValue(*value, *before) : 0;
        if (rising ? step < 0 : step > 0) {
            passes.onlyThatWay = passes.onlyThatWay && compareValue(*value, first) == 0;
            ++passes.count;
        }
        before = value;
    }
    return passes;
}

struct Ways {
    PlanDirections directions = PlanDirections::RisingThenFalling;
    int runs = 1;
};

Ways waysOf(const ReadingColumns::Block& readings, const std::vector<Decimal>& points) {
    const auto stated = [&](Direction direction) {
        return std::find(readings.directions.begin(), readings.directions.end(), direction) != readings.directions.end();
    };
    const Passes rising = passesOver(readings.setPoint, points.front(), true), falling = passesOver(readings.setPoint, points.back(), false);
    Ways ways;
    if (stated(Direction::Rising) != stated(Direction::Falling))
        ways.directions = stated(Direction::Rising) ? PlanDirections::Rising : PlanDirections::Falling;
    else if (!stated(Direction::Rising) && rising.onlyThatWay)
        ways = {PlanDirections::Rising, rising.count};
    else if (!stated(Direction::Rising) && falling.onlyThatWay)
        ways = {PlanDirections::Falling, falling.count};
    if (!readings.runs.empty())
        if (const std::int32_t last = *std::max_element(readings.runs.begin(), readings.runs.end()); last > 0)
            ways.runs = last;
    return ways;
}

} // namespace

Plan planOfReadings(Plan plan, const ReadingColumns::Block& readings) {
    const std::vector<Decimal> points = setPointsIn(readings.setPoint);
    if (points.empty())
        return plan;
    Ways ways = waysOf(readings, points);
    const std::size_t taken = readings.setPoint.size() - readings.setPoint.missing();
    const std::size_t pass = points.size() * (ways.directions == PlanDirections::RisingThenFalling ? 2 : 1);
    if (taken > MostFollowed || pass * static_cast<std::size_t>(ways.runs) > MostFollowed)
        ways.runs = 1;
    const std::size_t visits = pass * static_cast<std::size_t>(ways.runs);
    plan.setPoints = points;
    plan.directions = ways.directions;
    (readings.phase == Phase::AsFound ? plan.runs : plan.asLeftRuns) = ways.runs;
    plan.repeats = taken <= MostFollowed && taken % visits == 0 ? static_cast<int>(taken / visits) : 1;
    return plan;
}

} // namespace spanwright
