// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Linearity.h"

#include "core/base/LaneSums.h"
#include "core/diagnose/ResidualColumn.h"
#include "core/fit/Quantiles.h"

namespace spanwright {
namespace {

template <class T>
T numberOf(const PairColumn& column, std::size_t i) {
    if constexpr (std::is_same_v<T, double>)
        return column.high[i];
    else
        return column[i];
}

/// F from what the quadratic takes and what it leaves; empty where it leaves nothing.
template <class T>
std::optional<TestResult> result(const T& gain, const T& rest, std::size_t n) {
    if (!(rounded(rest) > 1e-12 * rounded(gain)) || !(rounded(rest) > 0))
        return std::nullopt;
    TestResult result;
    const int freedom = static_cast<int>(n) - 3;
    result.df = freedom;
    result.statistic = rounded(T(gain / rest)) * freedom;
    result.p = fAbove(result.statistic, 1, freedom);
    return result;
}

/// Sums over orthogonal polynomials 1, φ₁ = x − x̄, φ₂ = φ₁² − b φ₁ − c under the weights (Forsythe, J. SIAM 5 (1957)
/// 74).
template <class T>
std::optional<TestResult> test(const Sample& sample, const PairColumn& weight) {
    const std::size_t n = sample.size();
    const auto w = [&](std::size_t i) { return weight.empty() ? T(1.0) : numberOf<T>(weight, i); };
    T sumW(0.0), sumX(0.0), sumY(0.0);
    for (std::size_t i = 0; i < n; ++i) {
        sumW += w(i);
        sumX += w(i) * numberOf<T>(sample.reference, i);
        sumY += w(i) * numberOf<T>(sample.indication, i);
    }
    const T meanX = sumX / sumW, meanY = sumY / sumW;
    T second(0.0), third(0.0), xy(0.0);
    for (std::size_t i = 0; i < n; ++i) {
        const T x = numberOf<T>(sample.reference, i) - meanX;
        const T wx = w(i) * x;
        second += wx * x;
        third += wx * x * x;
        xy += wx * (numberOf<T>(sample.indication, i) - meanY);
    }
    if (!(rounded(second) > 0))
        return std::nullopt;
    const T slope = xy / second, b = third / second, c = second / sumW;
    T line(0.0), squares(0.0), product(0.0);
    for (std::size_t i = 0; i < n; ++i) {
        const T x = numberOf<T>(sample.reference, i) - meanX;
        const T e = numberOf<T>(sample.indication, i) - meanY - slope * x;
        const T q = x * x - b * x - c;
        line += w(i) * e * e;
        squares += w(i) * q * q;
        product += w(i) * q * e;
    }
    if (!(rounded(squares) > 1e-20 * rounded(T(second * second / sumW))))
        return std::nullopt;
    const T gain = product * product / squares;
    return result(gain, T(line - gain), n);
}

/// Of very many readings through which the line was fitted: what the quadratic takes from its residuals.
std::optional<TestResult> testOfLine(const Sample& sample, const Residuals& residuals, const Fit& fit) {
    const std::vector<double>& x = sample.reference.high;
    const std::vector<double>& e = residuals.e.high;
    const double middle = (fit.low + fit.high) / 2, scale = 2 / (fit.high - fit.low), n = static_cast<double>(x.size());
    // Separately: seven sums at once are more than a processor holds.
    const auto [t1, t2, t3, t4] = laneSums<4>(0, x.size(), [&, xs = x.data()](auto i) {
        const auto t = (at(xs, i) - middle) * scale, square = t * t;
        return std::array{t, square, t * square, square * square};
    });
    const auto [e0, e1, e2] = laneSums<3>(0, x.size(), [&, xs = x.data(), es = e.data()](auto i) {
        const auto t = (at(xs, i) - middle) * scale, here = at(es, i);
        return std::array{here, t * here, t * t * here};
    });
    // About the means: of t², what t does not explain; e has neither a mean nor a slope but for rounding.
    const double second = t2 - t1 * (t1 / n), third = t3 - t1 * (t2 / n), fourth = t4 - t2 * (t2 / n);
    if (!(second > 0))
        return std::nullopt;
    const double squares = fourth - third * (third / second);
    const double product = e2 - t2 / n * e0 - third / second * (e1 - t1 / n * e0);
    if (!(squares > 1e-12 * fourth))
        return std::nullopt;
    const double gain = product * (product / squares);
    return result(gain, fit.residualSs - gain, x.size());
}

} // namespace

std::optional<TestResult> linearityTest(const Sample& sample, const Residuals& residuals, const Fit& fit) {
    if (sample.size() < 4 || sample.reference.size() != sample.size())
        return std::nullopt;
    const bool doubles = sample.reference.low.empty() && sample.indication.low.empty();
    if (doubles && residuals.weight.empty() && fit.function.family == FunctionFamily::Line &&
        fit.direction == FitDirection::Indication && fit.method == Method::LeastSquares)
        return testOfLine(sample, residuals, fit);
    return doubles ? test<double>(sample, residuals.weight) : test<DoubleDouble>(sample, residuals.weight);
}

} // namespace spanwright
