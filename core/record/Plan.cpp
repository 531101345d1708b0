// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/Plan.h"

#include <map>
#include <tuple>

namespace spanwright {

namespace {

void appendPass(std::vector<PlannedReading>& all, const Plan& plan, Phase phase, int run, Direction direction) {
    const std::size_t count = plan.setPoints.size();
    for (std::size_t i = 0; i < count; ++i)
        for (int repeat = 0; repeat < plan.repeats; ++repeat)
            all.push_back({phase, run, direction, plan.setPoints[direction == Direction::Falling ? count - 1 - i : i]});
}

} // namespace

std::vector<PlannedReading> plannedReadings(const Plan& plan, Phase phase) {
    std::vector<PlannedReading> all;
    const int runs = phase == Phase::AsFound ? plan.runs : plan.asLeftRuns;
    for (int run = 1; run <= runs; ++run) {
        if (plan.directions != PlanDirections::Falling)
            appendPass(all, plan, phase, run, Direction::Rising);
        if (plan.directions != PlanDirections::Rising)
            appendPass(all, plan, phase, run, Direction::Falling);
    }
    return all;
}

std::vector<PlannedReading> openPlanned(const Plan& plan, const ReadingColumns& readings, Phase phase, Met met) {
    using Visit = std::tuple<int, Direction, double>;
    std::map<Visit, int> taken;
    for (std::size_t i = 0; i < readings.size(); ++i)
        if (readings.phases()[i] == phase && readings.setPoint().has(i) && (met == Met::WhenBegun || readings.complete(i)))
            ++taken[{readings.runs()[i], readings.directions()[i], readings.setPoint().toDouble(i)}];
    const auto take = [&](const Visit& visit) {
        const auto found = taken.find(visit);
        return found != taken.end() && found->second-- > 0;
    };
    std::vector<PlannedReading> open;
    for (const PlannedReading& planned : plannedReadings(plan, phase)) {
        const double at = planned.setPoint.toDouble();
        if (!take({planned.run, planned.direction, at}) && !take({planned.run, Direction::Unknown, at}) && !take({0, planned.direction, at}) &&
            !take({0, Direction::Unknown, at}))
            open.push_back(planned);
    }
    return open;
}

std::optional<PlannedReading> nextPlanned(const Plan& plan, const ReadingColumns& readings, Phase phase) {
    const std::vector<PlannedReading> open = openPlanned(plan, readings, phase, Met::WhenComplete);
    return open.empty() ? std::nullopt : std::optional(open.front());
}

} // namespace spanwright
