// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Diagnostics.h"
#include "core/diagnose/GroupedColumn.h"

#include <span>
#include <vector>

namespace spanwright {

struct EqualVariances {
    std::optional<TestResult> bartlett; ///< K² and its χ² p (Bartlett, Proc. R. Soc. A 160 (1937) 268)
    std::optional<TestResult>
        levene; ///< F of |u − group median| (Brown and Forsythe, J. Am. Stat. Assoc. 69 (1974) 364)
    std::optional<double> cochran; ///< s²_max/Σs² (ISO 5725-2:2019, 8.3.3), beside its critical values at 5 % and 1 %
    std::optional<double> cochranCritical, cochranCriticalOutlier;
    bool equalSizes = true; ///< Cochran's critical values suppose equal numbers; else the mean number is used
};

/// Empty parts where fewer than two groups have two values or more, or nothing varies, or there are more than 10,000
/// groups.
[[nodiscard]] EqualVariances equalVariances(const GroupedValues& values);

/// Critical value of Cochran's C for `groups` of `n` each: 1/(1 + (g − 1)/F), F exceeded with probability level/g at n
/// − 1 and (g − 1)(n − 1) degrees of freedom.
[[nodiscard]] double cochranCriticalValue(double groups, double n, double level);

/// n R² of the squares of the values regressed on a constant and the columns, χ² with as many degrees of freedom as
/// columns that count (Breusch and Pagan 1979, studentised by Koenker, J. Econometrics 17 (1981) 107). Empty without
/// columns.
[[nodiscard]] std::optional<TestResult> breuschPagan(std::span<const double> u,
                                                     const std::vector<std::vector<double>>& columns);

/// The same for one column, in one pass and without memory of its own.
[[nodiscard]] std::optional<TestResult> breuschPagan(std::span<const double> u, std::span<const double> column);

} // namespace spanwright
