// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Error.h"

#include <iosfwd>
#include <string>
#include <vector>

namespace spanwright {

/// Where a command writes: results, and everything else.
struct Console {
    std::ostream& out;
    std::ostream& err;
};

/// What a command ends with, as the program's exit status.
enum ExitStatus : int { Done = 0, Refused = 1, WrongUsage = 2, CertificateBlocked = 3 };

/// One line on the error stream, and the status that belongs to the error.
int refuse(Console console, const Error& error);

using Words = std::vector<std::string>;

} // namespace spanwright
