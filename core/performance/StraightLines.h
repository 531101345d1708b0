// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <span>

namespace spanwright {

/// A straight line a + b x and its deviation of largest magnitude among given points.
struct DeviationLine {
    double intercept = 0, slope = 0;
    double deviation = 0; ///< y − (a + b x), with its sign
    std::size_t at = 0;   ///< index of the point
};

/// x rises strictly, two points or more.
struct Points {
    std::span<const double> x, y;
};

/// The chord from the first point to the last.
[[nodiscard]] DeviationLine terminalLine(const Points& points);

/// The line with the smallest largest deviation: it leaves three points at that deviation with alternating signs, and
/// is parallel to an edge of the convex hull of the points (Chebyshev; the vertical width of a hull is least at an
/// edge). Exact.
[[nodiscard]] DeviationLine minimaxLine(const Points& points);

/// The line through the first point with the smallest largest deviation: two points at that deviation with opposite
/// signs. Exact.
[[nodiscard]] DeviationLine zeroBasedLine(const Points& points);

} // namespace spanwright
