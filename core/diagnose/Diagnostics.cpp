// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/diagnose/Diagnostics.h"

#include "core/base/Parallel.h"
#include "core/diagnose/Autocorrelation.h"
#include "core/diagnose/EqualVariances.h"
#include "core/diagnose/Linearity.h"
#include "core/diagnose/Normality.h"
#include "core/diagnose/Outliers.h"
#include "core/diagnose/ResidualColumn.h"
#include "core/split/FunctionBasis.h"
#include "core/split/VarianceSplit.h"

#include <algorithm>
#include <cmath>

namespace spanwright {
namespace {

/// Beyond this, Durbin and Watson's p comes from the normal distribution with the exact moments, and beyond the second
/// bound from the moments of white noise: the terms of the function no longer matter.
constexpr std::size_t mostForExactWatson = 2000;
constexpr std::size_t mostForWatsonMoments = 100'000;

/// Columns of the function at the readings; for a function that is not linear in its coefficients, of its tangent, which
/// `approximate` says.
struct Design {
    std::vector<std::vector<double>> columns;
    bool approximate = false;
};

Design designOf(const Sample& sample, const Fit& fit) {
    Design design;
    const PairColumn& abscissa = fit.direction == FitDirection::Indication ? sample.reference : sample.indication;
    const FunctionBasis basis = functionBasis(fit, abscissa.high);
    for (std::size_t j = 0; j < basis.terms; ++j)
        design.columns.emplace_back(basis.column(j).begin(), basis.column(j).end());
    design.approximate = !basis.linear;
    return design;
}

void multiplyByRoots(std::vector<std::vector<double>>& columns, const PairColumn& weight) {
    if (weight.empty())
        return;
    for (auto& column : columns)
        for (std::size_t i = 0; i < column.size(); ++i)
            column[i] *= std::sqrt(weight.high[i]);
}

Warning approximate(const char* figure, const char* method) {
    return {WarningCode::ApproximateMethod, {{"figure", figure}, {"method", method}}};
}

template <class T>
void orderOfTaking(std::span<const T> u, Diagnostics& result) {
    if constexpr (std::is_same_v<T, double>) {
        const SerialStatistics both = serialStatistics(u);
        result.lag1Autocorrelation = both.lagOne;
        result.durbinWatson = both.durbinWatson;
    } else {
        result.lag1Autocorrelation = lagOneAutocorrelation(u);
        result.durbinWatson = durbinWatson(u);
    }
    if (result.lag1Autocorrelation) {
        const double r = *result.lag1Autocorrelation, n = static_cast<double>(u.size());
        result.effectiveReadings = std::min(n, n * (1 - r) / (1 + r));
    }
}

void watsonP(const Residuals& residuals, Design design, Diagnostics& result) {
    const std::size_t n = residuals.e.size();
    if (!result.durbinWatson || n <= design.columns.size() + 1)
        return;
    const double d = *result.durbinWatson;
    multiplyByRoots(design.columns, residuals.weight);
    if (n > mostForExactWatson) {
        result.durbinWatsonP = durbinWatsonBelowNormal(d, design.columns, n);
        result.warnings.push_back(approximate("durbin_watson", "normal"));
        return;
    }
    result.durbinWatsonP = durbinWatsonBelow(d, design.columns);
    if (design.approximate)
        result.warnings.push_back(approximate("durbin_watson", "linearised"));
}

template <class T>
void outliers(std::span<const T> u, const Sample& sample, const DiagnoseQuestion& question, Diagnostics& result) {
    const int n = static_cast<int>(std::min<std::size_t>(u.size(), 1'000'000'000));
    const int most = question.mostOutliers > 0 ? question.mostOutliers : std::clamp(n / 10, 1, 10);
    const std::vector<ExtremeTrial> trials = extremeTrials(u, most, question.outlierLevel);
    for (const ExtremeTrial& trial : trials) {
        const std::size_t row = sample.rows[trial.index];
        result.esd.push_back({row < question.ids.size() ? question.ids[row] : 0, row + 1, trial.r, trial.lambda});
    }
    result.esdCount = outlierCount(trials);
    if (!result.esd.empty()) {
        const OutlierTrial& first = result.esd.front();
        result.grubbs = Diagnostics::Grubbs{first.r, first.lambda, first.id, first.row};
    }
}

/// The tests that look at the function's columns.
void regressions(const Sample& sample, const Residuals& residuals, const Fit& fit, std::span<const double> u,
                 Diagnostics& result) {
    if (u.size() <= mostForWatsonMoments) {
        Design design = designOf(sample, fit);
        result.breuschPagan = breuschPagan(u, design.columns);
        watsonP(residuals, std::move(design), result);
        return;
    }
    const PairColumn& abscissa = fit.direction == FitDirection::Indication ? sample.reference : sample.indication;
    if (fit.terms() == 2) {
        result.breuschPagan = breuschPagan(u, std::span<const double>(abscissa.high));
    } else if (spannedByPowers(fit.function)) {
        result.breuschPagan = breuschPagan(u, designOf(sample, fit).columns);
    }
    if (result.durbinWatson) {
        result.durbinWatsonP =
            0.5 * std::erfc(-(*result.durbinWatson - 2) * std::sqrt(static_cast<double>(u.size()) / 8));
        result.warnings.push_back(approximate("durbin_watson", "normal"));
    }
}

void take(const EqualVariances& equal, Diagnostics& result) {
    result.bartlett = equal.bartlett;
    result.levene = equal.levene;
    result.cochran = equal.cochran;
    result.cochranCritical = equal.cochranCritical;
    result.cochranCriticalOutlier = equal.cochranCriticalOutlier;
    if (equal.cochran && !equal.equalSizes)
        result.warnings.push_back(approximate("cochran", "mean-number"));
}

} // namespace

Diagnostics diagnose(const Sample& sample, const Residuals& residuals, const Fit& fit,
                     const DiagnoseQuestion& question) {
    Diagnostics result;
    if (sample.size() < 2 || !(fit.residualSs > roundingSquares(residuals)))
        return result;
    const std::vector<double> weighted =
        residuals.weight.empty() ? std::vector<double>{} : weightedResiduals<double>(residuals);
    const std::span<const double> u = residuals.weight.empty() ? residuals.e.high : weighted;
    // Independent of the rest, so for very many readings beside it.
    auto variances = beside(u.size(), [&] {
        return equalVariances({u, sample.group, sample.groupValue.size()});
    });
    if (residuals.e.low.empty()) {
        orderOfTaking(u, result);
        outliers(u, sample, question, result);
    } else {
        const std::vector<DoubleDouble> exact = weightedResiduals<DoubleDouble>(residuals);
        orderOfTaking(std::span<const DoubleDouble>(exact), result);
        outliers(std::span<const DoubleDouble>(exact), sample, question, result);
    }
    if (u.size() <= 5000)
        result.shapiroWilk = shapiroWilk({u.begin(), u.end()});
    if (fit.function.family != FunctionFamily::Constant)
        result.linearity = linearityTest(sample, residuals, fit);
    regressions(sample, residuals, fit, u, result);
    take(variances.get(), result);
    return result;
}

} // namespace spanwright
