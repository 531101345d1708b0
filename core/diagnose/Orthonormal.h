// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <vector>

namespace spanwright {

/// Orthonormal columns with the span of the given ones, in their order (modified Gram–Schmidt, each column twice, which
/// is enough: Giraud et al., Numer. Math. 101 (2005) 87). A column that depends on those before it to 12 digits is left
/// out.
[[nodiscard]] std::vector<std::vector<double>> orthonormal(std::vector<std::vector<double>> columns);

[[nodiscard]] double dot(const std::vector<double>& a, const std::vector<double>& b);

} // namespace spanwright
