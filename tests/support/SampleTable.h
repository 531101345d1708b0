// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

namespace spanwright::test {

/// The readings of a table of sample-data, as they are written there and no more: reference and indication first, then set point, run
/// or direction by their heads.
Record sampleTable(const char* name);
/// The same where the references were set and not only read.
Record sampleTableAtReferences(const char* name);

} // namespace spanwright::test
