// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Finding.h"

#include <string_view>

namespace spanwright {

/// The name of a finding as it stands in figures and in dismissals: "lack-of-fit".
std::string_view findingName(FindingCode code);

} // namespace spanwright
