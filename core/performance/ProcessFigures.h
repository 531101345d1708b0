// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Sample.h"
#include "core/record/Job.h"

#include <optional>

namespace spanwright {

/// A figure with its sign, in the unit of the indication, in % of output span, and where it occurs.
struct ProcessFigure {
    double value = 0;
    double percentOfSpan = 0;
    double setPoint = 0;
};

/// Performance figures of the process industry (terms of IEC 61298-2 and IEC 62828; definitions in the source file).
struct ProcessFigures {
    double span = 0; ///< of the output, unit of the indication
    std::optional<ProcessFigure> measuredErrorMax, inaccuracyHigh, inaccuracyLow, hysteresis, hysteresisInCycle,
        nonRepeatability, nonLinearityTerminal, nonLinearityIndependent, nonLinearityZeroBased;
    std::vector<Warning> warnings; ///< ApproximateMethod: span or ideal output not stated (facts: figure, method)
};

/// Figures of one phase. The error of a reading is its indication minus what a perfect item with the stated range and
/// output would show at its reference, so a reference that wanders about its set point does no harm. Where range and
/// output are not stated, the perfect item shows the reference itself if both have one unit, else lies on the chord
/// through the means at both ends; a warning says so. Empty without two set points, or for more than 2000 of them (a
/// logger's record, no plan of set points).
[[nodiscard]] std::optional<ProcessFigures> processFigures(const Sample& sample, const Item& item);

} // namespace spanwright
