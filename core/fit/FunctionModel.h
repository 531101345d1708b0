// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/DoubleDouble.h"
#include "core/base/Result.h"
#include "core/fit/Sample.h"
#include "core/record/Choices.h"

#include <memory>
#include <string>
#include <vector>

namespace spanwright {

/// Coefficients as they are reported, as a function of the β that was fitted, and J = ∂reported/∂β (p × p, row by row).
struct ReportedCoefficients {
    std::vector<DoubleDouble> value;
    std::vector<DoubleDouble> jacobian;
};

/// A family of functions f(x; β) in the basis in which it is fitted: abscissa x and ordinate in the user's units.
class FunctionModel {
  public:
    virtual ~FunctionModel() = default;
    [[nodiscard]] virtual std::size_t terms() const = 0;
    /// Whether f is linear in β: then f = gradient · β.
    [[nodiscard]] virtual bool linear() const { return true; }
    /// Whether a constant lies in the family, so that the total is taken about the mean.
    [[nodiscard]] virtual bool hasConstant() const { return true; }
    [[nodiscard]] virtual bool defined(double x) const { return x == x; }
    /// Whether the transform on which a fit starts exists for this ordinate.
    [[nodiscard]] virtual bool ordinateDefined(double) const { return true; }
    /// ∂f/∂β.
    [[nodiscard]] virtual std::vector<DoubleDouble> gradient(const DoubleDouble& x,
                                                             const std::vector<DoubleDouble>& beta) const = 0;
    [[nodiscard]] virtual std::vector<double> gradient(double x, const std::vector<double>& beta) const = 0;
    [[nodiscard]] virtual DoubleDouble value(const DoubleDouble& x, const std::vector<DoubleDouble>& beta) const = 0;
    [[nodiscard]] virtual double value(double x, const std::vector<double>& beta) const = 0;
    [[nodiscard]] virtual double derivative(double x, const std::vector<double>& beta) const = 0;
    /// Abscissae between which a function made of pieces is straight, in rising order; empty for all others.
    [[nodiscard]] virtual std::vector<double> knots() const { return {}; }
    /// β from which a non-linear fit starts. Error: OutsideDomain, RankLost.
    [[nodiscard]] virtual Result<std::vector<DoubleDouble>> start(const PairColumn& x, const PairColumn& y) const;
    [[nodiscard]] virtual ReportedCoefficients reported(const std::vector<DoubleDouble>& beta) const;
};

/// What a model is made for: the readings' abscissae and the units of both quantities.
struct ModelContext {
    double low = 0, high = 0; ///< range of the abscissae
    const Sample* sample = nullptr;
    FitDirection direction = FitDirection::Indication; ///< which quantity is the ordinate
};

/// Error: FunctionUnknown where a family cannot be made for these readings.
Result<std::unique_ptr<FunctionModel>> makeModel(const FunctionChoice& choice, const ModelContext& context);

} // namespace spanwright
