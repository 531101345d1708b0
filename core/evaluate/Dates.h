// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

namespace spanwright {

/// Days since 1970-01-01 of an ISO 8601 calendar date ("2026-11-30"); empty when it is none.
std::optional<std::int64_t> dayNumber(std::string_view date);

/// The calendar date in UTC of a time in ms since 1970-01-01 UTC.
std::string dateOf(std::int64_t milliseconds);

} // namespace spanwright
