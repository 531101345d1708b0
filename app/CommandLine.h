// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Console.h"

#include <optional>

namespace spanwright {

/// Runs a command that needs no window; empty when the words ask for the window.
std::optional<int> runCommand(const Words& words, Console console);

/// Reads the command line, does what it says and returns the exit status: 0 done, 1 refused, 2 wrong usage, 3 a certificate
/// that is blocked.
int runProgram(int argc, char** argv);

} // namespace spanwright
