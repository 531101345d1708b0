// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Error.h"

namespace spanwright {

/// Computed, but doubtful or missing, and why. The sentence is made in ui/words.
enum class WarningCode {
    ColumnNotExact,        ///< a column fits no decimal grid; facts: column
    NoReplicates,          ///< lack of fit cannot be tested
    OneRun,                ///< no run term
    OneDirection,          ///< no hysteresis
    NoDegreesOfFreedom,    ///< as many coefficients as readings
    RankLost,              ///< facts: terms
    NotConverged,          ///< facts: reason
    Extrapolated,          ///< facts: value
    NoFiniteInterval,      ///< facts: value
    NoAnswer,              ///< facts: value
    SeveralAnswers,        ///< facts: value
    NoIndication,          ///< facts: value, a reference that the function does not reach
    SeveralIndications,    ///< facts: value
    NotMonotonic,
    IncompleteReadings,    ///< rows that lack a reference or an indication; facts: count
    FigureUndefined,       ///< facts: figure, reason
    ApproximateMethod,     ///< facts: figure, method
    MatrixUnused,          ///< covariances between readings are stated, and the method does not use them
    SealBroken,            ///< a session file was changed outside the program
    JournalBroken,         ///< facts: entry, the first from 1 that does not fit the one before
    ResultsDiffer,         ///< stored with a session, and recomputed; facts: figure, stored, now
};
/// The last code, for a test that walks them all.
inline constexpr WarningCode lastWarningCode = WarningCode::ResultsDiffer;

struct Warning {
    WarningCode code = WarningCode::FigureUndefined;
    std::vector<Fact> facts;
    bool operator==(const Warning&) const = default;
};

} // namespace spanwright
