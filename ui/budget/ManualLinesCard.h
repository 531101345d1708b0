// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

class QTableWidget;
class QToolButton;

namespace spanwright {

/// The contributions that the readings cannot show: a list, and the fields of the one that is chosen.
class ManualLinesCard : public Card {
    Q_OBJECT

  public:
    explicit ManualLinesCard(Workbench& bench, QWidget* parent = nullptr);
    void choose(int index);

  private:
    void show();
    void showEditor();
    void add();
    void remove();
    [[nodiscard]] int count() const;

    Workbench& bench_;
    QTableWidget* table_;
    QToolButton* remove_;
    QWidget* editor_ = nullptr;
    int chosen_ = 0;
    int editing_ = -1;
};

} // namespace spanwright
