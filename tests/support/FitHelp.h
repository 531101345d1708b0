// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/fitFunction.h"
#include "tests/support/PublishedSet.h"

#include <string>
#include <vector>

namespace spanwright::test {

/// Numbers as typed, in the fewest digits that give them back.
std::vector<std::string> typed(const std::vector<double>& values);

/// A record with readings of one phase; columns that are empty are left out.
struct TypedReadings {
    std::vector<std::string> reference, indication, uReference, uIndication;
    std::vector<std::string> uCovariance = {};
};
Record recordOf(const TypedReadings& readings);

/// The fit of a record with its function set; fails the running test when there is none.
FitOutcome fitted(Record& record, const char* function);
/// Why there is no fit; fails the running test when there is one.
Error refused(Record& record, const char* function);

} // namespace spanwright::test
