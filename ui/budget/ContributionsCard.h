// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/BudgetLine.h"
#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

class QComboBox;
class QLabel;
class QLineEdit;
class QPushButton;
class QTableView;
class QVBoxLayout;

namespace spanwright {

class TextTable;

/// What U at the chosen set point is made of, with the share of each line, and the derived lines that were left out.
class ContributionsCard : public Card {
    Q_OBJECT

  public:
    explicit ContributionsCard(Workbench& bench, QWidget* parent = nullptr);
    void showPoint(int point);
    /// Marks the line of the budget at the chosen set point, if it is there.
    void choose(DerivedLine line);

  private:
    void show();
    void showOmitted();
    void leaveOut();
    void takeBack(DerivedLine line);
    [[nodiscard]] const SetPointBudget* budget(const Evaluation& evaluation) const;

    Workbench& bench_;
    int point_ = 0;
    TextTable* table_;
    QTableView* view_;
    QLabel* sum_;
    QLabel* readBack_;
    QVBoxLayout* omitted_;
    QComboBox* line_;
    QLineEdit* reason_;
    QPushButton* leaveOut_;
};

} // namespace spanwright
