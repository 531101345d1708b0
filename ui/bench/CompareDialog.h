// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/SheetDialog.h"

#include <functional>
#include <vector>

class QComboBox;
class QLabel;
class QListWidget;
class QPushButton;

namespace spanwright {

class EffectTable;
class TrialEvaluation;

/// Two evaluations of the same readings side by side: another function, another method, or all readings without the exclusions.
/// Coefficients, s, U, largest residual, values at chosen points, and the findings that differ. What is compared is chosen at the
/// top; the other one can be taken over.
class CompareDialog : public SheetDialog {
    Q_OBJECT

  public:
    /// What is compared with the record as it is.
    struct Other {
        QString name;      ///< heading of the other side
        QString nameOfNow;
        Record record;
        std::function<void(Choices&)> takeOver; ///< empty: only looked at
    };
    CompareDialog(Workbench& workbench, const Other& other, QWidget* parent = nullptr);

    static Other withFunction(const Record& record, const FunctionChoice& function);
    static Other withMethod(const Record& record, Method method);
    static Other withoutExclusions(const Record& record);
    /// Only looked at: a robust fit never becomes the calibration function. Readings that it weighs down are listed to select.
    static Other withRobust(const Record& record, RobustWeight weight);

    void accept() override;

  private:
    void fillChoice(const Other& first);
    void compare(const Other& other);
    void show(const std::shared_ptr<const Evaluation>& trial);
    void listWeighedDown(const PhaseEvaluation& trial);

    Workbench& workbench_;
    std::vector<Other> others_;
    Other other_;
    QComboBox* choice_;
    EffectTable* effect_;
    QLabel* findings_;
    QListWidget* weighedDown_;
    QPushButton* take_;
    TrialEvaluation* trial_;
};

} // namespace spanwright
