// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Autocorrelation.h"

#include "core/base/ClassSums.h"
#include "core/diagnose/Orthonormal.h"
#include "core/diagnose/ResidualColumn.h"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace spanwright {
namespace {

template <class T>
std::optional<double> lagOne(std::span<const T> u) {
    if (u.size() < 2)
        return std::nullopt;
    T sum(0.0);
    for (const T& value : u)
        sum += value;
    const T mean = sum / static_cast<double>(u.size());
    T products(0.0), squares(0.0), before(0.0);
    for (std::size_t i = 0; i < u.size(); ++i) {
        const T here = u[i] - mean;
        squares += here * here;
        if (i > 0)
            products += before * here;
        before = here;
    }
    if (!(rounded(squares) > 0))
        return std::nullopt;
    return rounded(T(products / squares));
}

template <class T>
std::optional<double> watson(std::span<const T> u) {
    if (u.size() < 2)
        return std::nullopt;
    T steps(0.0), squares(u[0] * u[0]);
    for (std::size_t i = 1; i < u.size(); ++i) {
        const T step = u[i] - u[i - 1];
        steps += step * step;
        squares += u[i] * u[i];
    }
    if (!(rounded(squares) > 0))
        return std::nullopt;
    return rounded(T(steps / squares));
}

/// Complex arithmetic without the library's care for infinities, which costs more than the arithmetic.
struct Complex {
    double re = 0, im = 0;
};
Complex operator*(const Complex& a, const Complex& b) {
    return {a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re};
}
Complex operator-(const Complex& a, const Complex& b) {
    return {a.re - b.re, a.im - b.im};
}
Complex inverse(const Complex& a) {
    const double norm = 1 / (a.re * a.re + a.im * a.im);
    return {a.re * norm, -a.im * norm};
}

/// Logarithm of a product of factors in the right half plane, with the argument followed beyond π.
class LogProduct {
  public:
    void multiply(const Complex& factor) {
        const Complex next = product_ * factor;
        if (next.re < 0 && product_.im > 0 && next.im <= 0)
            ++turns_;
        else if (next.re < 0 && product_.im < 0 && next.im >= 0)
            --turns_;
        product_ = next;
        if (++count_ % 16 == 0) {
            const double size = std::hypot(product_.re, product_.im);
            logSize_ += std::log(size);
            product_ = {product_.re / size, product_.im / size};
        }
    }
    [[nodiscard]] double logSize() const { return logSize_ + std::log(std::hypot(product_.re, product_.im)); }
    [[nodiscard]] double argument() const {
        return std::atan2(product_.im, product_.re) + 2 * std::numbers::pi * turns_;
    }

  private:
    Complex product_{1, 0};
    double logSize_ = 0;
    int turns_ = 0;
    int count_ = 0;
};

/// Orthonormal columns, row by row.
struct Rows {
    std::size_t rows = 0, terms = 0;
    std::vector<double> byRow;
};

Rows orthonormalRows(const std::vector<std::vector<double>>& columns) {
    const std::vector<std::vector<double>> q = orthonormal(columns);
    Rows result;
    result.terms = q.size();
    result.rows = columns.empty() ? 0 : columns.front().size();
    result.byRow.resize(result.rows * result.terms);
    for (std::size_t j = 0; j < q.size(); ++j)
        for (std::size_t i = 0; i < result.rows; ++i)
            result.byRow[i * result.terms + j] = q[j][i];
    return result;
}

/// Im φ(t) and |φ(t)| of Q = u'(A − d)u with u normal in the complement of the columns, where u'Au is the sum of
/// squared steps.
class QuadraticForm {
  public:
    QuadraticForm(double observed, Rows q) : d_(observed), q_(std::move(q)), last_(q_.terms), next_(q_.terms) {}

    struct Value {
        double imaginary = 0, size = 0;
    };

    Value at(double t) {
        const std::size_t n = q_.rows, p = q_.terms;
        LogProduct determinant;
        const Complex off{0, 2 * t};
        std::vector<Complex> gram(p * p);
        // C = I − 2it(A − d) = L D Lᵀ, tridiagonal; G = Qᵀ C⁻¹ Q = (L⁻¹Q)ᵀ D⁻¹ (L⁻¹Q), summed on the way down.
        Complex inversePivot{0, 0};
        for (std::size_t i = 0; i < n; ++i) {
            Complex pivot{1, -2 * t * ((i == 0 || i + 1 == n ? 1.0 : 2.0) - d_)};
            Complex factor{0, 0};
            if (i > 0) {
                factor = off * inversePivot;
                pivot = pivot - factor * off;
            }
            determinant.multiply(pivot);
            inversePivot = inverse(pivot);
            for (std::size_t j = 0; j < p; ++j) {
                Complex value{q_.byRow[i * p + j], 0};
                if (i > 0)
                    value = value - factor * last_[j];
                next_[j] = value;
            }
            for (std::size_t j = 0; j < p; ++j) {
                last_[j] = next_[j];
                const Complex scaled = next_[j] * inversePivot;
                for (std::size_t k = 0; k <= j; ++k) {
                    const Complex add = scaled * next_[k];
                    gram[j * p + k].re += add.re;
                    gram[j * p + k].im += add.im;
                }
            }
        }
        for (std::size_t j = 0; j < p; ++j) {
            determinant.multiply(gram[j * p + j]);
            const Complex by = inverse(gram[j * p + j]);
            for (std::size_t i = j + 1; i < p; ++i) {
                const Complex factor = gram[i * p + j] * by;
                for (std::size_t k = j + 1; k <= i; ++k)
                    gram[i * p + k] = gram[i * p + k] - factor * gram[k * p + j];
            }
        }
        const double size = std::exp(-determinant.logSize() / 2);
        return {size * std::sin(-determinant.argument() / 2), size};
    }

