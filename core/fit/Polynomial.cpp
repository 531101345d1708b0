// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/Polynomial.h"

namespace spanwright {

PolynomialModel::PolynomialModel(std::size_t degree, PolynomialConstant constant, double low, double high)
    : PolynomialModel(degree, constant, DoubleDouble(low + (high - low) / 2),
                      DoubleDouble(high > low ? (high - low) / 2 : 1.0)) {}

PolynomialModel::PolynomialModel(std::size_t degree, PolynomialConstant constant, const DoubleDouble& centre,
                                 const DoubleDouble& half)
    : terms_(constant == PolynomialConstant::With ? degree + 1 : degree), constant_(constant), centre_(centre),
      half_(half) {}

double PolynomialModel::derivativeOf(double x, const std::vector<double>& beta) const {
    // d/dt Σ β_k T_k = Σ k β_k U_{k−1}
    const double t = scaled(x);
    double u = 1.0, before = 0.0, sum = 0.0;
    for (std::size_t k = 1; k < terms_; ++k) {
        sum += static_cast<double>(k) * beta[k] * u;
        const double next = 2.0 * t * u - before;
        before = u;
        u = next;
    }
    const double slope = sum / half_.x[0];
    return hasConstant() ? slope : chebyshevSum(t, beta) + x * slope;
}

ReportedCoefficients PolynomialModel::reported(const std::vector<DoubleDouble>& beta) const {
    const std::size_t p = terms_;
    // Row k of `power`: T_k(t(x)) in powers of x, by T_k = 2 t T_{k−1} − T_{k−2} with t = x/half − centre/half.
    const DoubleDouble scale = DoubleDouble(1.0) / half_;
    const DoubleDouble shift = -centre_ / half_;
    std::vector<DoubleDouble> power(p * p, 0.0);
    for (std::size_t k = 0; k < p; ++k) {
        if (k == 0) {
            power[0] = 1.0;
            continue;
        }
        const double twice = k == 1 ? 1.0 : 2.0;
        for (std::size_t j = 0; j < p; ++j) {
            DoubleDouble c = twice * shift * power[(k - 1) * p + j];
            if (j > 0)
                c += twice * scale * power[(k - 1) * p + j - 1];
            if (k > 1)
                c -= power[(k - 2) * p + j];
            power[k * p + j] = c;
        }
    }
    ReportedCoefficients reported{std::vector<DoubleDouble>(p, 0.0), std::vector<DoubleDouble>(p * p, 0.0)};
    for (std::size_t j = 0; j < p; ++j)
        for (std::size_t k = 0; k < p; ++k) {
            reported.jacobian[j * p + k] = power[k * p + j];
            reported.value[j] += power[k * p + j] * beta[k];
        }
    return reported;
}

} // namespace spanwright
