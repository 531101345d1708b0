// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

namespace spanwright {

/// Coverage of U, the limits of the error and the decision rule that was agreed.
Card* limitsCard(Workbench& bench);

} // namespace spanwright
