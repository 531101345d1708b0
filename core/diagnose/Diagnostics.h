// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"

#include <optional>
#include <vector>

namespace spanwright {

/// A statistic with its p value; df where the reference distribution has them.
struct TestResult {
    double statistic = 0;
    double p = 0;
    std::optional<int> df;
};

struct OutlierTrial {
    ReadingId id = 0;
    std::size_t row = 0; ///< data row from 1
    double r = 0, lambda = 0;
};

/// Tests on the residuals of the readings used. A figure that the data do not give is empty.
struct Diagnostics {
    std::optional<double> durbinWatson, durbinWatsonP; ///< p against positive autocorrelation
    std::optional<double> lag1Autocorrelation;
    std::optional<double> effectiveReadings; ///< n (1 − ρ₁)/(1 + ρ₁)
    std::optional<TestResult> shapiroWilk, breuschPagan, bartlett, levene;
    std::optional<double> cochran, cochranCritical, cochranCriticalOutlier; ///< 5 % and 1 %
    std::optional<TestResult> linearity; ///< straight line against quadratic, ISO 8466-1
    struct Grubbs {
        double g = 0, critical = 0;
        ReadingId id = 0;
        std::size_t row = 0;
    };
    std::optional<Grubbs> grubbs;
    std::vector<OutlierTrial> esd;
    int esdCount = 0;
};

} // namespace spanwright
