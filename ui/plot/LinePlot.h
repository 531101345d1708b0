// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/PlotSubject.h"
#include "ui/plot/PlotView.h"

namespace spanwright {

/// How many times the distance from the line is drawn: 1 is the true picture; empty: as much as shows the bands well.
using Enlargement = std::optional<int>;

/// Readings, fitted function and both bands. The distance from the line (of points and bands together) may be drawn enlarged; the
/// plot then says so. With one reading selected, its distances are drawn: total = explained + residual.
class LinePlot : public PlotView {
    Q_OBJECT

  public:
    explicit LinePlot(QWidget* parent = nullptr);

    void setSubject(PlotSubject subject);
    void setEnlargement(Enlargement enlargement);
    /// The factor in use, chosen or found.
    [[nodiscard]] int enlargement() const { return factor_; }
    /// Draws the level about which the total spread is counted.
    void showMean(bool shown);
    void showSelection(const std::set<ReadingId>& selection);

  signals:
    /// The factor in use, whether chosen or found.
    void enlargementChanged(int factor);

  private:
    void rebuild();
    void annotate();
    void distancesOf(std::size_t row, std::vector<PlotStroke>& strokes) const;
    [[nodiscard]] QString distancesText(std::size_t row) const;
    void meanLine(std::vector<PlotStroke>& strokes) const;
    [[nodiscard]] int suitableFactor() const;
    [[nodiscard]] double drawn(double value, double fitted) const { return fitted + factor_ * (value - fitted); }
    [[nodiscard]] double level() const;

    PlotSubject subject_;
    Enlargement enlargement_;
    std::set<ReadingId> selection_;
    int factor_ = 1;
    bool meanShown_ = false;
};

} // namespace spanwright
