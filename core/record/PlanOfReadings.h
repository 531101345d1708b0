// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Plan.h"

namespace spanwright {

/// A plan with what readings taken elsewhere show of theirs: set points, directions, runs of their phase, readings at each visit; the
/// rest as it was. Where no direction is stated, the order of the set points tells whether they only rise or only fall; where no run is,
/// each return to the first set point begins one. Unchanged where no set point is stated, or more than a thousand are.
Plan planOfReadings(Plan plan, const ReadingColumns::Block& readings);

} // namespace spanwright
