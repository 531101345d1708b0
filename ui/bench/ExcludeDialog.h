// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/SheetDialog.h"

class QComboBox;
class QLabel;
class QLineEdit;
class QPushButton;
class QVBoxLayout;

namespace spanwright {

class EffectTable;
class TrialEvaluation;

/// Asks for the reason of an exclusion, from a short list or in words, and shows what it does to coefficients, s and U before it is
/// done. The readings stay in the record and in view.
class ExcludeDialog : public SheetDialog {
    Q_OBJECT

  public:
    ExcludeDialog(Workbench& workbench, std::vector<ReadingId> ids, QWidget* parent = nullptr);

    void accept() override;

  private:
    void buildReason();
    void showEffect(const std::shared_ptr<const Evaluation>& trial);
    void complete();
    [[nodiscard]] std::optional<ExclusionReason> reason() const;

    Workbench& workbench_;
    std::vector<ReadingId> ids_;
    QComboBox* reason_;
    QLineEdit* words_;
    QLabel* missing_;
    EffectTable* effect_;
    QPushButton* exclude_;
    TrialEvaluation* trial_;
};

} // namespace spanwright
