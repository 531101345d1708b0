// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/Evaluation.h"

#include <algorithm>

namespace spanwright {

std::size_t RowFigures::indexOf(ReadingId id) const {
    const auto found = std::lower_bound(ids.begin(), ids.end(), id);
    return found != ids.end() && *found == id ? static_cast<std::size_t>(found - ids.begin()) : size();
}

const PhaseEvaluation* Evaluation::phase(Phase which) const {
    const auto& held = phases[static_cast<std::size_t>(which)];
    return held ? &*held : nullptr;
}

} // namespace spanwright
