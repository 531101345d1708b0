// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "ui/bench/FiguresTable.h"

#include <QDialog>

class QLabel;

namespace spanwright {

class Workbench;

/// Performance figures of the process industry, one row each, a figure that the readings cannot give with a dash.
QStringList processHeadings(const Item& item);
std::vector<FiguresRow> processRows(const ProcessFigures& figures);
/// Force figures at every force, under them the largest of each with the force at which it occurs.
QStringList forceHeadings(const Item& item);
std::vector<FiguresRow> forceRows(const ForceFigures& figures);

/// What the item does, in its unit and in % of span, and where the worst of it occurs; force figures where the item was turned.
class PerformanceDialog : public QDialog {
    Q_OBJECT

  public:
    explicit PerformanceDialog(Workbench& workbench, QWidget* parent = nullptr);

  private:
    void refresh();
    void showForce(const PhaseEvaluation* phase);

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
