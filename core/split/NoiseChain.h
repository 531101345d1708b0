// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Sample.h"

#include <cstdint>
#include <vector>

namespace spanwright {

/// The offset and the gain of one run about the mean of all runs, set point and direction taken out.
struct RunEffect {
    int run = 0;
    std::size_t n = 0;
    double offset = 0; ///< at mid-range, unit of the residuals
    double slope = 0;  ///< unit of the residuals per unit of the set point
};

/// Residual sums of squares of nested models on residuals e with weights w, and the ranks that each adds to the one
/// before:
///   s1  e as it is
///   s2  one mean for each set point
///   s3  one mean for each set point and direction, where a set point has both
///   s4  and one offset for each run
///   s5  and one slope against the set point for each run
/// `…Weight` are the traces by which a random effect of variance σ² enters the expected sum of squares (Henderson's
/// method 3; Searle, Casella and McCulloch, "Variance Components", 1992, chapter 5).
struct NoiseChain {
    DoubleDouble s1 = 0.0, s2 = 0.0, s3 = 0.0, s4 = 0.0, s5 = 0.0;
    std::size_t readings = 0;
    int setPoints = 0, contrasts = 0, runOffsets = 0, runSlopes = 0; ///< ranks added
    bool directionsKnown = false, runsKnown = false;
    std::size_t runs = 0;
    double contrastWeight = 0, runInContrastWeight = 0, runOffsetWeight = 0;
    bool balanced = true; ///< every set point, direction and run that occurs, equally often in all combinations

    /// Cells of set point and direction, and the sums that the pictures and the adjusted test need.
    struct Cell {
        std::int32_t group = 0;
        Direction direction = Direction::Unknown;
        std::size_t n = 0;
        double weight = 0, mean = 0;
    };
    std::vector<Cell> cells; ///< in rising order of set point; left out for more than `mostListedCells` bare set points
    struct CellRun {
        std::int32_t cell = 0, run = 0; ///< indices; run into `effects`
        std::size_t n = 0;
        double weight = 0, mean = 0;
    };
    std::vector<CellRun> cellRuns; ///< empty when no run is known
    std::vector<RunEffect> effects;

    /// n − ranks: degrees of freedom of s2 … s5.
    [[nodiscard]] int dfPure() const { return static_cast<int>(readings) - setPoints; }
    [[nodiscard]] int dfRepeatability() const { return dfPure() - contrasts - runOffsets - runSlopes; }
};

/// More runs than this are not taken as runs: the column is a counter.
inline constexpr std::size_t mostRuns = 200;

/// Beyond this, set points without runs and directions are a logger's record and are not listed one by one.
inline constexpr std::size_t mostListedCells = 10'000;

/// Builds the chain in O(n) for few runs: means within cells, then elimination of the run columns on their cross
/// products within cells, which are sums of weights and lose no digits that matter.
[[nodiscard]] NoiseChain noiseChain(const Sample& sample, const Residuals& residuals);

} // namespace spanwright
