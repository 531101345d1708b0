// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

class QLabel;
class QTableWidget;
class QToolButton;

namespace spanwright {

/// The reference standards: a table of what they are and whether they were due, and the fields of the one that is chosen.
class StandardsCard : public Card {
    Q_OBJECT

  public:
    explicit StandardsCard(Workbench& bench, QWidget* parent = nullptr);
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
    int editing_ = -1; ///< standard whose fields are shown
};

} // namespace spanwright
