// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/SheetDialog.h"

class QGridLayout;
class QLabel;
class QSpinBox;

namespace spanwright {

class NumberEdit;

/// The coefficients with their uncertainties, each by itself and all together, and every interval of the function at one place.
class IntervalsDialog : public SheetDialog {
    Q_OBJECT

  public:
    explicit IntervalsDialog(Workbench& workbench, QWidget* parent = nullptr);

  private:
    void refresh();
    void showCoefficients(const PhaseEvaluation& phase);
    void showPlace(const PhaseEvaluation& phase);

    Workbench& workbench_;
    QGridLayout* coefficients_;
    QGridLayout* intervals_;
    QLabel* together_;
    QLabel* placeName_;
    NumberEdit* place_;
    QSpinBox* repeats_;
    QLabel* words_;
};

} // namespace spanwright
