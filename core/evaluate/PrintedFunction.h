// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/evaluate/LoggerFunction.h"

#include <optional>
#include <string>

namespace spanwright {

/// The share of U that printing may cost (common practice).
inline constexpr double PrintedShareOfU = 1.0 / 20;

/// A number of the function as it is printed, with a decimal point.
struct PrintedNumber {
    std::string name, unit;
    std::string text;
    std::optional<double> standardUncertainty; ///< of the coefficient before it was rounded; not of x of a table, nor about a centre
};

/// An input and what a logger must give for it, for checking what was typed there.
struct PrintedCheck {
    std::string input, output;
};

/// How the abscissa follows from the ordinate: closed, by halving the range, or not at all (the function turns in the range).
enum class InverseForm { None, Closed, Halving };

/// A calibration function in as few digits as keep every value in the calibrated range within U/20 of the function in full precision: no
/// number can lose one more digit. U is that of a value read back there, from one new reading; where there is none, 17 digits are
/// printed, and `share` is empty. A polynomial is in powers of x, or of x − centre where more than 15 digits would be needed.
struct PrintedFunction {
    explicit PrintedFunction(LoggerFunction made) : logger(std::move(made)) {}

    Phase phase = Phase::AsFound;
    FitDirection direction = FitDirection::Indication;
    LoggerFunction logger;
    std::vector<PrintedNumber> numbers;
    std::string centre;     ///< empty: none
    std::string low, high;  ///< calibrated range of the abscissa
    InverseForm inverse = InverseForm::None;
    std::optional<double> share; ///< largest error of a value, as a share of its U
    std::vector<PrintedCheck> checks;        ///< of the function
    std::vector<PrintedCheck> inverseChecks; ///< of its inverse, where there is one
};

/// What the digits follow from where no U is known: nothing, or the residual standard deviation in its place.
enum class WithoutU { FullPrecision, ByScatter };

/// Empty where there is no fit.
std::optional<PrintedFunction> printedFunction(const Record& record, const PhaseEvaluation& phase, WithoutU without = WithoutU::FullPrecision);

} // namespace spanwright
