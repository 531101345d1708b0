// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Shared.h"
#include "core/record/BudgetLine.h"
#include "core/record/Choices.h"
#include "core/record/Dismissal.h"
#include "core/record/Exclusion.h"
#include "core/record/Job.h"
#include "core/record/Journal.h"
#include "core/record/Limits.h"
#include "core/record/Plan.h"
#include "core/record/ReadingColumns.h"
#include "core/record/SignOff.h"
#include "core/record/UncertaintyMatrix.h"

#include <map>
#include <string>
#include <vector>

namespace spanwright {

/// What was recorded: a plain value, changed only by commands (ui/commands), from which every figure follows (core/evaluate).
struct Record {
    Job job;
    Item item;
    std::vector<Standard> standards;
    Conditions conditions;
    Plan plan;
    Shared<ReadingColumns> readings;
    Shared<Exclusions> exclusions;
    UncertaintyMatrix uncertaintyMatrix;
    Choices choices;
    BudgetInput budget;
    Limits limits;
    std::vector<SignOff> signOffs;
    std::vector<Dismissal> dismissals;

    Shared<Journal> journal;
    ReadingId nextReadingId = 1; ///< never handed out twice, not even after an undo
    /// Keys that a newer program wrote and this one does not know, by JSON pointer, as raw JSON: kept through load and save.
    std::map<std::string, std::string> unknown;

    /// Equal in all that is stated. The journal and the next id tell how the record came about, and are not compared.
    friend bool operator==(const Record& a, const Record& b);
};

} // namespace spanwright
