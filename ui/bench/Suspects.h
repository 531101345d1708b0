// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

#include <QString>

#include <optional>
#include <set>
#include <vector>

namespace spanwright {

/// A number that is asked about before it is recorded.
struct Suspect {
    std::size_t row = 0; ///< among the readings that are to be recorded
    NumberColumn column = NumberColumn::Indication;
    Decimal typed;
    std::optional<Decimal> suggestion; ///< what would fit
    QString sentence;
    bool useSuggestion = false; ///< the answer; nothing is replaced unless it is chosen
};

/// Numbers of the columns just typed or pasted that a slip of the hand could have made, or that lie far from what is expected: at most one
/// question for each, the best explanation first. Readings with an id replace those of the record. What lies inside the interval that the
/// readings so far lead to expect (`figures`, of their phase) is not called far off, unless more readings are judged than led to it. More
/// than a few thousand are not looked at.
std::vector<Suspect> suspectsAmong(const Record& record, const PhaseEvaluation* figures, const std::vector<Reading>& rows, const std::set<NumberColumn>& columns);

/// The readings with the answers put in.
std::vector<Reading> answered(std::vector<Reading> rows, const std::vector<Suspect>& suspects);
/// What the journal says of an answer: that a doubtful number was kept, or taken instead of which.
QString answerText(const Suspect& suspect);

} // namespace spanwright
