// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/EqualVariances.h"

#include "core/diagnose/Orthonormal.h"
#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <iterator>

namespace spanwright {
namespace {

constexpr std::size_t mostGroups = 10'000;

struct MeanAndSquares {
    double n = 0, mean = 0, squares = 0;
};

/// Calls use(group, first, last) for every stretch of neighbours in one group, so that sums of a plateau stay in registers.
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

/// Means and squares of |u − centre of its group| or, without centres, of u, for every group.
std::vector<MeanAndSquares> meansAndSquares(const GroupedValues& values, std::span<const double> centre) {
    std::vector<MeanAndSquares> parts(values.groups);
    const auto value = [&](std::size_t i, double middle) { return centre.empty() ? values.u[i] : std::abs(values.u[i] - middle); };
    eachStretch(values, [&](std::size_t g, std::size_t first, std::size_t last) {
        const double middle = centre.empty() ? 0 : centre[g];
        double sum = 0;
        for (std::size_t i = first; i < last; ++i)
            sum += value(i, middle);
        parts[g].n += static_cast<double>(last - first);
        parts[g].mean += sum;
    });
    for (MeanAndSquares& part : parts)
        part.mean /= part.n;
    eachStretch(values, [&](std::size_t g, std::size_t first, std::size_t last) {
        const double middle = centre.empty() ? 0 : centre[g], mean = parts[g].mean;
        double sum = 0;
        for (std::size_t i = first; i < last; ++i)
            sum += (value(i, middle) - mean) * (value(i, middle) - mean);
        parts[g].squares += sum;
    });
    return parts;
}

/// Groups with two values or more.
std::vector<MeanAndSquares> replicated(const std::vector<MeanAndSquares>& parts) {
    std::vector<MeanAndSquares> kept;
    std::copy_if(parts.begin(), parts.end(), std::back_inserter(kept), [](const MeanAndSquares& part) { return part.n >= 2; });
    return kept;
}

/// Median of every group, exact. Large groups are first counted into buckets between their ends, so that only one bucket of each
/// is gathered and nothing is copied.
class GroupMedians {
  public:
    explicit GroupMedians(const GroupedValues& values) : values_(values), buckets_(values.u.size() > 1024 * values.groups ? 1024 : 1), groups_(values.groups) {
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

std::optional<TestResult> bartlettOf(const std::vector<MeanAndSquares>& groups) {
    const double k = static_cast<double>(groups.size());
    double freedom = 0, squares = 0, inverse = 0, logs = 0;
    for (const auto& group : groups) {
        if (!(group.squares > 0))
            return std::nullopt;
        freedom += group.n - 1;
        squares += group.squares;
        inverse += 1 / (group.n - 1);
        logs += (group.n - 1) * std::log(group.squares / (group.n - 1));
    }
    TestResult result;
    result.statistic = std::max(0.0, (freedom * std::log(squares / freedom) - logs) / (1 + (inverse - 1 / freedom) / (3 * (k - 1))));
    result.df = static_cast<int>(groups.size()) - 1;
    result.p = chiSquaredAbove(result.statistic, k - 1);
    return result;
}

std::optional<TestResult> leveneOf(const std::vector<MeanAndSquares>& parts) {
    double n = 0, sum = 0, within = 0, between = 0;
    for (const auto& part : parts) {
        n += part.n;
        sum += part.n * part.mean;
        within += part.squares;
    }
    for (const auto& part : parts)
        between += part.n * (part.mean - sum / n) * (part.mean - sum / n);
    const double k = static_cast<double>(parts.size());
    if (!(within > 0) || n <= k)
        return std::nullopt;
    TestResult result;
    result.statistic = (between / (k - 1)) / (within / (n - k));
    result.df = static_cast<int>(parts.size()) - 1;
    result.p = fAbove(result.statistic, k - 1, n - k);
    return result;
}

} // namespace

double cochranCriticalValue(double groups, double n, double level) {
    const double f = fQuantileAbove(level / groups, n - 1, (groups - 1) * (n - 1));
    return 1 / (1 + (groups - 1) / f);
}

EqualVariances equalVariances(const GroupedValues& values) {
    EqualVariances result;
    if (values.groups < 2 || values.groups >= values.u.size() || values.groups > mostGroups)
        return result;
    const std::vector<MeanAndSquares> parts = replicated(meansAndSquares(values, {}));
    if (parts.size() < 2)
        return result;
    double sum = 0, largest = 0, n = 0;
    for (const auto& part : parts) {
        const double variance = part.squares / (part.n - 1);
        sum += variance;
        largest = std::max(largest, variance);
        n += part.n;
        result.equalSizes = result.equalSizes && !(std::abs(part.n - parts.front().n) > 0);
    }
    result.bartlett = bartlettOf(parts);
    if (sum > 0) {
        const double k = static_cast<double>(parts.size());
        result.cochran = largest / sum;
        result.cochranCritical = cochranCriticalValue(k, n / k, 0.05);
        result.cochranCriticalOutlier = cochranCriticalValue(k, n / k, 0.01);
    }
    result.levene = leveneOf(replicated(meansAndSquares(values, GroupMedians(values).medians())));
    return result;
}

std::optional<TestResult> breuschPagan(std::span<const double> u, const std::vector<std::vector<double>>& columns) {
    const std::size_t n = u.size();
    std::vector<double> squares(n);
    double mean = 0;
    for (std::size_t i = 0; i < n; ++i) {
        squares[i] = u[i] * u[i];
        mean += squares[i];
    }
    mean /= static_cast<double>(n);
    double total = 0;
    for (double& value : squares) {
        value -= mean;
        total += value * value;
    }
    if (!(total > 0))
        return std::nullopt;
    // What each direction beside the constant takes from the squares adds up to R².
    std::vector<std::vector<double>> all(1, std::vector<double>(n, 1.0));
    all.insert(all.end(), columns.begin(), columns.end());
    const std::vector<std::vector<double>> basis = orthonormal(std::move(all));
    if (basis.size() < 2)
        return std::nullopt;
    double explained = 0;
    for (std::size_t j = 1; j < basis.size(); ++j) {
        const double along = dot(basis[j], squares);
        explained += along * along;
    }
    TestResult result;
    result.statistic = static_cast<double>(n) * explained / total;
    result.df = static_cast<int>(basis.size()) - 1;
    result.p = chiSquaredAbove(result.statistic, *result.df);
    return result;
}

std::optional<TestResult> breuschPagan(std::span<const double> u, std::span<const double> column) {
    const std::size_t n = u.size();
    const double size = static_cast<double>(n);
    double meanX = 0, meanV = 0;
    for (std::size_t i = 0; i < n; ++i) {
        meanX += column[i];
        meanV += u[i] * u[i];
    }
    meanX /= size;
    meanV /= size;
    double xx = 0, vv = 0, xv = 0;
    for (std::size_t i = 0; i < n; ++i) {
        const double x = column[i] - meanX, v = u[i] * u[i] - meanV;
        xx += x * x;
        vv += v * v;
        xv += x * v;
    }
    if (!(xx > 0) || !(vv > 0))
        return std::nullopt;
    TestResult result;
    result.statistic = size * (xv / xx) * (xv / vv);
    result.df = 1;
    result.p = chiSquaredAbove(result.statistic, 1);
    return result;
}

} // namespace spanwright
