// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"

#include <string>
#include <vector>

namespace spanwright {

/// Whether a file with something in it may be written over.
enum class Replacing { Refused, Allowed };

/// Whether a result may be written there. Errors: FileIsInput (one of `inputs`, by whatever name or link it is reached, always
/// refused); FileExists (it holds something, and replacing is refused). Fact: file.
Result<void> mayBeWritten(const std::string& path, const std::vector<std::string>& inputs, Replacing replacing);

/// Writes all of it or nothing. Errors: FileNotWritable, FileWriteFailed. Facts: file, reason.
Result<void> writeWhole(const std::string& path, const std::string& bytes);

} // namespace spanwright
