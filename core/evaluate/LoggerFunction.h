// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Choices.h"

#include <optional>
#include <vector>

namespace spanwright {

/// What a calibration function needs besides its coefficients.
struct LoggerConstants {
    double zeroCelsius = 0;  ///< 0 °C in the unit of the temperature
    double slopeSign = 1;    ///< of the function in its range: +1 rising, −1 falling
    std::optional<double> centre; ///< of polynomials: they are in powers of x − centre
};

/// A calibration function as a data logger computes it in double precision from numbers as printed: what stands in the C text, step by
/// step. Numbers by family: powers in rising order (from x¹ without a constant; from (x − centre)⁰ with a centre); of a table x1, y1, x2,
/// y2, …; of Nernst E0 and the slope in the unit of the indication; else as in core/fit/CalibrationFunction.
class LoggerFunction {
  public:
    LoggerFunction(const FunctionChoice& function, const LoggerConstants& constants, std::vector<double> numbers)
        : function_(function), constants_(constants), numbers_(std::move(numbers)) {}

    [[nodiscard]] double value(double x) const;
    /// The abscissa of an ordinate by a closed form; for a function that only rises or only falls in its range.
    [[nodiscard]] double inverse(double y) const;
    /// The same by halving a range, for every function that only rises or only falls in it.
    [[nodiscard]] double halvedInverse(double y, double low, double high) const;
    /// Whether there is a closed form: not for polynomials beyond degree 2, Callendar and Van Dusen's function below 0 °C, Steinhart and Hart's.
    [[nodiscard]] bool hasClosedInverse() const;

    [[nodiscard]] const FunctionChoice& function() const { return function_; }
    [[nodiscard]] const LoggerConstants& constants() const { return constants_; }
    [[nodiscard]] const std::vector<double>& numbers() const { return numbers_; }
    /// Whether the first power of a polynomial is x¹.
    [[nodiscard]] bool withoutConstant() const;
    /// Whether the root of a quadratic is taken as 2(y − b0)/(b1 ± √D) rather than (−b1 ± √D)/(2 b2): the one that loses no digits.
    [[nodiscard]] bool rationalRoot() const;

  private:
    [[nodiscard]] double polynomial(double x) const;
    [[nodiscard]] double polynomialInverse(double y) const;
    [[nodiscard]] double table(double from, std::size_t known, std::size_t wanted) const;

    FunctionChoice function_;
    LoggerConstants constants_;
    std::vector<double> numbers_;
};

/// Whether the family is written in powers of the abscissa.
bool isPolynomial(FunctionFamily family);

} // namespace spanwright
