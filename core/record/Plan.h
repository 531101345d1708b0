// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"

#include <optional>
#include <vector>

namespace spanwright {

enum class PlanDirections { Rising, Falling, RisingThenFalling };

/// Which set points, how approached, how often.
struct Plan {
    std::vector<Decimal> setPoints; ///< in rising order
    PlanDirections directions = PlanDirections::RisingThenFalling;
    int runs = 1;         ///< passes of the set points
    int repeats = 1;      ///< readings taken at each visit
    int asLeftRuns = 0;   ///< passes after adjustment; 0: none planned
    int dwellSeconds = 0; ///< least wait at a set point
    int preloads = 0;     ///< exercises to full scale before the first run
    std::vector<Decimal> positions; ///< how the item is turned about its axis in run 1, 2, …, degrees; empty: never turned
    bool referenceTyped = true; ///< false: the reference is the set point and only the indication is typed
    bool operator==(const Plan&) const = default;
};

/// One reading that the plan asks for.
struct PlannedReading {
    Phase phase = Phase::AsFound;
    int run = 1;
    Direction direction = Direction::Unknown;
    Decimal setPoint;
    bool operator==(const PlannedReading&) const = default;
};

/// All readings of a phase in the order in which they are to be taken.
std::vector<PlannedReading> plannedReadings(const Plan& plan, Phase phase);

/// Whether a reading meets the plan when it is complete, or as soon as it was begun.
enum class Met { WhenComplete, WhenBegun };

/// The planned readings of the phase that no reading meets yet, in their order: the n-th visit of (run, direction, set point) is met by the
/// n-th reading there. A reading whose run or direction nobody stated, as in a table taken in, meets any of its set point.
std::vector<PlannedReading> openPlanned(const Plan& plan, const ReadingColumns& readings, Phase phase, Met met);

/// The first of them that has no complete reading. Empty when the plan is done.
std::optional<PlannedReading> nextPlanned(const Plan& plan, const ReadingColumns& readings, Phase phase);

} // namespace spanwright
