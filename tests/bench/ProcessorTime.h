// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <ctime>
#include <functional>
#include <vector>

namespace spanwright::test {

/// Median processor time of this process for one run of `work`, in seconds; other programs do not disturb it.
inline double processorSeconds(const std::function<void()>& work, int repeats) {
    std::vector<double> times;
    for (int i = 0; i < repeats; ++i) {
        const std::clock_t start = std::clock();
        work();
        times.push_back(static_cast<double>(std::clock() - start) / CLOCKS_PER_SEC);
    }
    std::sort(times.begin(), times.end());
    return times[times.size() / 2];
}

} // namespace spanwright::test
