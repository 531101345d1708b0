// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/Evaluation.h"
#include "core/record/Record.h"

#include <QWidget>

class QLabel;

namespace spanwright {

/// The foot of the window: the reference standard with its due date, and the conditions.
class StatusLine : public QWidget {
    Q_OBJECT

  public:
    explicit StatusLine(QWidget* parent = nullptr);
    void show(const Record& record, const Evaluation& evaluation);
    void setBusy(bool busy);

  protected:
    void paintEvent(QPaintEvent* event) override;

  private:
    QLabel* standard_;
    QLabel* busy_;
    QLabel* conditions_;
};

} // namespace spanwright
