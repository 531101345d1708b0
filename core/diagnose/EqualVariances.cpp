// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/EqualVariances.h"

#include "core/base/LaneSums.h"
#include "core/base/Parallel.h"
#include "core/diagnose/Orthonormal.h"
#include "core/fit/Quantiles.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdint>
#include <iterator>

namespace spanwright {
namespace {

constexpr std::size_t mostGroups = 10'000;

struct MeanAndSquares {
    double n = 0, mean = 0, squares = 0;
};

/// Mean and squares of transform(value) in one pass, from the distances to the first, which lies as near to the mean as the
/// values spread.
template <class Transform>
MeanAndSquares meanAndSquares(std::span<const double> values, Transform&& transform) {
    if (values.empty())
        return {};
    const double origin = transform(values.front()), n = static_cast<double>(values.size());
    const auto [sum, squares] = laneSums<2>(0, values.size(), [&](std::size_t i) -> std::array<double, 2> {
        const double d = transform(values[i]) - origin;
        return {d, d * d};
    });
    return {n, origin + sum / n, squares - sum * (sum / n)};
}

/// Groups with two values or more.
std::vector<MeanAndSquares> replicated(const std::vector<MeanAndSquares>& parts) {
    std::vector<MeanAndSquares> kept;
    std::copy_if(parts.begin(), parts.end(), std::back_inserter(kept),
                 [](const MeanAndSquares& part) { return part.n >= 2; });
    return kept;
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
    result.statistic =
        std::max(0.0, (freedom * std::log(squares / freedom) - logs) / (1 + (inverse - 1 / freedom) / (3 * (k - 1))));
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
    const GroupedColumn column(values);
    std::vector<MeanAndSquares> all;
    for (std::size_t g = 0; g < column.groups(); ++g)
        all.push_back(meanAndSquares(column[g], [](double u) { return u; }));
    const std::vector<MeanAndSquares> parts = replicated(all);
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
    const auto aboutMedians = [&](std::size_t first, std::size_t last) {
        for (std::size_t g = first; g < last; ++g)
            all[g] = meanAndSquares(column[g], [middle = medianOf(column[g])](double u) { return std::abs(u - middle); });
    };
    auto others = beside(values.u.size(), [&] { aboutMedians(column.groups() / 2, column.groups()); });
    aboutMedians(0, column.groups() / 2);
    others.get();
    result.levene = leveneOf(replicated(all));
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
    if (u.empty())
        return std::nullopt;
    const double n = static_cast<double>(u.size()), origin = column.front();
    const auto [x, v, xx, vv, xv] = laneSums<5>(0, u.size(), [&](auto i) {
        const auto distance = at(column.data(), i) - origin, square = at(u.data(), i) * at(u.data(), i);
        return std::array{distance, square, distance * distance, square * square, distance * square};
    });
    const double squaresX = xx - x * (x / n), squaresV = vv - v * (v / n), products = xv - x * (v / n);
    if (!(squaresX > 0) || !(squaresV > 0))
        return std::nullopt;
    TestResult result;
    result.statistic = n * (products / squaresX) * (products / squaresV);
    result.df = 1;
    result.p = chiSquaredAbove(result.statistic, 1);
    return result;
}

} // namespace spanwright
