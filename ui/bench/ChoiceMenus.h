// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/plot/LinePlot.h"
#include "ui/plot/ResidualView.h"

#include <QToolButton>

#include <functional>
#include <vector>

namespace spanwright {

/// A quiet button in the head of a card that shows the choice in use and opens the list of the others.
class ChoiceButton : public QToolButton {
    Q_OBJECT

  public:
    ChoiceButton(const QString& name, const QString& accessibleName, QWidget* parent = nullptr);
    void setChoice(const QString& text);
    /// The list is filled anew each time it opens; the further actions stand at its end.
    void fillWith(const std::function<void(QMenu&)>& fill);
    void setFurther(std::vector<QAction*> further) { further_ = std::move(further); }
    /// What can be chosen now, without the further actions; valid until the list is filled again.
    [[nodiscard]] std::vector<QAction*> choices();
    QSize sizeHint() const override;
    QSize minimumSizeHint() const override { return sizeHint(); }

  protected:
    void paintEvent(QPaintEvent* event) override;

  private:
    QString choice_;
    std::function<void()> fill_;
    std::vector<QAction*> further_;
};

/// The calibration function: all families in groups, and which quantity it gives.
ChoiceButton* functionButton(Workbench& workbench, QWidget* parent);
/// The probability of every interval.
ChoiceButton* coverageButton(Workbench& workbench, QWidget* parent);
/// Method, weights, and where the covariance comes from.
ChoiceButton* weightsButton(Workbench& workbench, QWidget* parent);
ChoiceButton* enlargementButton(LinePlot& plot, QWidget* parent);

} // namespace spanwright
