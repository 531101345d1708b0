// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"

#include <optional>

namespace spanwright {

/// The calibration function of a phase as it is printed. Coefficients of polynomials get the fewest digits with which no value in
/// the valid range moves by more than 1/20 of the smallest U; other functions the shortest text that reads back as the same
/// number. Check values at both ends and the middle let the user try his own formula. Empty where there is no fit.
std::optional<FunctionSection> functionSection(const PhaseEvaluation& phase);

} // namespace spanwright
