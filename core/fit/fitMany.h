// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/fitFunction.h"

#include <optional>

namespace spanwright {

/// Polynomials with equal weights through very many readings on exact grids, by StreamedFit; empty where another
/// function or method is chosen, or where the streams would lose digits.
std::optional<FitOutcome> fitMany(const Sample& sample, const Choices& choices);

/// The same function through `all`, from a fit of the readings `used` among them: each of the others is added to its sums,
/// which takes no pass over the readings. Empty where the fit was not streamed.
std::optional<Fit> fitTakenBackIn(const FitOutcome& outcome, const Sample& used, const Sample& all, const Choices& choices);

} // namespace spanwright
