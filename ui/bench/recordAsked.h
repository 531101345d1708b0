// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"

#include <functional>
#include <string>
#include <vector>

class QWidget;

namespace spanwright {

/// Readings that were typed or pasted and are to be recorded in one step.
struct EntryRequest {
    QString text; ///< of the step, for undo
    std::vector<Reading> rows;
    std::set<NumberColumn> columns; ///< those that were typed
    std::string reason;             ///< for the journal
};

/// Records them, after one question about the doubtful numbers among them where there are any; the answers stand in the journal. Exactly one
/// of the two is called: `recorded`, or `back` where nothing was recorded.
void recordAsked(Workbench& workbench, EntryRequest request, QWidget* parent, std::function<void()> recorded, std::function<void()> back);

} // namespace spanwright
