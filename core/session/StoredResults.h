// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <utility>
#include <vector>

namespace spanwright {

/// Figures as they were when the session was saved, by name, as the shortest text that reads back as the same double. Opening
/// recomputes and compares; nothing is ever taken from here.
struct StoredResults {
    std::string program; ///< version that computed them
    std::vector<std::pair<std::string, std::string>> figures; ///< in the order of the file
    bool operator==(const StoredResults&) const = default;
};

} // namespace spanwright
