// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/budget/Budget.h"
#include "core/interval/ReadBack.h"
#include "core/record/Record.h"
#include "core/split/VarianceSplit.h"

#include <optional>
#include <string>

namespace spanwright {

/// Whether an indication has one value that may be stated with an uncertainty, and why not.
enum class ValueState {
    Sound,
    NoAnswer,         ///< no reference value belongs to the indication
    OutsideRange,     ///< the value lies outside the calibrated range
    SeveralAnswers,   ///< the function is not monotonic, and several values in the range belong to the indication
    NoFiniteInterval, ///< the slope is not certain enough to bound the value
    NoUncertainty,    ///< no budget can be drawn up: no degrees of freedom tell the scatter
};
inline constexpr ValueState lastValueState = ValueState::NoUncertainty;

/// The reference value that belongs to new readings, with what the calibration function alone says about it and the whole budget
/// at that value. The window's panel, `convert` and the figures all take it from here.
struct ReadValue : ReadBackAnswer {
    ValueState state = ValueState::NoAnswer;
    std::optional<SetPointBudget> budget; ///< of a sound value only: U is its expandedReference
};

/// Reads an indication, the mean of `repeats` new readings (empty: of very many), back to the reference. The interval is that of the
/// calibration function alone with independent readings (readBack()); in the budget only what the split shows to be repeatability is
/// averaged (scatterOfMean()). `split` may be null.
ReadValue readValue(const Record& record, const Fit& fit, const VarianceSplit* split, double indication, std::optional<int> repeats);

/// A value as it is stated: U to two significant digits, the value to U's decimal place (JCGM 100:2008, 7.2.6).
struct StatedValue {
    std::string value;
    std::string expanded, coverageFactor; ///< empty where the value is not sound
};

/// Value, U and k in digits. A value outside the calibrated range is rounded to the place of the largest U in it, `largest`, and
/// stands without U. Everything is empty where there is no single value.
StatedValue statedValue(const ReadValue& value, const std::optional<SetPointBudget>& largest);

} // namespace spanwright
