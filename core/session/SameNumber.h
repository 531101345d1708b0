// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

namespace spanwright {

/// Name of another session in the folder of `path` whose certificate has this number; empty when there is none, no number or no
/// folder. Only the beginning of each file is read, where the job stands.
std::string sessionWithNumber(const std::string& path, const std::string& number);

} // namespace spanwright
