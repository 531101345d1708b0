// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <vector>

namespace spanwright {

/// The planned readings of a phase for which no reading has been begun, in the order of the plan. A reading that lacks a value
/// has been begun. Beyond a few thousand readings, which come from a file, no plan is followed and nothing remains.
std::vector<PlannedReading> remainingPlanned(const Record& record, Phase phase);

/// What stands at a planned reading before a value is typed.
Reading readingFor(const PlannedReading& planned, const Plan& plan);

/// The phase's readings that were begun: those at planned places, and all.
struct Taken {
    std::size_t planned = 0; ///< readings that the plan asks for
    std::size_t atPlan = 0;  ///< complete ones among them
    std::size_t all = 0;     ///< complete readings of the phase
};
Taken takenOf(const Record& record, Phase phase);

} // namespace spanwright
