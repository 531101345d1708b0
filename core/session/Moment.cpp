// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/Moment.h"

#include "core/exchange/TimeCell.h"

#include <charconv>

namespace spanwright {

void appendMoment(std::string& json, std::int64_t milliseconds) {
    constexpr std::int64_t yearZero = -62'167'219'200'000;
    constexpr std::int64_t yearTenThousand = 253'402'300'800'000;
    if (milliseconds == 0)
        json += "null";
    else if (milliseconds >= yearZero && milliseconds < yearTenThousand)
        json.append(1, '"').append(isoTime(milliseconds)).append(1, '"');
    else
        json += std::to_string(milliseconds);
}

std::int64_t readMoment(JsonScanner& scan, std::string_view key) {
    if (scan.takeNull())
        return 0;
    if (scan.atString()) {
        const std::string text = scan.string();
        const auto time = parseTime(text, DateOrder::YearMonthDay);
        if (!time)
            scan.failValue(key, text);
        return time.value_or(0);
    }
    const std::string_view digits = scan.skip();
    std::int64_t number = 0;
    const auto [end, problem] = std::from_chars(digits.data(), digits.data() + digits.size(), number);
    if (problem != std::errc{} || end != digits.data() + digits.size())
        scan.failValue(key, digits);
    return number;
}

} // namespace spanwright
