// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/look/Card.h"
#include "ui/plot/PlotSubject.h"

#include <vector>

class QAction;
class QLabel;

namespace spanwright {

class ChoiceButton;
class LinePlot;
class Workbench;

/// The readings and the calibration function, with what is chosen about it in the head and its equation at the foot.
class LineCard : public Card {
    Q_OBJECT

  public:
    explicit LineCard(Workbench& workbench, QWidget* parent = nullptr);
    [[nodiscard]] LinePlot& plot() const { return *plot_; }
    void setSubject(const PlotSubject& subject);
    /// Actions at the end of the list of functions, and of that of weights.
    void setFurther(std::vector<QAction*> ofFunction, std::vector<QAction*> ofWeights);
    void openWeights();

  private:
    LinePlot* plot_;
    ChoiceButton* function_;
    ChoiceButton* weights_;
    QLabel* equation_;
};

} // namespace spanwright