  private:
    double d_;
    Rows q_;
    std::vector<Complex> last_, next_;
};

struct Moments {
    double mean = 0, variance = 0;
};

/// Exact mean and variance of d (Durbin and Watson, Biometrika 38 (1951) 159).
Moments momentsOf(const Rows& q, std::size_t n) {
    const std::size_t p = q.terms;
    std::vector<double> aq(n * p);
    const auto at = [&](std::size_t i, std::size_t j) { return q.byRow[i * p + j]; };
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t j = 0; j < p; ++j)
            aq[i * p + j] = (i > 0 ? at(i, j) - at(i - 1, j) : 0) + (i + 1 < n ? at(i, j) - at(i + 1, j) : 0);
    double first = 0, second = 0, square = 0;
    for (std::size_t j = 0; j < p; ++j)
        for (std::size_t k = 0; k < p; ++k) {
            double qaq = 0;
            for (std::size_t i = 0; i < n; ++i) {
                qaq += at(i, j) * aq[i * p + k];
                if (j == k)
                    second += aq[i * p + j] * aq[i * p + j];
            }
            square += qaq * qaq;
            first += j == k ? qaq : 0;
        }
    const double size = static_cast<double>(n), freedom = size - static_cast<double>(p);
    const double trace = 2 * (size - 1) - first;
    const double traceOfSquare = 6 * size - 8 - 2 * second + square;
    const double mean = trace / freedom;
    return {mean, 2 * (traceOfSquare - trace * mean) / (freedom * (freedom + 2))};
}

} // namespace

SerialStatistics serialStatistics(std::span<const double> u) {
    const double n = static_cast<double>(u.size());
    if (u.size() < 2)
        return {};
    const auto [rest, restSquares, products, steps] =
        sumInHalves<4>(u.size() - 1, [column = u.data()](auto i) {
            const auto before = at(column, i), here = at(column, i + 1), step = here - before;
            return std::array{here, here * here, here * before, step * step};
        });
    const double sum = u[0] + rest, squares = u[0] * u[0] + restSquares;
    const double mean = sum / n, centred = squares - n * mean * mean;
    if (!(centred > 0))
        return {};
    const double lagged = products - mean * (2 * sum - u.front() - u.back()) + (n - 1) * mean * mean;
    return {lagged / centred, steps / squares};
}

std::optional<double> lagOneAutocorrelation(std::span<const double> u) {
    return lagOne(u);
}
std::optional<double> lagOneAutocorrelation(std::span<const DoubleDouble> u) {
    return lagOne(u);
}
std::optional<double> durbinWatson(std::span<const double> u) {
    return watson(u);
}
std::optional<double> durbinWatson(std::span<const DoubleDouble> u) {
    return watson(u);
}

double durbinWatsonBelow(double observed, const std::vector<std::vector<double>>& columns) {
    Rows q = orthonormalRows(columns);
    const double n = static_cast<double>(q.rows);
    QuadraticForm form(observed, std::move(q));
    // t = τ exp(s − e^{−s}), dt/t = (1 + e^{−s}) ds: both ends fall off fast enough for equal steps in s.
    const double scale = 0.25 / std::sqrt(n);
    const auto integrand = [&](double s, double& size) {
        const double fall = std::exp(-s);
        const auto value = form.at(scale * std::exp(s - fall));
        size = value.size;
        return value.imaginary * (1 + fall);
    };
    constexpr double left = -3.6;
    double step = 0.4, sum = 0, right = left, size = 1;
    for (; size > 1e-15 && right < 80; right += step)
        sum += integrand(right, size);
    double integral = sum * step;
    for (int halving = 0; halving < 8; ++halving) {
        for (double s = left + step / 2; s < right; s += step)
            sum += integrand(s, size);
        step /= 2;
        const double finer = sum * step;
        const double change = std::abs(finer - integral);
        integral = finer;
        if (change < 1e-9)
            break;
    }
    return std::clamp(0.5 - integral / std::numbers::pi, 0.0, 1.0);
}

double durbinWatsonBelowNormal(double observed, const std::vector<std::vector<double>>& columns, std::size_t n) {
    const Moments moments = momentsOf(orthonormalRows(columns), n);
    return 0.5 * std::erfc(-(observed - moments.mean) / std::sqrt(2 * moments.variance));
}

} // namespace spanwright
