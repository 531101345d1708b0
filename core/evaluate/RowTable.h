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

/// Every reading of the phase with what follows for it. With weights w, residuals e = y − ŷ in the unit of the ordinate, leverage h,
/// S = Σ w e², ν = n − p and s² = S/ν (Cook and Weisberg, "Residuals and Influence in Regression", 1982, 2.2 and 3.1):
///   standardised  √w e / (s √(1 − h))
///   studentised   √w e √((ν − 1)/(S (1 − h) − w e²)), externally
///   Cook          w e² h / (p s² (1 − h)²)
/// NaN where a reading takes no part, or a divisor is zero.
RowFigures rowTable(const RowSources& sources);

} // namespace spanwright
