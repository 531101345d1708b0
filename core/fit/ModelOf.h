// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/FunctionModel.h"

namespace spanwright {

/// Writes both precisions of a model from one source: `Family` has templates gradientOf(x, β), valueOf(x, β) and
/// derivativeOf(x, β).
template <class Family>
class ModelOf : public FunctionModel {
  public:
    [[nodiscard]] std::vector<DoubleDouble> gradient(const DoubleDouble& x,
                                                     const std::vector<DoubleDouble>& beta) const override {
        return self().template gradientOf<DoubleDouble>(x, beta);
    }
    [[nodiscard]] std::vector<double> gradient(double x, const std::vector<double>& beta) const override {
        return self().template gradientOf<double>(x, beta);
    }
    [[nodiscard]] DoubleDouble value(const DoubleDouble& x, const std::vector<DoubleDouble>& beta) const override {
        return self().template valueOf<DoubleDouble>(x, beta);
    }
    [[nodiscard]] double value(double x, const std::vector<double>& beta) const override {
        return self().template valueOf<double>(x, beta);
    }
    [[nodiscard]] double derivative(double x, const std::vector<double>& beta) const override {
        return self().derivativeOf(x, beta);
    }

  private:
    [[nodiscard]] const Family& self() const { return static_cast<const Family&>(*this); }
};

} // namespace spanwright
