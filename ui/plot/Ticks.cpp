// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/plot/Ticks.h"

#include "ui/look/NumberText.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

/// Steps of at least `wanted`.
Ticks ticksOf(const AxisRange& range, double wanted) {
    Ticks ticks;
    const double power = std::floor(std::log10(wanted));
    const double unit = std::pow(10.0, power);
    const double lead = wanted / unit;
    const double factor = lead <= 1 ? 1 : lead <= 2 ? 2 : lead <= 5 ? 5 : 10;
    ticks.step = factor * unit;
    ticks.decimals = std::max(0, -static_cast<int>(power) - (factor == 10 ? 1 : 0));
    const double from = std::ceil(range.low / ticks.step - 1e-9);
    const double to = std::floor(range.high / ticks.step + 1e-9);
    ticks.first = from * ticks.step;
    for (double i = from; i <= to; ++i)
        ticks.places.push_back(i * ticks.step);
    return ticks;
}

} // namespace

Ticks roundTicks(const AxisRange& range, int atMost) {
    if (!(range.span() > 0) || !std::isfinite(range.span()) || atMost < 1)
        return {};
    Ticks ticks = ticksOf(range, range.span() / atMost);
    // One number alone does not say how long an axis is.
    if (atMost > 1 && ticks.places.size() < 3)
        ticks = ticksOf(range, ticks.step / 2.5);
    return ticks;
}

QString tickText(double place, const Ticks& ticks, TickSign sign, const QLocale& locale) {
    if (std::abs(place) < ticks.step * 1e-6)
        return locale.zeroDigit();
    const SignShown shown = sign == TickSign::Both ? SignShown::Both : SignShown::Minus;
    if (ticks.decimals > 7 || std::abs(place) >= 1e9)
        return significantText(place, 3, locale);
    return fixedText(place, ticks.decimals, shown, locale);
}

AxisRange widened(const AxisRange& range, double share) {
    if (range.span() > 0)
        return {range.low - share * range.span(), range.high + share * range.span()};
    const double half = range.low == 0 ? 1 : std::abs(range.low) * 0.1;
    return {range.low - half, range.high + half};
}

} // namespace spanwright
