// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/performance/ForceFigures.h"

namespace spanwright {

/// Where the loading range of a class begins: at the computed limit, but not below the lowest force that was applied, since nothing
/// was read there (ASTM E74; from memory).
struct LoadingRange {
    double from = 0;
    bool lowestApplied = false; ///< `from` is the lowest force applied, above the computed limit
};

/// `computed` is figures.lowestForceClassA or figures.lowestForceClassAA.
LoadingRange loadingRange(const ForceFigures& figures, double computed);

} // namespace spanwright
