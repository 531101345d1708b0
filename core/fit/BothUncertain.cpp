// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/BothUncertain.h"

#include "core/fit/solveModel.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr int MostIterations = 500;

/// Covariance of both errors of a reading; 0 where none is stated.
DoubleDouble covarianceOf(const FitTask& task, std::size_t i) {
    const PairColumn& column = task.sample.uCovariance;
    return column.empty() || column.high[i] != column.high[i] ? DoubleDouble(0.0) : column[i];
}

/// Both uncertainties stated for every reading, none negative, not both zero, and a covariance that both allow.
Result<void> checkStated(const FitTask& task) {
    std::vector<std::size_t> missing, notPositive, tooLarge;
    for (std::size_t i = 0; i < task.sample.size(); ++i) {
        const bool known = !task.ux.empty() && !task.uy.empty() && task.ux.high[i] == task.ux.high[i] &&
                           task.uy.high[i] == task.uy.high[i];
        if (!known)
            missing.push_back(i);
        else if (task.ux.high[i] < 0 || task.uy.high[i] < 0 || !(task.ux.high[i] + task.uy.high[i] > 0))
            notPositive.push_back(i);
        else if (abs(covarianceOf(task, i)) > task.ux[i] * task.uy[i])
            tooLarge.push_back(i);
    }
    if (!missing.empty())
        return Error(ErrorCode::UncertaintyMissing, {{"rows", rowsFact(task.sample, missing)}});
    if (!notPositive.empty())
        return Error(ErrorCode::UncertaintyNotPositive, {{"rows", rowsFact(task.sample, notPositive)}});
    if (!tooLarge.empty())
        return Error(ErrorCode::CovarianceTooLarge, {{"rows", rowsFact(task.sample, tooLarge)}});
    return {};
}

/// The weighted problem for the increment of β, at the adjusted abscissae.
LinearProblem incrementProblem(const FitTask& task, const std::vector<DoubleDouble>& beta) {
    const std::size_t n = task.sample.size(), p = task.model->terms();
    const DoubleDouble b = task.model->value(DoubleDouble(1.0), beta) - task.model->value(DoubleDouble(0.0), beta);
    const DoubleDouble a = task.model->value(DoubleDouble(0.0), beta);
    LinearProblem problem{p, std::vector<DoubleDouble>(n * p), {}, {}};
    for (std::size_t i = 0; i < n; ++i) {
        const DoubleDouble x = task.x[i], y = task.y[i], vx = sqr(task.ux[i]), vy = sqr(task.uy[i]);
        const DoubleDouble c = covarianceOf(task, i), t = 1.0 / (vy - 2.0 * b * c + b * b * vx);
        const DoubleDouble adjusted = x + (b * vx - c) * t * (y - a - b * x);
        const std::vector<DoubleDouble> row = task.model->gradient(adjusted, beta);
        for (std::size_t k = 0; k < p; ++k)
            problem.design[k * n + i] = row[k];
        problem.ordinate.push_back(y - task.model->value(x, beta));
        problem.rootWeight.push_back(sqrt(t));
    }
    return problem;
}

VarianceProfile readingProfile(const FitTask& task) {
    std::vector<double> variance;
    for (std::size_t i = 0; i < task.sample.size(); ++i)
        variance.push_back(task.uy.high[i] * task.uy.high[i]);
    return {task.x.high, variance};
}

} // namespace

Result<SolvedModel> solveBothUncertain(FitTask& task) {
    if (const auto stated = checkStated(task); !stated)
        return stated.error();
    DoubleDouble largest = 0.0;
    for (std::size_t i = 0; i < task.sample.size(); ++i)
        largest = std::max(largest, abs(task.y[i]));
    auto solved = solveModel(task);
    if (!solved)
        return solved;
    solved->convergence = {false, 0, "iterations"};
    while (solved->convergence.iterations < MostIterations && !solved->convergence.reached) {
        solved->convergence.iterations += 1;
        LinearSolution step = solveLeastSquares(incrementProblem(task, solved->beta));
        if (!step.lostTerms.empty())
            return rankLost(task, step.lostTerms);
        DoubleDouble moved = 0.0;
        for (std::size_t k = 0; k < step.beta.size(); ++k) {
            solved->beta[k] += step.beta[k];
            moved = std::max(moved, abs(step.beta[k]));
        }
        solved->linear = std::move(step);
        solved->convergence.reached = moved <= largest * 1e-26;
    }
    if (solved->convergence.reached)
        solved->convergence.reason = "gradient";
    const LinearProblem last = incrementProblem(task, solved->beta);
    task.weighting.rootWeight = last.rootWeight;
    task.weighting.profile = readingProfile(task);
    return solved;
}

} // namespace spanwright
