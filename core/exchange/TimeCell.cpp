// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/TimeCell.h"

#include "core/exchange/Words.h"

#include <chrono>

namespace spanwright {

namespace {

using namespace std::chrono;

/// Reads from the front of a text what a time is made of.
class TimeScanner {
  public:
    explicit TimeScanner(std::string_view text) : rest_(text) {}

    [[nodiscard]] bool atEnd() const { return rest_.empty(); }

    bool take(char c) {
        if (!rest_.starts_with(c))
            return false;
        rest_.remove_prefix(1);
        return true;
    }

    struct Number {
        int value = 0;
        std::size_t digits = 0;
    };
    /// One to `most` digits.
    std::optional<Number> digits(std::size_t most) {
        Number number;
        while (number.digits < most && number.digits < rest_.size() && rest_[number.digits] >= '0' && rest_[number.digits] <= '9')
            number.value = number.value * 10 + (rest_[number.digits++] - '0');
        if (number.digits == 0)
            return std::nullopt;
        rest_.remove_prefix(number.digits);
        return number;
    }
    /// Any digits as a fraction of a second, in milliseconds; further digits are cut off.
    std::optional<int> fraction() {
        int value = 0;
        std::size_t count = 0;
        for (; count < rest_.size() && rest_[count] >= '0' && rest_[count] <= '9'; ++count)
            if (count < 3)
                value = value * 10 + (rest_[count] - '0');
        if (count == 0)
            return std::nullopt;
        rest_.remove_prefix(count);
        for (std::size_t i = count; i < 3; ++i)
            value *= 10;
        return value;
    }
    void skipBlanks() {
        while (take(' ')) {
        }
    }
    [[nodiscard]] std::string_view rest() const { return rest_; }

