// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"

#include <QDialog>

class QLabel;
class QPushButton;

namespace spanwright {

class EffectTable;
class TrialEvaluation;

/// Two evaluations of the same readings side by side: two functions, or with and without the exclusions. Coefficients, s, U, largest
/// residual, and the findings that differ. The other one can be taken over.
class CompareDialog : public QDialog {
    Q_OBJECT

  public:
    /// What is compared with the record as it is.
    struct Other {
        QString name;     ///< heading of the other side
        QString nameOfNow;
        Record record;
        QString takeOver; ///< label of the button; empty: only looked at
    };
    CompareDialog(Workbench& workbench, Other other, QWidget* parent = nullptr);

    static Other withFunction(const Record& record, const FunctionChoice& function);
    static Other withoutExclusions(const Record& record);

  signals:
    void takenOver();

  private:
    void show(const std::shared_ptr<const Evaluation>& trial);

    Workbench& workbench_;
    Other other_;
    EffectTable* effect_;
    QLabel* findings_;
    QPushButton* take_ = nullptr;
    TrialEvaluation* trial_;
};

} // namespace spanwright
