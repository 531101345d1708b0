// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/SteinhartHart.h"

#include "core/fit/LeastSquares.h"

namespace spanwright {

SteinhartHart::SteinhartHart(int terms, double low, double high, double zeroCelsius)
    : terms_(static_cast<std::size_t>(terms)), middle_((std::log(low) + std::log(high)) / 2),
      half_(high > low ? (std::log(high) - std::log(low)) / 2 : 1.0), toKelvin_(273.15 - zeroCelsius) {}

Result<std::vector<DoubleDouble>> SteinhartHart::start(const PairColumn& x, const PairColumn& y) const {
    // 1/T is linear in β; an error of T is one of 1/T times T².
    const std::size_t n = x.size();
    LinearProblem problem{terms_, std::vector<DoubleDouble>(n * terms_), {}, {}};
    for (std::size_t i = 0; i < n; ++i) {
        const std::vector<DoubleDouble> row = basis(x[i]);
        for (std::size_t k = 0; k < terms_; ++k)
            problem.design[k * n + i] = row[k];
        const DoubleDouble temperature = y[i] + toKelvin_;
        problem.ordinate.push_back(1.0 / temperature);
        problem.rootWeight.push_back(sqr(temperature));
    }
    LinearSolution solution = solveLeastSquares(problem);
    if (!solution.lostTerms.empty())
        return Error(ErrorCode::RankLost, {{"terms", solution.lostTerms.front() == 1 ? "B" : "C"}});
    return std::move(solution.beta);
}

double SteinhartHart::derivativeOf(double x, const std::vector<double>& beta) const {
    const double d = (std::log(x) - middle_) / half_;
    const double t = valueOf(x, beta) + toKelvin_;
    double slope = beta[1];
    if (terms_ == 3)
        slope += beta[2] * d * (3 * half_ * d + 6 * middle_);
    if (terms_ == 4)
        slope += d * (2 * beta[2] + 3 * beta[3] * d);
    return -t * t * slope / (half_ * x);
}

ReportedCoefficients SteinhartHart::reported(const std::vector<DoubleDouble>& beta) const {
    const DoubleDouble m = middle_, h = half_;
    if (terms_ == 2)
        return {{beta[0] - beta[1] * m / h, beta[1] / h}, {1.0, -m / h, 0.0, 1.0 / h}};
    std::vector<DoubleDouble> jacobian;
    if (terms_ == 3)                                        // h δ³ + 3 m δ² = (L³ − 3 m² L + 2 m³)/h²
        jacobian = {1.0, -m / h,  2.0 * m * m * m / sqr(h), //
                    0.0, 1.0 / h, -3.0 * sqr(m) / sqr(h),   //
                    0.0, 0.0,     1.0 / sqr(h)};
    else // rows A, B, C (of L³), D (of L²)
        jacobian = {1.0,
                    -m / h,
                    sqr(m) / sqr(h),
                    -m * m * m / (h * h * h), //
                    0.0,
                    1.0 / h,
                    -2.0 * m / sqr(h),
                    3.0 * sqr(m) / (h * h * h), //
                    0.0,
                    0.0,
                    0.0,
                    1.0 / (h * h * h), //
                    0.0,
                    0.0,
                    1.0 / sqr(h),
                    -3.0 * m / (h * h * h)};
    ReportedCoefficients reported{std::vector<DoubleDouble>(terms_, 0.0), std::move(jacobian)};
    for (std::size_t i = 0; i < terms_; ++i)
        for (std::size_t k = 0; k < terms_; ++k)
            reported.value[i] += reported.jacobian[i * terms_ + k] * beta[k];
    return reported;
}

} // namespace spanwright
