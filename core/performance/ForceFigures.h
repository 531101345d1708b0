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

/// Runs by number.
struct ForceSeries {
    std::vector<int> rotated;      ///< one for each position
    std::optional<int> first, again; ///< two in one position
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
    /// The largest of each figure over the forces, with its sign, and where it occurs.
    struct Largest {
        double value = 0, force = 0;
    };
    std::optional<Largest> reproducibility, repeatability, interpolation, reversibility;
    ForceSeries series;
};

/// The series with the item turned between them: the first run in each position, in the order of the runs. The first two runs in
/// one position show the repeatability. Positions of runs 1, 2, … in degrees; a whole turn is no turn. Empty with fewer than two
/// positions among the runs that were taken.
[[nodiscard]] std::optional<ForceSeries> turnedSeries(const std::vector<Decimal>& positions, const std::vector<std::int32_t>& runs);

/// Empty unless the item was turned (turnedSeries), with fewer than three forces, or when no function can be fitted. Indications
/// are deflections: the zero before each series is taken off already or is read at force 0.
[[nodiscard]] std::optional<ForceFigures> forceFigures(const Sample& sample, const Choices& choices, double resolution,
                                                       const std::vector<Decimal>& positions);

} // namespace spanwright
