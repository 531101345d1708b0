// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/ChainPlaces.h"

#include "core/base/ClassSums.h"

#include <algorithm>
#include <array>

namespace spanwright {
namespace {

std::vector<int> runNumbers(const std::vector<std::int32_t>& runs) {
    std::vector<int> numbers;
    std::int32_t last = runs.empty() ? 0 : runs.front() - 1;
    for (const std::int32_t run : runs) {
        if (run == last)
            continue;
        last = run;
        const auto at = std::lower_bound(numbers.begin(), numbers.end(), run);
        if (at == numbers.end() || *at != run)
            numbers.insert(at, run);
        if (numbers.size() > mostRuns)
            break;
    }
    return numbers;
}

std::size_t directionOf(const Sample& sample, std::size_t i) {
    return sample.direction.empty() ? 0 : static_cast<std::size_t>(sample.direction[i]);
}

void findCells(const Sample& sample, ChainPlaces& places, NoiseChain& chain) {
    const std::size_t n = sample.size(), groups = sample.groupValue.size();
    if (groups > mostListedCells && sample.direction.empty() && sample.run.empty()) {
        chain.setPoints = static_cast<int>(groups);
        places.cell = sample.group;
        return;
    }
    struct Seen : std::array<std::int32_t, 3> {
        void operator+=(const Seen& other) {
            for (std::size_t d = 0; d < size(); ++d)
                (*this)[d] += other[d];
        }
    };
    const std::vector<Seen> seen = classSums<Seen>(n, groups, [&](std::vector<Seen>& sums, std::size_t first, std::size_t last) {
        for (std::size_t i = first; i < last; ++i)
            ++sums[static_cast<std::size_t>(sample.group[i])][directionOf(sample, i)];
    });
    std::vector<std::array<std::int32_t, 3>> cellOf(groups, {-1, -1, -1});
    for (std::size_t g = 0; g < groups; ++g) {
        const bool both = seen[g][1] > 0 && seen[g][2] > 0;
        bool any = false;
        for (std::size_t d = 0; d < 3; ++d) {
            if (seen[g][d] == 0)
                continue;
            chain.directionsKnown = chain.directionsKnown || d > 0;
            if (!any || both) {
                NoiseChain::Cell cell;
                cell.group = static_cast<std::int32_t>(g);
                cell.direction = static_cast<Direction>(d);
                chain.cells.push_back(cell);
            } else {
                chain.cells.back().direction = Direction::Unknown;
            }
            any = true;
            cellOf[g][d] = static_cast<std::int32_t>(chain.cells.size() - 1);
            chain.cells.back().n += static_cast<std::size_t>(seen[g][d]);
        }
        chain.setPoints += any ? 1 : 0;
    }
    chain.contrasts = static_cast<int>(chain.cells.size()) - chain.setPoints;
    if (chain.contrasts == 0 && chain.cells.size() == groups) {
        places.cell = sample.group;
        return;
    }
    places.ownCell.resize(n);
    for (std::size_t i = 0; i < n; ++i)
        places.ownCell[i] = cellOf[static_cast<std::size_t>(sample.group[i])][directionOf(sample, i)];
    places.cell = places.ownCell;
}

} // namespace

ChainPlaces findPlaces(const Sample& sample, NoiseChain& chain) {
    ChainPlaces places;
    findCells(sample, places, chain);
    const std::size_t n = sample.size();
    if (!sample.run.empty()) {
        places.runNumbers = runNumbers(sample.run);
        places.tooManyRuns = places.runNumbers.size() > mostRuns;
        chain.runs = places.runNumbers.size();
        chain.runsKnown = !places.tooManyRuns;
    }
    if (chain.runsKnown) {
        places.run.resize(n);
        for (std::size_t i = 0; i < n; ++i)
            places.run[i] = static_cast<std::int32_t>(
                std::lower_bound(places.runNumbers.begin(), places.runNumbers.end(), sample.run[i]) -
                places.runNumbers.begin());
    }
    return places;
}

} // namespace spanwright
