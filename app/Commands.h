// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/Console.h"

namespace spanwright {

/// The commands that need no window. `words` is what follows the command's name; the result is the exit status.
int figuresCommand(const Words& words, Console console);
int checkCommand(const Words& words, Console console);
int certificateCommand(const Words& words, Console console);
int convertCommand(const Words& words, Console console);
int coefficientsCommand(const Words& words, Console console);
int selfTestCommand(const Words& words, Console console);

} // namespace spanwright
