// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Finding.h"
#include "ui/commands/Workbench.h"

#include <QWidget>

class QAction;
class QSplitter;

namespace spanwright {

class Card;
class LineCard;
class NextReading;
class ReadingsTable;
class ResidualsCard;
class SplitCard;

/// The bench: what to do next and the readings on the left; the line above, the residuals under it with the same horizontal axis;
/// what the spread is made of, and what it means, on the right. Its actions() belong into menus and the finder of commands.
class BenchPage : public QWidget {
    Q_OBJECT

  public:
    explicit BenchPage(Workbench& workbench, QWidget* parent = nullptr);
    /// Puts the cursor where the next value is typed.
    void startTyping();

  signals:
    /// The budget is wanted, to carry `line` into it; empty: to look at it.
    void budgetRequested(std::optional<spanwright::DerivedLine> line);
    /// The plan of set points is wanted (on the page of the job).
    void planRequested();

  private:
    void buildLeft(QSplitter* columns);
    void buildMiddle(QSplitter* columns);
    void buildRight(QSplitter* columns);
    void buildActions();
    void connectSelection();
    void refresh();
    void refreshWords();
    void showSelection();
    void showPart(std::optional<SplitPart> part);
    void exclude();
    void readmit();
    void follow(const Finding& finding);
    void carryToBudget(std::optional<DerivedLine> line);
    void showExclusions();
    void showPerformance();
    void showSplitTable();
    void showDegrees();

    Workbench& workbench_;
    NextReading* next_;
    ReadingsTable* table_;
    Card* readingsCard_;
    LineCard* line_;
    ResidualsCard* residuals_;
    SplitCard* split_;
    QAction* degrees_;
};

} // namespace spanwright
