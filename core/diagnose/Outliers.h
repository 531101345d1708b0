// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"

#include <cstddef>
#include <optional>
#include <span>
#include <vector>

namespace spanwright {

/// The value furthest from the mean of those that are left, R = |u − ū|/s, and the value that R exceeds with
/// probability `level` when nothing is wrong.
struct ExtremeTrial {
    std::size_t index = 0;
    double r = 0, lambda = 0;
};

/// Rosner's generalised extreme Studentised deviate test (Technometrics 25 (1983) 165; NIST handbook 1.3.5.17.3): up to
/// `most` trials, each without the values found before; outliers are the first k, k the largest with r > lambda. Trial
/// 1 is Grubbs's test, two-sided. Stops at three values left or none that varies. O(n + most · log). Without a level,
/// lambda is left at 0.
[[nodiscard]] std::vector<ExtremeTrial> extremeTrials(std::span<const DoubleDouble> u, int most, double level);
[[nodiscard]] std::vector<ExtremeTrial> extremeTrials(std::span<const double> u, int most, double level);
[[nodiscard]] std::vector<ExtremeTrial> extremeTrials(std::span<const double> u, int most);

/// Largest k with r > lambda at trial k, from 1; 0 when there is none.
[[nodiscard]] int outlierCount(const std::vector<ExtremeTrial>& trials);
/// The same at another level; a critical value is only computed where the normal distribution, which gives less than
/// Student's, is exceeded.
[[nodiscard]] int outlierCount(const std::vector<ExtremeTrial>& trials, std::size_t n, double level);

/// Two-sided critical value of Grubbs's G for n values: (n−1)/√n · √(t²/(n−2+t²)), t Student's with n − 2 degrees of
/// freedom and level/(2n) above it (Grubbs, Technometrics 11 (1969) 1; ISO 5725-2:2019, 8.3.4).
[[nodiscard]] double grubbsCriticalValue(std::size_t n, double level);

} // namespace spanwright
