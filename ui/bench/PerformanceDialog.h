// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/look/SheetDialog.h"

class QLabel;

namespace spanwright {

class FiguresTable;
class Workbench;
struct PhaseEvaluation;

/// What the item does, in its unit and in % of span, and where the worst of it occurs; force figures where the item was turned.
class PerformanceDialog : public SheetDialog {
    Q_OBJECT

  public:
    explicit PerformanceDialog(Workbench& workbench, QWidget* parent = nullptr);

  private:
    void refresh();
    void showForce(const PhaseEvaluation* phase);
    void copy();

    Workbench& workbench_;
    FiguresTable* process_;
    QLabel* processNote_;
    QLabel* processHead_;
    QLabel* forceHead_;
    FiguresTable* force_;
    QLabel* forceNote_;
    QLabel* noForce_;
};

} // namespace spanwright
