// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Warning.h"
#include "core/record/Choices.h"

#include <memory>
#include <optional>
#include <string>
#include <vector>

namespace spanwright {

/// A fitted calibration function as something to evaluate, with the covariance of its coefficients inside. The abscissa
/// is the reference when the function gives the indication, and the indication when it gives the reference. All in the
/// user's units.
class FittedFunction {
  public:
    virtual ~FittedFunction() = default;
    [[nodiscard]] virtual double value(double x) const = 0;
    [[nodiscard]] virtual double derivative(double x) const = 0;
    /// u² of value(x) from the coefficients: vᵀ V v with v = ∂value/∂coefficients.
    [[nodiscard]] virtual double variance(double x) const = 0;
    /// ∂value/∂coefficients in the basis of the fit, for what asks which functions lie near; may be empty.
    [[nodiscard]] virtual std::vector<double> gradient(double) const { return {}; }
    /// Variance of one new reading at x about the function (σ²; with a variance function or weights it depends on x).
    [[nodiscard]] virtual double readingVariance(double x) const = 0;
    /// Abscissae between which a function made of pieces is straight, in rising order; empty for all others.
    [[nodiscard]] virtual std::vector<double> knots() const { return {}; }
};

struct Coefficient {
    std::string name;
    std::string unit;
    double value = 0;
    double standardUncertainty = 0; ///< NaN without degrees of freedom
    double low = 0, high = 0;       ///< interval at the chosen coverage
    double jointLow = 0, jointHigh = 0; ///< together with all others at that coverage (Bonferroni)
};

/// How an iterated fit ended; a linear one is reached in one step.
struct Convergence {
    bool reached = true;
    int iterations = 1;
    std::string reason; ///< "linear", "gradient", "rounding"; not reached: "iterations", "no-decrease"
};

/// A reading that a robust fit weighs down, with its weight below 1.
struct WeighedDown {
    std::size_t row = 0; ///< row in ReadingColumns
    double weight = 1;
};

/// A calibration function fitted to the readings of one phase that are not excluded.
struct Fit {
    FunctionChoice function;
    FitDirection direction = FitDirection::Indication;
    Method method = Method::LeastSquares;
    Weights weights = Weights::Equal;
    CovarianceScale covarianceScale = CovarianceScale::Residuals;
    SharedError sharedError = SharedError::Budget;
    bool correlated = false; ///< covariances between readings took part (ISO/TS 28037:2010, clauses 9 and 10)
    double coverage = 0.95;
    std::size_t used = 0, excluded = 0, setPoints = 0;
    std::vector<Coefficient> coefficients;
    std::vector<double> covariance;                       ///< p × p, row by row
    double residualSd = 0;                                ///< s = √(Σ w e² / ν); a pure number when weighted
    int degreesOfFreedom = 0;                             ///< ν = n − p
    double totalSs = 0, regressionSs = 0, residualSs = 0; ///< Σ w (…)², rounded from double-double; they add up
    int totalDf = 0,
        regressionDf = 0; ///< total is about the mean (n − 1), or about zero (n) for a function without a constant
    std::optional<double> rSquared;                ///< regression over total; empty when total is 0
    std::optional<double> chiSquared, chiSquaredP; ///< with stated uncertainties
    double coverageFactor = 0; ///< quantile that multiplies a standard uncertainty of the fit for `coverage`
    double jointFactor = 0;    ///< the same for all coefficients together: quantile at (1 − coverage)/p (Bonferroni)
    double low = 0, high = 0;  ///< calibrated range of the abscissa, over the readings used
    std::shared_ptr<const FittedFunction> curve; ///< never null in a Fit that was made
    Convergence convergence;
    std::vector<WeighedDown> weighedDown; ///< by a robust fit, in the order taken
    std::vector<Warning> warnings;

    [[nodiscard]] std::size_t terms() const { return coefficients.size(); }
};

} // namespace spanwright
