// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

class QLabel;
class QLineEdit;
class QSpinBox;

namespace spanwright {

class FieldBox;
class FieldLine;

/// Set points, directions, runs.
class PlanCard : public Card {
    Q_OBJECT

  public:
    explicit PlanCard(Workbench& bench, QWidget* parent = nullptr);

  private:
    void fill();
    void showSummary();
    void showUnderstood();

    Workbench& bench_;
    FieldBox* setPoints_ = nullptr;
    FieldLine* line_ = nullptr;
    QLineEdit* from_;
    QLineEdit* to_;
    QSpinBox* points_;
    QLabel* refusal_;
    QLabel* summary_;
};

} // namespace spanwright
