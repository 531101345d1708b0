// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/LeastSquares.h"

#include <algorithm>
#include <cassert>
#include <span>

namespace spanwright {

namespace {

using Column = std::span<DoubleDouble>;

constexpr double LostBelow = 1e-24;

DoubleDouble dot(std::span<const DoubleDouble> a, std::span<const DoubleDouble> b) {
    DoubleDouble sum = 0.0;
    for (std::size_t i = 0; i < a.size(); ++i)
        sum += a[i] * b[i];
    return sum;
}

/// Turns `pivot` (rows k…n of a column) into the reflector that leaves only its first entry, and returns that entry.
DoubleDouble makeReflector(Column pivot) {
    const DoubleDouble norm = sqrt(dot(pivot, pivot));
    const DoubleDouble diagonal = pivot[0] > 0.0 ? -norm : norm;
    pivot[0] -= diagonal;
    return diagonal;
}

void reflect(Column target, std::span<const DoubleDouble> reflector, const DoubleDouble& halfSquare) {
    const DoubleDouble factor = dot(target, reflector) / halfSquare;
    for (std::size_t i = 0; i < target.size(); ++i)
        target[i] -= factor * reflector[i];
}

/// R (p × p, row by row) and Qᵀy.
struct Triangle {
    std::vector<DoubleDouble> r, qty;
    std::vector<std::size_t> lost;
};

Triangle triangulate(const LinearProblem& problem) {
    const std::size_t n = problem.size(), p = problem.terms;
    std::vector<DoubleDouble> a = problem.design, y = problem.ordinate;
    if (!problem.rootWeight.empty())
        for (std::size_t i = 0; i < n; ++i) {
            for (std::size_t k = 0; k < p; ++k)
                a[k * n + i] *= problem.rootWeight[i];
            y[i] *= problem.rootWeight[i];
        }
    Triangle triangle{std::vector<DoubleDouble>(p * p, 0.0), {}, {}};
    for (std::size_t k = 0; k < p; ++k) {
        const Column whole(a.data() + k * n, n);
        const Column pivot = whole.subspan(k);
        const DoubleDouble norm = sqrt(dot(whole, whole));
        const DoubleDouble rest = sqrt(dot(pivot, pivot));
        if (!(rest > norm * LostBelow)) {
            triangle.lost.push_back(k);
            std::fill(pivot.begin(), pivot.end(), DoubleDouble(0.0));
            continue;
        }
        const DoubleDouble diagonal = makeReflector(pivot);
        const DoubleDouble halfSquare = -diagonal * pivot[0];
        for (std::size_t j = k + 1; j < p; ++j)
            reflect(Column(a.data() + j * n, n).subspan(k), pivot, halfSquare);
        reflect(Column(y).subspan(k), pivot, halfSquare);
        for (std::size_t j = 0; j < k; ++j)
            triangle.r[j * p + k] = whole[j];
        triangle.r[k * p + k] = diagonal;
    }
    triangle.qty.assign(y.begin(), y.begin() + static_cast<std::ptrdiff_t>(p));
    return triangle;
}

std::vector<DoubleDouble> invertUpper(const std::vector<DoubleDouble>& r, std::size_t p) {
    std::vector<DoubleDouble> inverse(p * p, 0.0);
    for (std::size_t j = 0; j < p; ++j) {
        inverse[j * p + j] = 1.0 / r[j * p + j];
        for (std::size_t i = j; i-- > 0;) {
            DoubleDouble sum = 0.0;
            for (std::size_t k = i + 1; k <= j; ++k)
                sum += r[i * p + k] * inverse[k * p + j];
            inverse[i * p + j] = -sum / r[i * p + i];
        }
    }
    return inverse;
}

double leverageOf(const LinearProblem& problem, const std::vector<DoubleDouble>& inverse, std::size_t row) {
    const std::size_t n = problem.size(), p = problem.terms;
    DoubleDouble sum = 0.0;
    for (std::size_t j = 0; j < p; ++j) {
        DoubleDouble z = 0.0;
        for (std::size_t k = 0; k <= j; ++k)
            z += problem.design[k * n + row] * inverse[k * p + j];
        sum += z * z;
    }
    if (!problem.rootWeight.empty())
        sum *= problem.rootWeight[row] * problem.rootWeight[row];
    return toDouble(sum);
}

void fillResiduals(LinearSolution& solution, const LinearProblem& problem) {
    const std::size_t n = problem.size(), p = problem.terms;
    solution.residual = problem.ordinate;
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t k = 0; k < p; ++k)
            solution.residual[i] -= problem.design[k * n + i] * solution.beta[k];
        const DoubleDouble scaled =
            problem.rootWeight.empty() ? solution.residual[i] : solution.residual[i] * problem.rootWeight[i];
        solution.residualSs += scaled * scaled;
    }
}

} // namespace

LinearSolution solveLeastSquares(const LinearProblem& problem) {
    const std::size_t p = problem.terms;
    assert(problem.size() >= p && problem.design.size() == problem.size() * p);
    LinearSolution solution;
    const Triangle triangle = triangulate(problem);
    solution.lostTerms = triangle.lost;
    if (!solution.lostTerms.empty())
        return solution;
    solution.inverseRoot = invertUpper(triangle.r, p);
    solution.beta.assign(p, 0.0);
    for (std::size_t i = 0; i < p; ++i)
        for (std::size_t j = i; j < p; ++j)
            solution.beta[i] += solution.inverseRoot[i * p + j] * triangle.qty[j];
    fillResiduals(solution, problem);
    solution.leverage.resize(problem.size());
    for (std::size_t i = 0; i < problem.size(); ++i)
        solution.leverage[i] = leverageOf(problem, solution.inverseRoot, i);
    return solution;
}

std::vector<DoubleDouble> unscaledCovariance(const std::vector<DoubleDouble>& inverseRoot, std::size_t terms) {
    std::vector<DoubleDouble> covariance(terms * terms, 0.0);
    for (std::size_t i = 0; i < terms; ++i)
        for (std::size_t j = 0; j < terms; ++j)
            for (std::size_t k = std::max(i, j); k < terms; ++k)
                covariance[i * terms + j] += inverseRoot[i * terms + k] * inverseRoot[j * terms + k];
    return covariance;
}

} // namespace spanwright
