// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"
#include "core/diagnose/Finding.h"
#include "core/evaluate/ReadValue.h"
#include "core/split/VarianceSplit.h"
#include "core/verdict/Verdict.h"

#include <string_view>

namespace spanwright {

/// Names of codes as they stand in figures, for programs that read them. The switches have no default, so a code without a name
/// does not compile.
std::string_view codeName(WarningCode code);
std::string_view codeName(FindingCode code);
std::string_view codeName(Severity severity);
std::string_view codeName(Remedy remedy);
std::string_view codeName(SplitPart part);
std::string_view codeName(ConformityState state);
std::string_view codeName(ValueState state);

} // namespace spanwright
