// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"
#include "core/record/ReadingColumns.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

enum class FunctionFamily {
    Constant,
    Line,
    Proportional,
    Polynomial,
    PolynomialNoConstant,
    SquareRoot,
    Logarithmic,
    Power,
    ExponentialApproach,
    CallendarVanDusen,
    ThermistorB,
    SteinhartHart,
    Nernst,
    Table,
};

/// A calibration function as chosen; `order` is the degree of a polynomial or the terms of Steinhart–Hart, else 0.
struct FunctionChoice {
    FunctionFamily family = FunctionFamily::Line;
    int order = 0;
    bool operator==(const FunctionChoice&) const = default;
};

/// "line", "polynomial:2", "steinhart-hart:3", … as on the command line, in figures and in session files.
std::string functionName(const FunctionChoice& choice);
/// Error: FunctionUnknown (facts: text).
Result<FunctionChoice> parseFunctionName(std::string_view text);

enum class FitDirection { Indication, Reference }; ///< which quantity the function gives
enum class Method { LeastSquares, BothUncertain, Robust };
enum class RobustWeight { Huber, Bisquare };
/// Equal; 1/u² from the stated uncertainties; from the spread at each set point; u ∝ |x|; u = c0 + c1 |x| from the replicates.
enum class Weights { Equal, Stated, Replicates, Proportional, VarianceFunction };
enum class CovarianceScale { Residuals, Stated };
/// Where the calibration error that all readings of a standard share is accounted for: as a line of the budget, or as a covariance
/// of all its readings in the fit. Never in both.
enum class SharedError { Budget, Fit };

/// What the engineer decided, and the places at which answers are wanted.
struct Choices {
    FunctionChoice function;
    FitDirection fit = FitDirection::Indication;
    Method method = Method::LeastSquares;
    Weights weights = Weights::Equal;
    CovarianceScale covariance = CovarianceScale::Residuals;
    SharedError sharedError = SharedError::Budget;
    Decimal coverage{95, 2, {}}; ///< probability of every interval
    Phase phase = Phase::AsFound; ///< shown on the bench, and the one that the calibration function is taken from
    std::vector<Decimal> at;      ///< reference values for band and prediction
    std::vector<Decimal> read;    ///< indications (means of `repeats`) to be read back
    std::optional<int> repeats = 1; ///< new readings in each mean; empty: an exact indication
    int outliers = 0;               ///< largest number tried by the generalised ESD test; 0: the program's default
    Decimal outlierLevel{5, 2, {}}; ///< its level, and Grubbs's
    RobustWeight robust = RobustWeight::Huber; ///< for comparison only, never for the certificate
    Decimal toleranceShare{95, 2, {}}; ///< share of all readings that the tolerance band is to hold
    Decimal exclusionLimit{10, 2, {}}; ///< share of excluded readings above which findings and certificate say so
    bool separateDirections = false; ///< state rising and falling separately in results and budget
    bool splitOnCertificate = false; ///< print the variance split as a table
    bool operator==(const Choices&) const = default;
};

} // namespace spanwright
