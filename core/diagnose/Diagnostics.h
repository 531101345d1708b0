// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"
#include "core/fit/Sample.h"

#include <optional>
#include <span>
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
    std::optional<double> effectiveReadings; ///< n (1 − ρ₁)/(1 + ρ₁), not above n
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
    std::vector<Warning> warnings; ///< ApproximateMethod (facts: figure, method)
};

struct DiagnoseQuestion {
    std::span<const ReadingId> ids; ///< of every row of the record, to name readings
    int mostOutliers = 0;           ///< tried by the generalised ESD test; 0: a tenth of the readings, at most 10
    double outlierLevel = 0.05;
};

/// Every test, on residuals multiplied by the root of their weights, in the order taken. In double-double while the
/// residuals have their low parts. Sources stand with each test. Nothing where the residuals are no more than rounding.
[[nodiscard]] Diagnostics diagnose(const Sample& sample, const Residuals& residuals, const Fit& fit,
                                   const DiagnoseQuestion& question);

} // namespace spanwright
