// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/bench/FitEffect.h"
#include "ui/commands/Workbench.h"
#include "ui/look/SheetDialog.h"

class QLabel;
class QPushButton;

namespace spanwright {

class FiguresTable;
class TrialEvaluation;

/// What each exclusion did: the fit as it is beside the fit with that reading back in, and with all of them. From here readings
/// are taken back in, and it is said how many may be excluded before findings and certificate say so.
class ExclusionsDialog : public SheetDialog {
    Q_OBJECT

  public:
    explicit ExclusionsDialog(Workbench& workbench, QWidget* parent = nullptr);

  private:
    /// One line of the list: some readings back in.
    struct Trial {
        std::vector<ReadingId> back;
        QString name, reason, by;
        QString s, expanded, shift; ///< filled when it was evaluated
        std::vector<EffectRow> effect;
    };
    void start();
    void evaluateNext();
    void take(const std::shared_ptr<const Evaluation>& evaluation);
    void showList();
    void showEffect();
    void readmit();

    Workbench& workbench_;
    FiguresTable* list_;
    EffectTable* effect_;
    QLabel* limit_;
    QPushButton* readmit_;
    TrialEvaluation* evaluation_;
    std::vector<Trial> trials_;
    std::size_t next_ = 0;
};

} // namespace spanwright
