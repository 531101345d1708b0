// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"

#include <optional>
#include <vector>

namespace spanwright {

/// The reference value that belongs to an indication, with the set of values for which the indication would lie within the
/// band (Fieller's interval for the line; root finding for curves).
struct ReadBackAnswer {
    double indication = 0;
    std::optional<double> reference; ///< empty: no answer in the range
    std::vector<double> others;      ///< further answers, when the function is not monotonic
    double standardUncertainty = 0;
    double low = 0, high = 0;        ///< may be infinite
    bool insideRange = true;
    std::vector<Warning> warnings;
};

/// `repeats`: number of new readings of which `indication` is the mean; empty: an exact indication.
ReadBackAnswer readBack(const Fit& fit, double indication, std::optional<int> repeats);

} // namespace spanwright
