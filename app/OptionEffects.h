// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Arguments.h"
#include "app/RecordFile.h"
#include "core/evaluate/Evaluation.h"

#include <optional>
#include <string>

namespace spanwright {

/// An option of `figures` that would be passed over, though the figures would be taken for what it asks: the reason why the command is
/// refused. Empty where there is none.
std::optional<std::string> misleadingOption(const Arguments& arguments, const LoadedRecord& loaded);

/// Options of `figures` that change nothing here, each with the reason, for the error stream.
std::vector<std::string> optionsWithoutEffect(const Arguments& arguments, const Record& record, const PhaseEvaluation& phase);

} // namespace spanwright
