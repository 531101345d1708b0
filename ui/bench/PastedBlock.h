// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <QString>

#include <vector>

namespace spanwright {

/// A block copied from a spreadsheet: rows parted by line ends, cells by tabs (or by semicolons, where there is no tab).
struct PastedBlock {
    std::vector<std::vector<Decimal>> rows; ///< of equal width; empty when a cell was refused
    /// A cell that is no number, counted from 1 as it stands in the block, with what it holds and why it is refused.
    struct Refused {
        int row = 0, column = 0;
        Error error;
    };
    std::vector<Refused> refused;
    [[nodiscard]] int width() const { return rows.empty() ? 0 : static_cast<int>(rows.front().size()); }
};

/// All or nothing: with one cell refused, no number is taken. Empty lines at the end are no rows. A row of another width than the
/// first is refused at the cell where it ends or goes on (RaggedRow).
PastedBlock readPasted(const QString& text);

} // namespace spanwright
