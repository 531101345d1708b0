// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QLocale>
#include <QString>

#include <vector>

namespace spanwright {

/// The part of an axis that is shown.
struct AxisRange {
    double low = 0, high = 1;
    [[nodiscard]] double span() const { return high - low; }
    bool operator==(const AxisRange&) const = default;
};

/// Round places on an axis: first, first + step, … within the range; `decimals` digits after the mark write each of them exactly.
struct Ticks {
    double first = 0, step = 1;
    int decimals = 0;
    std::vector<double> places;
};

/// Steps of 1, 2 or 5 times a power of ten, as many as fit without exceeding `atMost`, but where that
/// leaves fewer than three, the next smaller step.
Ticks roundTicks(const AxisRange& range, int atMost);

enum class TickSign { Minus, Both };
/// A tick as it stands at the axis: the locale's decimal mark, a true minus sign, zero without a sign.
QString tickText(double place, const Ticks& ticks, TickSign sign, const QLocale& locale = QLocale());

/// The range widened by a share of its span at both ends; a range without width is given one.
AxisRange widened(const AxisRange& range, double share);

} // namespace spanwright
