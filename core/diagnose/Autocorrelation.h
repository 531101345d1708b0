// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"

#include <optional>
#include <span>
#include <vector>

namespace spanwright {

/// Both statistics of very many residuals in one pass, for residuals whose mean is small beside their scatter.
struct SerialStatistics {
    std::optional<double> lagOne, durbinWatson;
};
[[nodiscard]] SerialStatistics serialStatistics(std::span<const double> u);

/// r₁ = Σ (u_t − ū)(u_{t+1} − ū) / Σ (u_t − ū)²; empty when all are equal. As in the NIST reference data sets for
/// univariate statistics.
[[nodiscard]] std::optional<double> lagOneAutocorrelation(std::span<const double> u);
[[nodiscard]] std::optional<double> lagOneAutocorrelation(std::span<const DoubleDouble> u);

/// d = Σ (u_t − u_{t−1})² / Σ u_t² (Durbin and Watson, Biometrika 37 (1950) 409).
[[nodiscard]] std::optional<double> durbinWatson(std::span<const double> u);
[[nodiscard]] std::optional<double> durbinWatson(std::span<const DoubleDouble> u);

/// P(d ≤ observed) for independent normal errors after regression on `columns` (each of n rows): small when neighbours
/// are alike. Exact: d ≤ observed is a quadratic form in normal variables below 0, whose characteristic function is a
/// determinant of a tridiagonal matrix and a p × p one (Ansley, Kohn and Shively, J. Econometrics 54 (1992) 277),
/// inverted numerically by a double exponential rule (Imhof, Biometrika 48 (1961) 419). Absolute error about 1e-12; O(n
/// p²) for each of about 100 places.
[[nodiscard]] double durbinWatsonBelow(double observed, const std::vector<std::vector<double>>& columns);

/// The same by the normal distribution with the exact mean and variance of d, for many readings.
[[nodiscard]] double durbinWatsonBelowNormal(double observed, const std::vector<std::vector<double>>& columns,
                                             std::size_t n);

} // namespace spanwright
