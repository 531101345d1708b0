// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/SheetDialog.h"

class QLabel;
class QSpinBox;

namespace spanwright {

class NumberEdit;

/// Type an indication, read the value and its uncertainty: the calibration function read backwards, as the item's user will. Stays
/// open beside the work and follows it.
class ConvertDialog : public SheetDialog {
    Q_OBJECT

  public:
    explicit ConvertDialog(Workbench& workbench, QWidget* parent = nullptr);

  private:
    void convert();
    void showValue(const ReadValue& value, const StatedValue& stated, const QString& unit);
    void showInterval(const ReadValue& value, const PhaseEvaluation& phase, const QString& unit);

    Workbench& workbench_;
    NumberEdit* indication_;
    QSpinBox* repeats_;
    QLabel* value_;
    QLabel* interval_;
    QLabel* warnings_;
};

} // namespace spanwright
