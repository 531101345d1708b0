// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/verdict/Conformity.h"

#include <boost/math/distributions/normal.hpp>
#include <boost/math/distributions/students_t.hpp>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

double cumulative(const MeasuredValue& measured, double z) {
    if (measured.distribution == Distribution::Rectangular)
        return std::clamp((z / std::sqrt(3.0) + 1) / 2, 0.0, 1.0);
    if (std::isinf(z))
        return z > 0 ? 1 : 0;
    if (std::isinf(measured.degreesOfFreedom))
        return boost::math::cdf(boost::math::normal(), z);
    return boost::math::cdf(boost::math::students_t(measured.degreesOfFreedom), z);
}

} // namespace

double conformanceProbability(const MeasuredValue& measured, double low, double high) {
    if (measured.standardUncertainty <= 0)
        return measured.value >= low && measured.value <= high ? 1 : 0;
    // Both tails are taken on their small side, so that a probability near 1 keeps its digits.
    const double below = cumulative(measured, (low - measured.value) / measured.standardUncertainty);
    const double above = cumulative(measured, (measured.value - high) / measured.standardUncertainty);
    return std::max(0.0, 1 - below - above);
}

double guardBand(const Limits& limits, double expanded) {
    switch (limits.rule) {
    case DecisionRule::Simple: return 0;
    case DecisionRule::GuardedByU:
    case DecisionRule::FourState: return expanded;
    case DecisionRule::GuardedByFraction: return limits.fraction.toDouble() * expanded;
    }
    return 0;
}

double acceptanceRisk(const Limits& limits, double coverageFactor) {
    return boost::math::cdf(boost::math::complement(boost::math::normal(), guardBand(limits, 1) * coverageFactor));
}

ConformityState decide(double error, double limit, double guard, DecisionRule rule, double noise) {
    const double distance = std::fabs(error) - noise;
    if (distance <= limit - guard)
        return ConformityState::Pass;
    if (rule != DecisionRule::FourState)
        return ConformityState::Fail;
    if (distance <= limit)
        return ConformityState::ConditionalPass;
    return distance <= limit + guard ? ConformityState::ConditionalFail : ConformityState::Fail;
}

} // namespace spanwright
