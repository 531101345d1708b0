// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Sample.h"
#include "core/record/Choices.h"

#include <optional>
#include <vector>

namespace spanwright {

/// Figures at one force, in % of the mean deflection there.
struct ForceStep {
    double force = 0;
    double mean = 0;                       ///< of the rotated series, rising
    std::optional<double> reproducibility; ///< b = 100 (X_max − X_min)/X̄ over the rotated series
    std::optional<double> repeatability;   ///< b' = 100 |X₂ − X₁|/X̄, both series in one position
    std::optional<double> interpolation;   ///< f_c = 100 (X̄ − X_a)/X_a, X_a from the function of the means
    std::optional<double> reversibility; ///< v = 100 · mean |X' − X|/X of falling against rising in the rotated series
};

/// Figures of a force transducer (terms of ISO 376:2011 and ASTM E74, both from memory).
struct ForceFigures {
    std::vector<ForceStep> steps; ///< without force 0
    std::optional<double> zero;  ///< f₀ = 100 · largest |zero after − zero before a series|/X at the largest force
    int degree = 1;              ///< of the function, ASTM E74's ladder on the means
    int interpolationDegree = 1; ///< the same, at most 3, for f_c
    double residualSd = 0;       ///< s_m of all readings of the rotated series about that function
    double lowerLimitFactor = 0; ///< 2.4 s_m, not below the resolution; unit of the indication
    double lowerLimitForce = 0;  ///< the same as a force, by the mean slope
    double lowestForceClassA = 0, lowestForceClassAA = 0; ///< 400 and 2000 times that
};

/// The series by run number: two in one position, and those with the transducer turned between them (one of the first
/// two among them). By default runs 1 and 2 stand, and 1, 3, 4, … are turned.
struct ForceSeries {
    int first = 1, again = 2;
    std::vector<int> rotated; ///< empty: first and every run after `again`
};

/// Empty with fewer than two rotated series, three forces, or no reading in the second series, or when no function can
/// be fitted. Indications are deflections: the zero before each series is taken off already or is read at force 0.
[[nodiscard]] std::optional<ForceFigures> forceFigures(const Sample& sample, const Choices& choices, double resolution,
                                                       const ForceSeries& series = {});

} // namespace spanwright
