// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/ModelCurve.h"

namespace spanwright {

namespace {

std::vector<double> rounded(const std::vector<DoubleDouble>& values) {
    std::vector<double> result;
    for (const DoubleDouble& value : values)
        result.push_back(toDouble(value));
    return result;
}

} // namespace

ModelCurve::ModelCurve(std::shared_ptr<const FunctionModel> model, const std::vector<DoubleDouble>& beta,
                       const std::vector<DoubleDouble>& inverseRoot, double scale, VarianceProfile profile)
    : model_(std::move(model)), beta_(rounded(beta)), inverseRoot_(rounded(inverseRoot)), scale_(scale),
      profile_(std::move(profile)) {}

double ModelCurve::value(double x) const {
    return model_->value(x, beta_);
}

double ModelCurve::derivative(double x) const {
    return model_->derivative(x, beta_);
}

double ModelCurve::variance(double x) const {
    const std::vector<double> v = model_->gradient(x, beta_);
    const std::size_t p = v.size();
    double sum = 0;
    for (std::size_t j = 0; j < p; ++j) {
        double z = 0;
        for (std::size_t k = 0; k <= j; ++k)
            z += v[k] * inverseRoot_[k * p + j];
        sum += z * z;
    }
    return scale_ * sum;
}

std::vector<double> ModelCurve::gradient(double x) const {
    return model_->gradient(x, beta_);
}

double ModelCurve::readingVariance(double x) const {
    return scale_ * profile_.at(x);
}

} // namespace spanwright
