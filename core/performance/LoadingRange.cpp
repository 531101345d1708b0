// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/performance/LoadingRange.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

LoadingRange loadingRange(const ForceFigures& figures, double computed) {
    double lowest = INFINITY;
    for (const ForceStep& step : figures.steps)
        lowest = std::min(lowest, std::abs(step.force));
    if (std::isfinite(lowest) && computed < lowest)
        return {lowest, true};
    return {computed, false};
}

} // namespace spanwright
