// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/Dates.h"

#include <array>
#include <charconv>
#include <chrono>

namespace spanwright {

namespace {

std::optional<int> digits(std::string_view text) {
    int number = 0;
    for (const char c : text) {
        if (c < '0' || c > '9')
            return std::nullopt;
        number = 10 * number + (c - '0');
    }
    return number;
}

std::string padded(int number, std::size_t width) {
    std::string text = std::to_string(number);
    return text.size() < width ? std::string(width - text.size(), '0') + text : text;
}

} // namespace

std::optional<std::int64_t> dayNumber(std::string_view date) {
    if (date.size() != 10 || date[4] != '-' || date[7] != '-')
        return std::nullopt;
    const auto year = digits(date.substr(0, 4)), month = digits(date.substr(5, 2)), day = digits(date.substr(8, 2));
    if (!year || !month || !day)
        return std::nullopt;
    const std::chrono::year_month_day calendar{std::chrono::year(*year), std::chrono::month(static_cast<unsigned>(*month)),
                                               std::chrono::day(static_cast<unsigned>(*day))};
    if (!calendar.ok())
        return std::nullopt;
    return std::chrono::sys_days(calendar).time_since_epoch().count();
}

std::string dateOf(std::int64_t milliseconds) {
    const auto time = std::chrono::sys_time<std::chrono::milliseconds>(std::chrono::milliseconds(milliseconds));
    const std::chrono::year_month_day calendar(std::chrono::floor<std::chrono::days>(time));
    return padded(static_cast<int>(calendar.year()), 4) + "-" + padded(static_cast<int>(static_cast<unsigned>(calendar.month())), 2) +
           "-" + padded(static_cast<int>(static_cast<unsigned>(calendar.day())), 2);
}

} // namespace spanwright
