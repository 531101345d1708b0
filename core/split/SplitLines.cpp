// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/SplitLines.h"

namespace spanwright {

std::vector<SplitLine> splitLines(const VarianceSplit& split) {
    std::vector<SplitLine> lines;
    const auto add = [&](SplitPart part, int level, const std::optional<SplitRow>& row) {
        if (row)
            lines.push_back({part, SplitLine::Test::Chain, level, *row});
    };
    const auto addTest = [&](SplitLine::Test test, const std::optional<SplitRow>& row) {
        if (row && row->f)
            lines.push_back({SplitPart::LackOfFit, test, 3, *row});
    };
    add(SplitPart::Total, 0, split.total);
    add(SplitPart::Regression, 1, split.regression);
    add(SplitPart::Residual, 1, split.residual);
    add(SplitPart::LackOfFit, 2, split.lackOfFit);
    addTest(SplitLine::Test::Adjusted, split.lackOfFitAdjusted);
    if (split.against != SplitPart::PureError)
        addTest(SplitLine::Test::Naive, split.lackOfFitNaive);
    add(SplitPart::PureError, 2, split.pureError);
    add(SplitPart::Hysteresis, 3, split.hysteresis);
    add(SplitPart::RunOffset, 3, split.runOffset);
    add(SplitPart::RunSlope, 3, split.runSlope);
    add(SplitPart::Repeatability, 3, split.repeatability);
    return lines;
}

} // namespace spanwright
