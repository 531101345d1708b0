// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"

#include <QWidget>

class QLabel;
class QToolButton;

namespace spanwright {

/// What can be done with the readings that are selected, wherever they were selected. Shown only while there are some.
class SelectionBar : public QWidget {
    Q_OBJECT

  public:
    explicit SelectionBar(Workbench& workbench, QWidget* parent = nullptr);

  signals:
    void excludeRequested();
    void readmitRequested();

  private:
    void refresh();
    Workbench& workbench_;
    QLabel* count_;
    QToolButton* exclude_;
    QToolButton* readmit_;
};

} // namespace spanwright
