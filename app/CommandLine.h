// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

namespace spanwright {

/// Reads the command line, does what it says and returns the exit status: 0 done, 1 refused, 2 wrong usage, 3 a certificate
/// that is blocked.
int runProgram(int argc, char** argv);

} // namespace spanwright
