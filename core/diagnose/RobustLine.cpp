// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/RobustLine.h"

#include <algorithm>
#include <cmath>
#include <vector>

namespace spanwright {
namespace {

constexpr std::size_t mostReadings = 400;

double medianOf(std::vector<double>& values) {
    const auto middle = values.begin() + static_cast<std::ptrdiff_t>(values.size() / 2);
    std::nth_element(values.begin(), middle, values.end());
    if (values.size() % 2 == 1)
        return *middle;
    return (*std::max_element(values.begin(), middle) + *middle) / 2;
}

/// Median |r| of the readings whose level is below, or not below, the middle level.
double halfScatter(const std::vector<double>& level, const std::vector<double>& residual, double middle, bool upper) {
    std::vector<double> part;
    for (std::size_t i = 0; i < level.size(); ++i)
        if ((level[i] >= middle) == upper)
            part.push_back(std::abs(residual[i]));
    return part.empty() ? 0 : medianOf(part);
}

} // namespace

double RobustLine::distance(double x, double y) const {
    const double expected = at(x);
    const double sd = std::max(relative ? scatter * std::abs(expected) : scatter, least);
    return sd > 0 ? (y - expected) / sd : y == expected ? 0 : std::copysign(1e9, y - expected);
}

std::optional<RobustLine> robustLine(std::span<const double> allX, std::span<const double> allY, double least) {
    std::vector<double> x, y;
    const std::size_t step = allX.size() / mostReadings + 1;
    for (std::size_t i = 0; i < allX.size(); i += step) {
        x.push_back(allX[i]);
        y.push_back(allY[i]);
    }
    const std::size_t n = x.size();
    if (n < 4)
        return std::nullopt;
    // Slopes between set points only: pairs that lie closer than a twentieth of the range tell of scatter alone.
    const auto [low, high] = std::minmax_element(x.begin(), x.end());
    const double apart = (*high - *low) / 20;
    if (!(apart > 0))
        return std::nullopt;
    std::vector<double> values;
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t j = i + 1; j < n; ++j)
            if (std::abs(x[j] - x[i]) > apart)
                values.push_back((y[j] - y[i]) / (x[j] - x[i]));
    if (values.empty())
        return std::nullopt;
    RobustLine line;
    line.least = least;
    line.slope = medianOf(values);
    values.resize(n);
    for (std::size_t i = 0; i < n; ++i)
        values[i] = y[i] - line.slope * x[i];
    line.intercept = medianOf(values);

    std::vector<double> residual(n), level(n);
    for (std::size_t i = 0; i < n; ++i) {
        residual[i] = y[i] - line.at(x[i]);
        level[i] = std::abs(line.at(x[i]));
    }
    std::vector<double> sorted = level;
    const double middle = medianOf(sorted);
    const double lower = halfScatter(level, residual, middle, false),
                 upper = halfScatter(level, residual, middle, true);
    line.relative = n >= 12 && upper > 2.5 * std::max(lower, least);
    for (std::size_t i = 0; i < n; ++i)
        values[i] = std::abs(residual[i]) / (line.relative ? std::max(level[i], 1e-300) : 1);
    line.scatter = 1.4826 * medianOf(values);
    return line;
}

} // namespace spanwright
