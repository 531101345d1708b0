// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/FunctionModel.h"
#include "core/fit/Polynomial.h"
#include "core/fit/SensorEquations.h"
#include "core/fit/SteinhartHart.h"
#include "core/fit/TableModel.h"

#include <algorithm>

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

using Made = std::unique_ptr<FunctionModel>;

constexpr std::size_t MostKnots = 400;

Made polynomial(int degree, PolynomialConstant constant, const ModelContext& context) {
    return std::make_unique<PolynomialModel>(static_cast<std::size_t>(degree), constant, context.low, context.high);
}

/// 0 °C in the unit in which temperatures are typed: kelvin when it says so, else degrees Celsius.
double zeroCelsius(const ModelContext& context) {
    return context.sample->referenceUnit == "K" ? 273.15 : 0.0;
}

/// ln(10)·R·T/F at 298.15 K, 59.159 mV, with R and F as fixed by the SI (CODATA 2018), in the unit of the indication.
double nernstSlope(const ModelContext& context) {
    const double volts = std::numbers::ln10 * 8.31446261815324 * 298.15 / 96485.33212331;
    return context.sample->indicationUnit == "V" ? volts : volts * 1000;
}

/// Knots at the mean abscissa of each set point.
Result<Made> table(const ModelContext& context) {
    const Sample& sample = *context.sample;
    const std::size_t m = sample.groupValue.size();
    if (m < 2)
        return Error(ErrorCode::TooFewSetPoints, {{"needed", "2"}, {"got", std::to_string(m)}});
    if (m > MostKnots)
        return Error(ErrorCode::MethodUnfit, {{"reason", "knots"}, {"got", std::to_string(m)}, {"most", std::to_string(MostKnots)}});
    const PairColumn& x = context.direction == FitDirection::Indication ? sample.reference : sample.indication;
    std::vector<DoubleDouble> sum(m, 0.0);
    std::vector<double> n(m, 0.0);
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const auto g = static_cast<std::size_t>(sample.group[i]);
        sum[g] += x[i];
        n[g] += 1;
    }
    std::vector<double> knots;
    for (std::size_t g = 0; g < m; ++g)
        knots.push_back(toDouble(sum[g] / n[g]));
    std::sort(knots.begin(), knots.end());
    knots.erase(std::unique(knots.begin(), knots.end()), knots.end());
    if (knots.size() < 2)
        return Error(ErrorCode::ReferencesAllEqual);
    return Made(std::make_unique<TableModel>(std::move(knots)));
}

} // namespace

Result<Made> makeModel(const FunctionChoice& choice, const ModelContext& context) {
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
    case FunctionFamily::SquareRoot:
        return Made(std::make_unique<TransformedLine>(Transform::SquareRoot));
    case FunctionFamily::Logarithmic:
        return Made(std::make_unique<TransformedLine>(Transform::Logarithm));
    case FunctionFamily::Nernst:
        return Made(std::make_unique<TransformedLine>(Transform::Nernst, nernstSlope(context)));
    case FunctionFamily::Power:
        return Made(std::make_unique<PowerLaw>(context.low, context.high));
    case FunctionFamily::ExponentialApproach:
        return Made(std::make_unique<ExponentialApproach>(context.low, context.high));
    case FunctionFamily::CallendarVanDusen: {
        const bool below = context.low < zeroCelsius(context);
        return Made(std::make_unique<CallendarVanDusen>(
            below ? CallendarVanDusen::Ranges::Both : CallendarVanDusen::Ranges::FromZeroUp, zeroCelsius(context)));
    }
    case FunctionFamily::ThermistorB:
        return Made(std::make_unique<ThermistorB>(zeroCelsius(context)));
    case FunctionFamily::SteinhartHart:
        return Made(std::make_unique<SteinhartHart>(choice.order, context.low, context.high, zeroCelsius(context)));
    case FunctionFamily::Table:
        return table(context);
    }
    return Error(ErrorCode::FunctionUnknown, {{"text", functionName(choice)}});
}

} // namespace spanwright
