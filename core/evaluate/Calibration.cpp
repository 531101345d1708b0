// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/Calibration.h"

namespace spanwright {

const PhaseEvaluation* calibrationOf(const Evaluation& evaluation, Phase chosen) {
    for (const Phase phase : {chosen, chosen == Phase::AsFound ? Phase::AsLeft : Phase::AsFound})
        if (const PhaseEvaluation* found = evaluation.phase(phase); found != nullptr && found->fit)
            return found;
    return nullptr;
}

} // namespace spanwright
