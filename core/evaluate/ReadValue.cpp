// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/ReadValue.h"

#include "core/base/Rounding.h"
#include "core/budget/ReadBackBudget.h"

#include <cmath>

namespace spanwright {

namespace {

constexpr int DigitsWithoutU = 6; // where nothing says how far a value can be trusted

ValueState stateOf(const ReadBackAnswer& answer) {
    if (!answer.reference)
        return ValueState::NoAnswer;
    if (!answer.insideRange)
        return ValueState::OutsideRange;
    if (!answer.others.empty())
        return ValueState::SeveralAnswers;
    if (!std::isfinite(answer.standardUncertainty))
        return ValueState::NoUncertainty;
    if (std::isinf(answer.low) && std::isinf(answer.high))
        return ValueState::NoFiniteInterval;
    return ValueState::Sound;
}

} // namespace

ReadValue readValue(const Record& record, const Fit& fit, const VarianceSplit* split, double indication, std::optional<int> repeats) {
    ReadValue value{readBack(fit, indication, repeats), ValueState::NoAnswer, std::nullopt};
    value.state = stateOf(value);
    if (value.state != ValueState::Sound)
        return value;
    const double abscissa = fit.direction == FitDirection::Indication ? *value.reference : indication;
    value.budget = readBackBudget(record, fit, abscissa, scatterOfMean(repeatableShare(fit, split), repeats));
    if (!value.budget)
        value.state = ValueState::NoUncertainty;
    return value;
}

StatedValue statedValue(const ReadValue& value, const std::optional<SetPointBudget>& largest) {
    StatedValue stated;
    if (!value.reference || value.state == ValueState::SeveralAnswers)
        return stated;
    const std::optional<SetPointBudget>& measure = value.budget ? value.budget : largest;
    if (measure && measure->expandedReference > 0) {
        const RoundedUncertainty rounded = roundUncertainty(measure->expandedReference);
        stated.value = roundedText(*value.reference, rounded.decimals);
        if (value.budget)
            stated.expanded = rounded.text;
    } else {
        stated.value = significantDigits(*value.reference, DigitsWithoutU);
    }
    if (value.budget)
        stated.coverageFactor = roundedText(value.budget->coverageFactor, 2);
    return stated;
}

} // namespace spanwright
