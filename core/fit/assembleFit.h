// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/FitTask.h"
#include "core/fit/fitFunction.h"

namespace spanwright {

/// The fit as it is reported, from a solved model: everything is rounded here, once.
FitOutcome assembleFit(const FitTask& task, SolvedModel solved);

struct SumsOfSquares {
    DoubleDouble total = 0.0, regression = 0.0;
};

/// The figures alone, where sums and residuals were made elsewhere.
Fit assembleFigures(const FitTask& task, SolvedModel solved, const SumsOfSquares& sums);

} // namespace spanwright
