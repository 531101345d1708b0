// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <array>
#include <cstddef>

namespace spanwright {

/// Σ terms(i) for first ≤ i < last, K sums at once, where terms(i) gives an array of K numbers. Each sum is gathered in four
/// lanes that do not wait for each other and are added at the end: for very many readings several times faster than one
/// running sum, and more accurate. The order is fixed, so equal readings give equal bits.
template <std::size_t K, class Terms>
std::array<double, K> laneSums(std::size_t first, std::size_t last, Terms&& terms) {
    constexpr std::size_t Lanes = 4;
    std::array<std::array<double, Lanes>, K> lanes{};
    const auto add = [&](std::size_t i, std::size_t lane) {
        const std::array<double, K> at = terms(i);
#pragma GCC unroll 8
        for (std::size_t k = 0; k < K; ++k)
            lanes[k][lane] += at[k];
    };
    std::size_t i = first;
    for (; i + Lanes <= last; i += Lanes) {
#pragma GCC unroll 4
        for (std::size_t lane = 0; lane < Lanes; ++lane)
            add(i + lane, lane);
    }
    for (; i < last; ++i)
        add(i, 0);
    std::array<double, K> sums;
    for (std::size_t k = 0; k < K; ++k)
        sums[k] = (lanes[k][0] + lanes[k][1]) + (lanes[k][2] + lanes[k][3]);
    return sums;
}

} // namespace spanwright
