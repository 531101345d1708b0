// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/budget/Budget.h"
#include "core/diagnose/Diagnostics.h"
#include "core/diagnose/Finding.h"
#include "core/diagnose/Influence.h"
#include "core/evaluate/ReadValue.h"
#include "core/fit/DegreeLadder.h"
#include "core/fit/Fit.h"
#include "core/interval/Bands.h"
#include "core/performance/ForceFigures.h"
#include "core/performance/ProcessFigures.h"
#include "core/split/VarianceSplit.h"
#include "core/verdict/Verdict.h"

#include <array>
#include <memory>
#include <optional>
#include <vector>

namespace spanwright {

/// Every reading of a phase beside what follows for it, as columns of equal length in the order taken. Excluded readings are
/// there too: their residual is the distance from the function fitted without them. NaN where a value does not exist.
struct RowFigures {
    std::vector<ReadingId> ids;
    std::vector<double> reference, indication; ///< reference corrected where the standard's table is applied
    std::vector<double> fitted, residual, leverage;
    std::vector<double> weight; ///< of the fit; empty: all 1
    std::vector<std::uint8_t> excluded;
    std::vector<std::int32_t> runs;
    std::vector<Direction> directions;
    Influence influence;

    [[nodiscard]] std::size_t size() const { return ids.size(); }
    /// Row of an id; size() when it is not there. O(log n).
    [[nodiscard]] std::size_t indexOf(ReadingId id) const;
    [[nodiscard]] InfluenceFigures influenceOf(std::size_t row) const {
        return influence.of(residual[row], leverage[row], weight.empty() ? 1 : weight[row]);
    }
};

/// What excluding did: the same fit over all readings.
struct WithoutExclusions {
    std::vector<Coefficient> coefficients;
    double residualSd = 0;
    double largestExpanded = 0; ///< largest half-width of the new-reading band in the range
};

/// All that follows from the readings of one phase.
struct PhaseEvaluation {
    Phase phase = Phase::AsFound;
    std::size_t readings = 0, complete = 0, excluded = 0, planned = 0;
    std::optional<Error> notFitted; ///< why there is no fit (too few readings, all references equal, …)
    std::optional<Fit> fit;
    std::optional<DegreeLadder> degrees; ///< where the function is a polynomial and the readings are few
    std::optional<VarianceSplit> split;
    std::optional<Diagnostics> diagnostics;
    std::optional<ProcessFigures> performance;
    std::optional<ForceFigures> force; ///< where the plan says that the item was turned between runs
    RowFigures rows;
    std::vector<BandPoint> curve; ///< at most 400 points over the range of all readings, a little beyond
    std::vector<BandPoint> at;    ///< at the chosen reference values
    std::vector<ReadValue> read;
    std::optional<WithoutExclusions> withoutExclusions;
    Budget budget;
    Verdict verdict;
    std::vector<Finding> findings; ///< most serious first
    std::vector<Warning> warnings;
};

/// All that follows from a record: an immutable snapshot, shared by pointer.
struct Evaluation {
    std::array<std::optional<PhaseEvaluation>, 2> phases; ///< by Phase; empty when it has no readings
    std::string calibrated;       ///< date of measurement, from the job or the readings' times
    struct OverdueStandard {
        std::size_t index = 0; ///< in Record::standards
        int days = 0;
    };
    std::vector<OverdueStandard> overdue;

    [[nodiscard]] const PhaseEvaluation* phase(Phase which) const;
};

} // namespace spanwright
