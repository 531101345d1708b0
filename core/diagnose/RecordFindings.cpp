// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingRules.h"

#include <algorithm>
#include <map>
#include <vector>

namespace spanwright {
namespace {

struct ExcludedReading {
    ReadingId id = 0;
    std::size_t row = 0;
};

/// Complete readings of the phase that are excluded.
std::vector<ExcludedReading> excludedReadings(const FindingsInput& input) {
    std::vector<ExcludedReading> result;
    const ReadingColumns& readings = *input.record.readings;
    for (const Exclusion& exclusion : input.record.exclusions->all()) {
        const std::size_t row = readings.indexOf(exclusion.id);
        if (row < readings.size() && readings.phases()[row] == input.phase && readings.complete(row))
            result.push_back({exclusion.id, row});
    }
    return result;
}

void wholeSetPoints(const FindingsInput& input, const std::vector<ExcludedReading>& excluded,
                    std::vector<Finding>& found) {
    const ReadingColumns& readings = *input.record.readings;
    std::map<double, std::vector<ReadingId>> gone;
    for (const ExcludedReading& one : excluded) {
        const DecimalColumn& column = readings.setPoint().has(one.row) ? readings.setPoint() : readings.reference();
        const double setPoint = column.toDouble(one.row);
        if (!std::binary_search(input.sample.groupValue.begin(), input.sample.groupValue.end(), setPoint))
            gone[setPoint].push_back(one.id);
    }
    for (const auto& [setPoint, ids] : gone) {
        // Without stated set points every reference is its own, and a lone reading is no set point.
        if (ids.size() < 2 && !readings.setPoint().has(readings.indexOf(ids.front())))
            continue;
        Finding finding;
        finding.code = FindingCode::SetPointExcluded;
        finding.severity = Severity::Serious;
        finding.rows = ids;
        finding.figures = {{"set_point", setPoint}, {"count", static_cast<double>(ids.size())}};
        finding.remedy = Remedy::SeeExclusions;
        found.push_back(finding);
    }
}

void exclusions(const FindingsInput& input, std::vector<Finding>& found) {
    const std::vector<ExcludedReading> excluded = excludedReadings(input);
    if (excluded.empty())
        return;
    Finding finding;
    finding.code = FindingCode::ExcludedReadings;
    finding.severity = Severity::Note;
    finding.remedy = Remedy::SeeExclusions;
    finding.figures = {{"count", static_cast<double>(excluded.size())}};
    for (const ExcludedReading& one : excluded)
        finding.rows.push_back(one.id);
    if (input.fit && input.residualSdWithAll)
        finding.figures.insert(finding.figures.end(), {{"residual_sd_with", *input.residualSdWithAll},
                                                       {"residual_sd", input.fit->residualSd}});
    found.push_back(finding);

    wholeSetPoints(input, excluded, found);
    const double share =
        static_cast<double>(excluded.size()) / static_cast<double>(excluded.size() + input.sample.size());
    const double limit = input.record.choices.exclusionLimit.toDouble();
    if (share > limit) {
        finding.code = FindingCode::ManyExcluded;
        finding.severity = share > 2 * limit ? Severity::Serious : Severity::Attention; // twice the limit: common practice
        finding.figures = {{"share", share}, {"exclusion_limit", limit}, {"count", static_cast<double>(excluded.size())}};
        found.push_back(finding);
    }
}

void tooFew(const FindingsInput& input, std::vector<Finding>& found) {
    Finding finding;
    finding.code = FindingCode::TooFewReadings;
    finding.remedy = Remedy::TakeMoreReadings;
    const double n = static_cast<double>(input.sample.size());
    if (!input.fit) {
        finding.severity = Severity::Serious;
        finding.figures = {{"count", n}};
    } else {
        const int freedom = input.fit->degreesOfFreedom;
        const FunctionFamily family = input.fit->function.family;
        const bool fewPoints = family != FunctionFamily::Constant && family != FunctionFamily::Table &&
                               input.sample.groupValue.size() < input.fit->terms() + 1;
        if (freedom >= 5 && !fewPoints)
            return;
        finding.severity = freedom < 1                ? Severity::Serious
                           : freedom < 3 || fewPoints ? Severity::Attention
                                                      : Severity::Note;
        finding.figures = {{"count", n}, {"degrees_of_freedom", static_cast<double>(freedom)}};
        if (fewPoints)
            finding.figures.insert(finding.figures.begin(), {"set_points", static_cast<double>(input.sample.groupValue.size())});
    }
    found.push_back(finding);
}

} // namespace

void addRecordFindings(const FindingsInput& input, std::vector<Finding>& found) {
    exclusions(input, found);
    if (input.sample.size() > 0 && (input.fit || input.sample.size() < 4))
        tooFew(input, found);
}

} // namespace spanwright
