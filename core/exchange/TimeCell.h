// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

namespace spanwright {

/// In which order the numbers of a date stand. A year of four digits in front always means year, month, day.
enum class DateOrder { YearMonthDay, DayMonthYear, MonthDayYear };

/// Milliseconds since 1970-01-01 UTC of "2026-03-01T08:15:30.250+01:00", "01.03.2026 08:15:30,25", "3/1/2026 8:15 PM", … A time
/// without a zone is taken as UTC. A date alone is its midnight. Empty when the text is no such time or no day of the calendar
/// in that order.
std::optional<std::int64_t> parseTime(std::string_view text, DateOrder order);

/// "2026-03-01T08:15:30.250Z"; without the fraction when it is zero.
std::string isoTime(std::int64_t milliseconds);

} // namespace spanwright
