// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/split/NoiseChain.h"

#include <span>

namespace spanwright {

/// Which cell and which run a reading belongs to.
struct ChainPlaces {
    std::vector<std::int32_t> ownCell; ///< where cells are not simply set points
    std::span<const std::int32_t> cell;
    std::vector<std::int32_t> run; ///< index into runNumbers; empty when no run is known
    std::vector<int> runNumbers;   ///< rising
    bool tooManyRuns = false;
};

/// Finds cells and runs, and tells the chain which and how many there are: cells in rising order of set point, one for each direction
/// where a set point has both, else one for the set point.
ChainPlaces findPlaces(const Sample& sample, NoiseChain& chain);

} // namespace spanwright
