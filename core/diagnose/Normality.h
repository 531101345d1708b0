// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Diagnostics.h"

#include <vector>

namespace spanwright {

/// Shapiro and Wilk's W with Royston's weights and p value for 3 ≤ n ≤ 5000 (Royston, "Remark AS R94", Applied
/// Statistics 44 (1995) 547). Empty outside, or when all values are equal.
[[nodiscard]] std::optional<TestResult> shapiroWilk(std::vector<double> values);

} // namespace spanwright
