// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/budget/Budget.h"
#include "core/fit/Fit.h"
#include "core/record/Record.h"
#include "core/verdict/Verdict.h"

#include <optional>

namespace spanwright {

/// Output span, unit of the indication: of the stated output, else of the range where both quantities have the same unit.
std::optional<double> outputSpan(const Item& item);

/// Half-width of the limits of the error of indication at a point, unit of the indication: a % of the reading + b % of the span +
/// c, all of the side that the limits are stated for; those of the reference are multiplied by the slope. Empty where no part is
/// stated, or a part of the span without a span.
std::optional<double> limitHalfWidth(const Limits& limits, const Item& item, double reference, double indication, double slope);

/// Results and decisions at every point of the budget. The decision is taken on unrounded values.
Verdict makeVerdict(const Record& record, const Fit* fit, const Budget& budget);

} // namespace spanwright
