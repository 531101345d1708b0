// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/Fit.h"
#include "core/fit/FunctionModel.h"
#include "core/fit/LeastSquares.h"
#include "core/fit/Weighting.h"

namespace spanwright {

/// The readings as abscissa and ordinate of the function that is fitted, with their weights.
struct FitTask {
    const Sample& sample;
    const Choices& choices;
    FitDirection direction = FitDirection::Indication;
    const PairColumn& x;
    const PairColumn& y;
    const PairColumn& ux; ///< stated uncertainties; empty when none are stated
    const PairColumn& uy;
    std::shared_ptr<const FunctionModel> model;
    Weighting weighting;
    double low = 0, high = 0; ///< range of the abscissae
};

/// A model with its β, and the linear problem at the solution, which carries covariance, residuals and leverages.
struct SolvedModel {
    std::vector<DoubleDouble> beta;
    LinearSolution linear;
    Convergence convergence;
    std::optional<double> robustSd;              ///< spread of the residuals as a robust fit sees it
    std::optional<DoubleDouble> covarianceScale; ///< where it is not s²
    std::optional<DoubleDouble> totalSs;         ///< where covariances between readings took part
    std::vector<WeighedDown> weighedDown;
};

/// Error: RankLost (facts: terms) naming the columns that depend on others.
Error rankLost(const FitTask& task, const std::vector<std::size_t>& terms);

} // namespace spanwright
