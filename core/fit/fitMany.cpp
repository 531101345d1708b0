// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/fitMany.h"

#include "core/base/Parallel.h"
#include "core/fit/Polynomial.h"
#include "core/fit/StreamedFit.h"
#include "core/fit/assembleFit.h"

#include <algorithm>
#include <thread>

namespace spanwright {

namespace {

struct Shape {
    int degree = 0;
    StreamedConstant constant = StreamedConstant::With;
};

std::optional<Shape> shapeOf(const FunctionChoice& function) {
    switch (function.family) {
    case FunctionFamily::Constant:
        return Shape{0, StreamedConstant::With};
    case FunctionFamily::Line:
        return Shape{1, StreamedConstant::With};
    case FunctionFamily::Proportional:
        return Shape{1, StreamedConstant::Without};
    case FunctionFamily::Polynomial:
        return Shape{function.order, StreamedConstant::With};
    case FunctionFamily::PolynomialNoConstant:
        return Shape{function.order, StreamedConstant::Without};
    default:
        return std::nullopt;
    }
}

/// The streamed solution in the user's units, as if it had been solved reading by reading.
SolvedModel solvedModel(const StreamedFit& fit) {
    SolvedModel solved;
    const DoubleDouble unit = fit.sums.map.unit();
    for (const DoubleDouble& value : fit.beta)
        solved.beta.push_back(value * unit);
    solved.linear.inverseRoot = fit.inverseRoot;
    solved.linear.residualSs = fit.residualSs * sqr(unit);
    solved.convergence = {true, 1, "linear"};
    return solved;
}

GridColumn abscissaOf(const ExactGrids& grids, FitDirection direction) {
    return direction == FitDirection::Indication ? GridColumn{grids.reference, grids.referenceScale}
                                                 : GridColumn{grids.indication, grids.indicationScale};
}

GridColumn ordinateOf(const ExactGrids& grids, FitDirection direction) {
    return direction == FitDirection::Indication ? GridColumn{grids.indication, grids.indicationScale}
                                                 : GridColumn{grids.reference, grids.referenceScale};
}

/// The figures of a streamed fit of the readings of a sample.
Fit figuresOf(const StreamedFit& streamed, const Shape& shape, const Sample& sample, const Choices& choices) {
    const FitDirection direction = directionOf(choices);
    const bool indication = direction == FitDirection::Indication;
    const StreamMap& map = streamed.sums.map;
    const auto place = [&](std::int64_t m) { return toDouble(toDoubleDouble(m) * powerOfTen(-map.xScale)); };
    const FitTask task{sample,
                       choices,
                       direction,
                       indication ? sample.reference : sample.indication,
                       indication ? sample.indication : sample.reference,
                       indication ? sample.uReference : sample.uIndication,
                       indication ? sample.uIndication : sample.uReference,
                       std::make_shared<PolynomialModel>(static_cast<std::size_t>(shape.degree),
                                                         shape.constant == StreamedConstant::With
                                                             ? PolynomialConstant::With
                                                             : PolynomialConstant::Without,
                                                         map.centre(), map.half()),
                       {},
                       place(streamed.sums.lowX),
                       place(streamed.sums.highX)};
    const SolvedModel solved = solvedModel(streamed);
    const DoubleDouble total = streamed.totalSs * sqr(map.unit());
    return assembleFigures(task, solved, {total, total - solved.linear.residualSs});
}

} // namespace

std::optional<FitOutcome> fitMany(const Sample& sample, const Choices& choices) {
    const auto shape = shapeOf(choices.function);
    const bool even = choices.weights == Weights::Equal && choices.covariance == CovarianceScale::Residuals;
    if (!shape || !even || choices.method != Method::LeastSquares)
        return std::nullopt;
    const FitDirection direction = directionOf(choices);
    const GridColumn x = abscissaOf(*sample.grids, direction), y = ordinateOf(*sample.grids, direction);
    const unsigned threads = std::clamp(std::thread::hardware_concurrency(), 1u, 4u);
    auto streamed = fitStreamed(x, y, shape->degree, shape->constant, threads);
    if (!streamed || !(streamed->residualSs > 0.0))
        return std::nullopt;

    FitOutcome outcome{figuresOf(*streamed, *shape, sample, choices), {}, {}};
    auto fitted = beside(sample.size(), [&] { return std::vector<double>(sample.size()); });
    StreamedRows rows = streamedRows(*streamed, x, y, threads);
    const std::vector<double>& ordinate =
        direction == FitDirection::Indication ? sample.indication.high : sample.reference.high;
    outcome.residuals.fitted = fitted.get();
    inHalves(rows.residual.size(), [&](std::size_t first, std::size_t last) {
        for (std::size_t i = first; i < last; ++i)
            outcome.residuals.fitted[i] = ordinate[i] - rows.residual[i];
    });
    outcome.residuals.e.high = std::move(rows.residual);
    outcome.residuals.leverage = std::move(rows.leverage);
    outcome.streamed = std::make_shared<const StreamedFit>(std::move(*streamed));
    return outcome;
}

std::optional<Fit> fitTakenBackIn(const FitOutcome& outcome, const Sample& used, const Sample& all, const Choices& choices) {
    const auto shape = shapeOf(choices.function);
    if (!shape || !outcome.streamed || !all.grids)
        return std::nullopt;
    const FitDirection direction = directionOf(choices);
    const GridColumn x = abscissaOf(*all.grids, direction), y = ordinateOf(*all.grids, direction);
    std::optional<StreamedFit> fit = *outcome.streamed;
    std::size_t next = 0;
    for (std::size_t i = 0; fit && i < all.size(); ++i) {
        if (next < used.size() && used.rows[next] == all.rows[i])
            ++next;
        else
            fit = changedBy(*fit, StreamedChange::Include, x.grid[i], y.grid[i]);
    }
    if (!fit)
        return std::nullopt;
    return figuresOf(*fit, *shape, all, choices);
}

} // namespace spanwright
