// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/FunctionModel.h"
#include "core/fit/Polynomial.h"

namespace spanwright {

Result<std::vector<DoubleDouble>> FunctionModel::start(const PairColumn&, const PairColumn&) const {
    return std::vector<DoubleDouble>(terms(), 0.0);
}

ReportedCoefficients FunctionModel::reported(const std::vector<DoubleDouble>& beta) const {
    ReportedCoefficients same{beta, std::vector<DoubleDouble>(terms() * terms(), 0.0)};
    for (std::size_t k = 0; k < terms(); ++k)
        same.jacobian[k * terms() + k] = 1.0;
    return same;
}

namespace {

Result<std::unique_ptr<FunctionModel>> polynomial(int degree, PolynomialConstant constant, const ModelContext& context) {
    return std::unique_ptr<FunctionModel>(
        std::make_unique<PolynomialModel>(static_cast<std::size_t>(degree), constant, context.low, context.high));
}

} // namespace

Result<std::unique_ptr<FunctionModel>> makeModel(const FunctionChoice& choice, const ModelContext& context) {
    switch (choice.family) {
    case FunctionFamily::Constant:
        return polynomial(0, PolynomialConstant::With, context);
    case FunctionFamily::Line:
        return polynomial(1, PolynomialConstant::With, context);
    case FunctionFamily::Proportional:
        return polynomial(1, PolynomialConstant::Without, context);
    case FunctionFamily::Polynomial:
        return polynomial(choice.order, PolynomialConstant::With, context);
    case FunctionFamily::PolynomialNoConstant:
        return polynomial(choice.order, PolynomialConstant::Without, context);
    default:
        return Error(ErrorCode::FunctionUnknown, {{"text", functionName(choice)}});
    }
}

} // namespace spanwright
