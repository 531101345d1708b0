// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Console.h"
#include "core/base/Result.h"
#include "ui/shell/Start.h"

namespace spanwright {

/// What the words ask of the window. Errors: UsageUnknownOption, UsageValueBad (an unknown stage or scheme), UsageUnknownCommand,
/// FileMissing.
Result<StartOptions> startOptions(const Words& words);

/// Opens the window on what the words name (sessions and tables; --stage, --scheme) and returns when it is closed. Where it
/// cannot be opened, says why.
int windowCommand(int& argc, char** argv, const Words& words, Console console);

} // namespace spanwright
