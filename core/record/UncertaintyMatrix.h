// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/BudgetLine.h"
#include "core/record/ReadingColumns.h"

#include <string>
#include <vector>

namespace spanwright {

/// One row of the lower triangle: the covariances of one value with the rows before it and, last, its variance.
struct MatrixRow {
    ReadingId reading = 0; ///< the rows stay with their readings, whatever is excluded, removed or typed in later
    Side side = Side::Indication;
    std::vector<Decimal> covariances;
    bool operator==(const MatrixRow&) const = default;
};

/// Covariances that are known between readings: of the indications alone (ISO/TS 28037:2010, clause 9), or of all references
/// followed by all indications (clause 10). Empty where none are known. A row whose reading does not count is passed over.
struct UncertaintyMatrix {
    std::string source; ///< where it was read from
    std::vector<MatrixRow> rows;

    [[nodiscard]] bool empty() const { return rows.empty(); }
    bool operator==(const UncertaintyMatrix&) const = default;
};

} // namespace spanwright
