// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Diagnostics.h"
#include "core/diagnose/Finding.h"
#include "core/fit/Fit.h"
#include "core/performance/ProcessFigures.h"
#include "core/split/VarianceSplit.h"

#include <optional>
#include <vector>

namespace spanwright {

/// All that the rules look at. Pointers may be null where a part does not exist.
struct FindingsInput {
    const Record& record;
    Phase phase;
    const Sample& sample; ///< the readings used
    const Fit* fit = nullptr;
    const Residuals* residuals = nullptr;
    const VarianceSplit* split = nullptr;
    const Diagnostics* diagnostics = nullptr;
    const ProcessFigures* performance = nullptr;
    std::optional<double> residualSdWithAll =
        std::nullopt; ///< of the same function fitted to the excluded readings too
};

/// What the figures mean, most serious first, within a severity in order of consequence. A rule looks at 1 % where it
/// would make somebody repeat work, and at 5 % where a change of function would follow; every finding carries the
/// figures that made it. The thresholds are common practice unless a source stands beside the rule.
[[nodiscard]] std::vector<Finding> findings(const FindingsInput& input);

} // namespace spanwright
