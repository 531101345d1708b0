// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/PlotInk.h"
#include "ui/plot/PlotSubject.h"

namespace spanwright {

QColor colorOf(SplitPart part);

/// What a part of the variance split is made of, as lines over the residuals against the reference: set-point means for lack of
/// fit, rising and falling means for hysteresis, a line a run for the run terms, plus and minus its standard deviation for
/// repeatability.
std::vector<PlotStroke> strokesOf(SplitPart part, const PlotSubject& subject);

/// One sentence on those lines.
QString partExplained(SplitPart part, const PlotSubject& subject);

/// Where normally distributed residuals of the same standard deviation would lie on a normal probability plot.
PlotStroke normalLine(const PlotSubject& subject);

} // namespace spanwright
