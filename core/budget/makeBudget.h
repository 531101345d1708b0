// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/budget/Budget.h"
#include "core/fit/Fit.h"
#include "core/fit/Sample.h"
#include "core/record/Record.h"
#include "core/split/VarianceSplit.h"

namespace spanwright {

/// The budget of the error of indication at every stated point (pointMeans) of one phase, and of a value read back.
///
/// Each source is used once:
///   standards            U/k of each, × slope where it gives the reference; drift ±d rectangular
///   resolution           δ/√12 of the reference as read and of the indication (JCGM 100:2008, F.2.2.1)
///   repeatability        s_r/√n, ν of the split's repeatability (pure error where no direction or run is known; pooled within
///                        set point and direction where there is no fit)
///   run to run           σ_run/√(runs at the point), ν of the run offsets
///   hysteresis           half of |rising − falling| as a rectangular half-width, only where the mean of both is stated
///   lines by hand
/// Rounding of the indication also scatters repeated readings, so resolution is in part contained in repeatability; both are kept,
/// which is an upper bound (without any scatter, resolution is all that is seen). Lines in `record.budget.omitted` are left out.
///
/// For a value read back, see core/budget/ReadBackBudget.h.
///
/// Where each point and direction of the phase was read only once, repeatability and run to run are taken from `otherPhase`: an
/// adjustment of zero and span does not change the scatter (pooled estimate, JCGM 100:2008, 4.2.4).
///
/// fit, split and otherPhase may be null. Warning FigureUndefined (figure: repeatability, reason: no-replicates) where nothing is repeated,
/// (figure: results, reason: too-many-set-points) beyond MostStatedPoints.
Budget makeBudget(const Record& record, const Sample& sample, const Fit* fit, const VarianceSplit* split,
                  const VarianceSplit* otherPhase = nullptr);

} // namespace spanwright
