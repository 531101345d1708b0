// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/fit/Sample.h"

namespace spanwright {

/// What the rows of a phase are made of, taken over: the table keeps its columns where they already are one a reading. `all` are
/// the complete readings with the excluded among them; empty when nothing is excluded.
struct RowSources {
    const Record& record;
    Phase phase;
    Sample used; ///< the readings that count
    std::optional<Sample> all;
    const Fit* fit = nullptr;          ///< null: only what was read
    std::optional<Residuals> residuals; ///< of `used`
};

/// The rows of a phase, complete or not, in the order taken, with ids, runs and directions only.
RowFigures namedRows(const ReadingColumns& readings, Phase phase);

/// Every reading of namedRows() with what follows for it (core/diagnose/Influence). NaN where a reading takes no part or a figure does
/// not exist.
RowFigures rowTable(RowSources sources, RowFigures named);

} // namespace spanwright
