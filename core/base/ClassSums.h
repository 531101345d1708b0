// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/LaneSums.h"
#include "core/base/Parallel.h"

#include <vector>

namespace spanwright {

/// What `classes` classes gather from n readings: fill(sums, first, last) adds those readings to its vector of Sum, one a class.
/// Of very many readings in few classes both halves are gathered at the same time and added by Sum::operator+=, so that equal
/// readings give equal bits on any number of processors.
template <class Sum, class Fill>
std::vector<Sum> classSums(std::size_t n, std::size_t classes, Fill&& fill) {
    constexpr std::size_t Few = 200'000; // classes whose sums are quickly added
    if (n < FewerThanThreads || classes > Few) {
        std::vector<Sum> sums(classes);
        fill(sums, std::size_t{0}, n);
        return sums;
    }
    auto second = beside(n, [&] {
        std::vector<Sum> sums(classes);
        fill(sums, n / 2, n);
        return sums;
    });
    std::vector<Sum> sums(classes);
    fill(sums, std::size_t{0}, n / 2);
    const std::vector<Sum> others = second.get();
    for (std::size_t c = 0; c < classes; ++c)
        sums[c] += others[c];
    return sums;
}

/// laneSums() over 0 … n, of very many readings in halves at the same time.
template <std::size_t K, class Terms>
std::array<double, K> sumInHalves(std::size_t n, Terms&& terms) {
    if (n < FewerThanThreads)
        return laneSums<K>(0, n, terms);
    auto second = beside(n, [&] { return laneSums<K>(n / 2, n, terms); });
    std::array<double, K> sums = laneSums<K>(0, n / 2, terms);
    const std::array<double, K> others = second.get();
    for (std::size_t k = 0; k < K; ++k)
        sums[k] += others[k];
    return sums;
}

/// laneBounds() over 0 … n, of very many readings in halves at the same time.
template <class Value>
auto boundsInHalves(std::size_t n, Value&& value) {
    if (n < FewerThanThreads)
        return laneBounds(0, n, value);
    auto second = beside(n, [&] { return laneBounds(n / 2, n, value); });
    auto bounds = laneBounds(0, n / 2, value);
    const auto others = second.get();
    bounds.low = std::min(bounds.low, others.low);
    bounds.high = std::max(bounds.high, others.high);
    return bounds;
}

} // namespace spanwright
