// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

namespace spanwright {

/// A finding that somebody looked at and set aside. It stays listed, and comes back when its figures change.
struct Dismissal {
    std::string finding; ///< code as in figures JSON
    std::string figures; ///< the figures at the time, as text that is equal only when they are
    std::string reason;
    std::string by;   ///< initials
    std::string date; ///< ISO 8601
    bool operator==(const Dismissal&) const = default;
};

} // namespace spanwright
