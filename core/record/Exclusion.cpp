// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/record/Exclusion.h"

namespace spanwright {

namespace {

template <class Items>
auto place(Items& items, ReadingId id) {
    return std::lower_bound(items.begin(), items.end(), id, [](const Exclusion& e, ReadingId wanted) { return e.id < wanted; });
}

} // namespace

const Exclusion* Exclusions::find(ReadingId id) const {
    const auto found = place(items_, id);
    return found != items_.end() && found->id == id ? &*found : nullptr;
}

void Exclusions::add(const Exclusion& exclusion) {
    const auto found = place(items_, exclusion.id);
    if (found != items_.end() && found->id == exclusion.id)
        *found = exclusion;
    else
        items_.insert(found, exclusion);
}

void Exclusions::remove(ReadingId id) {
    const auto found = place(items_, id);
    if (found != items_.end() && found->id == id)
        items_.erase(found);
}

} // namespace spanwright
