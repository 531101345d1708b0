// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <memory>
#include <span>
#include <vector>

namespace spanwright {

/// Values u with the group of each.
struct GroupedValues {
    std::span<const double> u;
    std::span<const std::int32_t> group;
    std::size_t groups = 0;
};

/// The same values group by group, inside each in the order in which they came, so that one group is one stretch of memory.
class GroupedColumn {
  public:
    explicit GroupedColumn(const GroupedValues& values);

    [[nodiscard]] std::size_t groups() const { return begin_.size() - 1; }
    [[nodiscard]] std::span<const double> operator[](std::size_t group) const {
        return {values_.get() + begin_[group], begin_[group + 1] - begin_[group]};
    }

  private:
    std::unique_ptr<double[]> values_;
    std::vector<std::size_t> begin_;
};

/// The median, exact; 0 of nothing. Of many values only those near the median of a sample are gathered (Floyd and Rivest,
/// Commun. ACM 18 (1975) 165). O(n) expected.
[[nodiscard]] double medianOf(std::span<const double> values);

} // namespace spanwright
