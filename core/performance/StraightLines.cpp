// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/performance/StraightLines.h"

#include <cmath>
#include <vector>

namespace spanwright {
namespace {

DeviationLine withDeviation(const Points& points, double intercept, double slope) {
    DeviationLine line{intercept, slope, 0, 0};
    for (std::size_t i = 0; i < points.x.size(); ++i) {
        const double d = points.y[i] - (intercept + slope * points.x[i]);
        // A later point takes the place only by more than rounding, so that ties are settled by the first.
        if (std::abs(d) > std::abs(line.deviation) * (1 + 1e-9)) {
            line.deviation = d;
            line.at = i;
        }
    }
    return line;
}

/// Upper hull for sign +1, lower hull for −1, as indices in rising x (Andrew's monotone chain).
std::vector<std::size_t> hull(const Points& points, double sign) {
    std::vector<std::size_t> kept;
    for (std::size_t i = 0; i < points.x.size(); ++i) {
        while (kept.size() > 1) {
            const std::size_t a = kept[kept.size() - 2], b = kept.back();
            const double cross = (points.x[b] - points.x[a]) * (points.y[i] - points.y[a]) -
                                 (points.y[b] - points.y[a]) * (points.x[i] - points.x[a]);
            if (sign * cross < 0)
                break;
            kept.pop_back();
        }
        kept.push_back(i);
    }
    return kept;
}

} // namespace

DeviationLine terminalLine(const Points& points) {
    const double slope = (points.y.back() - points.y.front()) / (points.x.back() - points.x.front());
    return withDeviation(points, points.y.front() - slope * points.x.front(), slope);
}

DeviationLine minimaxLine(const Points& points) {
    const std::vector<std::size_t> hulls[] = {hull(points, 1), hull(points, -1)};
    double bestWidth = INFINITY, bestSlope = 0, bestMiddle = 0;
    for (const auto& edges : hulls)
        for (std::size_t k = 1; k < edges.size(); ++k) {
            const std::size_t a = edges[k - 1], b = edges[k];
            const double slope = (points.y[b] - points.y[a]) / (points.x[b] - points.x[a]);
            double high = -INFINITY, low = INFINITY;
            for (const std::size_t i : hulls[0])
                high = std::max(high, points.y[i] - slope * points.x[i]);
            for (const std::size_t i : hulls[1])
                low = std::min(low, points.y[i] - slope * points.x[i]);
            if (high - low < bestWidth) {
                bestWidth = high - low;
                bestSlope = slope;
                bestMiddle = (high + low) / 2;
            }
        }
    return withDeviation(points, bestMiddle, bestSlope);
}

DeviationLine zeroBasedLine(const Points& points) {
    // Deviations d − s t and s t − d are lines in the slope s; the lowest point of their upper envelope lies where a
    // falling and a rising one cross. Start from any crossing and exchange the line that rises above it until none
    // does.
    struct Edge {
        double t = 0, d = 0; // value d − s t
    };
    std::vector<Edge> edges;
    for (std::size_t i = 1; i < points.x.size(); ++i) {
        const double t = points.x[i] - points.x.front(), d = points.y[i] - points.y.front();
        edges.push_back({t, d});
        edges.push_back({-t, -d});
    }
    Edge falling = edges[0], rising = edges[1];
    double slope = 0;
    for (std::size_t step = 0; step < edges.size() + 2; ++step) {
        slope = (falling.d - rising.d) / (falling.t - rising.t);
        const double value = falling.d - slope * falling.t;
        Edge highest = falling;
        double most = value;
        for (const Edge& edge : edges)
            if (edge.d - slope * edge.t > most) {
                most = edge.d - slope * edge.t;
                highest = edge;
            }
        if (!(most > value + 1e-13 * std::abs(value)))
            break;
        (highest.t > 0 ? falling : rising) = highest;
    }
    return withDeviation(points, points.y.front() - slope * points.x.front(), slope);
}

} // namespace spanwright
