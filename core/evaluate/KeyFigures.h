// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"
#include "core/evaluate/Evaluation.h"

#include <string>
#include <utility>
#include <vector>

namespace spanwright {

/// The figures that are stored with a session and compared when it is opened, in a fixed order: "as-found.coefficients.b0" and
/// the shortest text that reads back as the same double. What does not exist is left out.
std::vector<std::pair<std::string, std::string>> keyFigures(const Evaluation& evaluation);

/// One ResultsDiffer for each figure that was stored and is now another one, or is no longer there. Figures that were not stored
/// (by an older program) are no difference. Numbers that agree to 12 digits agree: another machine may round the last ones
/// elsewhere.
std::vector<Warning> differingFigures(const std::vector<std::pair<std::string, std::string>>& stored, const Evaluation& now);

} // namespace spanwright
