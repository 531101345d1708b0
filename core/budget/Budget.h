// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"
#include "core/budget/PointMeans.h"
#include "core/record/BudgetLine.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

/// One contribution as it stands in the table (GUM 4 and 5).
struct BudgetItem {
    std::optional<DerivedLine> derived; ///< empty: added by hand
    std::string name;                   ///< of a manual line, or the standard's id
    Side side = Side::Indication;
    Distribution distribution = Distribution::Normal;
    double amount = 0;  ///< U, half-width or standard uncertainty, unit of `side`
    double divisor = 1;
    double standardUncertainty = 0; ///< amount/divisor, unit of `side`
    double degreesOfFreedom = 0;    ///< infinite for most Type B
    double sensitivity = 1;         ///< c, indication per unit of `side`
    double contribution = 0;        ///< |c| u, unit of the indication
    double share = 0;               ///< of the combined variance
    bool common = false;            ///< the same for all points (one standard)
    bool fromOtherPhase = false;    ///< a spread that the readings before (or after) adjustment showed
};

/// The budget of the error of indication at one set point.
struct SetPointBudget {
    double setPoint = 0;
    Direction direction = Direction::Unknown; ///< Unknown: the mean of both
    std::vector<BudgetItem> items;
    double combined = 0;                  ///< u_c, unit of the indication
    double effectiveDegreesOfFreedom = 0; ///< Welch–Satterthwaite; infinite when every line's is
    Distribution distribution = Distribution::Normal; ///< that k belongs to: Normal, Student, or Rectangular where one such line dominates
    double coverageFactor = 0;            ///< k
    double expanded = 0;                  ///< U = k u_c, unit of the indication
    double expandedReference = 0;         ///< the same divided by the slope, unit of the reference
};

struct Budget {
    double coverage = 0.9545;
    std::vector<PointMeans> means;      ///< of the readings, and
    std::vector<SetPointBudget> points; ///< what stands for each of them
    std::optional<SetPointBudget> readBack; ///< of a reference value taken from the function by one new reading, worst in range
    std::vector<Warning> warnings;
};

} // namespace spanwright
