// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/JsonWriter.h"
#include "core/performance/ForceFigures.h"
#include "core/performance/ProcessFigures.h"

#include <optional>

namespace spanwright {

/// Figures of the process industry; null where there are none.
void writePerformance(JsonWriter& json, const std::optional<ProcessFigures>& performance);

/// Figures of a force transducer, in % of the deflection unless named otherwise; those without readings are left out.
void writeForce(JsonWriter& json, const ForceFigures& force);

} // namespace spanwright
