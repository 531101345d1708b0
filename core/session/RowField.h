// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"

#include <array>
#include <optional>
#include <string_view>

namespace spanwright {

/// What can stand in a place of a row of readings in a session file.
enum class RowField { Id, Phase, Run, Direction, SetPoint, Reference, Indication, UReference, UIndication, EnteredAt, EnteredBy, UCovariance };

inline constexpr std::array<std::string_view, 12> rowFieldNames{
    "id",          "phase",      "run",         "direction",    "set_point", "reference",
    "indication",  "u_reference", "u_indication", "entered_at", "entered_by", "u_covariance"};

constexpr std::string_view nameOf(RowField field) {
    return rowFieldNames[static_cast<std::size_t>(field)];
}

/// Empty when this program knows no such field.
constexpr std::optional<RowField> rowFieldOf(std::string_view name) {
    for (std::size_t i = 0; i < rowFieldNames.size(); ++i)
        if (rowFieldNames[i] == name)
            return static_cast<RowField>(i);
    return std::nullopt;
}

/// The column of numbers that the field belongs to; empty for the others.
constexpr std::optional<NumberColumn> numberColumnOf(RowField field) {
    switch (field) {
    case RowField::SetPoint: return NumberColumn::SetPoint;
    case RowField::Reference: return NumberColumn::Reference;
    case RowField::Indication: return NumberColumn::Indication;
    case RowField::UReference: return NumberColumn::UReference;
    case RowField::UIndication: return NumberColumn::UIndication;
    case RowField::UCovariance: return NumberColumn::UCovariance;
    default: return std::nullopt;
    }
}

} // namespace spanwright
