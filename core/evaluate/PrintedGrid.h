// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/evaluate/LoggerFunction.h"

#include <vector>

namespace spanwright {

/// Whether the inverse of a printed function is held to the same bound as the function.
enum class InverseHeld { No, Yes };

/// The places at which a printed function is compared with the fitted one: a fine grid over the calibrated range, the abscissae of the
/// readings (thinned where they are many), the knots of a table. Each has the U of a value read back there.
class PrintedGrid {
  public:
    PrintedGrid(const Record& record, const PhaseEvaluation& phase, InverseHeld inverse);

    /// Whether there is any U to compare with.
    [[nodiscard]] bool bounded() const { return bounded_; }
    /// Takes the residual standard deviation for U at every place, where it has the unit of the ordinate and is not nought.
    void boundByScatter();
    /// Largest error as a share of U, of the function and of its closed inverse; NaN where the function does not exist.
    [[nodiscard]] double largestShare(const LoggerFunction& logger) const;
    [[nodiscard]] bool holds(const LoggerFunction& logger) const;
    [[nodiscard]] double smallestExpanded() const;         ///< unit of the ordinate
    [[nodiscard]] double smallestExpandedAbscissa() const; ///< unit of the abscissa

  private:
    struct Place {
        double x = 0, y = 0;
        double expanded = 0, expandedAbscissa = 0;
    };

    const Fit& fit_;
    std::vector<Place> places_;
    bool bounded_ = false;
    InverseHeld inverse_;
};

} // namespace spanwright
