// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"

#include <QString>

#include <set>
#include <vector>

class QModelIndex;

namespace spanwright {

class ReadingsColumns;
class ReadingsModel;
struct PastedBlock;

/// What a pasted block makes of the readings from a cell of the table on: all of it or, with the reason in words, nothing.
struct PastedReadings {
    QString refusal; ///< empty when the readings can be recorded
    std::vector<Reading> rows;
    std::set<NumberColumn> columns;
};

PastedReadings pastedReadings(const PastedBlock& block, const ReadingsModel& model, const ReadingsColumns& columns, const QModelIndex& start);

} // namespace spanwright
