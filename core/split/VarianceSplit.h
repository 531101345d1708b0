// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"
#include "core/fit/Fit.h"
#include "core/fit/Sample.h"

#include <optional>
#include <vector>

namespace spanwright {

/// One source of the spread.
struct SplitRow {
    double ss = 0; ///< sum of squares, (unit)², or a pure number when weighted
    int df = 0;
    std::optional<double> ms; ///< ss/df
    std::optional<double> f;  ///< against the row named by `against`
    std::optional<double> p;  ///< P(F ≥ f)
};

enum class SplitPart {
    Total,
    Regression,
    Residual,
    LackOfFit,
    PureError,
    Hysteresis,
    RunOffset,
    RunSlope,
    Repeatability
};

/// The means at one set point, as residuals of the fitted function, for the pictures.
struct SetPointMeans {
    double setPoint = 0;
    std::size_t n = 0;
    double mean = 0; ///< of the residuals
    std::optional<double> rising, falling;
};

/// The residuals of one run as a straight line over the set points.
struct RunLine {
    int run = 0;
    std::size_t n = 0;
    double offset = 0; ///< run mean minus mean of all, at mid-range
    double slope = 0;
};

/// A standard deviation that belongs to one cause.
struct VarianceComponent {
    SplitPart part = SplitPart::Repeatability;
    double variance = 0;             ///< not below 0; (unit of the ordinate)², with weights the mean over the readings
    double estimate = 0;             ///< the same before it was kept from falling below 0: unbiased
    double degreesOfFreedom = 0;     ///< effective, where it is a difference of mean squares
    std::optional<double> low, high; ///< 95 % interval of the standard deviation
    double shareOfTotal = 0;         ///< of the variance of all readings
    double shareOfNoise = 0;         ///< of the sum of the components
};

/// How the spread of the readings divides: a chain of nested least-squares models on the residuals (see NoiseChain).
struct VarianceSplit {
    SplitRow total, regression, residual;
    std::optional<SplitRow> lackOfFit, pureError, hysteresis, runOffset, runSlope, repeatability;
    SplitPart against = SplitPart::PureError;  ///< what lack of fit, hysteresis and run terms are tested against
    std::optional<SplitRow> lackOfFitNaive;    ///< against pure error, as in textbooks
    std::optional<SplitRow> lackOfFitAdjusted; ///< after direction and run, for unbalanced data
    std::vector<SetPointMeans> setPoints;      ///< empty beyond 10,000 of them
    std::vector<RunLine> runs;
    std::vector<VarianceComponent> components;
    std::vector<Warning> warnings;
};

/// Splits what a fit left, Σ w e², with the sums of squares and degrees of freedom of the fit above it. Rows and
/// degrees of freedom as ranks added, computed in double-double while the residuals have their low parts, in one or two
/// passes over the readings. Rows that the data cannot give are empty, each with a warning (FigureUndefined,
/// NoReplicates, OneRun, OneDirection). Sources: Draper and Smith, "Applied Regression Analysis" (lack of fit); Searle,
/// "Linear Models" (differences of nested residual sums).
[[nodiscard]] VarianceSplit splitVariance(const Sample& sample, const Residuals& residuals, const Fit& fit);

/// The largest sum of squares that may be nothing but rounding of the readings fitted: below it no test is made.
[[nodiscard]] double roundingSquares(const Residuals& residuals);

} // namespace spanwright
