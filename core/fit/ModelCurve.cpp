// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/ModelCurve.h"

#include <limits>

namespace spanwright {

namespace {

constexpr double Nowhere = std::numeric_limits<double>::quiet_NaN();

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

// Formulas go on where their functions do not: a thermometer below absolute zero, a resistance below none.
double ModelCurve::value(double x) const {
    const double value = model_->defined(x) ? model_->value(x, beta_) : Nowhere;
    return model_->ordinateDefined(value) ? value : Nowhere;
}

double ModelCurve::derivative(double x) const {
    return model_->defined(x) ? model_->derivative(x, beta_) : Nowhere;
}

double ModelCurve::variance(double x) const {
    if (!model_->defined(x))
        return Nowhere;
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
