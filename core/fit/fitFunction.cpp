// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/fitFunction.h"

#include "core/fit/CalibrationFunction.h"
#include "core/fit/LeastSquares.h"
#include "core/fit/ModelCurve.h"
#include "core/fit/Quantiles.h"
#include "core/fit/Weighting.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

/// The readings as abscissa and ordinate of the function that is fitted, with their weights.
struct Task {
    const Sample& sample;
    const Choices& choices;
    FitDirection direction;
    const PairColumn& x;
    const PairColumn& y;
    std::shared_ptr<const FunctionModel> model;
    Weighting weighting;
};

/// Number of distinct abscissae, counted up to `enough`.
std::size_t distinctUpTo(const PairColumn& x, std::size_t enough) {
    std::vector<DoubleDouble> seen;
    for (std::size_t i = 0; i < x.size() && seen.size() < enough; ++i)
        if (std::find(seen.begin(), seen.end(), x[i]) == seen.end())
            seen.push_back(x[i]);
    return seen.size();
}

Error shortOf(ErrorCode code, std::size_t needed, std::size_t got) {
    return Error(code, {{"needed", std::to_string(needed)}, {"got", std::to_string(got)}});
}

Result<void> checkEnough(const Task& task) {
    const std::size_t p = task.model->terms(), n = task.sample.size();
    if (n < p)
        return shortOf(ErrorCode::TooFewReadings, p, n);
    const std::size_t distinct = distinctUpTo(task.x, p);
    if (distinct < p)
        return distinct == 1 ? Error(ErrorCode::ReferencesAllEqual, {{"value", std::to_string(task.x.high.front())}})
                             : shortOf(ErrorCode::TooFewSetPoints, p, distinct);
    std::vector<std::size_t> outside;
    for (std::size_t i = 0; i < n; ++i)
        if (!task.model->defined(task.x.high[i]) || !task.model->ordinateDefined(task.y.high[i]))
            outside.push_back(i);
    if (!outside.empty())
        return Error(ErrorCode::OutsideDomain,
                     {{"function", functionName(task.choices.function)}, {"rows", rowsFact(task.sample, outside)}});
    return {};
}

LinearProblem linearProblem(const Task& task) {
    const std::size_t n = task.sample.size(), p = task.model->terms();
    LinearProblem problem{p, std::vector<DoubleDouble>(n * p), {}, task.weighting.rootWeight};
    for (std::size_t i = 0; i < n; ++i) {
        const std::vector<DoubleDouble> row = task.model->gradient(task.x[i], {});
        for (std::size_t k = 0; k < p; ++k)
            problem.design[k * n + i] = row[k];
        problem.ordinate.push_back(task.y[i]);
    }
    return problem;
}

/// Total about the weighted mean (or zero), regression as Σ w (ŷ − centre)², both free of cancellation.
void fillSums(Fit& fit, const Task& task, const LinearSolution& solution) {
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
    if (regression <= total * 1e-26)
        regression = 0.0;
    fit.totalSs = toDouble(total);
    fit.regressionSs = toDouble(regression);
    fit.residualSs = toDouble(solution.residualSs);
    fit.totalDf = static_cast<int>(n) - (task.model->hasConstant() ? 1 : 0);
    fit.regressionDf = static_cast<int>(fit.terms()) - (task.model->hasConstant() ? 1 : 0);
    if (total > 0.0)
        fit.rSquared = toDouble(regression / total);
}

/// Coefficients as reported, with J·scale·(AᵀWA)⁻¹·Jᵀ in double-double, rounded once.
void fillCoefficients(Fit& fit, const Task& task, const LinearSolution& solution, const DoubleDouble& scale) {
    const std::size_t p = task.model->terms();
    const ReportedCoefficients reported = task.model->reported(solution.beta);
    const std::vector<DoubleDouble> inner = unscaledCovariance(solution.inverseRoot, p);
    std::vector<DoubleDouble> half(p * p, 0.0);
    for (std::size_t i = 0; i < p; ++i)
        for (std::size_t j = 0; j < p; ++j)
            for (std::size_t k = 0; k < p; ++k)
                half[i * p + j] += reported.jacobian[i * p + k] * inner[k * p + j];
    const bool indication = task.direction == FitDirection::Indication;
    const auto names = coefficientNames(task.choices.function, indication ? task.sample.referenceUnit : task.sample.indicationUnit,
                                        indication ? task.sample.indicationUnit : task.sample.referenceUnit);
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
        const double value = toDouble(reported.value[i]);
        const double u = variance.isnan() ? std::numeric_limits<double>::quiet_NaN() : toDouble(sqrt(variance));
        fit.coefficients.push_back({names[i].name, names[i].unit, value, u, value - fit.coverageFactor * u, value + fit.coverageFactor * u});
    }
}

