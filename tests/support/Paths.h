// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

namespace spanwright::test {

/// The root of the source tree, without a slash at its end.
std::string sourceDir();
/// The built program.
std::string programPath();

} // namespace spanwright::test
