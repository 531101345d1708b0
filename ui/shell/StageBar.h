// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/shell/Stage.h"

#include <QAbstractButton>
#include <QWidget>

class QAction;
class QLabel;
class QHBoxLayout;

namespace spanwright {

/// One stage: its name, and under it in words whether it is complete.
class StageButton : public QAbstractButton {
    Q_OBJECT

  public:
    explicit StageButton(Stage stage, QWidget* parent = nullptr);
    /// How many things are missing; empty: nothing was begun, so nothing is said.
    void setMissing(std::optional<int> missing);
    [[nodiscard]] QString state() const { return state_; }
    [[nodiscard]] QSize sizeHint() const override;

  protected:
    void paintEvent(QPaintEvent* event) override;

  private:
    QString state_;
    bool complete_ = false;
};

/// The head of the window: what is calibrated, the four stages in the order of the work, and what is wanted at any time.
class StageBar : public QWidget {
    Q_OBJECT

  public:
    explicit StageBar(QWidget* parent = nullptr);
    void setItem(const QString& name, const QString& subtitle);
    void setCurrent(Stage stage);
    StageButton* button(Stage stage) const { return buttons_[static_cast<std::size_t>(stage)]; }
    /// A word at the right end that triggers an action.
    void addAtEnd(QAction* action, const QString& label);

  signals:
    void stageChosen(Stage stage);

  protected:
    void paintEvent(QPaintEvent* event) override;

  private:
    QLabel* name_;
    QLabel* subtitle_;
    QHBoxLayout* end_;
    std::array<StageButton*, allStages.size()> buttons_{};
};

} // namespace spanwright
