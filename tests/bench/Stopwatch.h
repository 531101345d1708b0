// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <chrono>
#include <ctime>
#include <functional>
#include <vector>

namespace spanwright::test {

/// Median of `repeats` times that `once` gives, in seconds.
inline double medianSeconds(int repeats, const std::function<double()>& once) {
    std::vector<double> times;
    for (int i = 0; i < repeats; ++i)
        times.push_back(once());
    std::sort(times.begin(), times.end());
    return times[times.size() / 2];
}

/// Processor time of this process for one run of `work`, all threads together; other programs do not disturb it.
inline double processorSeconds(const std::function<void()>& work, int repeats) {
    return medianSeconds(repeats, [&] {
        const std::clock_t start = std::clock();
        work();
        return static_cast<double>(std::clock() - start) / CLOCKS_PER_SEC;
    });
}

/// Time until `work` is done, as somebody waits for it.
inline double wallSeconds(const std::function<void()>& work, int repeats) {
    return medianSeconds(repeats, [&] {
        const auto start = std::chrono::steady_clock::now();
        work();
        return std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
    });
}

} // namespace spanwright::test
