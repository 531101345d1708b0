// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/FindingRules.h"

#include "core/diagnose/Orthonormal.h"
#include "core/fit/Quantiles.h"
#include "core/split/FunctionBasis.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

constexpr double certain = 0.01, doubtful = 0.05;

/// The next richer function that the set points can carry; the same function when there is none.
FunctionChoice richer(const FunctionChoice& function, std::size_t setPoints) {
    FunctionChoice next = function;
    std::size_t terms = 3;
    switch (function.family) {
    case FunctionFamily::Constant:
    case FunctionFamily::Proportional:
        next = {FunctionFamily::Line, 0};
        terms = 2;
        break;
    case FunctionFamily::Line:
        next = {FunctionFamily::Polynomial, 2};
        break;
    case FunctionFamily::Polynomial:
    case FunctionFamily::PolynomialNoConstant:
        next.order = function.order + 1;
        terms = static_cast<std::size_t>(next.order) + 1;
        break;
    default:
        break;
    }
    return setPoints > terms ? next : function;
}

/// The readings at the set point whose mean lies furthest from the function, in standard deviations of a mean.
struct WorstPoint {
    std::size_t group = 0;
    double mean = 0, setPoint = 0;
};

WorstPoint worstPoint(const VarianceSplit& split) {
    WorstPoint worst;
    double most = -1;
    for (std::size_t i = 0; i < split.setPoints.size(); ++i) {
        const SetPointMeans& point = split.setPoints[i];
        const double size = std::abs(point.mean) * std::sqrt(static_cast<double>(point.n));
        if (size > most) {
            most = size;
            worst = {i, point.mean, point.setPoint};
        }
    }
    return worst;
}

void lackOfFit(const FindingsInput& input, std::vector<Finding>& found) {
    const SplitRow* judged = input.split ? judgedLackOfFit(*input.split) : nullptr;
    if (!judged || !(*judged->p < doubtful))
        return;
    const WorstPoint worst = worstPoint(*input.split);
    Finding finding;
    finding.code = FindingCode::LackOfFit;
    finding.severity = *judged->p < certain ? Severity::Serious : Severity::Attention;
    finding.figures = {{"f", *judged->f}, {"p", *judged->p}};
    if (!input.split->setPoints.empty())
        finding.figures.insert(finding.figures.end(), {{"value", worst.mean}, {"set_point", worst.setPoint}});
    for (std::size_t i = 0; i < input.sample.size() && finding.rows.size() < mostRowsNamed; ++i)
        if (static_cast<std::size_t>(input.sample.group[i]) < input.sample.groupValue.size() &&
            input.sample.groupValue[static_cast<std::size_t>(input.sample.group[i])] == worst.setPoint)
            finding.rows.push_back(idOf(input, i));
    const FunctionChoice next = richer(input.fit->function, input.sample.groupValue.size());
    if (!(next == input.fit->function)) {
        finding.remedy = Remedy::CompareFunction;
        finding.suggestion = next;
    } else {
        finding.remedy = Remedy::SeeReadings;
    }
    found.push_back(finding);

    const auto& naive = input.split->lackOfFitNaive;
    if (input.split->against == SplitPart::Repeatability && naive && naive->p && *naive->p >= doubtful &&
        judged != &*naive) {
        Finding hidden = finding;
        hidden.code = FindingCode::HiddenCurvature;
        hidden.severity = Severity::Attention;
        hidden.figures = {{"f_naive", *naive->f}, {"p_naive", *naive->p}, {"f", *judged->f}, {"p", *judged->p}};
        found.push_back(hidden);
    }
}

void highestTerm(const FindingsInput& input, std::vector<Finding>& found) {
    const Fit& fit = *input.fit;
    const bool polynomial = fit.function.family == FunctionFamily::Polynomial ||
                            fit.function.family == FunctionFamily::PolynomialNoConstant;
    if (!polynomial || fit.function.order < 2 || fit.degreesOfFreedom < 1 ||
        fit.covarianceScale == CovarianceScale::Stated)
        return;
    const Coefficient& last = fit.coefficients.back();
    if (!(last.standardUncertainty > 0))
        return;
    const double t = last.value / last.standardUncertainty;
    const double p = 2 * studentAbove(std::abs(t), fit.degreesOfFreedom);
    // Without the term the residual sum of squares is larger by t² s², over one degree of freedom more. With readings
    // rounded to a coarse step the rounding alone can look like a term, so a gain below the standard uncertainty of the
    // step does not count.
    const double before =
        std::sqrt((fit.residualSs + t * t * fit.residualSd * fit.residualSd) / (fit.degreesOfFreedom + 1));
    const auto& resolution = input.record.item.resolution;
    const bool coarse = resolution && fit.weights == Weights::Equal && fit.direction == FitDirection::Indication &&
                        before - fit.residualSd < resolution->toDouble() / std::sqrt(12.0) &&
                        before < resolution->toDouble();
    if (p < doubtful && !coarse)
        return;
    Finding finding;
    finding.code = FindingCode::DegreeNotJustified;
    finding.severity = Severity::Attention;
    finding.figures = {{"t", t}, {"p", p}};
    finding.remedy = Remedy::CompareFunction;
    finding.suggestion = fit.function;
    --finding.suggestion.order;
    if (finding.suggestion.order == 1)
        finding.suggestion = {
            fit.function.family == FunctionFamily::Polynomial ? FunctionFamily::Line : FunctionFamily::Proportional, 0};
    found.push_back(finding);
}

