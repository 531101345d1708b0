// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/split/RunSystem.h"

#include <algorithm>
#include <utility>

namespace spanwright {

namespace {

constexpr double LeastPivot = 1e-11; ///< of what the column had before, or it depends on those taken in

/// The end of the cell that begins at `begin`.
template <class T>
std::size_t cellEnd(const std::vector<RunInCell<T>>& rows, std::size_t begin) {
    std::size_t end = begin;
    while (end < rows.size() && rows[end].cell == rows[begin].cell)
        ++end;
    return end;
}

} // namespace

template <class T>
RunSystem<T>::RunSystem(std::vector<RunInCell<T>> rows, std::size_t runs)
    : rows_(std::move(rows)), runs_(runs), a_(4 * runs * runs, 0.0), scale_(2 * runs, 0.0), b_(2 * runs, T(0.0)), used_(2 * runs, 0), solution_(2 * runs, T(0.0)) {
    for (std::size_t begin = 0; begin < rows_.size();) {
        const std::size_t end = cellEnd(rows_, begin);
        addCell(begin, end);
        begin = end;
    }
    for (std::size_t r = 0; r < runs_; ++r)
        offsetTrace_ += at(r, r);
}

template <class T>
void RunSystem<T>::addCell(std::size_t begin, std::size_t end) {
    const double x = plain(rows_[begin].x);
    double all = 0;
    for (std::size_t k = begin; k < end; ++k)
        all += plain(rows_[k].weight);
    for (std::size_t k = begin; k < end; ++k) {
        const RunInCell<T>& one = rows_[k];
        const std::size_t r = one.run;
        const double weight = plain(one.weight), share = weight / all;
        b_[r] += one.sum;
        b_[runs_ + r] += one.x * one.sum;
        scale_[r] += weight;
        scale_[runs_ + r] += weight * x * x;
        for (std::size_t m = begin; m < end; ++m) {
            const std::size_t s = rows_[m].run;
            const double entry = (r == s ? weight : 0.0) - share * plain(rows_[m].weight), sloped = x * entry;
            at(r, s) += entry;
            at(r, runs_ + s) += sloped;
            at(runs_ + r, s) += sloped;
            at(runs_ + r, runs_ + s) += x * sloped;
        }
    }
}

template <class T>
int RunSystem<T>::add(std::size_t from, std::size_t to) {
    int rank = 0;
    for (;;) {
        std::size_t pivot = to;
        double best = LeastPivot;
        for (std::size_t j = from; j < to; ++j)
            if (!used_[j] && scale_[j] > 0 && at(j, j) / scale_[j] > best) {
                best = at(j, j) / scale_[j];
                pivot = j;
            }
        if (pivot == to)
            break;
        eliminate(pivot);
        ++rank;
    }
    refine();
    return rank;
}

template <class T>
void RunSystem<T>::eliminate(std::size_t pivot) {
    used_[pivot] = 1;
    order_.push_back(pivot);
    std::vector<std::size_t> left;
    for (std::size_t j = 0; j < 2 * runs_; ++j)
        if (!used_[j])
            left.push_back(j);
    for (const std::size_t i : left) {
        const double factor = at(i, pivot) / at(pivot, pivot);
        for (const std::size_t j : left)
            at(i, j) -= factor * at(pivot, j);
    }
}

/// By the pivots so far: their columns and rows in A still hold what the elimination left when their turn came.
template <class T>
std::vector<double> RunSystem<T>::solve(const std::vector<T>& right) const {
    std::vector<double> x(2 * runs_, 0.0);
    for (const std::size_t i : order_)
        x[i] = plain(right[i]);
    for (std::size_t k = 0; k < order_.size(); ++k)
        for (std::size_t m = k + 1; m < order_.size(); ++m)
            x[order_[m]] -= at(order_[m], order_[k]) / at(order_[k], order_[k]) * x[order_[k]];
    for (std::size_t k = order_.size(); k-- > 0;) {
        const std::size_t i = order_[k];
        for (std::size_t m = k + 1; m < order_.size(); ++m)
            x[i] -= at(i, order_[m]) * x[order_[m]];
        x[i] /= at(i, i);
    }
    return x;
}

/// b − A ρ, from the sums of the readings.
template <class T>
std::vector<T> RunSystem<T>::rest() const {
    std::vector<T> rest(2 * runs_, T(0.0));
    std::vector<T> effect;
    for (std::size_t begin = 0; begin < rows_.size();) {
        const std::size_t end = cellEnd(rows_, begin);
        T all(0.0), mean(0.0);
        effect.clear();
        for (std::size_t k = begin; k < end; ++k) {
            const RunInCell<T>& one = rows_[k];
            effect.push_back(solution_[one.run] + one.x * solution_[runs_ + one.run]);
            all += one.weight;
            mean += one.weight * effect.back();
        }
        mean /= all;
        for (std::size_t k = begin; k < end; ++k) {
            const RunInCell<T>& one = rows_[k];
            const T left = one.sum - one.weight * (effect[k - begin] - mean);
            rest[one.run] += left;
            rest[runs_ + one.run] += one.x * left;
        }
        begin = end;
    }
    return rest;
}

template <class T>
void RunSystem<T>::refine() {
    constexpr int rounds = 2; // the first from nought
    std::fill(solution_.begin(), solution_.end(), T(0.0));
    std::vector<T> left = b_;
    for (int round = 0; round < rounds; ++round) {
        const std::vector<double> step = solve(left);
        for (std::size_t i = 0; i < step.size(); ++i)
            solution_[i] += step[i];
        left = rest();
    }
    explained_ = T(0.0);
    for (std::size_t i = 0; i < left.size(); ++i)
        explained_ += solution_[i] * (b_[i] + left[i]);
}

template class RunSystem<double>;
template class RunSystem<DoubleDouble>;

} // namespace spanwright
