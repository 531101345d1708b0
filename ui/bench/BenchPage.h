// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/plot/PlotSubject.h"
#include "ui/plot/ResidualView.h"

#include <QWidget>

class QLabel;
class QSplitter;
class QToolButton;

namespace spanwright {

class Card;
class ChoiceButton;
class FindingsView;
class LinePlot;
class NextReading;
class ReadingsTable;
class ResidualPlot;
class SplitPicture;

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
    QWidget* buildLeft();
    QWidget* buildMiddle();
    QWidget* buildRight();
    void buildActions();
    void connectSelection();
    void refresh();
    void refreshWords();
    void showSelection();
    void showPart(std::optional<SplitPart> part);
    void setView(ResidualView view);
    void exclude();
    void readmit();
    void follow(const Finding& finding);
    void carryToBudget(std::optional<DerivedLine> line);
    void dismiss(const Finding& finding);
    void recall(const Finding& finding);
    void showExclusions();
    void showPerformance();
    QToolButton* cardLink(const QString& name, const QString& text, void (BenchPage::*what)());
    void showSplitTable();
    void showDegrees();
    [[nodiscard]] PlotSubject subject() const;

    Workbench& workbench_;
    NextReading* next_;
    ReadingsTable* table_;
    LinePlot* line_;
    ResidualPlot* residual_;
    SplitPicture* split_;
    FindingsView* findings_;
    Card* readingsCard_;
    Card* lineCard_;
    Card* splitCard_;
    Card* findingsCard_;
    ChoiceButton* viewButton_;
    ChoiceButton* functionButton_;
    ChoiceButton* weightsButton_;
    QLabel* equation_;
    QLabel* unknown_;
};

} // namespace spanwright
