// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <cstdint>
#include <optional>

namespace spanwright {

/// Seconds between a reading and the one before, where the set point was changed within a run and the planned wait was not kept; empty
/// where it was kept, and where the times are not known.
[[nodiscard]] std::optional<std::int64_t> hurried(const Plan& plan, const Reading& before, const Reading& typed);

} // namespace spanwright
