// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingRules.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

constexpr std::size_t leastOnPlateau = 10; ///< readings
constexpr double widthOfPlateau = 0.01;    ///< share of the range of the references
constexpr std::size_t leastOnTheWay = 3;   ///< readings in a row; fewer may have been taken one by one
constexpr std::size_t mostBetween = 1000;  ///< readings named

struct Plateaus {
    std::size_t count = 0, between = 0; ///< and the readings on the way from one to the next,
    std::vector<std::size_t> first;     ///< of which these come first

    void addBetween(std::size_t begin, std::size_t end) {
        if (end - begin < leastOnTheWay)
            return;
        between += end - begin;
        for (std::size_t i = begin; i < end && first.size() < mostBetween; ++i)
            first.push_back(i);
    }
};

/// Stretches of at least ten neighbours whose references stay within `width`; sought until half of the readings lie on the way.
Plateaus plateausIn(const std::vector<double>& reference, double width) {
    Plateaus plateaus;
    std::size_t left = 0; // where the last plateau was left
    for (std::size_t begin = 0; begin < reference.size() && 2 * (plateaus.between + begin - left) <= reference.size();) {
        double least = reference[begin], most = least;
        std::size_t end = begin + 1;
        for (; end < reference.size(); ++end) {
            least = std::min(least, reference[end]);
            most = std::max(most, reference[end]);
            if (most - least > width)
                break;
        }
        if (end - begin < leastOnPlateau) {
            ++begin;
            continue;
        }
        plateaus.addBetween(left, begin);
        // The last of a settling is a stretch of its own at the edge of the next.
        const bool goesOn = begin > 0 && begin == left && std::abs(reference[begin] - reference[begin - 1]) <= 2 * width;
        plateaus.count += goesOn ? 0 : 1;
        begin = left = end;
    }
    plateaus.addBetween(left, reference.size());
    return plateaus;
}

} // namespace

/// Readings taken on the way from one plateau to the next, of a logger whose set points are not stated: the item lags behind the reference
/// there. Three plateaus or more that hold most of the readings, with at least two percent of the readings between them, tell a logger from
/// readings taken one by one (common practice).
void addPlateauFindings(const FindingsInput& input, std::vector<Finding>& found) {
    const DecimalColumn& setPoint = input.record.readings->setPoint();
    const std::vector<double>& reference = input.sample.reference.high;
    if (setPoint.missing() < setPoint.size() || reference.size() < 3 * leastOnPlateau || input.fit->function.family == FunctionFamily::Constant)
        return;
    // Where no set point is stated, each reference is one, and they stand in rising order.
    const double range = input.sample.groupValue.back() - input.sample.groupValue.front();
    const Plateaus plateaus = plateausIn(reference, widthOfPlateau * range);
    if (plateaus.count < 3 || 2 * plateaus.between > reference.size() || 50 * plateaus.between < reference.size())
        return;
    Finding finding;
    finding.code = FindingCode::BetweenPlateaus;
    finding.severity = Severity::Serious;
    finding.figures = {{"count", static_cast<double>(plateaus.between)}, {"plateaus", static_cast<double>(plateaus.count)}};
    for (const std::size_t i : plateaus.first)
        finding.rows.push_back(idOf(input, i));
    finding.remedy = Remedy::SeeReadings;
    found.push_back(finding);
}

} // namespace spanwright
