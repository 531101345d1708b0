// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/CorrelatedFit.h"

#include "core/fit/Cholesky.h"
#include "core/fit/StatedCovariance.h"
#include "core/fit/solveModel.h"

#include <algorithm>

namespace spanwright {

namespace {

using Dense = std::vector<DoubleDouble>;

constexpr int MostIterations = 500;
/// Increments of this share of the ordinates are as small as the rounding of an ill-conditioned covariance lets them become.
constexpr double Settled = 1e-26, SettledRoughly = 1e-18;

/// The design at the abscissae X, column by column.
Dense designAt(const FitTask& task, const Dense& x, const Dense& beta) {
    const std::size_t n = x.size(), p = task.model->terms();
    Dense design(n * p);
    for (std::size_t i = 0; i < n; ++i) {
        const Dense row = task.model->gradient(x[i], beta);
        for (std::size_t k = 0; k < p; ++k)
            design[k * n + i] = row[k];
    }
    return design;
}

LinearSolution solveWhitened(const CholeskyFactor& factor, Dense design, Dense ordinate) {
    const std::size_t n = factor.n, p = design.size() / n;
    for (std::size_t k = 0; k < p; ++k)
        solveLower(factor, std::span(design).subspan(k * n, n));
    solveLower(factor, ordinate);
    return solveLeastSquares({p, std::move(design), std::move(ordinate), {}});
}

Dense valuesOf(const PairColumn& column) {
    Dense values;
    for (std::size_t i = 0; i < column.size(); ++i)
        values.push_back(column[i]);
    return values;
}

Dense residualsAt(const FitTask& task, const Dense& beta) {
    Dense z;
    for (std::size_t i = 0; i < task.sample.size(); ++i)
        z.push_back(task.y[i] - task.model->value(task.x[i], beta));
    return z;
}

/// (y − c)ᵀV⁻¹(y − c) with c the generalised mean, or 0 for a function without a constant.
DoubleDouble totalOf(const FitTask& task, const CholeskyFactor& factor) {
    Dense y = valuesOf(task.y), ones(y.size(), 1.0);
    solveLower(factor, y);
    solveLower(factor, ones);
    DoubleDouble cross = 0.0, square = 0.0;
    for (std::size_t i = 0; i < y.size(); ++i) {
        cross += ones[i] * y[i];
        square += ones[i] * ones[i];
    }
    const DoubleDouble centre = task.model->hasConstant() ? cross / square : DoubleDouble(0.0);
    DoubleDouble total = 0.0;
    for (std::size_t i = 0; i < y.size(); ++i)
        total += sqr(y[i] - centre * ones[i]);
    return total;
}

/// Everything that is reported reading by reading, from the covariance V of z and the design at the solution.
void describeReadings(FitTask& task, SolvedModel& solved, const Dense& v, const Dense& design,
                      const std::vector<double>& noise) {
    const std::size_t n = task.sample.size(), p = task.model->terms();
    const Dense& root = solved.linear.inverseRoot;
    task.weighting.rootWeight.clear();
    solved.linear.leverage.clear();
    for (std::size_t i = 0; i < n; ++i) {
        task.weighting.rootWeight.push_back(1.0 / sqrt(v[i * n + i]));
        DoubleDouble sum = 0.0;
        for (std::size_t j = 0; j < p; ++j) {
            DoubleDouble term = 0.0;
            for (std::size_t k = 0; k <= j; ++k)
                term += design[k * n + i] * root[k * p + j];
            sum += sqr(term);
        }
        solved.linear.leverage.push_back(toDouble(sum / v[i * n + i]));
    }
    task.weighting.profile = VarianceProfile(task.x.high, noise);
    solved.linear.residual = residualsAt(task, solved.beta);
}

Result<SolvedModel> solveOrdinates(FitTask& task) {
    auto joint = jointCovariance(task, CovarianceOf::Ordinates);
    if (!joint)
        return joint.error();
    const std::size_t n = task.sample.size();
    const CholeskyFactor factor = cholesky(joint->yy, n);
    if (factor.lostRow)
        return Error(ErrorCode::MatrixNotPositive, {{"row", std::to_string(*factor.lostRow + 1)}});
    const Dense design = designAt(task, valuesOf(task.x), {});
    SolvedModel solved;
    solved.linear = solveWhitened(factor, design, valuesOf(task.y));
    if (!solved.linear.lostTerms.empty())
        return rankLost(task, solved.linear.lostTerms);
    solved.beta = solved.linear.beta;
    solved.convergence.reason = "linear";
    solved.totalSs = totalOf(task, factor);
    describeReadings(task, solved, joint->yy, design, joint->noise);
    return solved;
}

/// Slope of a line in the user's unit, from β in whatever basis.
DoubleDouble slopeOf(const FitTask& task, const Dense& beta) {
    return task.model->value(DoubleDouble(1.0), beta) - task.model->value(DoubleDouble(0.0), beta);
}

/// The state of the iteration at one β.
struct Step {
    Dense v;                 ///< covariance of z
    CholeskyFactor factor;
    Dense design;            ///< at the adjusted abscissae
    LinearSolution linear;   ///< increment of β
};

Result<Step> stepAt(const FitTask& task, const JointCovariance& u, const Dense& beta) {
    const std::size_t n = task.sample.size();
    const DoubleDouble b = slopeOf(task, beta);
    Step step;
    step.v.resize(n * n);
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t j = 0; j < n; ++j)
            step.v[i * n + j] = u.yy[i * n + j] - b * (u.xy[i * n + j] + u.xy[j * n + i]) + b * b * u.xx[i * n + j];
    step.factor = cholesky(step.v, n);
    if (step.factor.lostRow)
        return Error(ErrorCode::MatrixNotPositive, {{"row", std::to_string(*step.factor.lostRow + 1)}});
    const Dense z = residualsAt(task, beta);
    Dense pull = z, adjusted = valuesOf(task.x);
    solveSymmetric(step.factor, pull);
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t j = 0; j < n; ++j)
            adjusted[i] -= (u.xy[i * n + j] - b * u.xx[i * n + j]) * pull[j];
    step.design = designAt(task, adjusted, beta);
    step.linear = solveWhitened(step.factor, step.design, z);
    if (!step.linear.lostTerms.empty())
        return rankLost(task, step.linear.lostTerms);
    return step;
}

