// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/ModelOf.h"

#include <cmath>
#include <numbers>

namespace spanwright {

/// y = b0 + b1 φ(x) for a fixed transform φ.
enum class Transform {
    SquareRoot, ///< φ = √x, x ≥ 0: differential-pressure flow, ISO 5167-1:2022, 5.1
    Logarithm,  ///< φ = lg x, x > 0: ion-selective electrodes, light, sound level
    Nernst,     ///< φ = 7 − x with x = pH: E = E0 − k (pH − 7), IUPAC 2002, Pure Appl. Chem. 74, 2169
};

class TransformedLine final : public ModelOf<TransformedLine> {
  public:
    /// `theoreticalSlope`: with Nernst, ln(10)·RT/F at 25 °C in the unit of the ordinate, of which the slope is
    /// reported in percent.
    explicit TransformedLine(Transform transform, double theoreticalSlope = 1.0);

    [[nodiscard]] std::size_t terms() const override { return 2; }
    [[nodiscard]] bool defined(double x) const override;
    [[nodiscard]] ReportedCoefficients reported(const std::vector<DoubleDouble>& beta) const override;

    template <class T>
    [[nodiscard]] std::vector<T> gradientOf(const T& x, const std::vector<T>&) const {
        return {T(1.0), phi(x)};
    }
    template <class T>
    [[nodiscard]] T valueOf(const T& x, const std::vector<T>& beta) const {
        return beta[0] + beta[1] * phi(x);
    }
    [[nodiscard]] double derivativeOf(double x, const std::vector<double>& beta) const;

  private:
    template <class T>
    [[nodiscard]] T phi(const T& x) const {
        using std::log10, std::sqrt;
        return transform_ == Transform::SquareRoot  ? sqrt(x)
               : transform_ == Transform::Logarithm ? log10(x)
                                                    : T(7.0 - x);
    }

    Transform transform_;
    double theoreticalSlope_;
};

/// Callendar and Van Dusen, IEC 60751:2022, 5.2: R = R0 (1 + A t + B t²) for t ≥ 0, and + R0 C (t − 100) t³ below.
/// Linear in R0, R0 A, R0 B, R0 C; without readings below 0 °C there is no C.
class CallendarVanDusen final : public ModelOf<CallendarVanDusen> {
  public:
    enum class Ranges { FromZeroUp, Both };
    /// `zeroCelsius`: 0 °C in the unit of the abscissa.
    CallendarVanDusen(Ranges ranges, double zeroCelsius) : ranges_(ranges), zeroCelsius_(zeroCelsius) {}

    [[nodiscard]] std::size_t terms() const override { return ranges_ == Ranges::Both ? 4 : 3; }
    [[nodiscard]] bool defined(double x) const override;
    [[nodiscard]] ReportedCoefficients reported(const std::vector<DoubleDouble>& beta) const override;

    template <class T>
    [[nodiscard]] std::vector<T> gradientOf(const T& x, const std::vector<T>&) const {
        const T t = x - zeroCelsius_;
        std::vector<T> basis{T(1.0), t, t * t};
        if (ranges_ == Ranges::Both)
            basis.push_back(t < 0.0 ? (t - 100.0) * t * t * t : T(0.0));
        return basis;
    }
    template <class T>
    [[nodiscard]] T valueOf(const T& x, const std::vector<T>& beta) const {
        const std::vector<T> basis = gradientOf<T>(x, beta);
        T sum = 0.0;
        for (std::size_t k = 0; k < basis.size(); ++k)
            sum += beta[k] * basis[k];
        return sum;
    }
    [[nodiscard]] double derivativeOf(double x, const std::vector<double>& beta) const;

  private:
    Ranges ranges_;
    double zeroCelsius_;
};

/// y = a x^b, x > 0, least squares in the user's unit: metal-oxide gas sensors, photoresistors. Fitted as c (x/x0)^b
/// with x0 the geometric middle of the range.
class PowerLaw final : public ModelOf<PowerLaw> {
  public:
    PowerLaw(double low, double high) : middle_(std::sqrt(low) * std::sqrt(high)) {}

