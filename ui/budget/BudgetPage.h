// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"

#include <QWidget>

namespace spanwright {

class ContributionsCard;
class ManualLinesCard;
class ResultsCard;

/// The uncertainty at each set point, what it is made of, the lines added by hand, and the limits with the decision.
class BudgetPage : public QWidget {
    Q_OBJECT

  public:
    explicit BudgetPage(Workbench& bench, QWidget* parent = nullptr);
    /// Makes the editor of a field exist ("budget.lines.1.amount" chooses the second line).
    void prepareField(const QString& field);

  private:
    ResultsCard* results_;
    ContributionsCard* contributions_;
    ManualLinesCard* lines_;
};

} // namespace spanwright
