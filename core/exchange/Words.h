// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>

namespace spanwright {

/// Without blanks (space, tab, no-break space, narrow no-break space) at both ends.
std::string_view withoutBlanks(std::string_view text);
/// ASCII letters in lower case; other bytes as they are.
std::string lowerCase(std::string_view text);

} // namespace spanwright
