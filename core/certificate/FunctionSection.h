// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"

#include <optional>

namespace spanwright {

/// The calibration function of a phase as it is printed: in the digits of printedFunction(), so that the certificate and the text for a
/// data logger state the same numbers and the same check values. Empty where there is no fit.
std::optional<FunctionSection> functionSection(const Record& record, const PhaseEvaluation& phase);

} // namespace spanwright
