// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Journal.h"
#include "core/record/ReadingColumns.h"

#include <QString>

#include <set>
#include <utility>

namespace spanwright {

/// Which values of the readings were changed after they were recorded, and how, as the journal tells.
class AmendedValues {
  public:
    /// Reads what the journal has that was not read yet. One that does not continue the last read belongs to another record.
    void follow(const Journal& journal);
    [[nodiscard]] bool contains(ReadingId id, NumberColumn column) const { return amended_.contains({id, column}); }
    [[nodiscard]] bool contains(ReadingId id) const;

    /// Every entry about a value, in words, oldest first.
    static QString history(const Journal& journal, ReadingId id, NumberColumn column);

  private:
    std::set<std::pair<ReadingId, NumberColumn>> amended_;
    std::size_t read_ = 0;
    JournalEntry last_; ///< of those read
};

} // namespace spanwright
