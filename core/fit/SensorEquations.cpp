// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/SensorEquations.h"

#include "core/fit/LeastSquares.h"

#include <functional>

namespace spanwright {

namespace {

using Function = std::function<DoubleDouble(const DoubleDouble&)>;

/// Least-squares line of g(y) on φ(x), each weighted by w(y): the transform on which a non-linear fit starts.
std::vector<DoubleDouble> lineOfTransform(const PairColumn& x, const PairColumn& y, const Function& phi,
                                          const Function& g, const Function& rootWeight) {
    const std::size_t n = x.size();
    LinearProblem problem{2, std::vector<DoubleDouble>(2 * n, 1.0), {}, {}};
    for (std::size_t i = 0; i < n; ++i) {
        problem.design[n + i] = phi(x[i]);
        problem.ordinate.push_back(g(y[i]));
        problem.rootWeight.push_back(rootWeight(y[i]));
    }
    return solveLeastSquares(problem).beta;
}

DoubleDouble logOf(const DoubleDouble& value) {
    return log(value);
}
DoubleDouble itself(const DoubleDouble& value) {
    return value;
}

} // namespace

TransformedLine::TransformedLine(Transform transform, double theoreticalSlope)
    : transform_(transform), theoreticalSlope_(theoreticalSlope) {}

bool TransformedLine::defined(double x) const {
    return transform_ == Transform::SquareRoot ? x >= 0 : transform_ == Transform::Logarithm ? x > 0 : x == x;
}

double TransformedLine::derivativeOf(double x, const std::vector<double>& beta) const {
    switch (transform_) {
    case Transform::SquareRoot:
        return beta[1] / (2.0 * std::sqrt(x));
    case Transform::Logarithm:
        return beta[1] / (std::numbers::ln10 * x);
    case Transform::Nernst:
        break;
    }
    return -beta[1];
}

ReportedCoefficients TransformedLine::reported(const std::vector<DoubleDouble>& beta) const {
    ReportedCoefficients same = FunctionModel::reported(beta);
    if (transform_ == Transform::Nernst) {
        const DoubleDouble percent = DoubleDouble(100.0) / theoreticalSlope_;
        same.value[1] *= percent;
        same.jacobian[3] = percent;
    }
    return same;
}

bool CallendarVanDusen::defined(double x) const {
    const double t = x - zeroCelsius_;
    constexpr double Rounding = 0.02; // what half a digit of a resistance in 0.01 Ω makes at either end
    return t >= -200 - Rounding && t <= 850 + Rounding;
}

double CallendarVanDusen::derivativeOf(double x, const std::vector<double>& beta) const {
    const double t = x - zeroCelsius_;
    const double upper = beta[1] + 2 * beta[2] * t;
    return ranges_ == Ranges::Both && t < 0 ? upper + beta[3] * t * t * (4 * t - 300) : upper;
}

ReportedCoefficients CallendarVanDusen::reported(const std::vector<DoubleDouble>& beta) const {
    ReportedCoefficients same = FunctionModel::reported(beta);
    for (std::size_t k = 1; k < terms(); ++k) {
        same.value[k] = beta[k] / beta[0];
        same.jacobian[k * terms() + k] = 1.0 / beta[0];
        same.jacobian[k * terms()] = -beta[k] / sqr(beta[0]);
    }
    return same;
}

Result<std::vector<DoubleDouble>> PowerLaw::start(const PairColumn& x, const PairColumn& y) const {
    auto line = lineOfTransform(
        x, y, [this](const DoubleDouble& at) { return log(at / middle_); }, logOf, itself);
    if (line.empty())
        return Error(ErrorCode::RankLost, {{"terms", "b"}});
    line[0] = exp(line[0]);
    return line;
}

double PowerLaw::derivativeOf(double x, const std::vector<double>& beta) const {
    return beta[1] * valueOf(x, beta) / x;
}

ReportedCoefficients PowerLaw::reported(const std::vector<DoubleDouble>& beta) const {
    const DoubleDouble l = log(DoubleDouble(middle_)), factor = exp(-beta[1] * l);
    return {{beta[0] * factor, beta[1]}, {factor, -beta[0] * factor * l, 0.0, 1.0}};
}

Result<std::vector<DoubleDouble>> ExponentialApproach::start(const PairColumn& x, const PairColumn& y) const {
    // For a given 1/L the function is linear: the best of a ladder of rates, growth as well as approach.
    const std::size_t n = x.size();
    std::vector<DoubleDouble> best;
    DoubleDouble least = 0.0;
    for (double rate = 0.02; rate < 60; rate *= 1.5)
        for (const double sign : {1.0, -1.0}) {
            const double kappa = sign * rate / span_;
            LinearProblem problem{2, std::vector<DoubleDouble>(2 * n, 1.0), {}, {}};
            for (std::size_t i = 0; i < n; ++i) {
                problem.design[n + i] = -std::exp(-kappa * (x.high[i] - low_));
                problem.ordinate.push_back(y[i]);
            }
            const LinearSolution solution = solveLeastSquares(problem);
            if (solution.lostTerms.empty() && (best.empty() || solution.residualSs < least)) {
                best = {solution.beta[0], solution.beta[1], kappa};
                least = solution.residualSs;
            }
        }
    if (best.empty())
        return Error(ErrorCode::RankLost, {{"terms", "L"}});
    return best;
}

double ExponentialApproach::derivativeOf(double x, const std::vector<double>& beta) const {
    return beta[1] * beta[2] * std::exp(-beta[2] * (x - low_));
}

ReportedCoefficients ExponentialApproach::reported(const std::vector<DoubleDouble>& beta) const {
    const DoubleDouble factor = exp(beta[2] * low_), length = 1.0 / beta[2];
    return {{beta[0], beta[1] * factor, length},
            {1.0, 0.0, 0.0,                        //
             0.0, factor, beta[1] * factor * low_, //
             0.0, 0.0, -sqr(length)}};
}

Result<std::vector<DoubleDouble>> ThermistorB::start(const PairColumn& x, const PairColumn& y) const {
    auto line = lineOfTransform(
        x, y, [this](const DoubleDouble& at) { return reciprocal(at); }, logOf, itself);
    if (line.empty())
        return Error(ErrorCode::RankLost, {{"terms", "B"}});
    line[0] = exp(line[0]);
    return line;
}

double ThermistorB::derivativeOf(double x, const std::vector<double>& beta) const {
    const double t = x + toKelvin_;
    return -beta[1] * valueOf(x, beta) / (t * t);
}

} // namespace spanwright
