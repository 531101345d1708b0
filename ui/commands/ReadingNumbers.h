// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"

#include <optional>

namespace spanwright {

/// A number of a reading: its column, what the journal calls it, and where the reading holds it.
struct ReadingNumber {
    NumberColumn column;
    const char* name;
    std::optional<Decimal> Reading::*field;
};

/// In the order of NumberColumn.
inline constexpr ReadingNumber readingNumbers[] = {
    {NumberColumn::SetPoint, "set point", &Reading::setPoint},
    {NumberColumn::Reference, "reference", &Reading::reference},
    {NumberColumn::Indication, "indication", &Reading::indication},
    {NumberColumn::UReference, "u of reference", &Reading::uReference},
    {NumberColumn::UIndication, "u of indication", &Reading::uIndication},
    {NumberColumn::UCovariance, "covariance", &Reading::uCovariance},
};

constexpr const ReadingNumber& numberOf(NumberColumn column) {
    return readingNumbers[static_cast<std::size_t>(column)];
}

inline std::optional<Decimal>& numberOf(Reading& reading, NumberColumn column) {
    return reading.*numberOf(column).field;
}
inline const std::optional<Decimal>& numberOf(const Reading& reading, NumberColumn column) {
    return reading.*numberOf(column).field;
}

} // namespace spanwright
