// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/SheetDialog.h"

class QLabel;
class QPushButton;
class QTableView;

namespace spanwright {

class MatrixModel;

/// Covariances between the readings: looked at, loaded from a file, pasted, removed. What is refused is said under the table, and
/// what was there stays.
class MatrixDialog : public SheetDialog {
    Q_OBJECT

  public:
    explicit MatrixDialog(Workbench& workbench, QWidget* parent = nullptr);
    /// Takes a table of numbers in; `source` says where it comes from.
    void take(const std::string& text, const QString& source);

  protected:
    void keyPressEvent(QKeyEvent* event) override;

  private:
    void load();
    void paste();
    void remove();
    void refresh();

    Workbench& workbench_;
    MatrixModel* model_;
    QTableView* table_;
    QLabel* about_;
    QLabel* refusal_;
    QPushButton* remove_;
    std::vector<QPushButton*> changing_;
};

} // namespace spanwright