  private:
    std::string_view rest_;
};

std::optional<sys_days> takeDate(TimeScanner& scan, DateOrder order) {
    const auto first = scan.digits(4);
    if (!first)
        return std::nullopt;
    char mark = 0;
    for (const char candidate : {'-', '.', '/'})
        if (scan.take(candidate)) {
            mark = candidate;
            break;
        }
    const auto second = mark != 0 ? scan.digits(2) : std::nullopt;
    if (!second || !scan.take(mark))
        return std::nullopt;
    const auto third = scan.digits(4);
    if (!third)
        return std::nullopt;

    const bool yearFirst = first->digits == 4;
    if (!yearFirst && (order == DateOrder::YearMonthDay || (third->digits != 4 && third->digits != 2)))
        return std::nullopt;
    const int yearNumber = yearFirst ? first->value : third->digits == 2 ? 2000 + third->value : third->value;
    const bool dayFirst = order == DateOrder::DayMonthYear;
    const int monthNumber = yearFirst || dayFirst ? second->value : first->value;
    const int dayNumber = yearFirst ? third->value : dayFirst ? first->value : second->value;
    if (yearFirst && third->digits > 2)
        return std::nullopt;
    const year_month_day date{year{yearNumber}, month{static_cast<unsigned>(monthNumber)}, day{static_cast<unsigned>(dayNumber)}};
    if (!date.ok())
        return std::nullopt;
    return sys_days{date};
}

struct Clock {
    milliseconds sinceMidnight{0};
};

/// hh:mm[:ss[.fff]] [AM|PM]
std::optional<Clock> takeClock(TimeScanner& scan) {
    const auto hour = scan.digits(2);
    if (!hour || !scan.take(':'))
        return std::nullopt;
    const auto minute = scan.digits(2);
    if (!minute)
        return std::nullopt;
    int second = 0;
    int fraction = 0;
    if (scan.take(':')) {
        const auto typed = scan.digits(2);
        if (!typed)
            return std::nullopt;
        second = typed->value;
        if (scan.take('.') || scan.take(',')) {
            const auto thousandths = scan.fraction();
            if (!thousandths)
                return std::nullopt;
            fraction = *thousandths;
        }
    }
    int hours24 = hour->value;
    scan.skipBlanks();
    const std::string half = lowerCase(scan.rest());
    if (half == "am" || half == "pm") {
        if (hours24 < 1 || hours24 > 12)
            return std::nullopt;
        hours24 = hours24 % 12 + (half == "pm" ? 12 : 0);
        scan = TimeScanner({});
    }
    if (hours24 > 23 || minute->value > 59 || second > 59)
        return std::nullopt;
    return Clock{hours{hours24} + minutes{minute->value} + seconds{second} + milliseconds{fraction}};
}

/// Z or ±hh[[:]mm]
std::optional<minutes> takeZone(TimeScanner& scan) {
    if (scan.take('Z') || scan.take('z'))
        return minutes{0};
    const bool west = scan.take('-');
    if (!west && !scan.take('+'))
        return std::nullopt;
    const auto hour = scan.digits(2);
    if (!hour || hour->digits != 2 || hour->value > 14)
        return std::nullopt;
    scan.take(':');
    const auto minute = scan.digits(2);
    if (minute && minute->value > 59)
        return std::nullopt;
    const minutes east = hours{hour->value} + minutes{minute ? minute->value : 0};
    return west ? -east : east;
}

/// "2026-03-01T08:15:30.250Z" and "2026-03-01 08:15:30", as programs write them, by their places; empty for anything else.
std::optional<std::int64_t> parsePlainIso(std::string_view text) {
    constexpr std::size_t shortest = 19;
    constexpr std::size_t withThousandths = 23;
    if (text.ends_with('Z'))
        text.remove_suffix(1);
    const bool thousandths = text.size() == withThousandths;
    if (text.size() != shortest && !thousandths)
        return std::nullopt;
    bool digitsOnly = true;
    const auto number = [&](std::size_t at, std::size_t digits) {
        int value = 0;
        for (std::size_t i = at; i < at + digits; ++i) {
            digitsOnly = digitsOnly && text[i] >= '0' && text[i] <= '9';
            value = value * 10 + (text[i] - '0');
        }
        return value;
    };
    const year_month_day date{year{number(0, 4)}, month{static_cast<unsigned>(number(5, 2))},
                              day{static_cast<unsigned>(number(8, 2))}};
    const int hour = number(11, 2);
    const int minute = number(14, 2);
    const int second = number(17, 2);
    const int fraction = thousandths ? number(20, 3) : 0;
    const bool marks = text[4] == '-' && text[7] == '-' && (text[10] == 'T' || text[10] == ' ') && text[13] == ':' &&
                       text[16] == ':' && (!thousandths || text[19] == '.');
    if (!digitsOnly || !marks || !date.ok() || hour > 23 || minute > 59 || second > 59)
        return std::nullopt;
    const milliseconds sinceMidnight = hours{hour} + minutes{minute} + seconds{second} + milliseconds{fraction};
    return (sys_days{date}.time_since_epoch() + sinceMidnight).count();
}

} // namespace

std::optional<std::int64_t> parseTime(std::string_view text, DateOrder order) {
    if (const auto plain = parsePlainIso(text))
        return plain;
    TimeScanner scan(withoutBlanks(text));
    const auto date = takeDate(scan, order);
    if (!date)
        return std::nullopt;
    milliseconds sinceEpoch = date->time_since_epoch();
    if (!scan.atEnd()) {
        if (!scan.take('T') && !scan.take(' ') && !(scan.take(',') && scan.take(' ')))
            return std::nullopt;
        scan.skipBlanks();
        const auto clock = takeClock(scan);
        if (!clock)
            return std::nullopt;
        sinceEpoch += clock->sinceMidnight;
        if (!scan.atEnd()) {
            const auto east = takeZone(scan);
            if (!east || !scan.atEnd())
                return std::nullopt;
            sinceEpoch -= *east;
        }
    }
    return sinceEpoch.count();
}

std::string isoTime(std::int64_t since) {
    const milliseconds sinceEpoch{since};
    const sys_days date = floor<days>(sys_time<milliseconds>{sinceEpoch});
    const year_month_day calendar{date};
    const hh_mm_ss clock{sinceEpoch - date.time_since_epoch()};
    std::string iso;
    const auto append = [&iso](long long number, std::size_t digits) {
        const std::string text = std::to_string(number);
        iso.append(text.size() < digits ? digits - text.size() : 0, '0');
        iso += text;
    };
    append(static_cast<int>(calendar.year()), 4);
    iso += '-';
    append(static_cast<unsigned>(calendar.month()), 2);
    iso += '-';
    append(static_cast<unsigned>(calendar.day()), 2);
    iso += 'T';
    append(clock.hours().count(), 2);
    iso += ':';
    append(clock.minutes().count(), 2);
    iso += ':';
    append(clock.seconds().count(), 2);
    if (clock.subseconds().count() != 0) {
        iso += '.';
        append(clock.subseconds().count(), 3);
    }
    iso += 'Z';
    return iso;
}

} // namespace spanwright
