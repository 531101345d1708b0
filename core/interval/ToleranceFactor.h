// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace spanwright {

/// Factors of a statistical tolerance interval mean ± k s of a normal variable (ISO 16269-6:2014): with probability
/// `confidence` it holds at least the share `share` of all values. `effective` is n where the mean has variance σ²/n;
/// on a calibration function it is σ²/u²(f(x)), at every abscissa its own. `df` are the degrees of freedom of s.

/// One-sided: t'_{confidence}(df, δ)/√n with the noncentral t of δ = z_share·√n.
double toleranceFactorOneSided(double effective, double df, double share, double confidence);

/// Two-sided, exact: k with ∫ P(χ²_df ≥ df·r²(z)/k²) φ(z) dz = confidence, where Φ(z/√n + r) − Φ(z/√n − r) = share.
double toleranceFactorTwoSided(double effective, double df, double share, double confidence);

/// Two-sided after Howe (1969, JASA 64, 610): √(df (1 + 1/n) z²_{(1−share)/2}/χ²_{1−confidence; df}).
double toleranceFactorHowe(double effective, double df, double share, double confidence);

} // namespace spanwright
