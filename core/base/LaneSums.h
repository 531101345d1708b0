// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <algorithm>
#include <array>
#include <cstddef>
#include <cstring>
#include <type_traits>

namespace spanwright {

/// Two neighbouring numbers of a column, which every 64-bit processor handles at once, and the place of the first.
using Pair = double __attribute__((vector_size(16)));
struct PairPlace {
    std::size_t first = 0;
    friend PairPlace operator+(PairPlace place, std::size_t by) { return {place.first + by}; }
};

/// column[i], of one place or of a pair. Written with these, a term serves both.
inline double at(const double* column, std::size_t i) {
    return column[i];
}
inline Pair at(const double* column, PairPlace i) {
    Pair pair;
    std::memcpy(&pair, column + i.first, sizeof pair);
    return pair;
}
template <class T>
T lesser(const T& a, const T& b) {
    return b < a ? b : a;
}
template <class T>
T greater(const T& a, const T& b) {
    return a < b ? b : a;
}
/// 1 where a > b, else 0.
inline double exceeds(double a, double b) {
    return a > b ? 1 : 0;
}
inline Pair exceeds(const Pair& a, const Pair& b) {
    return a > b ? Pair{1, 1} : Pair{0, 0};
}

/// Σ terms(i) for first ≤ i < last, K sums at once, where terms(i) gives an array of K numbers. Each sum is gathered in four
/// lanes that do not wait for each other and are added at the end: for very many readings several times faster than one
/// running sum, and more accurate. Terms that take a pair too are worked out two at a time. The order is fixed, so equal readings
/// give equal bits.
template <std::size_t K, class Terms>
std::array<double, K> laneSums(std::size_t first, std::size_t last, Terms&& terms) {
    constexpr bool Pairs = std::is_invocable_v<Terms, PairPlace>;
    constexpr std::size_t Lanes = 4, Width = Pairs ? 2 : 1;
    using Number = std::conditional_t<Pairs, Pair, double>;
    std::array<std::array<Number, Lanes / Width>, K> lanes{};
    std::size_t i = first;
    for (; i + Lanes <= last; i += Lanes) {
#pragma GCC unroll 4
        for (std::size_t lane = 0; lane < Lanes / Width; ++lane) {
            std::array<Number, K> here;
            if constexpr (Pairs)
                here = terms(PairPlace{i + Width * lane});
            else
                here = terms(i + lane);
#pragma GCC unroll 8
            for (std::size_t k = 0; k < K; ++k)
                lanes[k][lane] += here[k];
        }
    }
    std::array<double, K> rest{};
    for (; i < last; ++i) {
        const std::array<double, K> here = terms(i);
        for (std::size_t k = 0; k < K; ++k)
            rest[k] += here[k];
    }
    std::array<double, K> sums;
    for (std::size_t k = 0; k < K; ++k) {
        std::array<double, Lanes> of;
        std::memcpy(&of, &lanes[k], sizeof of);
        sums[k] = (of[0] + of[1]) + (of[2] + of[3]) + rest[k];
    }
    return sums;
}

template <class T>
struct Bounds {
    T low{}, high{};
};

/// Smallest and largest value(i) for first ≤ i < last, of which there is one at least; in four lanes too.
template <class Value>
auto laneBounds(std::size_t first, std::size_t last, Value&& value) {
    using T = std::decay_t<decltype(value(first))>;
    constexpr bool Pairs = std::is_invocable_v<Value, PairPlace>;
    constexpr std::size_t Lanes = 4, Width = Pairs ? 2 : 1;
    using Number = std::conditional_t<Pairs, Pair, T>;
    const T start = value(first);
    Bounds<T> bounds{start, start};
    std::array<Number, Lanes / Width> low, high;
    for (std::size_t lane = 0; lane < Lanes / Width; ++lane) {
        if constexpr (Pairs)
            low[lane] = high[lane] = Pair{start, start};
        else
            low[lane] = high[lane] = start;
    }
    std::size_t i = first;
    for (; i + Lanes <= last; i += Lanes) {
#pragma GCC unroll 4
        for (std::size_t lane = 0; lane < Lanes / Width; ++lane) {
            Number here;
            if constexpr (Pairs)
                here = value(PairPlace{i + Width * lane});
            else
                here = value(i + lane);
            low[lane] = lesser(low[lane], here);
            high[lane] = greater(high[lane], here);
        }
    }
    std::array<T, Lanes> lows, highs;
    static_assert(sizeof lows == sizeof low);
    std::memcpy(&lows, &low, sizeof low);
    std::memcpy(&highs, &high, sizeof high);
    for (std::size_t lane = 0; lane < Lanes; ++lane)
        bounds = {lesser(bounds.low, lows[lane]), greater(bounds.high, highs[lane])};
    for (; i < last; ++i)
        bounds = {lesser(bounds.low, value(i)), greater(bounds.high, value(i))};
    return bounds;
}

} // namespace spanwright
