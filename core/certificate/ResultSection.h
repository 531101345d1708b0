// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"

namespace spanwright {

/// Results, budget and performance figures of a phase, rounded: every U to two significant digits, error, indication and limit to
/// the place of their U, the reference to the place of U in its unit (JCGM 100:2008, 7.2.6; ILAC P14:09/2020). Reference and
/// indication keep the decimals that tell neighbouring set points apart where U is coarser.
PhaseSection phaseSection(const Record& record, const PhaseEvaluation& phase);

} // namespace spanwright
