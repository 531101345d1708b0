// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/PlanRows.h"

#include <map>
#include <tuple>

namespace spanwright {

namespace {

using Visit = std::tuple<int, Direction, double>;
constexpr std::size_t mostFollowed = 5000;

std::map<Visit, int> visits(const Record& record, Phase phase, bool completeOnly) {
    std::map<Visit, int> count;
    const ReadingColumns& readings = *record.readings;
    for (std::size_t i = 0; i < readings.size(); ++i)
        if (readings.phases()[i] == phase && readings.setPoint().has(i) && (!completeOnly || readings.complete(i)))
            ++count[{readings.runs()[i], readings.directions()[i], readings.setPoint().toDouble(i)}];
    return count;
}

std::vector<PlannedReading> without(const Record& record, Phase phase, std::map<Visit, int> met) {
    std::vector<PlannedReading> left;
    for (const PlannedReading& planned : plannedReadings(record.plan, phase))
        if (met[{planned.run, planned.direction, planned.setPoint.toDouble()}]-- <= 0)
            left.push_back(planned);
    return left;
}

} // namespace

std::vector<PlannedReading> remainingPlanned(const Record& record, Phase phase) {
    if (record.readings->size() > mostFollowed)
        return {};
    return without(record, phase, visits(record, phase, false));
}

Reading readingFor(const PlannedReading& planned, const Plan& plan) {
    Reading reading;
    reading.phase = planned.phase;
    reading.run = planned.run;
    reading.direction = planned.direction;
    reading.setPoint = planned.setPoint;
    if (!plan.referenceTyped)
        reading.reference = planned.setPoint;
    return reading;
}

Taken takenOf(const Record& record, Phase phase) {
    Taken taken;
    const ReadingColumns& readings = *record.readings;
    for (std::size_t i = 0; i < readings.size(); ++i)
        if (readings.phases()[i] == phase && readings.complete(i))
            ++taken.all;
    if (readings.size() > mostFollowed)
        return taken;
    taken.planned = plannedReadings(record.plan, phase).size();
    taken.atPlan = taken.planned - without(record, phase, visits(record, phase, true)).size();
    return taken;
}

} // namespace spanwright
