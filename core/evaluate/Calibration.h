// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"

namespace spanwright {

/// The phase that the calibration function is taken from: the chosen one, or the other where that has none. Null where neither has.
const PhaseEvaluation* calibrationOf(const Evaluation& evaluation, Phase chosen);

} // namespace spanwright
