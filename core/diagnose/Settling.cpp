// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Settling.h"

namespace spanwright {

std::optional<std::int64_t> hurried(const Plan& plan, const Reading& before, const Reading& typed) {
    const bool sameRun = before.phase == typed.phase && before.run == typed.run;
    if (!sameRun || plan.dwellSeconds <= 0 || typed.enteredAt <= 0 || before.enteredAt <= 0 || typed.setPoint == before.setPoint)
        return std::nullopt;
    const std::int64_t waited = typed.enteredAt - before.enteredAt;
    return waited < std::int64_t{1000} * plan.dwellSeconds ? std::optional(waited / 1000) : std::nullopt;
}

} // namespace spanwright
