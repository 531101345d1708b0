// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"
#include "ui/plot/PointCloud.h"

#include <QString>

#include <memory>

namespace spanwright {

/// What the plots of the bench draw: the evaluation of one phase, and the record for names, units and times.
struct PlotSubject {
    std::shared_ptr<const PhaseEvaluation> phase; ///< null when the phase has no readings
    Item item;
    Shared<ReadingColumns> readings;
    Shared<Exclusions> exclusions;
    FitDirection fit = FitDirection::Indication;

    /// The quantity that the function takes, and the one that it gives.
    [[nodiscard]] const Quantity& abscissa() const { return fit == FitDirection::Indication ? item.reference : item.indication; }
    [[nodiscard]] const Quantity& ordinate() const { return fit == FitDirection::Indication ? item.indication : item.reference; }
    [[nodiscard]] bool empty() const { return !phase || phase->rows.size() == 0; }
    [[nodiscard]] const std::vector<double>& x() const;
    [[nodiscard]] const std::vector<double>& y() const;
};

/// The evaluation of one phase of a snapshot, which it keeps alive.
std::shared_ptr<const PhaseEvaluation> phaseOf(const std::shared_ptr<const Evaluation>& evaluation, Phase phase);

/// The phase that is shown, of a snapshot.
PlotSubject subjectOf(const Record& record, const std::shared_ptr<const Evaluation>& evaluation);

/// Ids, directions and exclusions of every reading; the places are for the plot to fill.
PlotPoints pointsOf(const PhaseEvaluation& phase);

/// Digits after the mark that show a residual: two digits of the residual standard deviation, and never fewer than were typed.
int residualDecimals(const PlotSubject& subject);

/// Lowest and highest of the finite values among readings that count; a range without width where there is none.
AxisRange rangeOfUsed(const std::vector<double>& values, const PhaseEvaluation& phase);

/// One reading in words: its number, where it belongs, its values with units, its residual, why it is excluded.
QString readingText(const PlotSubject& subject, ReadingId id);

/// "reference" when the quantity has no name yet.
QString quantityText(const Quantity& quantity, FitDirection role);
/// "name / unit", as it stands in a heading.
QString withUnit(const QString& name, const QString& unit);
/// "1 reading", "66 readings".
QString readingsText(std::size_t count);
/// "residual s = 0.0048 mA, 64 degrees of freedom".
QString residualText(const Fit& fit, const PlotSubject& subject);
/// With a capital letter at its beginning, where a name stands alone.
QString sentenceCase(QString text);

} // namespace spanwright
