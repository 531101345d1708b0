// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/fit/Sample.h"

namespace spanwright {

/// What the rows of a phase are made of. `used` are the readings that count, `all` the complete ones with the excluded among them;
/// both are the same object when nothing is excluded.
struct RowSources {
    const Record& record;
    Phase phase;
    const Sample& used;
    const Sample& all;
    const Fit* fit = nullptr;             ///< null: only what was read
    const Residuals* residuals = nullptr; ///< of `used`
};

/// Every reading of the phase with what follows for it (core/diagnose/Influence). NaN where a reading takes no part or a figure does
/// not exist.
RowFigures rowTable(const RowSources& sources);

} // namespace spanwright