DoubleDouble largestOf(const Dense& values) {
    DoubleDouble largest = 0.0;
    for (const DoubleDouble& value : values)
        largest = std::max(largest, abs(value));
    return largest;
}

Result<SolvedModel> solveBoth(FitTask& task) {
    const auto u = jointCovariance(task, CovarianceOf::Both);
    if (!u)
        return u.error();
    auto solved = solveModel(task);
    if (!solved)
        return solved;
    const DoubleDouble size = largestOf(valuesOf(task.y));
    solved->convergence = {false, 0, "iterations"};
    DoubleDouble before = size;
    while (solved->convergence.iterations < MostIterations && !solved->convergence.reached) {
        const auto step = stepAt(task, *u, solved->beta);
        if (!step)
            return step.error();
        solved->convergence.iterations += 1;
        for (std::size_t k = 0; k < solved->beta.size(); ++k)
            solved->beta[k] += step->linear.beta[k];
        const DoubleDouble moved = largestOf(step->linear.beta);
        if (moved <= size * Settled)
            solved->convergence = {true, solved->convergence.iterations, "gradient"};
        else if (moved <= size * SettledRoughly && moved >= before)
            solved->convergence = {true, solved->convergence.iterations, "rounding"};
        before = moved;
    }
    auto last = stepAt(task, *u, solved->beta);
    if (!last)
        return last.error();
    solved->linear = std::move(last->linear);
    solved->totalSs = totalOf(task, last->factor);
    describeReadings(task, *solved, last->v, last->design, u->noise);
    return solved;
}

} // namespace

Result<SolvedModel> solveCorrelated(FitTask& task) {
    return task.choices.method == Method::BothUncertain ? solveBoth(task) : solveOrdinates(task);
}

} // namespace spanwright