    [[nodiscard]] std::size_t terms() const override { return 2; }
    [[nodiscard]] bool linear() const override { return false; }
    [[nodiscard]] bool defined(double x) const override { return x > 0; }
    [[nodiscard]] bool ordinateDefined(double y) const override { return y > 0; }
    [[nodiscard]] Result<std::vector<DoubleDouble>> start(const PairColumn& x, const PairColumn& y) const override;
    [[nodiscard]] ReportedCoefficients reported(const std::vector<DoubleDouble>& beta) const override;

    template <class T>
    [[nodiscard]] std::vector<T> gradientOf(const T& x, const std::vector<T>& beta) const {
        using std::exp, std::log;
        const T l = log(x / middle_), power = exp(beta[1] * l);
        return {power, beta[0] * power * l};
    }
    template <class T>
    [[nodiscard]] T valueOf(const T& x, const std::vector<T>& beta) const {
        using std::exp, std::log;
        return beta[0] * exp(beta[1] * log(x / middle_));
    }
    [[nodiscard]] double derivativeOf(double x, const std::vector<double>& beta) const;

  private:
    double middle_;
};

/// y = y∞ − A exp(−x/L): saturating optical and humidity sensors. Fitted in y∞, A exp(−x0/L) and 1/L with x0 the low
/// end.
class ExponentialApproach final : public ModelOf<ExponentialApproach> {
  public:
    ExponentialApproach(double low, double high) : low_(low), span_(high - low) {}

    [[nodiscard]] std::size_t terms() const override { return 3; }
    [[nodiscard]] bool linear() const override { return false; }
    [[nodiscard]] Result<std::vector<DoubleDouble>> start(const PairColumn& x, const PairColumn& y) const override;
    [[nodiscard]] ReportedCoefficients reported(const std::vector<DoubleDouble>& beta) const override;

    template <class T>
    [[nodiscard]] std::vector<T> gradientOf(const T& x, const std::vector<T>& beta) const {
        using std::exp;
        const T d = x - low_, decay = exp(-beta[2] * d);
        return {T(1.0), -decay, beta[1] * d * decay};
    }
    template <class T>
    [[nodiscard]] T valueOf(const T& x, const std::vector<T>& beta) const {
        using std::exp;
        return beta[0] - beta[1] * exp(-beta[2] * (x - low_));
    }
    [[nodiscard]] double derivativeOf(double x, const std::vector<double>& beta) const;

  private:
    double low_, span_;
};

/// R = R25 exp[B (1/T − 1/298.15 K)], T = t + 273.15: the B-parameter equation, IEC 60539-1:2022, 3.2. Least squares in
/// R.
class ThermistorB final : public ModelOf<ThermistorB> {
  public:
    /// `zeroCelsius`: 0 °C in the unit of the abscissa.
    explicit ThermistorB(double zeroCelsius) : toKelvin_(273.15 - zeroCelsius) {}

    [[nodiscard]] std::size_t terms() const override { return 2; }
    [[nodiscard]] bool linear() const override { return false; }
    [[nodiscard]] bool defined(double x) const override { return x + toKelvin_ > 0; }
    [[nodiscard]] bool ordinateDefined(double y) const override { return y > 0; }
    [[nodiscard]] Result<std::vector<DoubleDouble>> start(const PairColumn& x, const PairColumn& y) const override;

    template <class T>
    [[nodiscard]] std::vector<T> gradientOf(const T& x, const std::vector<T>& beta) const {
        using std::exp;
        const T r = reciprocal(x), factor = exp(beta[1] * r);
        return {factor, beta[0] * factor * r};
    }
    template <class T>
    [[nodiscard]] T valueOf(const T& x, const std::vector<T>& beta) const {
        using std::exp;
        return beta[0] * exp(beta[1] * reciprocal(x));
    }
    [[nodiscard]] double derivativeOf(double x, const std::vector<double>& beta) const;

  private:
    /// 1/T − 1/298.15 K
    template <class T>
    [[nodiscard]] T reciprocal(const T& x) const {
        return 1.0 / (x + toKelvin_) - 1.0 / T(298.15);
    }

    double toKelvin_;
};

} // namespace spanwright
