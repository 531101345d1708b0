// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <span>

namespace spanwright {

/// A first-pass line that up to a quarter of wild readings cannot bend: median of the slopes between pairs (Theil 1950,
/// Sen, J. Am. Stat. Assoc. 63 (1968) 1379) and median intercept, with the scatter about it from the median absolute
/// residual.
struct RobustLine {
    double intercept = 0, slope = 0;
    double scatter = 0;    ///< 1.4826 · median |r|, or of |r|/|ŷ| where `relative`
    bool relative = false; ///< scatter grows with level
    double least = 0;      ///< standard deviation below which scatter is not believed

    [[nodiscard]] double at(double x) const { return intercept + slope * x; }
    /// Standard deviations of y from the line at x.
    [[nodiscard]] double distance(double x, double y) const;
};

/// `least` is the standard deviation that rounding alone gives. Empty for fewer than four readings or one abscissa.
/// More than 400 readings are thinned evenly.
[[nodiscard]] std::optional<RobustLine> robustLine(std::span<const double> x, std::span<const double> y, double least);

} // namespace spanwright
