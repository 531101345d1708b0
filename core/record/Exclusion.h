// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/ReadingColumns.h"

#include <algorithm>
#include <string>
#include <vector>

namespace spanwright {

/// The short list of reasons; Other needs words.
enum class ExclusionReason { NotSettled, TypingSlip, WrongReference, Disturbance, OutOfRange, InstrumentFault, Other };

/// A reading set aside from every computation, never deleted, with the reason (ISO/IEC 17025:2017, 7.8.2.1 n).
struct Exclusion {
    ReadingId id = 0;
    ExclusionReason reason = ExclusionReason::Other;
    std::string words; ///< may be empty unless the reason is Other
    std::string by;    ///< initials
    std::int64_t at = 0; ///< ms since 1970-01-01 UTC
    bool operator==(const Exclusion&) const = default;
};

/// Exclusions in rising order of the reading's id, at most one a reading.
class Exclusions {
  public:
    [[nodiscard]] const std::vector<Exclusion>& all() const { return items_; }
    [[nodiscard]] std::size_t size() const { return items_.size(); }
    [[nodiscard]] bool empty() const { return items_.empty(); }
    [[nodiscard]] const Exclusion* find(ReadingId id) const;
    [[nodiscard]] bool contains(ReadingId id) const { return find(id) != nullptr; }
    void add(const Exclusion& exclusion); ///< replaces one of the same reading
    void remove(ReadingId id);
    bool operator==(const Exclusions&) const = default;

  private:
    std::vector<Exclusion> items_;
};

} // namespace spanwright
