// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/plot/PlotView.h"
#include "ui/plot/ResidualView.h"

namespace spanwright {

/// Residuals with the bands about zero. A part of the variance split that is selected shows what it is made of: set-point means
/// joined, rising and falling means, the line of each run.
class ResidualPlot : public PlotView {
    Q_OBJECT

  public:
    explicit ResidualPlot(QWidget* parent = nullptr);

    void setSubject(PlotSubject subject);
    void setView(ResidualView view);
    [[nodiscard]] ResidualView view() const { return view_; }
    void showPart(std::optional<SplitPart> part);
    [[nodiscard]] std::optional<SplitPart> part() const { return part_; }
    void showSelection(const std::set<ReadingId>& selection);

  private:
    void rebuild();
    void annotate();
    void addBands(Content& content, AxisRange& y) const;
    [[nodiscard]] std::vector<PlotStroke> strokesOfPart() const;
    [[nodiscard]] std::vector<PlotNote> notesOfExcluded() const;
    [[nodiscard]] QString summary() const;

    PlotSubject subject_;
    ResidualView view_ = ResidualView::Reference;
    std::optional<SplitPart> part_;
};

} // namespace spanwright
