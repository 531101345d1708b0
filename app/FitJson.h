// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/JsonWriter.h"
#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

namespace spanwright {

/// Coefficients with their covariance, how well and how the function was fitted, and the ladder of degrees where there is one.
void writeFit(JsonWriter& json, const Record& record, const PhaseEvaluation& evaluation);

/// Intervals at chosen places, with a tolerance interval for that share of all readings, and values read back.
void writeAnswers(JsonWriter& json, const PhaseEvaluation& evaluation, double toleranceShare);

} // namespace spanwright
