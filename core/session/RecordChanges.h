// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <optional>
#include <string>
#include <string_view>

namespace spanwright {

/// What turns `before` into `after`, as one JSON object: parts that differ as a whole, readings and exclusions by id, new journal
/// entries. "{}" when nothing differs; empty when the whole record would be shorter or `after` did not grow out of `before`.
std::optional<std::string> writeChanges(const Record& before, const Record& after);

/// Applies them. Errors: NotJson, SessionValueBad; the record may then be changed in part.
Result<void> applyChanges(Record& record, std::string_view changes);

} // namespace spanwright
