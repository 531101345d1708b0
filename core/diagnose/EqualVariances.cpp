// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/EqualVariances.h"

#include "core/diagnose/Orthonormal.h"
#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

/// Values sorted into their groups (counting sort); groups with fewer than two are left out.
std::vector<std::vector<double>> replicateGroups(const GroupedValues& values) {
    std::vector<std::uint32_t> count(values.groups, 0);
    for (const std::int32_t g : values.group)
        ++count[static_cast<std::size_t>(g)];
    std::vector<std::int32_t> place(values.groups, -1);
    std::vector<std::vector<double>> groups;
    for (std::size_t g = 0; g < values.groups; ++g) {
        if (count[g] < 2)
            continue;
        place[g] = static_cast<std::int32_t>(groups.size());
        groups.emplace_back().reserve(count[g]);
    }
    if (groups.size() < 2)
        return {};
    for (std::size_t i = 0; i < values.u.size(); ++i) {
        const std::int32_t at = place[static_cast<std::size_t>(values.group[i])];
        if (at >= 0)
            groups[static_cast<std::size_t>(at)].push_back(values.u[i]);
    }
    return groups;
}

struct MeanAndSquares {
    double n = 0, mean = 0, squares = 0;
};

MeanAndSquares meanAndSquares(const std::vector<double>& values) {
    MeanAndSquares result;
    result.n = static_cast<double>(values.size());
    for (const double value : values)
        result.mean += value;
    result.mean /= result.n;
    for (const double value : values)
        result.squares += (value - result.mean) * (value - result.mean);
    return result;
}

double median(std::vector<double>& values) {
    const auto middle = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
    std::nth_element(values.begin(), middle, values.end());
    if (values.size() % 2 == 1)
        return *middle;
    return (*std::max_element(values.begin(), middle) + *middle) / 2;
}

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

std::optional<TestResult> leveneOf(std::vector<std::vector<double>>& groups) {
    double n = 0, sum = 0, within = 0;
    std::vector<MeanAndSquares> parts;
    for (auto& group : groups) {
        const double middle = median(group);
        for (double& value : group)
            value = std::abs(value - middle);
        parts.push_back(meanAndSquares(group));
        n += parts.back().n;
        sum += parts.back().n * parts.back().mean;
        within += parts.back().squares;
    }
    double between = 0;
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
    std::vector<std::vector<double>> groups = replicateGroups(values);
    if (groups.empty())
        return result;
    std::vector<MeanAndSquares> parts;
    double sum = 0, largest = 0, n = 0;
    for (const auto& group : groups) {
        parts.push_back(meanAndSquares(group));
        const double variance = parts.back().squares / (parts.back().n - 1);
        sum += variance;
        largest = std::max(largest, variance);
        n += parts.back().n;
        result.equalSizes = result.equalSizes && group.size() == groups.front().size();
    }
    result.bartlett = bartlettOf(parts);
    if (sum > 0) {
        const double k = static_cast<double>(groups.size());
        result.cochran = largest / sum;
        result.cochranCritical = cochranCriticalValue(k, n / k, 0.05);
        result.cochranCriticalOutlier = cochranCriticalValue(k, n / k, 0.01);
    }
    result.levene = leveneOf(groups);
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

} // namespace spanwright
