// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/StreamedFit.h"

#include "core/base/Parallel.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

/// Share of a diagonal entry below which a pivot of the normal equations is made of lost digits.
constexpr double PivotBelow = 1e-8;

/// The basis of the fit in T_0…T_D, row by row: the identity, or x·T_k = centre·T_k + half·(T_{k+1} + T_{|k−1|})/2.
std::vector<DoubleDouble> basisInChebyshev(const StreamMap& map, int degree, StreamedConstant constant) {
    const auto width = static_cast<std::size_t>(degree) + 1;
    const std::size_t p = constant == StreamedConstant::With ? width : width - 1;
    std::vector<DoubleDouble> basis(p * width, 0.0);
    for (std::size_t k = 0; k < p; ++k) {
        if (constant == StreamedConstant::With) {
            basis[k * width + k] = 1.0;
            continue;
        }
        basis[k * width + k] += map.centre();
        basis[k * width + k + 1] += map.half() * 0.5;
        basis[k * width + (k > 0 ? k - 1 : 1)] += map.half() * 0.5;
    }
    return basis;
}

/// Σ φ φᵀ in the basis of the fit.
std::vector<DoubleDouble> gramOf(const StreamSums& sums, const std::vector<DoubleDouble>& basis, std::size_t p) {
    const auto width = static_cast<std::size_t>(sums.degree) + 1;
    std::vector<DoubleDouble> gram(p * p, 0.0);
    for (std::size_t a = 0; a < p; ++a)
        for (std::size_t b = 0; b < p; ++b)
            for (std::size_t j = 0; j < width; ++j) {
                if (basis[a * width + j].x[0] == 0) // mostly the identity
                    continue;
                for (std::size_t k = 0; k < width; ++k)
                    if (basis[b * width + k].x[0] != 0)
                        gram[a * p + b] += basis[a * width + j] * basis[b * width + k] * productSum(sums, j, k);
            }
    return gram;
}

std::vector<DoubleDouble> inBasis(const std::vector<DoubleDouble>& basis, const std::vector<DoubleDouble>& cross,
                                  std::size_t p) {
    const std::size_t width = cross.size();
    std::vector<DoubleDouble> result(p, 0.0);
    for (std::size_t a = 0; a < p; ++a)
        for (std::size_t j = 0; j < width; ++j)
            result[a] += basis[a * width + j] * cross[j];
    return result;
}

