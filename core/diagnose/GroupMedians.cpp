// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/GroupMedians.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

class GroupMedians {
  public:
    explicit GroupMedians(const GroupedValues& values)
        : values_(values), buckets_(values.u.size() > 1024 * values.groups ? 1024 : 1), groups_(values.groups) {
        eachStretch(values, [&](std::size_t g, std::size_t first, std::size_t last) {
            double low = groups_[g].low, high = groups_[g].high;
            for (std::size_t i = first; i < last; ++i) {
                low = std::min(low, values.u[i]);
                high = std::max(high, values.u[i]);
            }
            groups_[g].low = low;
            groups_[g].high = high;
            groups_[g].n += last - first;
        });
        for (Group& group : groups_)
            if (buckets_ > 1 && group.high > group.low)
                group.bucketsPerUnit = static_cast<double>(buckets_) / (group.high - group.low);
        count();
        gather();
    }

    [[nodiscard]] std::vector<double> medians() {
        std::vector<double> result(groups_.size(), 0.0);
        for (std::size_t g = 0; g < groups_.size(); ++g)
            if (groups_[g].n > 0)
                result[g] = median(groups_[g]);
        return result;
    }

  private:
    struct Group {
        double low = INFINITY, high = -INFINITY;
        double bucketsPerUnit = 0;
        std::size_t n = 0;
        std::size_t firstBucket = 0, lastBucket = 0, below = 0; ///< that hold both middle values; values below them
        std::vector<double> middle;
    };

    [[nodiscard]] std::size_t bucketOf(const Group& group, double u) const {
        return std::min(buckets_ - 1, static_cast<std::size_t>((u - group.low) * group.bucketsPerUnit));
    }

    void count() {
        if (buckets_ == 1)
            return;
        std::vector<std::uint32_t> counts(groups_.size() * buckets_, 0);
        eachStretch(values_, [&](std::size_t g, std::size_t first, std::size_t last) {
            const Group group{groups_[g].low, groups_[g].high, groups_[g].bucketsPerUnit, 0, 0, 0, 0, {}};
            std::uint32_t* const of = counts.data() + g * buckets_;
            for (std::size_t i = first; i < last; ++i)
                ++of[bucketOf(group, values_.u[i])];
        });
        for (std::size_t g = 0; g < groups_.size(); ++g) {
            Group& group = groups_[g];
            std::size_t before = 0, bucket = 0;
            const auto advance = [&](std::size_t rank) {
                while (before + counts[g * buckets_ + bucket] <= rank)
                    before += counts[g * buckets_ + bucket++];
            };
            if (group.n == 0)
                continue;
            advance((group.n - 1) / 2);
            group.firstBucket = bucket;
            group.below = before;
            advance(group.n / 2);
            group.lastBucket = bucket;
        }
    }

    void gather() {
        eachStretch(values_, [&](std::size_t g, std::size_t first, std::size_t last) {
            Group& group = groups_[g];
            for (std::size_t i = first; i < last; ++i) {
                const std::size_t bucket = bucketOf(group, values_.u[i]);
                if (bucket >= group.firstBucket && bucket <= group.lastBucket)
                    group.middle.push_back(values_.u[i]);
            }
        });
    }

    static double median(Group& group) {
        const auto nth = [&](std::size_t rank) {
            const auto place = group.middle.begin() + static_cast<std::ptrdiff_t>(rank - group.below);
            std::nth_element(group.middle.begin(), place, group.middle.end());
            return *place;
        };
        return (nth((group.n - 1) / 2) + nth(group.n / 2)) / 2;
    }

    const GroupedValues& values_;
    std::size_t buckets_;
    std::vector<Group> groups_;
};

} // namespace

std::vector<double> groupMedians(const GroupedValues& values) {
    return GroupMedians(values).medians();
}

} // namespace spanwright
