// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <vector>

namespace spanwright {

/// What is observed in one run, each with the root of its weight, by which the whole row counts.
struct RunBlock {
    struct Row {
        double root = 1;
        double x = 0;               ///< against which the run has a slope
        std::vector<double> shared; ///< values in the columns that all runs share
        double right = 0;
    };
    std::vector<Row> rows;
};

/// Whether each run has an offset and a slope of its own, coded to sum to zero over the runs.
enum class RunColumns { None, Free };

struct RunwiseSolution {
    double rest = 0; ///< residual sum of squares
    int rank = 0;
};

/// Least squares on the shared columns and the columns of the runs.
///
/// A run's two columns are its own, so its rows are first turned (Householder) until only two of them hold these; what is left of all
/// runs knows the shared columns alone and is turned into a triangle. There remain two rows for each run and one for each shared
/// column, solved by a QR with column pivoting that finds the rank. Orthogonal throughout, so as good as one QR of all rows, at the
/// cost of a small one (block angular problems: Björck, "Numerical Methods for Least Squares Problems", 1996, section 6.3).
[[nodiscard]] RunwiseSolution solveByRuns(const std::vector<RunBlock>& blocks, std::size_t shared, RunColumns columns);

} // namespace spanwright