DoubleDouble covarianceScale(const Task& task, const LinearSolution& solution, int df) {
    if (task.choices.covariance == CovarianceScale::Stated)
        return 1.0;
    return df > 0 ? solution.residualSs / static_cast<double>(df) : DoubleDouble::_nan;
}

Residuals residualsOf(const Task& task, const LinearSolution& solution) {
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

FitOutcome assemble(const Task& task, const LinearSolution& solution) {
    FitOutcome outcome;
    Fit& fit = outcome.fit;
    fit.function = task.choices.function;
    fit.direction = task.direction;
    fit.method = task.choices.method;
    fit.weights = task.choices.weights;
    fit.covarianceScale = task.choices.covariance;
    fit.coverage = task.choices.coverage.toDouble();
    fit.used = task.sample.size();
    fit.excluded = task.sample.excluded;
    fit.setPoints = task.sample.groupValue.size();
    fit.low = *std::min_element(task.x.high.begin(), task.x.high.end());
    fit.high = *std::max_element(task.x.high.begin(), task.x.high.end());
    const int df = static_cast<int>(fit.used - task.model->terms());
    fit.degreesOfFreedom = df;
    const double tail = toDouble((1.0 - task.choices.coverage.toDoubleDouble()) / 2.0);
    fit.coverageFactor = fit.covarianceScale == CovarianceScale::Stated ? normalQuantileAbove(tail) : studentQuantileAbove(tail, df);

    const DoubleDouble scale = covarianceScale(task, solution, df);
    fillCoefficients(fit, task, solution, scale);
    fillSums(fit, task, solution);
    fit.residualSd = df > 0 ? toDouble(sqrt(solution.residualSs / static_cast<double>(df))) : std::numeric_limits<double>::quiet_NaN();
    if (task.choices.weights == Weights::Stated) {
        fit.chiSquared = fit.residualSs;
        if (df > 0)
            fit.chiSquaredP = chiSquaredAbove(fit.residualSs, df);
    }
    if (df == 0)
        fit.warnings.push_back({WarningCode::NoDegreesOfFreedom, {}});
    fit.curve = std::make_shared<ModelCurve>(task.model, solution.beta, solution.inverseRoot, toDouble(scale), task.weighting.profile);
    outcome.residuals = residualsOf(task, solution);
    return outcome;
}

Error rankLost(const Task& task, const LinearSolution& solution) {
    const auto names = coefficientNames(task.choices.function, {}, {});
    std::string terms;
    for (const std::size_t k : solution.lostTerms)
        terms += (terms.empty() ? "" : ", ") + names[k].name;
    return Error(ErrorCode::RankLost, {{"terms", terms}});
}

} // namespace

FitDirection directionOf(const Choices& choices) {
    return choices.function.family == FunctionFamily::Constant ? FitDirection::Indication : choices.fit;
}

Result<FitOutcome> fitFunction(const Sample& sample, const Choices& choices) {
    if (sample.size() == 0)
        return Error(ErrorCode::NoReadings);
    const FitDirection direction = directionOf(choices);
    const bool indication = direction == FitDirection::Indication;
    const PairColumn& x = indication ? sample.reference : sample.indication;
    const PairColumn& y = indication ? sample.indication : sample.reference;
    const auto [low, high] = std::minmax_element(x.high.begin(), x.high.end());
    auto model = makeModel(choices.function, {*low, *high, &sample, direction});
    if (!model)
        return model.error();
    Task task{sample, choices, direction, x, y, std::move(*model), {}};
    if (const auto enough = checkEnough(task); !enough)
        return enough.error();
    if (choices.weights == Weights::Stated || choices.covariance == CovarianceScale::Stated) {
        auto weighting = statedWeighting(sample, x, indication ? sample.uIndication : sample.uReference);
        if (!weighting)
            return weighting.error();
        task.weighting = std::move(*weighting);
    }
    const LinearSolution solution = solveLeastSquares(linearProblem(task));
    if (!solution.lostTerms.empty())
        return rankLost(task, solution);
    return assemble(task, solution);
}

} // namespace spanwright
