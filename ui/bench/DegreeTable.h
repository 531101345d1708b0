// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/DegreeLadder.h"
#include "ui/look/SheetDialog.h"

namespace spanwright {

class FiguresTable;

/// Polynomials of rising degree side by side, what each gains and what it changes. The chosen row can be used.
class DegreeTable : public SheetDialog {
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

    void accept() override;

  signals:
    void degreeChosen(int degree);

  private:
    [[nodiscard]] int chosen() const; ///< 0 when none is
    void follow();

    FiguresTable* table_;
    QPushButton* use_;
    int now_;
};

} // namespace spanwright
