// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

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
};

} // namespace spanwright
