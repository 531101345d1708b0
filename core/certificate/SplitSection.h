// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"

namespace spanwright {

/// The variance split of a phase for the printed page; empty without a fitted function.
std::optional<SplitSection> splitSection(const PhaseEvaluation& phase);

/// Force figures for the printed page; empty where the item was not turned.
std::optional<ForceSection> forceSection(const PhaseEvaluation& phase);

} // namespace spanwright
