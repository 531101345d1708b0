// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

#include <string>

namespace spanwright {

enum class RowsShown { No, Yes };

/// What follows from one phase as one JSON object, keys in a fixed order (see DEVELOPERS.md). A figure that does not exist is
/// null, and `warnings` says why. The phase must have a fit.
std::string figuresJson(const Record& record, const PhaseEvaluation& evaluation, RowsShown rows);

} // namespace spanwright
