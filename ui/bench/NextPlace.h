// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <QWidget>

class QLabel;
class QToolButton;

namespace spanwright {

/// Where the next reading is taken: the set point in figures that can be read from the bench, direction and run in words. Without a
/// plan, the way to one.
class NextPlace : public QWidget {
    Q_OBJECT

  public:
    explicit NextPlace(QWidget* parent = nullptr);
    void showPlanned(const Reading& next, const QString& unit);
    void showDone();
    void showUnplanned();

  signals:
    void planRequested();

  private:
    void showWords(const QString& words);

    QLabel* setPoint_;
    QLabel* unit_;
    QLabel* words_;
    QToolButton* plan_;
};

} // namespace spanwright
