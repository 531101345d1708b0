// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <string>
#include <vector>

namespace spanwright {

/// One thing that happened to the record: what, where, the value before and after, who, when, why (ISO/IEC 17025:2017, 7.5.2).
struct JournalEntry {
    std::int64_t at = 0; ///< ms since 1970-01-01 UTC
    std::string who;     ///< initials
    std::string what;    ///< a short code: "reading-entered", "value-amended", "excluded", "undone", …
    std::string where;   ///< "reading 17 indication", "item.serial", …
    std::string before;
    std::string after;
    std::string reason;
    bool operator==(const JournalEntry&) const = default;
};

/// Append-only. Undoing a change adds an entry; nothing is ever taken out.
class Journal {
  public:
    void append(JournalEntry entry) { entries_.push_back(std::move(entry)); }
    [[nodiscard]] const std::vector<JournalEntry>& entries() const { return entries_; }
    [[nodiscard]] std::size_t size() const { return entries_.size(); }
    bool operator==(const Journal&) const = default;

  private:
    std::vector<JournalEntry> entries_;
};

} // namespace spanwright
