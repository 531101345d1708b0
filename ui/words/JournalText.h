// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Journal.h"

#include <QString>

namespace spanwright {

/// An entry of the journal as people say it. The file keeps codes and paths, "value-amended" and "item.serial"; no window shows them.
struct JournalWords {
    QString what, where, before, after, reason;
};
JournalWords journalWords(const JournalEntry& entry);

/// What a path of the record is called: "standards.1.due" is "standard 2, due". Empty for a path that the record does not have.
QString fieldText(const std::string& path);

} // namespace spanwright
