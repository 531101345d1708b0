// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/ModelOf.h"

namespace spanwright {

/// Linear between knots at the set points: least squares in hat functions, which gives the mean of each set point where
/// its abscissae are equal. Beyond the ends the outer segments go on.
class TableModel final : public ModelOf<TableModel> {
  public:
    /// `knots` in rising order, at least two.
    explicit TableModel(std::vector<double> knots) : knots_(std::move(knots)) {}

    [[nodiscard]] std::size_t terms() const override { return knots_.size(); }
    [[nodiscard]] std::vector<double> knots() const override { return knots_; }

    template <class T>
    [[nodiscard]] std::vector<T> gradientOf(const T& x, const std::vector<T>&) const {
        std::vector<T> row(knots_.size(), T(0.0));
        const std::size_t i = segment(x);
        const T share = (x - knots_[i]) / (T(knots_[i + 1]) - knots_[i]);
        row[i] = 1.0 - share;
        row[i + 1] = share;
        return row;
    }
    template <class T>
    [[nodiscard]] T valueOf(const T& x, const std::vector<T>& beta) const {
        const std::size_t i = segment(x);
        const T share = (x - knots_[i]) / (T(knots_[i + 1]) - knots_[i]);
        return beta[i] + share * (beta[i + 1] - beta[i]);
    }
    [[nodiscard]] double derivativeOf(double x, const std::vector<double>& beta) const {
        const std::size_t i = segment(x);
        return (beta[i + 1] - beta[i]) / (knots_[i + 1] - knots_[i]);
    }

  private:
    template <class T>
    [[nodiscard]] std::size_t segment(const T& x) const {
        std::size_t i = 0;
        while (i + 2 < knots_.size() && x >= knots_[i + 1])
            ++i;
        return i;
    }

    std::vector<double> knots_;
};

} // namespace spanwright
