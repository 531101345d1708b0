// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

namespace spanwright {

Card* itemCard(Workbench& bench);
/// Laboratory, customer, numbers, dates.
Card* orderCard(Workbench& bench);
Card* methodCard(Workbench& bench);
Card* adjustmentCard(Workbench& bench);
/// Traceability, external results, opinions, replacement.
Card* statementsCard(Workbench& bench);

} // namespace spanwright
