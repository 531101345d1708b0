// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"
#include "core/record/Limits.h"
#include "core/record/ReadingColumns.h"

#include <optional>
#include <vector>

namespace spanwright {

/// ILAC G8:09/2019, 4.2.
enum class ConformityState { Pass, ConditionalPass, ConditionalFail, Fail };

/// The result at one set point (and direction, where stated separately), with the decision where limits are stated. Unit of the
/// indication unless said.
struct PointResult {
    double setPoint = 0;
    Direction direction = Direction::Unknown;
    std::size_t n = 0;
    double reference = 0;           ///< mean, corrected, unit of the reference
    double indication = 0;          ///< mean
    std::optional<double> rising, falling; ///< means
    double ideal = 0;               ///< indication of a perfect item at the reference; NaN where the item states none
    double error = 0;               ///< indication − ideal; NaN likewise (Verdict::warnings says so)
    double expanded = 0;            ///< U
    double expandedReference = 0;   ///< U in the unit of the reference
    double coverageFactor = 0;
    double errorPercentOfSpan = 0, expandedPercentOfSpan = 0;
    std::optional<double> limit;    ///< half-width
    std::optional<double> acceptance; ///< half-width within which the error is accepted
    std::optional<double> guardBand;  ///< w
    std::optional<ConformityState> state;
    std::optional<double> conformanceProbability; ///< p_c, JCGM 106:2012, 7
};

struct Verdict {
    std::vector<PointResult> points;
    std::optional<ConformityState> overall; ///< the worst
    std::vector<Warning> warnings;          ///< FigureUndefined (figure: error, reason: no-output-range)
};

} // namespace spanwright
