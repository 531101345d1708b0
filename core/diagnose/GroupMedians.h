// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <span>
#include <vector>

namespace spanwright {

/// Values u in groups.
struct GroupedValues {
    std::span<const double> u;
    std::span<const std::int32_t> group;
    std::size_t groups = 0;
};

/// Calls use(group, first, last) for every stretch of neighbours in one group, so that sums of a plateau stay in
/// registers.
template <class Use>
void eachStretch(const GroupedValues& values, Use&& use) {
    for (std::size_t i = 0; i < values.u.size();) {
        const std::int32_t group = values.group[i];
        std::size_t last = i + 1;
        while (last < values.u.size() && values.group[last] == group)
            ++last;
        use(static_cast<std::size_t>(group), i, last);
        i = last;
    }
}

/// The median of every group, exact; 0 for a group without values. Large groups are first counted into buckets between
/// their ends, so that only one bucket of each is gathered and nothing is copied. O(n).
[[nodiscard]] std::vector<double> groupMedians(const GroupedValues& values);

} // namespace spanwright
