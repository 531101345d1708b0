// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/FitTask.h"
#include "core/fit/fitFunction.h"

namespace spanwright {

/// The fit as it is reported, from a solved model: everything is rounded here, once.
FitOutcome assembleFit(const FitTask& task, SolvedModel solved);

} // namespace spanwright
