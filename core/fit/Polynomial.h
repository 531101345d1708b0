// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/ModelOf.h"

namespace spanwright {

enum class PolynomialConstant { With, Without };

/// y = Σ c_k x^k, fitted in Chebyshev polynomials T_k(t), t = (x − centre)/half over the range of the readings, or in
/// x·T_k(t) without a constant. Reported as raw powers by a conversion in double-double, since it is there that digits
/// are lost. A line is degree 1, a constant degree 0, a proportional function degree 1 without a constant.
class PolynomialModel final : public ModelOf<PolynomialModel> {
  public:
    PolynomialModel(std::size_t degree, PolynomialConstant constant, double low, double high);
    /// With t = (x − centre)/half as given.
    PolynomialModel(std::size_t degree, PolynomialConstant constant, const DoubleDouble& centre,
                    const DoubleDouble& half);

    [[nodiscard]] std::size_t terms() const override { return terms_; }
    [[nodiscard]] bool hasConstant() const override { return constant_ == PolynomialConstant::With; }
    [[nodiscard]] ReportedCoefficients reported(const std::vector<DoubleDouble>& beta) const override;

    template <class T>
    [[nodiscard]] std::vector<T> gradientOf(const T& x, const std::vector<T>&) const {
        const T t = scaled(x);
        std::vector<T> basis(terms_);
        for (std::size_t k = 0; k < terms_; ++k)
            basis[k] = k == 0 ? T(1.0) : k == 1 ? t : 2.0 * t * basis[k - 1] - basis[k - 2];
        if (!hasConstant())
            for (T& b : basis)
                b *= x;
        return basis;
    }
    template <class T>
    [[nodiscard]] T valueOf(const T& x, const std::vector<T>& beta) const {
        const T sum = chebyshevSum<T>(scaled(x), beta);
        return hasConstant() ? sum : x * sum;
    }
    [[nodiscard]] double derivativeOf(double x, const std::vector<double>& beta) const;

  private:
    [[nodiscard]] DoubleDouble scaled(const DoubleDouble& x) const { return (x - centre_) / half_; }
    [[nodiscard]] double scaled(double x) const { return ((x - centre_.x[0]) - centre_.x[1]) / half_.x[0]; }
    /// Σ β_k T_k(t) by Clenshaw's recurrence.
    template <class T>
    [[nodiscard]] T chebyshevSum(const T& t, const std::vector<T>& beta) const {
        T next = 0.0, afterNext = 0.0;
        for (std::size_t k = terms_; k-- > 1;) {
            const T current = beta[k] + 2.0 * t * next - afterNext;
            afterNext = next;
            next = current;
        }
        return beta[0] + t * next - afterNext;
    }

    std::size_t terms_;
    PolynomialConstant constant_;
    DoubleDouble centre_, half_;
};

} // namespace spanwright
