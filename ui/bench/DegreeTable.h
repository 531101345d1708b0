// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/DegreeLadder.h"

#include <QDialog>

class QPushButton;
class QTableWidget;

namespace spanwright {

/// Polynomials of rising degree side by side, what each gains and what it changes. The chosen row can be used.
class DegreeTable : public QDialog {
    Q_OBJECT

  public:
    /// `resolution` and `unit` are those of the ordinate, `inUnit` that of the abscissa; `now` is the degree in use.
    struct Question {
        DegreeLadder ladder;
        double resolution = 0;
        int now = 1;
        QString unit, inUnit;
    };
    explicit DegreeTable(const Question& question, QWidget* parent = nullptr);

  signals:
    void degreeChosen(int degree);

  private:
    void fill(const Question& question);

    QTableWidget* table_;
    QPushButton* use_;
};

} // namespace spanwright
