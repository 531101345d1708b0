// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstring>
#include <type_traits>
#include <vector>

namespace spanwright {

/// Whether all values are equal, at the speed at which memory is read.
template <class T>
bool allSame(const std::vector<T>& values) {
    static_assert(std::has_unique_object_representations_v<T>);
    return values.empty() || std::memcmp(values.data(), values.data() + 1, (values.size() - 1) * sizeof(T)) == 0;
}

} // namespace spanwright
