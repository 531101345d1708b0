// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/PlotSubject.h"

#include <QString>

#include <vector>

namespace spanwright {

/// What the residuals are drawn against.
enum class ResidualView { Reference, Fitted, Order, Time, Run, Normal };
inline constexpr ResidualView residualViews[] = {ResidualView::Reference, ResidualView::Fitted, ResidualView::Order,
                                                 ResidualView::Time,      ResidualView::Run,    ResidualView::Normal};

QString residualViewText(ResidualView view, const PlotSubject& subject);

/// Abscissae of the readings for a view, NaN where one has none; the unit of the axis; why the view has nothing to show.
struct ResidualAbscissa {
    std::vector<double> x;
    QString unit;
    std::vector<QString> names; ///< of the whole numbers from 1, for runs
    QString emptyText;
};
ResidualAbscissa residualAbscissa(ResidualView view, const PlotSubject& subject);

/// Expected normal scores of values, Φ⁻¹((i − 3/8)/(n + 1/4)) for the i-th smallest (Blom 1958); NaN where a value is not finite
/// or is left out.
std::vector<double> normalScores(const std::vector<double>& values, const std::vector<std::uint8_t>& leftOut);

} // namespace spanwright
