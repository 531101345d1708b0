// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/fitFunction.h"

#include <optional>

namespace spanwright {

/// Polynomials with equal weights through very many readings on exact grids, by StreamedFit; empty where another
/// function or method is chosen, or where the streams would lose digits.
std::optional<FitOutcome> fitMany(const Sample& sample, const Choices& choices);

} // namespace spanwright
