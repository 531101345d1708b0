// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Findings.h"

namespace spanwright {

/// The families of rules behind findings(), each in a source file of its own. `deviations` are
/// repeatabilityDeviations().
void addFunctionFindings(const FindingsInput& input, std::vector<Finding>& found);
void addRunFindings(const FindingsInput& input, std::vector<Finding>& found);
void addScatterFindings(const FindingsInput& input, const std::vector<double>& deviations, std::vector<Finding>& found);
/// Weights by level that let the readings near zero decide alone; readings of a logger between its plateaus.
void addWeightFindings(const FindingsInput& input, std::vector<Finding>& found);
void addPlateauFindings(const FindingsInput& input, std::vector<Finding>& found);
void addReadingFindings(const FindingsInput& input, const std::vector<double>& deviations, std::vector<Finding>& found);
/// χ² of the stated uncertainties where they are taken as they are: above its 95 % quantile they do not explain the residuals (ISO/TS
/// 28037:2010, 6.3), below the 1 % quantile the residuals are smaller than they ought to be (common practice).
void addStatedFindings(const Fit& fit, std::vector<Finding>& found);
void addRecordFindings(const FindingsInput& input, std::vector<Finding>& found);

/// Lack of fit as it is judged: after direction and run where the readings are unbalanced, against repeatability where
/// there is any, else against pure error. Null when nothing can be tested.
const SplitRow* judgedLackOfFit(const VarianceSplit& split);

/// Ids of readings of the sample by index, at most this many.
inline constexpr std::size_t mostRowsNamed = 50;
ReadingId idOf(const FindingsInput& input, std::size_t index);

/// Deviations of the readings from the mean of their set point and direction and from the line of their run, times the
/// root of their weights, in the order taken: what is left when everything that the split knows is taken out. Empty
/// without repeats. Readings left out (by index, rising) take no part in the means and deviate by 0.
std::vector<double> repeatabilityDeviations(const FindingsInput& input, const std::vector<std::size_t>& leftOut = {});

/// Whether a finding of that code is there already.
bool contains(const std::vector<Finding>& found, FindingCode code);

} // namespace spanwright
