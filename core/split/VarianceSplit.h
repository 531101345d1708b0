// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"
#include "core/record/ReadingColumns.h"

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

enum class SplitPart { Total, Regression, Residual, LackOfFit, PureError, Hysteresis, RunOffset, RunSlope, Repeatability };

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
    double variance = 0; ///< not below 0
    double degreesOfFreedom = 0;
    std::optional<double> low, high; ///< interval of the standard deviation
    double shareOfTotal = 0, shareOfNoise = 0;
};

/// How the spread of the readings divides: a chain of nested least-squares models on the residuals. See DEVELOPERS.md.
struct VarianceSplit {
    SplitRow total, regression, residual;
    std::optional<SplitRow> lackOfFit, pureError, hysteresis, runOffset, runSlope, repeatability;
    SplitPart against = SplitPart::PureError;      ///< what lack of fit, hysteresis and run terms are tested against
    std::optional<SplitRow> lackOfFitNaive;        ///< against pure error, as in textbooks
    std::optional<SplitRow> lackOfFitAdjusted;     ///< after direction and run, for unbalanced data
    std::vector<SetPointMeans> setPoints;
    std::vector<RunLine> runs;
    std::vector<VarianceComponent> components;
    std::vector<Warning> warnings;
};

} // namespace spanwright
