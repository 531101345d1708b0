// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/NoiseChain.h"

#include "core/base/ClassSums.h"
#include "core/split/ChainPlaces.h"
#include "core/split/RunSystem.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <span>

namespace spanwright {
namespace {

/// Weight of a class of readings and their weighted mean.
template <class T>
struct ClassMean {
    T weight = T(0.0), mean = T(0.0);
    void operator+=(const ClassMean& other) {
        weight += other.weight;
        mean += other.mean;
    }
};

/// Weighted means of e in the classes named by `of`.
template <class T>
std::vector<ClassMean<T>> meansOf(std::span<const std::int32_t> of, std::size_t classes, std::span<const T> e, std::span<const T> w) {
    auto means = classSums<ClassMean<T>>(e.size(), classes, [&](std::vector<ClassMean<T>>& sums, std::size_t first, std::size_t last) {
        for (std::size_t i = first; i < last; ++i)
            sums[static_cast<std::size_t>(of[i])] += w.empty() ? ClassMean<T>{T(1.0), e[i]} : ClassMean<T>{w[i], w[i] * e[i]};
    });
    for (ClassMean<T>& one : means)
        if (plain(one.weight) > 0)
            one.mean /= one.weight;
    return means;
}

/// Σ w d(i)² over all readings.
template <class T, class Distance>
T squaresOf(std::span<const T> w, std::size_t n, Distance&& d) {
    const auto square = [&](std::size_t i) {
        const T distance = d(i);
        return w.empty() ? distance * distance : w[i] * distance * distance;
    };
    if constexpr (std::is_same_v<T, double>) {
        return sumInHalves<1>(n, [&](std::size_t i) -> std::array<double, 1> { return {square(i)}; })[0];
    } else {
        T sum(0.0);
        for (std::size_t i = 0; i < n; ++i)
            sum += square(i);
        return sum;
    }
}

template <class T>
T squaresAbout(std::span<const std::int32_t> of, const std::vector<ClassMean<T>>& means, std::span<const T> e, std::span<const T> w) {
    return squaresOf(w, e.size(), [&](std::size_t i) { return e[i] - means[static_cast<std::size_t>(of[i])].mean; });
}

/// Σ w (e − mean)² with all = Σ w e². Of very many set points of a few readings each the sums tell it, where that costs six bits at
/// most, without looking up every mean again.
template <class T>
DoubleDouble squaresWithin(std::span<const std::int32_t> of, const std::vector<ClassMean<T>>& means, const DoubleDouble& all,
                           std::span<const T> e, std::span<const T> w) {
    if constexpr (std::is_same_v<T, double>) {
        if (means.size() > mostListedCells) {
            const auto between = sumInHalves<1>(means.size(), [&](std::size_t c) -> std::array<double, 1> {
                return {means[c].weight * means[c].mean * means[c].mean};
            });
            if (const DoubleDouble within = all - between[0]; within > all / 64)
                return within;
        }
    }
    return squaresAbout<T>(of, means, e, w);
}

template <class T>
struct CellRunSums {
    std::int32_t run = 0;
    std::size_t n = 0;
    T weight = T(0.0), sum = T(0.0); ///< Σ w, Σ w (e − cell mean)
};

/// Readings in order of cell (counting sort), then the sums for each run inside each cell.
template <class T, class Use>
void eachCell(const NoiseChain& chain, const ChainPlaces& places, std::span<const T> e, std::span<const T> w,
              const std::vector<ClassMean<T>>& means, Use&& use) {
    const std::size_t cells = chain.cells.size();
    std::vector<std::size_t> begin(cells + 1, 0);
    for (const std::int32_t c : places.cell)
        ++begin[static_cast<std::size_t>(c) + 1];
    for (std::size_t c = 0; c < cells; ++c)
        begin[c + 1] += begin[c];
    std::vector<std::uint32_t> order(places.cell.size());
    std::vector<std::size_t> next(begin.begin(), begin.end() - 1);
    for (std::size_t i = 0; i < order.size(); ++i)
        order[next[static_cast<std::size_t>(places.cell[i])]++] = static_cast<std::uint32_t>(i);

    std::vector<std::int32_t> slot(chain.runs, -1);
    std::vector<CellRunSums<T>> runs;
    for (std::size_t c = 0; c < cells; ++c) {
        runs.clear();
        for (std::size_t k = begin[c]; k < begin[c + 1]; ++k) {
            const std::size_t i = order[k];
            const auto r = static_cast<std::size_t>(places.run[i]);
            if (slot[r] < 0) {
                slot[r] = static_cast<std::int32_t>(runs.size());
                runs.emplace_back().run = places.run[i];
            }
            CellRunSums<T>& at = runs[static_cast<std::size_t>(slot[r])];
            const T weight = w.empty() ? T(1.0) : w[i];
            ++at.n;
            at.weight += weight;
            at.sum += weight * (e[i] - means[c].mean);
        }
        for (const auto& run : runs)
            slot[static_cast<std::size_t>(run.run)] = -1;
        use(c, runs);
    }
}

/// Mid-range and half-range of the set points, to hold the slope columns near 1.
struct Range {
    double middle = 0, half = 1;
};

Range rangeOf(const Sample& sample) {
    const double low = sample.groupValue.front(), high = sample.groupValue.back();
    return {(low + high) / 2, high > low ? (high - low) / 2 : 1};
}

template <class T>
void addRuns(const Sample& sample, const ChainPlaces& places, std::span<const T> e, std::span<const T> w,
             const std::vector<ClassMean<T>>& means, NoiseChain& chain) {
    const std::size_t runs = chain.runs;
    const Range range = rangeOf(sample);
    std::vector<RunInCell<T>> rows;
    std::vector<std::size_t> count(runs, 0);
    chain.cellRuns.reserve(std::min(chain.readings, chain.cells.size() * runs));
    std::size_t first = 0;
    eachCell<T>(chain, places, e, w, means, [&](std::size_t c, const std::vector<CellRunSums<T>>& inside) {
        const T x = (T(sample.groupValue[static_cast<std::size_t>(chain.cells[c].group)]) - range.middle) / range.half;
        for (const auto& one : inside) {
            const auto r = static_cast<std::size_t>(one.run);
            count[r] += one.n;
            rows.push_back({c, r, x, one.weight, one.sum});
            chain.cellRuns.push_back({static_cast<std::int32_t>(c), one.run, one.n, plain(one.weight),
                                      plain(means[c].mean + one.sum / one.weight)});
        }
        const std::size_t expected = chain.cellRuns.front().n;
        if (first == 0)
            first = inside.size();
        for (const auto& one : inside)
            chain.balanced = chain.balanced && one.n == expected;
        chain.balanced = chain.balanced && inside.size() == first && first == runs;
    });
    RunSystem<T> system(std::move(rows), runs);
    chain.runOffsetWeight = system.offsetTrace();
    chain.runOffsets = system.addOffsets();
    chain.s4 = chain.s3 - DoubleDouble(system.explained());
    chain.runSlopes = system.addSlopes();
    chain.s5 = chain.s3 - DoubleDouble(system.explained());

    double offsetMean = 0, slopeMean = 0;
    for (std::size_t r = 0; r < runs; ++r) {
        const double share = static_cast<double>(count[r]) / static_cast<double>(chain.readings);
        offsetMean += system.offset(r) * share;
        slopeMean += system.slope(r) * share;
    }
    for (std::size_t r = 0; r < runs; ++r)
        chain.effects.push_back({places.runNumbers[r], count[r], system.offset(r) - offsetMean, (system.slope(r) - slopeMean) / range.half});
}

/// tr Zᵀ(P₃ − P₂)Z for the run columns Z: how much of a run effect leaks into the contrast of rising and falling.
double runInContrast(const NoiseChain& chain) {
    double trace = 0;
    std::vector<double> inGroup(chain.runs, 0.0);
    std::size_t k = 0;
    for (std::size_t c = 0; c < chain.cells.size();) {
        const std::int32_t group = chain.cells[c].group;
        double weight = 0;
        std::fill(inGroup.begin(), inGroup.end(), 0.0);
        for (; c < chain.cells.size() && chain.cells[c].group == group; ++c) {
            weight += chain.cells[c].weight;
            for (; k < chain.cellRuns.size() && chain.cellRuns[k].cell == static_cast<std::int32_t>(c); ++k) {
                trace += chain.cellRuns[k].weight * chain.cellRuns[k].weight / chain.cells[c].weight;
                inGroup[static_cast<std::size_t>(chain.cellRuns[k].run)] += chain.cellRuns[k].weight;
            }
        }
        for (const double sum : inGroup)
            trace -= sum * sum / weight;
    }
    return std::max(0.0, trace);
}

template <class T>
void build(const Sample& sample, std::span<const T> e, std::span<const T> w, NoiseChain& chain) {
    const ChainPlaces places = findPlaces(sample, chain);
    if constexpr (std::is_same_v<T, double>)
        chain.s1 = sumInHalves<1>(e.size(), [&](auto i) {
            const auto square = at(e.data(), i) * at(e.data(), i);
            return std::array{w.empty() ? square : at(w.data(), i) * square};
        })[0];
    else
        chain.s1 = squaresOf(w, e.size(), [&](std::size_t i) { return e[i]; });
    const std::vector<ClassMean<T>> groups = meansOf<T>(sample.group, sample.groupValue.size(), e, w);
    chain.s2 = squaresWithin<T>(sample.group, groups, chain.s1, e, w);
    const bool divided = !places.ownCell.empty();
    const std::vector<ClassMean<T>> own = divided ? meansOf<T>(places.cell, chain.cells.size(), e, w) : std::vector<ClassMean<T>>{};
    const std::vector<ClassMean<T>>& cells = divided ? own : groups;
    chain.s3 = divided ? DoubleDouble(squaresAbout<T>(places.cell, cells, e, w)) : chain.s2;
    chain.s4 = chain.s5 = chain.s3;

    for (std::size_t c = 0; c < chain.cells.size(); ++c) {
        NoiseChain::Cell& cell = chain.cells[c];
        cell.weight = plain(cells[c].weight);
        cell.mean = plain(cells[c].mean);
        chain.balanced = chain.balanced && cell.n == chain.cells.front().n;
        const double whole = plain(groups[static_cast<std::size_t>(cell.group)].weight);
        chain.contrastWeight += cell.weight - cell.weight * cell.weight / whole;
    }
    chain.balanced = chain.balanced && (chain.contrasts == 0 || chain.contrasts == chain.setPoints);
    if (chain.runsKnown && chain.runs > 1 && chain.cells.size() < chain.readings) {
        addRuns<T>(sample, places, e, w, cells, chain);
        chain.runInContrastWeight = runInContrast(chain);
    }
}

} // namespace

NoiseChain noiseChain(const Sample& sample, const Residuals& residuals) {
    NoiseChain chain;
    chain.readings = sample.size();
    if (chain.readings == 0 || sample.groupValue.empty())
        return chain;
    if (residuals.e.low.empty()) {
        build<double>(sample, residuals.e.high, residuals.weight.high, chain);
        return chain;
    }
    const auto exact = [](const PairColumn& column) {
        std::vector<DoubleDouble> values(column.size());
        for (std::size_t i = 0; i < values.size(); ++i)
            values[i] = column[i];
        return values;
    };
    build<DoubleDouble>(sample, exact(residuals.e), exact(residuals.weight), chain);
    return chain;
}

} // namespace spanwright