/// R⁻¹ with G = RᵀR; empty when a pivot is lost.
std::optional<std::vector<DoubleDouble>> inverseCholesky(const std::vector<DoubleDouble>& gram, std::size_t p) {
    std::vector<DoubleDouble> r(p * p, 0.0), inverse(p * p, 0.0);
    for (std::size_t j = 0; j < p; ++j) {
        for (std::size_t i = 0; i <= j; ++i) {
            DoubleDouble sum = gram[i * p + j];
            for (std::size_t k = 0; k < i; ++k)
                sum -= r[k * p + i] * r[k * p + j];
            if (i < j)
                r[i * p + j] = sum / r[i * p + i];
            else if (sum > gram[j * p + j] * PivotBelow)
                r[j * p + j] = sqrt(sum);
            else
                return std::nullopt;
        }
    }
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

/// G⁻¹ b = R⁻¹ R⁻ᵀ b
std::vector<DoubleDouble> solved(const std::vector<DoubleDouble>& inverse, const std::vector<DoubleDouble>& b) {
    const std::size_t p = b.size();
    std::vector<DoubleDouble> half(p, 0.0), x(p, 0.0);
    for (std::size_t j = 0; j < p; ++j)
        for (std::size_t k = 0; k <= j; ++k)
            half[j] += inverse[k * p + j] * b[k];
    for (std::size_t i = 0; i < p; ++i)
        for (std::size_t j = i; j < p; ++j)
            x[i] += inverse[i * p + j] * half[j];
    return x;
}

DoubleDouble product(const std::vector<DoubleDouble>& a, const std::vector<DoubleDouble>& b) {
    DoubleDouble sum = 0.0;
    for (std::size_t k = 0; k < a.size(); ++k)
        sum += a[k] * b[k];
    return sum;
}

/// Coefficients of T_0…T_D of the ordinate counted from offset().
std::vector<DoubleDouble> chebyshevOf(const StreamedFit& fit, const std::vector<DoubleDouble>& beta) {
    const auto basis = basisInChebyshev(fit.sums.map, fit.sums.degree, fit.constant);
    const auto width = static_cast<std::size_t>(fit.sums.degree) + 1;
    std::vector<DoubleDouble> c(width, 0.0);
    for (std::size_t a = 0; a < beta.size(); ++a)
        for (std::size_t j = 0; j < width; ++j)
            c[j] += beta[a] * basis[a * width + j];
    c[0] -= fit.sums.map.offset();
    return c;
}

/// Total about the mean, or about zero, from the sums.
DoubleDouble totalOf(const StreamSums& sums, StreamedConstant constant) {
    const auto n = static_cast<double>(sums.n);
    if (constant == StreamedConstant::With)
        return sums.square - sqr(sums.cross[0]) / n;
    const DoubleDouble y0 = sums.map.offset();
    return sums.square + 2.0 * y0 * sums.cross[0] + n * y0 * y0;
}

/// Σ φ y in the basis of the fit, y counted from zero.
std::vector<DoubleDouble> rightSide(const StreamSums& sums, const std::vector<DoubleDouble>& basis, std::size_t p) {
    std::vector<DoubleDouble> cross = sums.cross;
    for (std::size_t j = 0; j < cross.size(); ++j)
        cross[j] += sums.map.offset() * sums.moment[j];
    return inBasis(basis, cross, p);
}

/// One step of refinement with residuals of the rounded coefficients, and Σe² of the refined ones.
void refine(StreamedFit& fit, const GridColumn& x, const GridColumn& y, unsigned threads) {
    const auto d = static_cast<std::size_t>(fit.sums.degree);
    const auto basis = basisInChebyshev(fit.sums.map, fit.sums.degree, fit.constant);
    const std::vector<DoubleDouble> exact = chebyshevOf(fit, fit.beta);
    std::vector<double> c;
    std::vector<DoubleDouble> lost;
    for (const DoubleDouble& value : exact) {
        c.push_back(toDouble(value));
        lost.push_back(value - c.back());
    }
    const auto kernel = streamKernel().residuals[d];
    const auto sums = streamedSums(
        fit.sums.map, x, y, d + 2,
        [&](const StreamBlock& block, double* out, std::size_t) { kernel(block, c.data(), out); }, threads);
    // Residuals of β itself differ from those of the rounded c by Σ lost_j T_j: carried through the moments.
    std::vector<DoubleDouble> gradient(sums.begin(), sums.begin() + static_cast<std::ptrdiff_t>(d + 1));
    DoubleDouble square = sums.back();
    for (std::size_t j = 0; j <= d; ++j)
        square -= 2.0 * lost[j] * gradient[j];
    for (std::size_t j = 0; j <= d; ++j)
        for (std::size_t k = 0; k <= d; ++k) {
            const DoubleDouble moment = productSum(fit.sums, j, k);
            gradient[j] -= moment * lost[k];
            square += lost[j] * lost[k] * moment;
        }
    const std::vector<DoubleDouble> right = inBasis(basis, gradient, fit.terms());
    const std::vector<DoubleDouble> step = solved(fit.inverseRoot, right);
    for (std::size_t k = 0; k < step.size(); ++k)
        fit.beta[k] += step[k];
    fit.residualSs = square - product(step, right);
}

} // namespace

std::optional<StreamedFit> fitStreamed(const GridColumn& x, const GridColumn& y, int degree, StreamedConstant constant,
                                       unsigned threads) {
    if (degree > MostStreamedDegree || x.grid.size() < 2 || x.grid.size() != y.grid.size())
        return std::nullopt;
    auto sums = gatherSums(x, y, degree, threads);
    if (!sums)
        return std::nullopt;
    StreamedFit fit;
    fit.sums = std::move(*sums);
    fit.constant = constant;
    const auto basis = basisInChebyshev(fit.sums.map, degree, constant);
    const std::size_t p = static_cast<std::size_t>(degree) + (constant == StreamedConstant::With ? 1 : 0);
    auto inverse = inverseCholesky(gramOf(fit.sums, basis, p), p);
    if (!inverse)
        return std::nullopt;
    fit.inverseRoot = std::move(*inverse);
    fit.beta = solved(fit.inverseRoot, rightSide(fit.sums, basis, p));
    fit.totalSs = totalOf(fit.sums, constant);
    refine(fit, x, y, threads);
    return fit;
}

