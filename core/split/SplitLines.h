// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/split/VarianceSplit.h"

#include <vector>

namespace spanwright {

/// A line of the variance split listed from the whole to its parts.
struct SplitLine {
    /// Of the chain of nested models; or lack of fit once more, after direction and run, or against pure error with direction and run
    /// in it. Only lines of the chain add up.
    enum class Test { Chain, Adjusted, Naive };
    SplitPart part = SplitPart::Total;
    Test test = Test::Chain;
    int level = 0; ///< how far it is indented: a part of the line above with a smaller one
    SplitRow row;
};

/// The lines that the readings can give, in the order in which every table of the split shows them. A second test of lack of fit is
/// there where it could be made and differs from the first.
[[nodiscard]] std::vector<SplitLine> splitLines(const VarianceSplit& split);

} // namespace spanwright
