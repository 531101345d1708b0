// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Findings.h"

#include "core/base/ClassSums.h"
#include "core/diagnose/FindingRules.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <iterator>

namespace spanwright {
namespace {

/// Codes in order of consequence: what makes the result wrong before what makes it uncertain before what is merely
/// worth knowing.
constexpr std::array order{
    FindingCode::BetweenPlateaus, FindingCode::LowestOutweigh, // they bring others with them
    FindingCode::LackOfFit,       FindingCode::HiddenCurvature,    FindingCode::ThroughZeroNotSupported,
    FindingCode::StatedTooSmall,
    FindingCode::Outlier,         FindingCode::SetPointExcluded,   FindingCode::ManyExcluded,
    FindingCode::TooFewReadings,  FindingCode::Extrapolation,      FindingCode::Hysteresis,
    FindingCode::FirstRunDiffers, FindingCode::RunZeroShift,       FindingCode::RunGainChange,
    FindingCode::ScatterGrows,    FindingCode::Autocorrelated,     FindingCode::Influential,
    FindingCode::Straggler,       FindingCode::DegreeNotJustified, FindingCode::OutsideBand,
    FindingCode::RepeatedReading, FindingCode::StatedTooLarge,     FindingCode::NonNormal,          FindingCode::ExcludedReadings};

/// More set points than this are a logger's record: what repeats there is by chance.
constexpr std::size_t mostSetPoints = 10'000;

std::ptrdiff_t rank(FindingCode code) {
    return std::find(order.begin(), order.end(), code) - order.begin();
}

} // namespace

const SplitRow* judgedLackOfFit(const VarianceSplit& split) {
    if (split.lackOfFitAdjusted && split.lackOfFitAdjusted->f)
        return &*split.lackOfFitAdjusted;
    if (split.lackOfFit && split.lackOfFit->f)
        return &*split.lackOfFit;
    if (split.lackOfFitNaive && split.lackOfFitNaive->f)
        return &*split.lackOfFitNaive;
    return nullptr;
}

ReadingId idOf(const FindingsInput& input, std::size_t index) {
    return input.record.readings->ids()[input.sample.rows[index]];
}

std::vector<double> repeatabilityDeviations(const FindingsInput& input, const std::vector<std::size_t>& leftOut) {
    const Sample& sample = input.sample;
    const std::size_t n = sample.size();
    if (!input.residuals || !input.split || !input.split->pureError || sample.groupValue.size() > mostSetPoints)
        return {};
    struct Cell {
        double weight = 0, sum = 0;
        std::size_t n = 0;
        void operator+=(const Cell& other) {
            weight += other.weight;
            sum += other.sum;
            n += other.n;
        }
    };
    const std::size_t directions = sample.direction.empty() ? 1 : 3;
    const auto cellOf = [&](std::size_t i) {
        const auto d = sample.direction.empty() ? std::size_t{0} : static_cast<std::size_t>(sample.direction[i]);
        return directions * static_cast<std::size_t>(sample.group[i]) + d;
    };
    const std::vector<double>& w = input.residuals->weight.high;
    std::vector<double> withoutRuns;
    if (!sample.run.empty() && !input.split->runs.empty()) {
        withoutRuns = input.residuals->e.high;
        const double middle = (sample.groupValue.front() + sample.groupValue.back()) / 2;
        std::size_t at = 0;
        for (std::size_t i = 0; i < n; ++i) {
            const auto& runs = input.split->runs;
            if (at >= runs.size() || runs[at].run != sample.run[i])
                at = static_cast<std::size_t>(
                    std::find_if(runs.begin(), runs.end(), [&](const RunLine& r) { return r.run == sample.run[i]; }) -
                    runs.begin());
            if (at < runs.size())
                withoutRuns[i] -= runs[at].offset +
                                  runs[at].slope * (sample.groupValue[static_cast<std::size_t>(sample.group[i])] - middle);
        }
    }
    const std::span<const double> e = withoutRuns.empty() ? input.residuals->e.high : withoutRuns;
    const bool barePoints = leftOut.empty() && withoutRuns.empty() && sample.direction.empty() && input.split->setPoints.size() == sample.groupValue.size();
    std::vector<Cell> cells;
    if (barePoints)
        for (const SetPointMeans& point : input.split->setPoints)
            cells.push_back({1, point.mean, point.n});
    else
        cells = classSums<Cell>(n, directions * sample.groupValue.size(), [&](std::vector<Cell>& sums, std::size_t first, std::size_t last) {
            auto next = std::lower_bound(leftOut.begin(), leftOut.end(), first);
            for (std::size_t i = first; i < last; ++i) {
                if (next != leftOut.end() && *next == i) {
                    ++next;
                    continue;
                }
                const double weight = w.empty() ? 1 : w[i];
                sums[cellOf(i)] += {weight, weight * e[i], 1};
            }
        });
    for (Cell& cell : cells) {
        cell.sum /= cell.weight;
        // What one mean takes from a cell of few makes its deviations too small by √(1 − 1/n).
        cell.weight = cell.n > 1 ? 1 / std::sqrt(1 - 1 / static_cast<double>(cell.n)) : 0;
    }
    std::vector<double> left(n);
    inHalves(n, [&](std::size_t first, std::size_t last) {
        for (std::size_t i = first; i < last; ++i) {
            const Cell& cell = cells[cellOf(i)];
            left[i] = (e[i] - cell.sum) * cell.weight * (w.empty() ? 1 : std::sqrt(w[i]));
        }
    });
    for (const std::size_t i : leftOut)
        left[i] = 0;
    return left;
}

bool contains(const std::vector<Finding>& found, FindingCode code) {
    return std::any_of(found.begin(), found.end(), [&](const Finding& finding) { return finding.code == code; });
}

std::vector<Finding> findings(const FindingsInput& input) {
    std::vector<Finding> found;
    if (input.fit && input.residuals) {
        auto plateaus = beside(input.sample.size(), [&] {
            std::vector<Finding> own;
            addPlateauFindings(input, own);
            return own;
        });
        addFunctionFindings(input, found);
        addRunFindings(input, found);
        const std::vector<double> deviations = repeatabilityDeviations(input);
        addReadingFindings(input, deviations, found);
        addScatterFindings(input, deviations, found);
        addWeightFindings(input, found);
        std::ranges::move(plateaus.get(), std::back_inserter(found));
    }
    if (input.fit)
        addStatedFindings(*input.fit, found);
    addRecordFindings(input, found);
    std::stable_sort(found.begin(), found.end(), [](const Finding& a, const Finding& b) {
        return a.severity != b.severity ? a.severity > b.severity : rank(a.code) < rank(b.code);
    });
    return found;
}

} // namespace spanwright
