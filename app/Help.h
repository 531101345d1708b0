// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string_view>

namespace spanwright {

/// All commands and options on a page, for --help.
std::string_view helpText();

} // namespace spanwright
