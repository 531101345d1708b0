// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/look/Card.h"
#include "ui/plot/PlotSubject.h"
#include "ui/plot/ResidualView.h"

namespace spanwright {

class ChoiceButton;
class ResidualPlot;
class Workbench;

/// The residuals, drawn against what is chosen in the head, where the selected readings can be excluded too.
class ResidualsCard : public Card {
    Q_OBJECT

  public:
    explicit ResidualsCard(Workbench& workbench, QWidget* parent = nullptr);
    [[nodiscard]] ResidualPlot& plot() const { return *plot_; }
    void setSubject(const PlotSubject& subject);
    /// Draws one part of the variance split beside the residuals.
    void showPart(std::optional<SplitPart> part);
    /// What the function gives; named in the head.
    void setDirection(FitDirection direction);

  signals:
    void excludeRequested();
    void readmitRequested();
    /// Parts of the split are not drawn any more.
    void partsLeft();

  private:
    void setView(ResidualView view);
    void nameView();

    ResidualPlot* plot_;
    ChoiceButton* view_;
    FitDirection direction_ = FitDirection::Indication;
};

} // namespace spanwright
