// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/Robust.h"

#include "core/fit/solveModel.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr double HuberConstant = 1.345, BisquareConstant = 4.685;
constexpr int MostIterations = 200;

/// ψ(r)/r
double weightOf(RobustWeight kind, double r) {
    const double size = std::fabs(r);
    if (kind == RobustWeight::Huber)
        return size <= HuberConstant ? 1.0 : HuberConstant / size;
    const double share = 1.0 - (r / BisquareConstant) * (r / BisquareConstant);
    return size < BisquareConstant ? share * share : 0.0;
}

/// ψ′(r)
double slopeOf(RobustWeight kind, double r) {
    if (kind == RobustWeight::Huber)
        return std::fabs(r) <= HuberConstant ? 1.0 : 0.0;
    const double square = (r / BisquareConstant) * (r / BisquareConstant);
    return square < 1 ? (1.0 - square) * (1.0 - 5.0 * square) : 0.0;
}

/// Residuals in the unit in which they have equal variance.
std::vector<double> scaledResiduals(const FitTask& task, const std::vector<DoubleDouble>& beta,
                                    const std::vector<DoubleDouble>& rootWeight) {
    std::vector<double> scaled;
    for (std::size_t i = 0; i < task.sample.size(); ++i) {
        const DoubleDouble e = task.y[i] - task.model->value(task.x[i], beta);
        scaled.push_back(toDouble(rootWeight.empty() ? e : e * rootWeight[i]));
    }
    return scaled;
}

double spreadOf(std::vector<double> residual) {
    for (double& e : residual)
        e = std::fabs(e);
    const std::size_t n = residual.size(), half = n / 2;
    std::nth_element(residual.begin(), residual.begin() + static_cast<std::ptrdiff_t>(half), residual.end());
    double middle = residual[half];
    if (n % 2 == 0)
        middle =
            (middle + *std::max_element(residual.begin(), residual.begin() + static_cast<std::ptrdiff_t>(half))) / 2;
    return middle / 0.6745;
}

struct Iterated {
    std::vector<DoubleDouble> beta;
    Convergence convergence;
};

/// Reweighted fits from `beta` until no fitted value moves by more than 10⁻¹² of the spread.
Result<Iterated> reweighted(FitTask task, RobustWeight kind, std::vector<DoubleDouble> beta) {
    const std::vector<DoubleDouble> base = task.weighting.rootWeight;
    Iterated iterated{std::move(beta), {false, 0, "iterations"}};
    std::vector<double> residual = scaledResiduals(task, iterated.beta, base);
    while (iterated.convergence.iterations < MostIterations) {
        iterated.convergence.iterations += 1;
        const double spread = spreadOf(residual);
        if (!(spread > 0)) {
            iterated.convergence = {true, iterated.convergence.iterations, "rounding"};
            break;
        }
        task.weighting.rootWeight.assign(task.sample.size(), 1.0);
        for (std::size_t i = 0; i < residual.size(); ++i)
            task.weighting.rootWeight[i] =
                (base.empty() ? DoubleDouble(1.0) : base[i]) * std::sqrt(weightOf(kind, residual[i] / spread));
        auto solved = solveModel(task);
        if (!solved)
            return solved.error();
        iterated.beta = std::move(solved->beta);
        const std::vector<double> next = scaledResiduals(task, iterated.beta, base);
        double moved = 0;
        for (std::size_t i = 0; i < next.size(); ++i)
            moved = std::max(moved, std::fabs(next[i] - residual[i]));
        residual = next;
        if (moved <= 1e-12 * spread) {
            iterated.convergence = {true, iterated.convergence.iterations, "gradient"};
            break;
        }
    }
    return iterated;
}

/// Huber's covariance factor, with K = 1 + (p/n)·var(ψ′)/mean(ψ′)².
void describe(SolvedModel& solved, const FitTask& task, RobustWeight kind) {
    const std::vector<double> residual = scaledResiduals(task, solved.beta, task.weighting.rootWeight);
    const double spread = spreadOf(residual);
    const auto n = static_cast<double>(residual.size()), p = static_cast<double>(task.model->terms());
    solved.robustSd = n > p ? spread : std::numeric_limits<double>::quiet_NaN();
    if (!(spread > 0) || n <= p)
        return;
    double square = 0, slope = 0, slopeSquare = 0;
    for (std::size_t i = 0; i < residual.size(); ++i) {
        const double r = residual[i] / spread, weight = weightOf(kind, r);
        square += weight * r * weight * r;
        slope += slopeOf(kind, r);
        slopeSquare += slopeOf(kind, r) * slopeOf(kind, r);
        if (weight < 1)
            solved.weighedDown.push_back({task.sample.rows[i], weight});
    }
    slope /= n;
    const double k = 1 + p / n * (slopeSquare / n - slope * slope) / (slope * slope);
    solved.covarianceScale = k * k * square / (n - p) / (slope * slope) * spread * spread;
}

} // namespace

Result<SolvedModel> solveRobust(FitTask& task) {
    auto solved = solveModel(task);
    if (!solved)
        return solved;
    auto iterated = reweighted(task, RobustWeight::Huber, solved->beta);
    if (iterated && task.choices.robust == RobustWeight::Bisquare)
        iterated = reweighted(task, RobustWeight::Bisquare, iterated->beta);
    if (!iterated)
        return iterated.error();
    solved->beta = iterated->beta;
    solved->convergence = iterated->convergence;
    solved->linear.residualSs = 0.0;
    for (std::size_t i = 0; i < task.sample.size(); ++i) {
        solved->linear.residual[i] = task.y[i] - task.model->value(task.x[i], solved->beta);
        const DoubleDouble scaled = task.weighting.rootWeight.empty()
                                        ? solved->linear.residual[i]
                                        : solved->linear.residual[i] * task.weighting.rootWeight[i];
        solved->linear.residualSs += sqr(scaled);
    }
    // A bisquare weight list holds nearly every reading; those below half count as weighed down there.
    describe(*solved, task, task.choices.robust);
    if (task.choices.robust == RobustWeight::Bisquare)
        std::erase_if(solved->weighedDown, [](const WeighedDown& reading) { return reading.weight >= 0.5; });
    return solved;
}

} // namespace spanwright
