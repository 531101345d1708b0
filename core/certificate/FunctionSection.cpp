// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/FunctionSection.h"

#include "core/base/Rounding.h"
#include "core/certificate/ShortText.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

constexpr int Places = 201;          // at which a rounded function is compared with the exact one
constexpr double ShareOfU = 1.0 / 20;
constexpr int MostDigits = 17;

/// Power of x that the first coefficient belongs to; empty where the function is no polynomial in its coefficients.
std::optional<int> firstPower(FunctionFamily family) {
    switch (family) {
    case FunctionFamily::Constant:
    case FunctionFamily::Line:
    case FunctionFamily::Polynomial: return 0;
    case FunctionFamily::Proportional:
    case FunctionFamily::PolynomialNoConstant: return 1;
    default: return std::nullopt;
    }
}

double polynomial(const std::vector<double>& coefficients, int first, double x) {
    double sum = 0;
    for (std::size_t i = coefficients.size(); i-- > 0;)
        sum = sum * x + coefficients[i];
    return first == 0 ? sum : sum * x;
}

double place(const Fit& fit, int i) {
    return fit.low + (fit.high - fit.low) * i / (Places - 1);
}

/// Largest distance between the function and the polynomial of these coefficients in the valid range.
double largestDistance(const Fit& fit, const std::vector<double>& coefficients, int first) {
    double largest = 0;
    for (int i = 0; i < Places; ++i) {
        const double x = place(fit, i);
        largest = std::max(largest, std::fabs(polynomial(coefficients, first, x) - fit.curve->value(x)));
    }
    return largest;
}

/// Smallest U at a stated point, unit of the ordinate.
double smallestExpanded(const PhaseEvaluation& phase) {
    double smallest = INFINITY;
    for (const SetPointBudget& point : phase.budget.points) {
        const double u = phase.fit->direction == FitDirection::Indication ? point.expanded : point.expandedReference;
        if (u > 0)
            smallest = std::min(smallest, u);
    }
    return smallest;
}

std::vector<double> numbers(const std::vector<Digits>& texts) {
    std::vector<double> result;
    for (const Digits& text : texts)
        result.push_back(std::stod(text));
    return result;
}

std::vector<Digits> coefficientTexts(const Fit& fit, double allowed) {
    std::vector<Digits> texts;
    const auto first = firstPower(fit.function.family);
    for (int digits = 3; first && std::isfinite(allowed) && digits < MostDigits; ++digits) {
        texts.clear();
        for (const Coefficient& coefficient : fit.coefficients)
            texts.push_back(significantDigits(coefficient.value, digits));
        if (largestDistance(fit, numbers(texts), *first) <= allowed)
            return texts;
    }
    texts.clear();
    for (const Coefficient& coefficient : fit.coefficients)
        texts.push_back(shortText(coefficient.value));
    return texts;
}

void addChecks(const Fit& fit, double expanded, FunctionSection& section) {
    const auto first = firstPower(fit.function.family);
    std::vector<Digits> texts;
    for (const auto& term : section.terms)
        texts.push_back(term.value);
    section.checksFromPrinted = first.has_value();
    const int decimals = std::isfinite(expanded) ? decimalsFor(expanded, 2) + 1 : 6;
    for (const double share : {0.0, 0.5, 1.0}) {
        const Digits x = roundedText(fit.low + share * (fit.high - fit.low), decimalsFor(fit.high - fit.low, 3));
        const double at = std::clamp(std::stod(x), fit.low, fit.high);
        const double value = first ? polynomial(numbers(texts), *first, std::stod(x)) : fit.curve->value(at);
        section.checks.push_back({x, roundedText(value, decimals)});
        if (fit.low == fit.high)
            return;
    }
}

double largestResidual(const RowFigures& rows) {
    double largest = 0;
    for (std::size_t i = 0; i < rows.size(); ++i)
        if (rows.excluded[i] == 0 && std::fabs(rows.residual[i]) > std::fabs(largest))
            largest = rows.residual[i];
    return largest;
}

} // namespace

std::optional<FunctionSection> functionSection(const PhaseEvaluation& phase) {
    if (!phase.fit || phase.fit->curve == nullptr)
        return std::nullopt;
    const Fit& fit = *phase.fit;
    FunctionSection section;
    section.phase = phase.phase;
    section.function = fit.function;
    section.direction = fit.direction;
    section.method = fit.method;
    section.weights = fit.weights;
    section.weighted = fit.weights != Weights::Equal || fit.method == Method::BothUncertain;
    const double stated = smallestExpanded(phase);
    // Without a stated uncertainty the digits follow from the scatter.
    const double expanded = std::isfinite(stated) || !(fit.residualSd > 0) || section.weighted ? stated : fit.residualSd;
    const std::vector<Digits> texts = coefficientTexts(fit, expanded * ShareOfU);
    for (std::size_t i = 0; i < fit.coefficients.size(); ++i) {
        const Coefficient& coefficient = fit.coefficients[i];
        section.terms.push_back({coefficient.name, coefficient.unit, texts[i], significantDigits(coefficient.standardUncertainty, 2)});
    }
    const int rangeDecimals = std::max(0, decimalsFor(fit.high - fit.low, 6));
    section.low = roundedText(fit.low, rangeDecimals);
    section.high = roundedText(fit.high, rangeDecimals);
    section.residualSd = significantDigits(fit.residualSd, 2);
    section.degreesOfFreedom = fit.degreesOfFreedom;
    section.largestResidual = roundedText(largestResidual(phase.rows), std::isfinite(expanded) ? decimalsFor(expanded, 2) : 6);
    addChecks(fit, expanded, section);
    if (phase.budget.readBack && phase.budget.readBack->expandedReference > 0) {
        section.readBackExpanded = roundUncertainty(phase.budget.readBack->expandedReference).text;
        section.readBackFactor = roundedText(phase.budget.readBack->coverageFactor, 2);
    }
    return section;
}

} // namespace spanwright
