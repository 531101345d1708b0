// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Progress.h"
#include "core/base/Result.h"
#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

namespace spanwright {

/// The only road from what was recorded to a number. Pure: the same record gives the same bits. A phase that cannot be fitted
/// is an evaluation with `notFitted`, not an error. Error: Cancelled.
Result<Evaluation> evaluate(const Record& record, Progress& progress);

} // namespace spanwright
