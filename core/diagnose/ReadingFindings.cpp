// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingRules.h"

#include "core/base/ClassSums.h"
#include "core/diagnose/Outliers.h"
#include "core/diagnose/ResidualColumn.h"
#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>
#include <map>

namespace spanwright {
namespace {

/// One after the other, the reading that lies furthest from the mean of its set point, direction and run when those found before
/// are left out of that mean: a wild reading pulls the mean of its set point towards it, and its sound neighbours would seem to be
/// out. With very many readings the means are taken once.
std::vector<ExtremeTrial> cleanedTrials(const FindingsInput& input, const std::vector<double>& deviations, int most) {
    constexpr std::size_t mostCleaned = 20'000;
    if (deviations.size() > mostCleaned)
        return extremeTrials(deviations, most);
    std::vector<ExtremeTrial> trials;
    std::vector<std::size_t> leftOut;
    std::vector<double> all = deviations;
    for (int k = 0; k < most; ++k) {
        std::vector<double> kept;
        std::vector<std::size_t> index;
        for (std::size_t i = 0; i < all.size(); ++i)
            if (!std::binary_search(leftOut.begin(), leftOut.end(), i)) {
                kept.push_back(all[i]);
                index.push_back(i);
            }
        const std::vector<ExtremeTrial> furthest = extremeTrials(kept, 1);
        if (furthest.empty())
            break;
        trials.push_back(furthest.front());
        trials.back().index = index[furthest.front().index];
        leftOut.insert(std::lower_bound(leftOut.begin(), leftOut.end(), trials.back().index), trials.back().index);
        all = repeatabilityDeviations(input, leftOut);
    }
    return trials;
}

/// The furthest residuals one after the other; the diagnostics hold them unless fewer were asked for there.
std::vector<ExtremeTrial> residualTrials(const FindingsInput& input, int most) {
    std::vector<ExtremeTrial> trials;
    if (input.diagnostics && input.diagnostics->esd.size() >= static_cast<std::size_t>(most)) {
        for (const OutlierTrial& trial : std::span(input.diagnostics->esd).first(static_cast<std::size_t>(most)))
            trials.push_back({input.sample.rows.indexOf(trial.row - 1), trial.r, trial.lambda});
        return trials;
    }
    if (input.residuals->weight.empty())
        return extremeTrials(input.residuals->e.high, most);
    return extremeTrials(weightedResiduals<double>(*input.residuals), most);
}

/// Stragglers at 5 % and outliers at 1 % (ISO 5725-2:2019, 8.3.4), among the residuals and among the deviations from
/// set point, direction and run, where a gap between rising and falling hides nothing. A technical cause is to be
/// looked for; nothing is removed.
void outlying(const FindingsInput& input, const std::vector<double>& deviations, std::vector<Finding>& found) {
    const std::size_t n = input.sample.size();
    const int most = static_cast<int>(std::clamp<std::size_t>(n / 10, 1, 10));
    struct Mark {
        double r = 0, lambda = 0;
        bool outlier = false;
    };
    std::map<std::size_t, Mark> marks;
    const auto look = [&](std::size_t readings, const std::vector<ExtremeTrial>& trials) {
        if (readings < 5)
            return;
        const int stragglers = outlierCount(trials, readings, 0.05);
        const int outliers = stragglers > 0 ? outlierCount(trials, readings, 0.01) : 0;
        for (int k = 0; k < stragglers; ++k) {
            const auto at = static_cast<std::size_t>(k);
            Mark& mark = marks[trials[at].index];
            const bool outlier = k < outliers;
            if (mark.r > 0 && (mark.outlier || !outlier))
                continue;
            mark = {trials[at].r, grubbsCriticalValue(readings - at, outlier ? 0.01 : 0.05), outlier};
        }
    };
    look(n, residualTrials(input, most));
    look(deviations.size(), cleanedTrials(input, deviations, most));
    for (const bool outlier : {true, false}) {
        Finding finding;
        finding.code = outlier ? FindingCode::Outlier : FindingCode::Straggler;
        finding.severity = outlier ? Severity::Serious : Severity::Attention;
        finding.remedy = Remedy::SeeReadings;
        Mark worst;
        for (const auto& [index, mark] : marks)
            if (mark.outlier == outlier) {
                finding.rows.push_back(idOf(input, index));
                if (mark.r > worst.r)
                    worst = mark;
            }
        if (finding.rows.empty())
            continue;
        finding.figures = {
            {"count", static_cast<double>(finding.rows.size())}, {"r", worst.r}, {"critical", worst.lambda}};
        found.push_back(finding);
    }
}

/// w e² of a place or a pair.
auto weightedSquare(const Residuals& residuals, auto i) {
    const auto e = at(residuals.e.high.data(), i);
    return residuals.weight.empty() ? e * e : at(residuals.weight.high.data(), i) * e * e;
}

/// Cook's distance beyond the median of F with p and n − p degrees of freedom: leaving the reading out would move the
/// coefficients to the edge of their 50 % region (Cook, Technometrics 19 (1977) 15).
void influential(const FindingsInput& input, double largestSquare, std::vector<Finding>& found) {
    const Fit& fit = *input.fit;
    const Residuals& residuals = *input.residuals;
    if (fit.degreesOfFreedom < 2 || fit.function.family == FunctionFamily::Constant ||
        residuals.leverage.size() != residuals.e.size() || !(fit.residualSd > 0))
        return;
    const double limit = fQuantileAbove(0.5, static_cast<double>(fit.terms()), fit.degreesOfFreedom);
    Finding finding;
    finding.code = FindingCode::Influential;
    finding.severity = Severity::Attention;
    finding.remedy = Remedy::SeeReadings;
    const double variance = fit.residualSs / fit.degreesOfFreedom * static_cast<double>(fit.terms());
    const std::span<const double> h = residuals.leverage;
    const auto above = [&](std::size_t i) { return weightedSquare(residuals, i) * h[i]; };
    const auto below = [&](std::size_t i) { return variance * (1 - h[i]) * (1 - h[i]); };
    // Of very many readings none has a share that counts, which the largest of both tells without looking at each.
    const double highest = boundsInHalves(h.size(), [&](auto i) { return at(h.data(), i); }).high;
    if (highest < 1 && largestSquare * highest <= limit * variance * (1 - highest) * (1 - highest))
        return;
    double most = 0;
    for (std::size_t i = 0; i < h.size() && finding.rows.size() < mostRowsNamed; ++i) {
        if (!(above(i) > limit * below(i)) || 1 - h[i] < 1e-13)
            continue;
        finding.rows.push_back(idOf(input, i));
        most = std::max(most, above(i) / below(i));
    }
    if (finding.rows.empty())
        return;
    finding.figures = {{"count", static_cast<double>(finding.rows.size())}, {"cook", most}, {"limit", limit}};
    found.push_back(finding);
}

/// Readings outside ŷ ± t √(σ²(1 + h)). A share of 1 − coverage is to be expected there, so few are no finding unless
/// one lies half as far again, and farther than the largest of so many would.
void outsideBand(const FindingsInput& input, double largestSquare, std::vector<Finding>& found) {
    const Fit& fit = *input.fit;
    const Residuals& residuals = *input.residuals;
    const double scale =
        fit.covarianceScale == CovarianceScale::Stated && fit.weights != Weights::Equal ? 1 : fit.residualSd;
    if (fit.degreesOfFreedom < 1 || !(scale > 0) || residuals.leverage.size() != residuals.e.size())
        return;
    Finding finding;
    finding.code = FindingCode::OutsideBand;
    finding.remedy = Remedy::SeeReadings;
    const double edge = fit.coverageFactor * fit.coverageFactor * scale * scale;
    const std::size_t n = residuals.e.size();
    const auto square = [&](auto i) { return weightedSquare(residuals, i); };
    const auto limit = [&](auto i) { return edge * (1 + at(residuals.leverage.data(), i)); };
    const double count = sumInHalves<1>(n, [&](auto i) { return std::array{exceeds(square(i), limit(i))}; })[0];
    const double expected = static_cast<double>(n) * (1 - fit.coverage);
    const bool many = count > expected + 2 * std::sqrt(expected);
    // The largest of n sound readings lies beyond this once in twenty sets (Bonferroni).
    const double far = std::max(1.5, studentQuantileAbove(0.025 / static_cast<double>(n), fit.degreesOfFreedom) / fit.coverageFactor);
    const auto beyond = [&] { return boundsInHalves(n, [&](auto i) { return square(i) - far * far * limit(i); }).high >= 0; };
    if (!many && (largestSquare < far * far * edge || !beyond()))
        return;
    for (std::size_t i = 0; i < n && finding.rows.size() < mostRowsNamed; ++i)
        if (square(i) > limit(i))
            finding.rows.push_back(idOf(input, i));
    finding.severity = many ? Severity::Attention : Severity::Note;
    finding.figures = {{"count", count}, {"expected", expected}};
    found.push_back(finding);
}

/// A reading that repeats both numbers of the one before as typed, where references otherwise wander, so that the same
/// one twice is rather a habit of the hand than the instrument.
void repeatedReadings(const FindingsInput& input, std::vector<Finding>& found) {
    const Sample& sample = input.sample;
    const ReadingColumns& readings = *input.record.readings;
    if (sample.size() > 100'000)
        return;
    bool wander = false;
    Finding finding;
    for (std::size_t i = 1; i < sample.size(); ++i) {
        if (sample.group[i] != sample.group[i - 1] || sample.rows[i] != sample.rows[i - 1] + 1)
            continue;
        const std::size_t row = sample.rows[i];
        const auto same = [&](const DecimalColumn& column) {
            return column.has(row) && column.has(row - 1) && column.at(row) == column.at(row - 1);
        };
        if (!same(readings.reference()))
            wander = true;
        else if (same(readings.indication()) && readings.reference().at(row) != readings.setPoint().at(row))
            finding.rows.push_back(idOf(input, i));
    }
    if (finding.rows.empty() || !wander)
        return;
    finding.code = FindingCode::RepeatedReading;
    finding.severity = Severity::Note;
    finding.remedy = Remedy::SeeReadings;
    finding.figures = {{"count", static_cast<double>(finding.rows.size())}};
    found.push_back(finding);
}

} // namespace

void addReadingFindings(const FindingsInput& input, const std::vector<double>& deviations,
                        std::vector<Finding>& found) {
    outlying(input, deviations, found);
    const std::size_t n = input.residuals->e.size();
    const double largestSquare = n > 0 ? boundsInHalves(n, [&](auto i) { return weightedSquare(*input.residuals, i); }).high : 0;
    influential(input, largestSquare, found);
    outsideBand(input, largestSquare, found);
    repeatedReadings(input, found);
}

} // namespace spanwright
