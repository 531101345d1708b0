// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "app/FiguresJson.h"

#include <QString>

namespace spanwright {

/// What follows from one phase as a page of text for reading: the function, its coefficients, the variance split, findings,
/// answers, warnings. The phase must have a fit.
QString figuresText(const Record& record, const PhaseEvaluation& evaluation, RowsShown rows);

} // namespace spanwright
