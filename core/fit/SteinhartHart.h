// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/ModelOf.h"

#include <cmath>

namespace spanwright {

/// Temperature of a thermistor from its resistance: 1/T = A + B ln R + C (ln R)³, with 2 terms A, B, with 4 also D (ln
/// R)² (Steinhart and Hart 1968, Deep-Sea Research 15, 497). Least squares in the temperature, not in 1/T. Fitted in
/// powers of δ = (ln R − m)/h about the middle m of the readings; the third term of three is h δ³ + 3 m δ², which spans
/// (ln R)³ with the first two.
class SteinhartHart final : public ModelOf<SteinhartHart> {
  public:
    /// `low`, `high`: range of the resistances; `zeroCelsius`: 0 °C in the unit of the ordinate.
    SteinhartHart(int terms, double low, double high, double zeroCelsius);

    [[nodiscard]] std::size_t terms() const override { return terms_; }
    [[nodiscard]] bool linear() const override { return false; }
    [[nodiscard]] bool defined(double x) const override { return x > 0; }
    [[nodiscard]] bool ordinateDefined(double y) const override { return y + toKelvin_ > 0; }
    [[nodiscard]] Result<std::vector<DoubleDouble>> start(const PairColumn& x, const PairColumn& y) const override;
    [[nodiscard]] ReportedCoefficients reported(const std::vector<DoubleDouble>& beta) const override;

    template <class T>
    [[nodiscard]] std::vector<T> gradientOf(const T& x, const std::vector<T>& beta) const {
        std::vector<T> row = basis(x);
        const T temperature = valueOf(x, beta) + toKelvin_;
        for (T& entry : row)
            entry *= -temperature * temperature;
        return row;
    }
    template <class T>
    [[nodiscard]] T valueOf(const T& x, const std::vector<T>& beta) const {
        const std::vector<T> row = basis(x);
        T reciprocal = 0.0;
        for (std::size_t k = 0; k < row.size(); ++k)
            reciprocal += beta[k] * row[k];
        return 1.0 / reciprocal - toKelvin_;
    }
    [[nodiscard]] double derivativeOf(double x, const std::vector<double>& beta) const;

  private:
    template <class T>
    [[nodiscard]] std::vector<T> basis(const T& x) const {
        using std::log;
        const T d = (log(x) - middle_) / half_;
        if (terms_ == 2)
            return {T(1.0), d};
        if (terms_ == 3)
            return {T(1.0), d, (half_ * d + 3.0 * middle_) * d * d};
        return {T(1.0), d, d * d, d * d * d};
    }

    std::size_t terms_;
    double middle_, half_, toKelvin_;
};

} // namespace spanwright