/// F of adding a constant to a function without one: what the part of 1 that the function does not span takes from the
/// residuals.
void throughZero(const FindingsInput& input, std::vector<Finding>& found) {
    const Fit& fit = *input.fit;
    const bool noConstant = fit.function.family == FunctionFamily::Proportional ||
                            fit.function.family == FunctionFamily::PolynomialNoConstant;
    if (!noConstant || fit.degreesOfFreedom < 2)
        return;
    const PairColumn& abscissa =
        fit.direction == FitDirection::Indication ? input.sample.reference : input.sample.indication;
    const FunctionBasis basis = functionBasis(fit, abscissa.high);
    const std::size_t n = basis.rows;
    const auto root = [&](std::size_t i) {
        return input.residuals->weight.empty() ? 1 : std::sqrt(input.residuals->weight.high[i]);
    };
    std::vector<std::vector<double>> columns;
    for (std::size_t j = 0; j <= basis.terms; ++j) {
        std::vector<double>& v = columns.emplace_back(n);
        for (std::size_t i = 0; i < n; ++i)
            v[i] = root(i) * (j < basis.terms ? basis.column(j)[i] : 1.0);
    }
    const std::vector<double> ones = columns.back();
    const std::vector<std::vector<double>> directions = orthonormal(std::move(columns));
    if (directions.size() <= basis.terms)
        return;
    const std::vector<double>& beside = directions.back();
    double along = 0;
    for (std::size_t i = 0; i < n; ++i)
        along += beside[i] * root(i) * input.residuals->e.high[i];
    const double gain = along * along, rest = fit.residualSs - gain;
    if (!(rest > 0))
        return;
    const double f = gain / (rest / (fit.degreesOfFreedom - 1));
    const double p = fAbove(f, 1, fit.degreesOfFreedom - 1);
    if (!(p < certain))
        return;
    Finding finding;
    finding.code = FindingCode::ThroughZeroNotSupported;
    finding.severity = Severity::Serious;
    finding.figures = {{"f", f}, {"p", p}, {"value", along / dot(beside, ones)}};
    finding.remedy = Remedy::CompareFunction;
    finding.suggestion = fit.function.family == FunctionFamily::Proportional
                             ? FunctionChoice{FunctionFamily::Line, 0}
                             : FunctionChoice{FunctionFamily::Polynomial, fit.function.order};
    found.push_back(finding);
}

void extrapolation(const FindingsInput& input, std::vector<Finding>& found) {
    const Fit& fit = *input.fit;
    const Choices& choices = input.record.choices;
    // The value asked for that lies furthest out, in shares of the range, and how many lie outside.
    double furthest = 0, askedFor = 0;
    int count = 0;
    const auto outside = [&](double value, double a, double b) {
        const double low = std::min(a, b), high = std::max(a, b);
        const double beyond = std::max(low - value, value - high) / (high - low);
        if (!(beyond > 1e-9))
            return;
        ++count;
        if (beyond > furthest) {
            furthest = beyond;
            askedFor = value;
        }
    };
    const bool ofReference = fit.direction == FitDirection::Indication;
    const double first = fit.curve ? fit.curve->value(fit.low) : 0, last = fit.curve ? fit.curve->value(fit.high) : 0;
    if (fit.function.family != FunctionFamily::Constant) {
        for (const Decimal& x : choices.at)
            ofReference ? outside(x.toDouble(), fit.low, fit.high) : outside(x.toDouble(), first, last);
        for (const Decimal& y : choices.read)
            ofReference ? outside(y.toDouble(), first, last) : outside(y.toDouble(), fit.low, fit.high);
    }
    if (count == 0)
        return;
    Finding finding;
    finding.code = FindingCode::Extrapolation;
    finding.severity = Severity::Attention;
    finding.figures = {{"asked_for", askedFor}, {"values_outside", static_cast<double>(count)}};
    finding.remedy = Remedy::TakeMoreReadings;
    found.push_back(finding);
}

} // namespace

void addFunctionFindings(const FindingsInput& input, std::vector<Finding>& found) {
    lackOfFit(input, found);
    highestTerm(input, found);
    throughZero(input, found);
    extrapolation(input, found);
}

void addStatedFindings(const Fit& fit, std::vector<Finding>& found) {
    constexpr double small = 0.01;
    if (fit.covarianceScale != CovarianceScale::Stated || !fit.chiSquaredP)
        return;
    const double p = *fit.chiSquaredP;
    Finding finding;
    finding.figures = {{"chi_squared", *fit.chiSquared}, {"degrees_of_freedom", static_cast<double>(fit.degreesOfFreedom)}, {"p", p}};
    finding.remedy = Remedy::ChooseWeights;
    if (p < doubtful) {
        finding.code = FindingCode::StatedTooSmall;
        finding.severity = p < certain ? Severity::Serious : Severity::Attention;
        found.push_back(finding);
    } else if (1 - p < small) {
        finding.code = FindingCode::StatedTooLarge;
        finding.severity = Severity::Note;
        found.push_back(finding);
    }
}

} // namespace spanwright
