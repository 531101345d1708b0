// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"
#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

class QLabel;
class QLineEdit;
class QSpinBox;

namespace spanwright {

/// Set points, directions, runs.
class PlanCard : public Card {
    Q_OBJECT

  public:
    explicit PlanCard(Workbench& bench, QWidget* parent = nullptr);

  private:
    void fill();
    void showSummary();

    Workbench& bench_;
    QLineEdit* from_;
    QLineEdit* to_;
    QSpinBox* points_;
    QLabel* refusal_;
    QLabel* summary_;
};

/// "0; 2,5; 5" or "0 2.5 5" or one a line; in rising order, each once.
Result<std::vector<Decimal>> parseSetPoints(const QString& text);
/// `count` set points at equal distances, the ends as typed. At least two.
std::vector<Decimal> evenSetPoints(const Decimal& from, const Decimal& to, int count);

} // namespace spanwright
