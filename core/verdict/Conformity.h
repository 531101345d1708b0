// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Limits.h"
#include "core/verdict/Verdict.h"

namespace spanwright {

/// What is known of a measured value: estimate y, standard uncertainty u, and the distribution of (Y − y)/u.
struct MeasuredValue {
    double value = 0;
    double standardUncertainty = 0;
    double degreesOfFreedom = 0; ///< infinite: normal
    Distribution distribution = Distribution::Normal; ///< Rectangular: uniform of half-width √3 u; else Student or normal
};

/// Conformance probability p_c = P(low ≤ Y ≤ high) (JCGM 106:2012, 7.2 to 7.5: Φ((T_U − y)/u) − Φ((T_L − y)/u); with few degrees of
/// freedom Student's distribution takes the place of Φ). Limits may be infinite. u = 0: 1 or 0.
double conformanceProbability(const MeasuredValue& measured, double low, double high);

/// Guard band w of a rule for an expanded uncertainty U (ILAC G8:09/2019, table 1): 0, U, r U; U for the four-state rule (4.2.3).
double guardBand(const Limits& limits, double expanded);

/// Largest specific risk of false acceptance of a rule: 1 − Φ(k w/U), for a result on one acceptance limit (one-sided, normal).
double acceptanceRisk(const Limits& limits, double coverageFactor);

/// The decision on an error of indication against ±limit (two-sided; ILAC G8:09/2019, 4.2.1 to 4.2.3). A result that differs from a
/// limit by no more than `noise` counts as on it, and a result on a limit is inside.
ConformityState decide(double error, double limit, double guard, DecisionRule rule, double noise);

} // namespace spanwright
