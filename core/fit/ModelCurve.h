// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"
#include "core/fit/FunctionModel.h"
#include "core/fit/Weighting.h"

namespace spanwright {

/// A fitted model, evaluated in the basis in which it was fitted: vᵀVv = scale·‖R⁻ᵀv‖², so a variance is never
/// negative.
class ModelCurve final : public FittedFunction {
  public:
    /// `scale`: s², or 1 where the stated uncertainties are taken as they are; it multiplies the covariance and the
    /// profile.
    ModelCurve(std::shared_ptr<const FunctionModel> model, const std::vector<DoubleDouble>& beta,
               const std::vector<DoubleDouble>& inverseRoot, double scale, VarianceProfile profile);

    [[nodiscard]] double value(double x) const override;
    [[nodiscard]] double derivative(double x) const override;
    [[nodiscard]] double variance(double x) const override;
    [[nodiscard]] std::vector<double> gradient(double x) const override;
    [[nodiscard]] double readingVariance(double x) const override;
    [[nodiscard]] std::vector<double> knots() const override { return model_->knots(); }

  private:
    std::shared_ptr<const FunctionModel> model_;
    std::vector<double> beta_, inverseRoot_;
    double scale_;
    VarianceProfile profile_;
};

} // namespace spanwright
