// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace spanwright {

/// The quantile that a Student variable with `df` degrees of freedom exceeds with probability `tail`; NaN for df < 1.
double studentQuantileAbove(double tail, double df);
/// The same for a standard normal variable.
double normalQuantileAbove(double tail);
/// The same for an F variable.
double fQuantileAbove(double tail, double df1, double df2);
/// The same for a χ² variable.
double chiSquaredQuantileAbove(double tail, double df);

/// P(X ≥ x), computed as a complement so that small tails keep their digits; NaN for df < 1.
double chiSquaredAbove(double x, double df);
double fAbove(double x, double df1, double df2);
double studentAbove(double x, double df);

} // namespace spanwright
