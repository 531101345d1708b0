// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/Record.h"

namespace spanwright {

bool operator==(const Record& a, const Record& b) {
    return a.job == b.job && a.item == b.item && a.standards == b.standards && a.conditions == b.conditions && a.plan == b.plan &&
           a.readings == b.readings && a.exclusions == b.exclusions && a.uncertaintyMatrix == b.uncertaintyMatrix && a.choices == b.choices && a.budget == b.budget &&
           a.limits == b.limits && a.signOffs == b.signOffs &&
           a.dismissals == b.dismissals && a.unknown == b.unknown;
}

} // namespace spanwright
