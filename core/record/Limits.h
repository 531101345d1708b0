// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/BudgetLine.h"

namespace spanwright {

enum class DecisionRule { Simple, GuardedByU, GuardedByFraction, FourState };

/// Limits of the error of indication, ±(percentOfReading % of reading + percentOfSpan % of span + constant), and the decision
/// rule agreed beforehand (ISO/IEC 17025:2017, 7.1.3; ILAC G8:09/2019).
struct Limits {
    bool stated = false; ///< whether conformity is wanted at all
    std::string specification; ///< where the limits come from
    std::optional<Decimal> percentOfReading, percentOfSpan, constant; ///< constant in the unit of `side`
    Side side = Side::Indication;
    DecisionRule rule = DecisionRule::Simple;
    Decimal fraction{1, 0, {}}; ///< r of w = r·U for GuardedByFraction
    std::string agreedWith;
    std::string agreedOn; ///< date
    bool operator==(const Limits&) const = default;
};

} // namespace spanwright
