// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/assembleFit.h"

#include "core/fit/CalibrationFunction.h"
#include "core/fit/ModelCurve.h"
#include "core/fit/Quantiles.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <optional>

namespace spanwright {

namespace {

/// Total about the weighted mean (or zero), regression as Σ w (ŷ − centre)², both free of cancellation. Where residuals
/// and fitted values are not orthogonal (iterated fits), regression is what the residual leaves of the total.
SumsOfSquares sumsOf(const FitTask& task, const SolvedModel& solved) {
    const LinearSolution& solution = solved.linear;
    if (solved.totalSs)
        return {*solved.totalSs, *solved.totalSs - solution.residualSs};
    const bool orthogonal = task.model->linear() && task.choices.method == Method::LeastSquares;
    const std::size_t n = task.sample.size();
    const auto weight = [&](std::size_t i) {
        return task.weighting.rootWeight.empty() ? DoubleDouble(1.0) : sqr(task.weighting.rootWeight[i]);
    };
    DoubleDouble centre = 0.0;
    if (task.model->hasConstant()) {
        DoubleDouble sum = 0.0, weights = 0.0;
        for (std::size_t i = 0; i < n; ++i) {
            sum += weight(i) * task.y[i];
            weights += weight(i);
        }
        centre = sum / weights;
    }
    DoubleDouble total = 0.0, regression = 0.0;
    for (std::size_t i = 0; i < n; ++i) {
        total += weight(i) * sqr(task.y[i] - centre);
        regression += weight(i) * sqr(task.y[i] - solution.residual[i] - centre);
    }
    if (!orthogonal)
        regression = total - solution.residualSs;
    if (regression <= total * 1e-26)
        regression = 0.0;
    return {total, regression};
}

void fillSums(Fit& fit, const FitTask& task, const LinearSolution& solution, const SumsOfSquares& sums) {
    fit.totalSs = toDouble(sums.total);
    fit.regressionSs = toDouble(sums.regression);
    fit.residualSs = toDouble(solution.residualSs);
    fit.totalDf = static_cast<int>(fit.used) - (task.model->hasConstant() ? 1 : 0);
    fit.regressionDf = static_cast<int>(fit.terms()) - (task.model->hasConstant() ? 1 : 0);
    if (sums.total > 0.0)
        fit.rSquared = toDouble(sums.regression / sums.total);
}

DoubleDouble largestOf(const PairColumn& column) {
    DoubleDouble largest = 0.0;
    for (std::size_t i = 0; i < column.size(); ++i)
        largest = std::max(largest, abs(column[i]));
    return largest;
}

/// Residuals below this share of the largest ordinate are the rounding of 31-digit arithmetic: readings typed with up to 18
/// digits that do not lie on the function leave at least 10⁻¹⁸. Longer ones may come close to the rounding.
double roundingShare(const Sample& sample) {
    const auto longer = [](const Warning& warning) { return warning.code == WarningCode::ColumnNotExact; };
    return std::any_of(sample.warnings.begin(), sample.warnings.end(), longer) ? 1e-30 : 1e-25;
}

/// Power of the abscissa that a coefficient belongs to; empty where the function is no polynomial.
std::optional<int> powerOf(const FunctionChoice& function, std::size_t term) {
    switch (function.family) {
    case FunctionFamily::Constant:
    case FunctionFamily::Line:
    case FunctionFamily::Polynomial:
        return static_cast<int>(term);
    case FunctionFamily::Proportional:
    case FunctionFamily::PolynomialNoConstant:
        return static_cast<int>(term) + 1;
    default:
        return std::nullopt;
    }
}

/// Where the function leaves nothing over, a term that stays below the rounding of the ordinates is no term.
double withoutRounding(const FitTask& task, const SolvedModel& solved, std::size_t term, double value) {
    const auto power = powerOf(task.choices.function, term);
    if (!power || solved.linear.residualSs > 0.0)
        return value;
    const double most = std::fabs(value) * std::pow(toDouble(largestOf(task.x)), *power);
    return most < toDouble(largestOf(task.y)) * roundingShare(task.sample) ? 0.0 : value;
}

/// Coefficients as reported, with J·scale·(AᵀWA)⁻¹·Jᵀ in double-double, rounded once.
void fillCoefficients(Fit& fit, const FitTask& task, const SolvedModel& solved, const DoubleDouble& scale) {
    const std::size_t p = task.model->terms();
    const ReportedCoefficients reported = task.model->reported(solved.beta);
    const std::vector<DoubleDouble> inner = unscaledCovariance(solved.linear.inverseRoot, p);
    std::vector<DoubleDouble> half(p * p, 0.0);
    for (std::size_t i = 0; i < p; ++i)
        for (std::size_t j = 0; j < p; ++j)
            for (std::size_t k = 0; k < p; ++k)
                half[i * p + j] += reported.jacobian[i * p + k] * inner[k * p + j];
    const bool indication = task.direction == FitDirection::Indication;
    const auto names =
        coefficientNames(task.choices.function, indication ? task.sample.referenceUnit : task.sample.indicationUnit,
                         indication ? task.sample.indicationUnit : task.sample.referenceUnit, p);
    fit.covariance.resize(p * p);
    for (std::size_t i = 0; i < p; ++i) {
        DoubleDouble variance = 0.0;
        for (std::size_t j = 0; j < p; ++j) {
            DoubleDouble sum = 0.0;
            for (std::size_t k = 0; k < p; ++k)
                sum += half[i * p + k] * reported.jacobian[j * p + k];
            fit.covariance[i * p + j] = toDouble(scale * sum);
            if (j == i)
                variance = scale * sum;
        }
        const double value = withoutRounding(task, solved, i, toDouble(reported.value[i]));
        const double u = variance.isnan() ? std::numeric_limits<double>::quiet_NaN() : toDouble(sqrt(variance));
        fit.coefficients.push_back(
            {names[i].name, names[i].unit, value, u, value - fit.coverageFactor * u, value + fit.coverageFactor * u,
             value - fit.jointFactor * u, value + fit.jointFactor * u});
    }
}

void dropRounding(LinearSolution& solution, const FitTask& task) {
    DoubleDouble largest = 0.0;
    for (std::size_t i = 0; i < task.y.size(); ++i)
        largest = std::max(largest, abs(solution.residual[i]));
    if (largest > largestOf(task.y) * roundingShare(task.sample))
        return;
    std::fill(solution.residual.begin(), solution.residual.end(), DoubleDouble(0.0));
    solution.residualSs = 0.0;
}

DoubleDouble covarianceScale(const FitTask& task, const SolvedModel& solved, int df) {
    if (solved.covarianceScale)
        return *solved.covarianceScale;
    if (task.choices.covariance == CovarianceScale::Stated)
        return 1.0;
    return df > 0 ? solved.linear.residualSs / static_cast<double>(df) : DoubleDouble::_nan;
}

Residuals residualsOf(const FitTask& task, const LinearSolution& solution) {
    Residuals residuals;
    for (std::size_t i = 0; i < task.sample.size(); ++i) {
        residuals.e.push_back(solution.residual[i]);
        residuals.fitted.push_back(toDouble(task.y[i] - solution.residual[i]));
        if (!task.weighting.rootWeight.empty())
            residuals.weight.push_back(sqr(task.weighting.rootWeight[i]));
    }
    residuals.leverage = solution.leverage;
    return residuals;
}

/// What was chosen and what it was fitted to.
void describe(Fit& fit, const FitTask& task) {
    fit.function = task.choices.function;
    fit.direction = task.direction;
    fit.method = task.choices.method;
    const bool stated =
        task.choices.covariance == CovarianceScale::Stated || task.choices.method == Method::BothUncertain;
    fit.weights = stated ? Weights::Stated : task.choices.weights;
    fit.covarianceScale = task.choices.covariance;
    fit.sharedError = task.sample.shared.empty() ? SharedError::Budget : task.choices.sharedError;
    fit.coverage = task.choices.coverage.toDouble();
    fit.used = task.sample.size();
    fit.excluded = task.sample.excluded;
    fit.setPoints = task.sample.groupValue.size();
    fit.low = task.low;
    fit.high = task.high;
    const int df = static_cast<int>(fit.used - task.model->terms());
    fit.degreesOfFreedom = df;
    const double tail = toDouble((1.0 - task.choices.coverage.toDoubleDouble()) / 2.0);
    const auto quantile = [&](double above) {
        return fit.covarianceScale == CovarianceScale::Stated ? normalQuantileAbove(above) : studentQuantileAbove(above, df);
    };
    fit.coverageFactor = quantile(tail);
    fit.jointFactor = quantile(tail / static_cast<double>(task.model->terms()));
}

/// Whether the function turns in the calibrated range, so that an indication may belong to several references.
bool turns(const Fit& fit) {
    constexpr int Steps = 100;
    bool rises = false, falls = false;
    for (int i = 0; i <= Steps && !(rises && falls); ++i) {
        const double slope = fit.curve->derivative(fit.low + (fit.high - fit.low) * i / Steps);
        rises = rises || slope > 0;
        falls = falls || slope < 0;
    }
    return rises && falls;
}

} // namespace

Fit assembleFigures(const FitTask& task, SolvedModel solved, const SumsOfSquares& sums) {
    const LinearSolution& solution = solved.linear;
    Fit fit;
    describe(fit, task);
    const int df = fit.degreesOfFreedom;
    const DoubleDouble scale = covarianceScale(task, solved, df);
    fillCoefficients(fit, task, solved, scale);
    fillSums(fit, task, solution, sums);
    fit.residualSd = df > 0 ? toDouble(sqrt(solution.residualSs / static_cast<double>(df)))
                            : std::numeric_limits<double>::quiet_NaN();
    if (solved.robustSd)
        fit.residualSd = *solved.robustSd;
    if (fit.weights == Weights::Stated) {
        fit.chiSquared = fit.residualSs;
        if (df > 0)
            fit.chiSquaredP = chiSquaredAbove(fit.residualSs, df);
    }
    if (task.sample.matrix != nullptr && !fit.correlated)
        fit.warnings.push_back({WarningCode::MatrixUnused, {}});
    if (df == 0)
        fit.warnings.push_back({WarningCode::NoDegreesOfFreedom, {}});
    fit.convergence = solved.convergence;
    if (!fit.convergence.reached)
        fit.warnings.push_back({WarningCode::NotConverged, {{"reason", fit.convergence.reason}}});
    if (task.choices.method == Method::Robust)
        fit.warnings.push_back(
            {WarningCode::ApproximateMethod, {{"figure", "standard_uncertainty"}, {"method", "robust"}}});
    fit.weighedDown = std::move(solved.weighedDown);
    fit.correlated = solved.totalSs.has_value();
    fit.curve = std::make_shared<ModelCurve>(task.model, solved.beta, solution.inverseRoot, toDouble(scale),
                                             task.weighting.profile);
    if (fit.terms() > 2 && turns(fit))
        fit.warnings.push_back({WarningCode::NotMonotonic, {}});
    return fit;
}

FitOutcome assembleFit(const FitTask& task, SolvedModel solved) {
    dropRounding(solved.linear, task);
    const SumsOfSquares sums = sumsOf(task, solved);
    Residuals residuals = residualsOf(task, solved.linear);
    return {assembleFigures(task, std::move(solved), sums), std::move(residuals), {}};
}

} // namespace spanwright
