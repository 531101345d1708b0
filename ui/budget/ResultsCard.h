// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

class QTableView;

namespace spanwright {

class TextTable;

/// Error, U, limit and decision at every set point of the phase that is shown.
class ResultsCard : public Card {
    Q_OBJECT

  public:
    explicit ResultsCard(Workbench& bench, QWidget* parent = nullptr);

  signals:
    /// A row of Budget::points.
    void pointChosen(int point);

  private:
    void show();

    Workbench& bench_;
    TextTable* table_;
    QTableView* view_;
    QWidget* rows_;
    QLabel* empty_;
};

/// Digits after the mark that show `u` to two significant digits.
int decimalsOf(double u);

} // namespace spanwright
