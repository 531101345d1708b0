// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/PlanRows.h"

namespace spanwright {

namespace {

constexpr std::size_t mostFollowed = 5000;

} // namespace

std::vector<PlannedReading> remainingPlanned(const Record& record, Phase phase) {
    if (record.readings->size() > mostFollowed)
        return {};
    return openPlanned(record.plan, *record.readings, phase, Met::WhenBegun);
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
    taken.atPlan = taken.planned - openPlanned(record.plan, readings, phase, Met::WhenComplete).size();
    return taken;
}

} // namespace spanwright
