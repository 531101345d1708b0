// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/plot/LinePlot.h"
#include "ui/plot/ResidualView.h"

#include <QToolButton>

namespace spanwright {

/// A quiet button in the head of a card that shows the choice in use and opens the list of the others.
class ChoiceButton : public QToolButton {
    Q_OBJECT

  public:
    ChoiceButton(const QString& name, const QString& accessibleName, QWidget* parent = nullptr);
    void setChoice(const QString& text);
    QSize sizeHint() const override;
    QSize minimumSizeHint() const override { return sizeHint(); }
};

/// Words of a way of weighing.
QString weightsText(Weights weights);
QString methodText(Method method);

/// The calibration function: all families in groups, and which quantity it gives.
ChoiceButton* functionButton(Workbench& workbench, QWidget* parent);
/// The probability of every interval.
ChoiceButton* coverageButton(Workbench& workbench, QWidget* parent);
/// Method, weights, and where the covariance comes from.
ChoiceButton* weightsButton(Workbench& workbench, QWidget* parent);
ChoiceButton* enlargementButton(LinePlot& plot, QWidget* parent);

} // namespace spanwright
