// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"
#include "core/fit/Sample.h"
#include "core/record/Record.h"

#include <optional>
#include <vector>

namespace spanwright {

/// The readings of one set point as they are stated: of one direction, or the mean of rising and falling.
struct PointMeans {
    double setPoint = 0;
    Direction direction = Direction::Unknown; ///< Unknown: both, or not known
    std::size_t n = 0;
    std::size_t runs = 1;   ///< different runs among them
    double reference = 0;   ///< corrected, unit of the reference
    double indication = 0;
    std::optional<double> rising, falling; ///< mean indications
    std::optional<double> gap;             ///< rising minus falling at equal reference, unit of the indication
};

/// With more set points than this (a logger's file without set points, say) none are stated one by one.
inline constexpr std::size_t MostStatedPoints = 1000;

/// Means over the readings that count, in rising order of the set point, rising before falling where they are stated
/// separately (`choices.separateDirections`). Otherwise a set point that has both directions gets the mean of the two
/// directions' means, so that a direction with more readings does not weigh more. `fit` (may be null) moves the directions to
/// the same reference before the gap is taken.
std::vector<PointMeans> pointMeans(const Record& record, const Sample& sample, const Fit* fit);

/// The indication of a perfect item at a reference value: the straight line through (rangeLow, outputLow) and (rangeHigh,
/// outputHigh); the reference value itself where no output is stated and both quantities have the same unit; else empty.
std::optional<double> idealIndication(const Item& item, double reference);

/// Change of the indication per change of the reference at a point: of the fitted function, else of the perfect item, else 1.
/// Never zero.
double sensitivityAt(const Item& item, const Fit* fit, double reference, double indication);

} // namespace spanwright