StreamedRows streamedRows(const StreamedFit& fit, const GridColumn& x, const GridColumn& y, unsigned threads) {
    const std::size_t n = x.grid.size(), p = fit.terms();
    const auto d = static_cast<std::size_t>(fit.sums.degree), width = d + 1;
    std::vector<double> c, h(2 * d + 1, 0.0);
    for (const DoubleDouble& value : chebyshevOf(fit, fit.beta))
        c.push_back(toDouble(value));
    // h(t) = ‖R⁻ᵀ φ‖²: products of T_j T_k = (T_{j+k} + T_{|j−k|})/2
    const auto basis = basisInChebyshev(fit.sums.map, fit.sums.degree, fit.constant);
    for (std::size_t a = 0; a < p; ++a) {
        std::vector<DoubleDouble> z(width, 0.0);
        for (std::size_t b = 0; b <= a; ++b)
            for (std::size_t j = 0; j < width; ++j)
                z[j] += fit.inverseRoot[b * p + a] * basis[b * width + j];
        for (std::size_t j = 0; j < width; ++j)
            for (std::size_t k = 0; k < width; ++k) {
                const double half = toDouble(z[j] * z[k]) / 2;
                h[j + k] += half;
                h[j > k ? j - k : k - j] += half;
            }
    }
    auto leverage = beside(n, [n] { return std::vector<double>(n); });
    StreamedRows rows{std::vector<double>(n), {}};
    rows.leverage = leverage.get();
    const auto kernel = streamKernel().elements[d];
    const auto part = [&](unsigned which) {
        const std::size_t share = (n / threads) & ~std::size_t{3};
        const std::size_t from = which * share, to = which + 1 == threads ? n : from + share,
                          whole = (to - from) & ~std::size_t{3};
        kernel(streamBlock(fit.sums.map, x.grid.data() + from, y.grid.data() + from, whole), c.data(), h.data(),
               rows.residual.data() + from, rows.leverage.data() + from);
        for (std::size_t i = from + whole; i < to; ++i) {
            const std::int64_t mx[4] = {x.grid[i], x.grid[i], x.grid[i], x.grid[i]},
                               my[4] = {y.grid[i], y.grid[i], y.grid[i], y.grid[i]};
            double e[4], l[4];
            kernel(streamBlock(fit.sums.map, mx, my, 4), c.data(), h.data(), e, l);
            rows.residual[i] = e[0];
            rows.leverage[i] = l[0];
        }
    };
    inParallel(threads, part);
    return rows;
}

std::optional<StreamedFit> changedBy(const StreamedFit& fit, StreamedChange change, std::int64_t x, std::int64_t y) {
    const double sign = change == StreamedChange::Exclude ? -1.0 : 1.0;
    const auto width = static_cast<std::size_t>(fit.sums.degree) + 1;
    const std::size_t p = fit.terms();
    StreamedFit changed = fit;
    const DoubleDouble t = toDoubleDouble(x - fit.sums.map.x0) * fit.sums.map.xStep, v = fit.sums.map.v(y);
    std::vector<DoubleDouble> chebyshev(2 * width - 1, 1.0);
    for (std::size_t j = 1; j < chebyshev.size(); ++j)
        chebyshev[j] = j == 1 ? t : 2.0 * t * chebyshev[j - 1] - chebyshev[j - 2];
    for (std::size_t j = 0; j < chebyshev.size(); ++j)
        changed.sums.moment[j] += sign * chebyshev[j];
    for (std::size_t j = 0; j < width; ++j)
        changed.sums.cross[j] += sign * chebyshev[j] * v;
    changed.sums.square += sign * v * v;
    if (change == StreamedChange::Include) {
        changed.sums.lowX = std::min(changed.sums.lowX, x);
        changed.sums.highX = std::max(changed.sums.highX, x);
    }
    changed.sums.n = change == StreamedChange::Exclude ? fit.sums.n - 1 : fit.sums.n + 1;

    const auto basis = basisInChebyshev(fit.sums.map, fit.sums.degree, fit.constant);
    auto inverse = inverseCholesky(gramOf(changed.sums, basis, p), p);
    if (!inverse)
        return std::nullopt;
    const std::vector<DoubleDouble> phi =
        inBasis(basis, {chebyshev.begin(), chebyshev.begin() + static_cast<std::ptrdiff_t>(width)}, p);
    const DoubleDouble e = v + fit.sums.map.offset() - product(fit.beta, phi);
    const std::vector<DoubleDouble> pull = solved(fit.inverseRoot, phi);
    const DoubleDouble share = e / (1.0 + sign * product(pull, phi));
    for (std::size_t k = 0; k < p; ++k)
        changed.beta[k] += sign * share * pull[k];
    changed.residualSs += sign * e * share;
    changed.inverseRoot = std::move(*inverse);
    changed.totalSs = totalOf(changed.sums, fit.constant);
    return changed;
}

} // namespace spanwright
