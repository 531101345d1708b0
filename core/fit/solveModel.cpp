// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/solveModel.h"

#include "core/fit/CalibrationFunction.h"

#include <cmath>
#include <optional>

namespace spanwright {

namespace {

constexpr int MostIterations = 200;
constexpr int MostHalvings = 40;

/// Linearised about β: design ∂f/∂β, ordinate y − f(x; β) (or y itself for a linear family).
LinearProblem linearised(const FitTask& task, const std::vector<DoubleDouble>& beta) {
    const std::size_t n = task.sample.size(), p = task.model->terms();
    LinearProblem problem{p, std::vector<DoubleDouble>(n * p), {}, task.weighting.rootWeight};
    problem.ordinate.reserve(n);
    for (std::size_t i = 0; i < n; ++i) {
        const DoubleDouble x = task.x[i];
        const std::vector<DoubleDouble> row = task.model->gradient(x, beta);
        for (std::size_t k = 0; k < p; ++k)
            problem.design[k * n + i] = row[k];
        problem.ordinate.push_back(task.model->linear() ? task.y[i] : task.y[i] - task.model->value(x, beta));
    }
    return problem;
}

DoubleDouble weightedSquare(const std::vector<DoubleDouble>& values, const std::vector<DoubleDouble>& rootWeight) {
    DoubleDouble sum = 0.0;
    for (std::size_t i = 0; i < values.size(); ++i)
        sum += sqr(rootWeight.empty() ? values[i] : values[i] * rootWeight[i]);
    return sum;
}

DoubleDouble sumOfSquares(const FitTask& task, const std::vector<DoubleDouble>& beta) {
    std::vector<DoubleDouble> residual;
    for (std::size_t i = 0; i < task.sample.size(); ++i)
        residual.push_back(task.y[i] - task.model->value(task.x[i], beta));
    return weightedSquare(residual, task.weighting.rootWeight);
}

/// The longest of the steps δ, δ/2, δ/4, … that does not raise the sum of squares; empty when none is found.
std::optional<std::vector<DoubleDouble>> stepped(const FitTask& task, const std::vector<DoubleDouble>& beta,
                                                 const std::vector<DoubleDouble>& step, const DoubleDouble& current) {
    DoubleDouble share = 1.0;
    for (int halving = 0; halving < MostHalvings; ++halving, share *= 0.5) {
        std::vector<DoubleDouble> next = beta;
        for (std::size_t k = 0; k < beta.size(); ++k)
            next[k] += share * step[k];
        if (sumOfSquares(task, next) <= current)
            return next;
    }
    return std::nullopt;
}

/// Gain of a step, as a share of the residual squares, that may be rounding: it moves no coefficient by more than 10⁻¹³ of its
/// uncertainty.
constexpr double RoundedGain = 1e-26;

Result<SolvedModel> solveNonLinear(const FitTask& task) {
    const auto start = task.model->start(task.x, task.y);
    if (!start)
        return start.error();
    SolvedModel solved;
    solved.beta = *start;
    solved.convergence = {false, 0, "iterations"};
    std::vector<DoubleDouble> ordinates;
    for (std::size_t i = 0; i < task.sample.size(); ++i)
        ordinates.push_back(task.y[i]);
    const DoubleDouble size = weightedSquare(ordinates, task.weighting.rootWeight);
    DoubleDouble gainBefore = size;
    while (solved.convergence.iterations < MostIterations) {
        solved.convergence.iterations += 1;
        const LinearProblem problem = linearised(task, solved.beta);
        const DoubleDouble current = weightedSquare(problem.ordinate, problem.rootWeight);
        if (!std::isfinite(toDouble(current)))
            return Error(ErrorCode::NoConvergence, {{"reason", "not-finite"}});
        solved.linear = solveLeastSquares(problem);
        if (!solved.linear.lostTerms.empty())
            return rankLost(task, solved.linear.lostTerms);
        const DoubleDouble gain = current - solved.linear.residualSs;
        // Both sums are rounded, so at the end the gain need not fall any further: then no step is left either.
        const bool rounding = gain <= solved.linear.residualSs * RoundedGain;
        if (gain <= solved.linear.residualSs * 1e-32 || gain <= size * 1e-54 || (rounding && gain >= gainBefore * 0.25)) {
            solved.convergence.reached = true;
            solved.convergence.reason = solved.linear.residualSs <= size * 1e-54 ? "rounding" : "gradient";
            break;
        }
        gainBefore = gain;
        const auto next = stepped(task, solved.beta, solved.linear.beta, current);
        if (!next) {
            solved.convergence.reached = rounding;
            solved.convergence.reason = rounding ? "rounding" : "no-decrease";
            break;
        }
        solved.beta = *next;
    }
    return solved;
}

} // namespace

Error rankLost(const FitTask& task, const std::vector<std::size_t>& lost) {
    const auto names = coefficientNames(task.choices.function, {}, {}, task.model->terms());
    std::string terms;
    for (const std::size_t k : lost)
        terms += (terms.empty() ? "" : ", ") + names[k].name;
    return Error(ErrorCode::RankLost, {{"terms", terms}});
}

Result<SolvedModel> solveModel(const FitTask& task) {
    if (!task.model->linear())
        return solveNonLinear(task);
    SolvedModel solved;
    solved.linear = solveLeastSquares(linearised(task, {}));
    if (!solved.linear.lostTerms.empty())
        return rankLost(task, solved.linear.lostTerms);
    solved.beta = solved.linear.beta;
    solved.convergence.reason = "linear";
    return solved;
}

} // namespace spanwright
