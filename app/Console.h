// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"

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

/// A result on standard output; refused where not all of it could be written.
int print(Console console, const std::string& result);

/// One line on the error stream, and the status that belongs to the error.
int refuse(Console console, const Error& error);

/// Wrong usage of an option on this file, in words.
int refuseUsage(Console console, const std::string& file, const std::string& reason);

/// One line for each thing that is wrong with a file; Refused.
int refuseFile(Console console, const std::string& file, const std::vector<Warning>& wrong);

using Words = std::vector<std::string>;

} // namespace spanwright
