// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"

#include <string>

namespace spanwright {

/// Writes all of it or nothing. Errors: FileNotWritable, FileWriteFailed. Facts: file, reason.
Result<void> writeWhole(const std::string& path, const std::string& bytes);

} // namespace spanwright
