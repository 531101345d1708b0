// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Finding.h"
#include "core/record/Record.h"

namespace spanwright {

/// Figures of a finding and the readings concerned as one text, equal only when all of them are.
std::string figuresKey(const Finding& finding);

/// The dismissal that holds for a finding; null when it was not dismissed, or when its figures have changed since.
const Dismissal* dismissalOf(const Finding& finding, const Record& record);

} // namespace spanwright
