// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/session/JsonScanner.h"

#include <cstdint>

namespace spanwright {

/// ISO 8601, null for 0 (not known), and the bare number of milliseconds outside the years 0 to 9999.
void appendMoment(std::string& json, std::int64_t milliseconds);
/// Reads what appendMoment() wrote; SessionValueBad at `key` otherwise.
std::int64_t readMoment(JsonScanner& scan, std::string_view key);

} // namespace spanwright
