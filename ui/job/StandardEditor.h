// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"

#include <QWidget>

namespace spanwright {

/// The fields of one reference standard, what its certificate says, its correction table, and why it was used when overdue.
QWidget* makeStandardEditor(Workbench& bench, std::size_t index);

} // namespace spanwright
