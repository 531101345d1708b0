// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"

#include <cstddef>
#include <vector>

namespace spanwright {

inline double plain(double value) {
    return value;
}
inline double plain(const DoubleDouble& value) {
    return toDouble(value);
}

/// The readings of one run in one cell of set point and direction.
template <class T>
struct RunInCell {
    std::size_t cell = 0, run = 0;
    T x = T(0.0);      ///< the set point, from −1 to 1
    T weight = T(0.0); ///< Σ w
    T sum = T(0.0);    ///< Σ w (e − mean of the cell)
};

/// Least squares of e on an offset and a slope for each run, beside one mean for each cell.
///
/// The cross products A of the run columns within cells are eliminated in double, the largest pivot first, so that a column which
/// depends on others is found and left at zero. What the runs explain is not taken from that elimination: the solution ρ is refined
/// with b − A ρ in T, formed from the readings' sums, and the explained Σ is ρᵀ(b + (b − A ρ)), whose error is of second order in that
/// of ρ. So all digits of T are kept for little more than the price of double (Björck, "Numerical Methods for Least Squares Problems",
/// 1996, section 2.9).
template <class T>
class RunSystem {
  public:
    /// Rows of the same cell follow each other.
    RunSystem(std::vector<RunInCell<T>> rows, std::size_t runs);

    /// Takes in an offset for each run, then a slope; each returns the rank added.
    int addOffsets() { return add(0, runs_); }
    int addSlopes() { return add(runs_, 2 * runs_); }
    /// Σ w e² that the columns taken in explain beyond the means of the cells.
    [[nodiscard]] const T& explained() const { return explained_; }
    [[nodiscard]] double offset(std::size_t run) const { return plain(solution_[run]); }
    [[nodiscard]] double slope(std::size_t run) const { return plain(solution_[runs_ + run]); }
    /// tr A over the offsets, before anything was eliminated.
    [[nodiscard]] double offsetTrace() const { return offsetTrace_; }

  private:
    [[nodiscard]] double& at(std::size_t i, std::size_t j) { return a_[i * 2 * runs_ + j]; }
    [[nodiscard]] double at(std::size_t i, std::size_t j) const { return a_[i * 2 * runs_ + j]; }
    void addCell(std::size_t begin, std::size_t end);
    int add(std::size_t from, std::size_t to);
    void eliminate(std::size_t pivot);
    [[nodiscard]] std::vector<double> solve(const std::vector<T>& right) const;
    [[nodiscard]] std::vector<T> rest() const;
    void refine();

    std::vector<RunInCell<T>> rows_;
    std::size_t runs_;
    std::vector<double> a_, scale_;
    std::vector<T> b_;
    std::vector<char> used_;
    std::vector<std::size_t> order_; ///< of the pivots
    std::vector<T> solution_;        ///< offsets, then slopes; dependent columns at zero
    T explained_ = T(0.0);
    double offsetTrace_ = 0;
};

} // namespace spanwright
