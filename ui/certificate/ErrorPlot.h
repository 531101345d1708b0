// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Certificate.h"
#include "ui/certificate/Page.h"

namespace spanwright {

/// The errors of indication of a phase with their expanded uncertainties and limits, as blocks in a rectangle: a triangle up for
/// rising, down for falling, a dot for the mean of both.
std::vector<PageBlock> errorPlot(const PhaseSection& section, const Item& item, const QRectF& mm);

} // namespace spanwright
