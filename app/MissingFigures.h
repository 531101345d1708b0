// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"

#include <string>
#include <vector>

namespace spanwright {

/// Why figures that are null do not exist: one warning a reason, naming the figures by their path in figures JSON. Those that a
/// warning of the evaluation already explains are left out.
std::vector<Warning> reasonsFor(const std::vector<std::string>& missing, const PhaseEvaluation& evaluation);

} // namespace spanwright
