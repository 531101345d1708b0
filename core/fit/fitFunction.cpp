// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/fitFunction.h"

#include "core/fit/BothUncertain.h"
#include "core/fit/CalibrationFunction.h"
#include "core/fit/CorrelatedFit.h"
#include "core/fit/Robust.h"
#include "core/fit/StatedCovariance.h"
#include "core/fit/assembleFit.h"
#include "core/fit/fitMany.h"
#include "core/fit/solveModel.h"

#include <algorithm>
#include <charconv>
#include <cmath>

namespace spanwright {

namespace {

/// Number of distinct abscissae, counted up to `enough`.
std::size_t distinctUpTo(const PairColumn& x, std::size_t enough) {
    std::vector<DoubleDouble> seen;
    for (std::size_t i = 0; i < x.size() && seen.size() < enough; ++i)
        if (std::find(seen.begin(), seen.end(), x[i]) == seen.end())
            seen.push_back(x[i]);
    return seen.size();
}

std::string shortest(double value) {
    char text[32];
    return {text, std::to_chars(text, text + sizeof text, value).ptr};
}

Error shortOf(ErrorCode code, std::size_t needed, std::size_t got) {
    return Error(code, {{"needed", std::to_string(needed)}, {"got", std::to_string(got)}});
}

Result<void> checkEnough(const FitTask& task) {
    const std::size_t p = task.model->terms(), n = task.sample.size();
    if (n < p)
        return shortOf(ErrorCode::TooFewReadings, p, n);
    const std::size_t distinct = distinctUpTo(task.x, p);
    if (distinct < p)
        return distinct == 1 ? Error(ErrorCode::ReferencesAllEqual, {{"value", shortest(task.x.high.front())}})
                             : shortOf(ErrorCode::TooFewSetPoints, p, distinct);
    std::vector<std::size_t> outside;
    for (std::size_t i = 0; i < n; ++i)
        if (!task.model->defined(task.x.high[i]) || !task.model->ordinateDefined(task.y.high[i]))
            outside.push_back(i);
    if (!outside.empty())
        return Error(ErrorCode::OutsideDomain,
                     {{"function", functionName(task.choices.function)},
                      {"rows", rowsFact(task.sample, outside)},
                      {"where", std::string(factsOf(task.choices.function.family).where)}});
    return {};
}

/// Fills the weights that were chosen; those from replicates need the residuals of an unweighted fit first.
Result<Weighting> chosenWeighting(const FitTask& task) {
    if (task.choices.weights == Weights::Stated || task.choices.covariance == CovarianceScale::Stated)
        return statedWeighting(task.sample, task.x, task.uy);
    if (task.choices.weights == Weights::Equal)
        return Weighting{};
    if (task.choices.weights == Weights::Proportional)
        return proportionalWeighting(task.sample, task.x);
    const auto even = solveModel(task);
    if (!even)
        return even.error();
    return task.choices.weights == Weights::Replicates
               ? replicateWeighting(task.sample, task.x, even->linear.residual)
               : varianceFunctionWeighting(task.sample, task.x, even->linear.residual);
}

/// Within these bounds the fourth powers of numbers, and the squares of their quotients, can be held by a double.
constexpr double LeastMagnitude = 1e-70, MostMagnitude = 1e70;

/// Whether small values may stand beside others, where they count as zero, or each counts by itself, as a variance that divides.
enum class Smallness { BesideOthers, Never };

struct Magnitudes {
    const PairColumn& column;
    const char* quantity;
    Smallness smallness;
};

Result<void> checkMagnitude(const Sample& sample, const Magnitudes& checked) {
    std::vector<std::size_t> small, large;
    std::size_t zeros = 0;
    for (std::size_t i = 0; i < checked.column.size(); ++i) {
        const double magnitude = std::fabs(checked.column.high[i]);
        zeros += magnitude == 0 ? 1 : 0;
        if (magnitude > MostMagnitude)
            large.push_back(i);
        else if (magnitude > 0 && magnitude < LeastMagnitude)
            small.push_back(i);
    }
    const bool vanish = !small.empty() && (checked.smallness == Smallness::Never || small.size() + zeros == checked.column.size());
    if (large.empty() && !vanish)
        return {};
    return Error(ErrorCode::MagnitudeUnfit, {{"quantity", checked.quantity},
                                             {"side", large.empty() ? "small" : "large"},
                                             {"limit", large.empty() ? "1e-70" : "1e70"},
                                             {"rows", rowsFact(sample, large.empty() ? small : large)}});
}

/// Numbers whose squares vanish or overflow would give s = 0, or none, without a word.
Result<void> checkMagnitudes(const Sample& sample) {
    // On a grid of 64-bit integers the scale alone says so in all but unheard-of cases.
    const auto ordinary = [](int scale) { return scale > -50 && scale < 70; };
    if (sample.grids && ordinary(sample.grids->referenceScale) && ordinary(sample.grids->indicationScale))
        return {};
    for (const Magnitudes& checked : {Magnitudes{sample.reference, "reference", Smallness::BesideOthers},
                                      Magnitudes{sample.indication, "indication", Smallness::BesideOthers},
                                      Magnitudes{sample.uReference, "uncertainty", Smallness::Never},
                                      Magnitudes{sample.uIndication, "uncertainty", Smallness::Never}})
        if (const auto fits = checkMagnitude(sample, checked); !fits)
            return fits;
    return {};
}

bool straight(const FunctionChoice& function) {
    return function.family == FunctionFamily::Line || function.family == FunctionFamily::Proportional;
}

Result<SolvedModel> solve(FitTask& task) {
    if (task.choices.method == Method::BothUncertain && !straight(task.choices.function))
        return Error(ErrorCode::MethodUnfit,
                     {{"reason", "function"}, {"text", functionName(task.choices.function)}});
    const auto correlated = takesCovariances(task);
    if (!correlated)
        return correlated.error();
    if (*correlated)
        return solveCorrelated(task);
    if (task.choices.method == Method::BothUncertain)
        return solveBothUncertain(task);
    auto weighting = chosenWeighting(task);
    if (!weighting)
        return weighting.error();
    task.weighting = std::move(*weighting);
    return task.choices.method == Method::Robust ? solveRobust(task) : solveModel(task);
}

} // namespace

FitDirection directionOf(const Choices& choices) {
    return factsOf(choices.function.family).only.value_or(choices.fit);
}

Result<FitOutcome> fitFunction(const Sample& sample, const Choices& choices) {
    if (sample.size() == 0)
        return Error(ErrorCode::NoReadings);
    const FitDirection direction = directionOf(choices);
    const bool indication = direction == FitDirection::Indication;
    const PairColumn& x = indication ? sample.reference : sample.indication;
    const PairColumn& y = indication ? sample.indication : sample.reference;
    if (const auto fits = checkMagnitudes(sample); !fits)
        return fits.error();
    if (sample.grids) {
        if (choices.sharedError == SharedError::Budget)
            if (auto streamed = fitMany(sample, choices))
                return std::move(*streamed);
        return fitFunction(withExactColumns(sample), choices);
    }
    const auto [low, high] = std::minmax_element(x.high.begin(), x.high.end());
    auto model = makeModel(choices.function, {*low, *high, &sample, direction});
    if (!model)
        return model.error();
    FitTask task{sample,
                 choices,
                 direction,
                 x,
                 y,
                 indication ? sample.uReference : sample.uIndication,
                 indication ? sample.uIndication : sample.uReference,
                 std::move(*model),
                 {},
                 *low,
                 *high};
    if (const auto enough = checkEnough(task); !enough)
        return enough.error();
    auto solved = solve(task);
    if (!solved)
        return solved.error();
    return assembleFit(task, std::move(*solved));
}

} // namespace spanwright
