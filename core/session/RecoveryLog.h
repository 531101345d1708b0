// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace spanwright {

/// The bytes of a recovery file: a line that says what it is and for which session, then entries, each headed by a line
/// "#bytes readings digest". What is torn or does not match its digest, and all after it, is not there.
struct RecoveryLog {
    struct Entry {
        std::string_view payload; ///< a session in the first, then changes
        std::size_t readings = 0; ///< in the record after it
    };
    std::string sessionPath;
    std::vector<Entry> entries;

    /// Empty when the bytes are no recovery file. Entries look into the bytes.
    static std::optional<RecoveryLog> parse(std::string_view bytes);
    static std::string heading(const std::string& sessionPath);
    static std::string entry(std::string_view payload, std::size_t readings);
};

} // namespace spanwright
