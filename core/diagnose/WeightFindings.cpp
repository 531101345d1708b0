// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingRules.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

/// Weights proportional to level take the scatter to vanish at zero, where display and noise leave some. Readings below a thousandth of
/// the highest level, or where that scatter is less than the rounding of the display, are found when fewer than half of the readings
/// hold more than 95 % of the weight there (common practice).
void addWeightFindings(const FindingsInput& input, std::vector<Finding>& found) {
    constexpr double nearZero = 1e-3, nearlyAll = 0.95;
    const Fit& fit = *input.fit;
    const std::vector<double>& weight = input.residuals->weight.high;
    if (fit.weights != Weights::Proportional || fit.method != Method::LeastSquares || weight.empty())
        return;
    const bool forward = fit.direction == FitDirection::Indication;
    const std::vector<double>& level = forward ? input.sample.reference.high : input.sample.indication.high;
    const auto& resolution = forward ? input.record.item.resolution : input.record.item.referenceResolution;
    const double rounding = resolution ? resolution->toDouble() / std::sqrt(12.0) : 0;
    const auto magnitude = [&](std::size_t i) { return std::abs(level[i]); };
    double highest = 0, all = 0, held = 0;
    for (std::size_t i = 0; i < weight.size(); ++i) {
        highest = std::max(highest, magnitude(i));
        all += weight[i];
    }
    Finding finding;
    std::size_t count = 0;
    double lowest = highest;
    for (std::size_t i = 0; i < weight.size(); ++i) {
        if (!(magnitude(i) < nearZero * highest) && !(fit.residualSd * magnitude(i) < rounding))
            continue;
        ++count;
        held += weight[i];
        lowest = std::min(lowest, magnitude(i));
        if (finding.rows.size() < mostRowsNamed)
            finding.rows.push_back(idOf(input, i));
    }
    if (2 * count >= weight.size() || !(held > nearlyAll * all))
        return;
    finding.code = FindingCode::LowestOutweigh;
    finding.severity = Severity::Serious;
    finding.figures = {{"count", static_cast<double>(count)}, {"weight_share", held / all}, {"level", lowest}};
    finding.remedy = Remedy::ChooseWeights;
    found.push_back(finding);
}

} // namespace spanwright
