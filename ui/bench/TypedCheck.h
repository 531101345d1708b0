// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"
#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

#include <QString>

#include <optional>

namespace spanwright {

/// What is expected of an indication before it is typed.
struct Expected {
    double low = 0, high = 0;
    /// From the readings so far (the band of a new reading), or from the item's range and output (a fifth of the span about the
    /// indication of a perfect item).
    enum class From { Readings, Range } from = From::Readings;
};
std::optional<Expected> expectedAt(double reference, const PhaseEvaluation* phase, const Item& item);

/// What is to be said about a typed value; a doubtful one is asked about before it is recorded, and never changed.
struct TypedCheck {
    QString sentence; ///< plain words; empty when there is nothing to say
    bool doubtful = false;
};
TypedCheck checkIndication(const Decimal& indication, double reference, const PhaseEvaluation* phase, const Item& item);
/// Whether an indication lies in the interval that the readings so far lead to expect.
bool insideOfReadings(const Decimal& indication, double reference, const PhaseEvaluation* phase, const Item& item);
/// Whether a reference lies far from its set point, or has more decimals than it is read with.
TypedCheck checkReference(const Decimal& reference, const std::optional<Decimal>& setPoint, const Item& item);

/// Digits in which a value of the indication is usually typed.
int indicationDecimals(const Record& record);

} // namespace spanwright
