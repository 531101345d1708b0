// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/evaluate.h"

namespace spanwright::test {

/// What follows from a record that can be evaluated.
inline Evaluation evaluated(const Record& record) {
    Progress progress;
    return evaluate(record, progress).value();
}

} // namespace spanwright::test
