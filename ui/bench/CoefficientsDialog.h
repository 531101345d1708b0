// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/SheetDialog.h"
#include "ui/words/CoefficientText.h"

#include <functional>

class QComboBox;
class QLabel;
class QPlainTextEdit;
class QPushButton;

namespace spanwright {

/// Where to save a text; empty when given up. Tests answer in the user's place.
using TextPathAsk = std::function<QString(QWidget* parent, const QString& suggestion)>;
TextPathAsk screenTextPath();

/// The calibration function as text for a data logger: choose a form, copy it or save it. Stays open beside the work and follows it.
class CoefficientsDialog : public SheetDialog {
    Q_OBJECT

  public:
    explicit CoefficientsDialog(Workbench& workbench, TextPathAsk ask = screenTextPath(), QWidget* parent = nullptr);

  private:
    void refresh();
    void copy();
    void save();
    [[nodiscard]] CoefficientForm form() const;

    Workbench& workbench_;
    TextPathAsk ask_;
    QComboBox* form_;
    QPlainTextEdit* text_;
    QLabel* said_;
    QPushButton* copy_;
    QPushButton* save_;
};

} // namespace spanwright
