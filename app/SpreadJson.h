// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/JsonWriter.h"
#include "core/diagnose/Diagnostics.h"
#include "core/split/VarianceSplit.h"

#include <optional>

namespace spanwright {

/// What the residuals are made of, and what the tests say of them; null where there is none.
void writeSplit(JsonWriter& json, const std::optional<VarianceSplit>& split);
void writeDiagnostics(JsonWriter& json, const std::optional<Diagnostics>& diagnostics);

} // namespace spanwright
