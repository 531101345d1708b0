// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/look/SheetDialog.h"

class QComboBox;

namespace spanwright {

/// Asks why something is done that the record keeps for good: a value changed, a finding dismissed. Without a reason it is not done.
class ReasonDialog : public SheetDialog {
    Q_OBJECT

  public:
    struct Question {
        QString title;
        QString heading; ///< what it is about
        QString change;  ///< "4.002 → 4.020"; may be empty
        QString ask;     ///< the question above the list
        QStringList usual; ///< reasons to choose from; the first is there to begin with
        QString accept, reject;
    };
    ReasonDialog(const QString& name, const Question& question, QWidget* parent = nullptr);
    [[nodiscard]] QString reason() const;

  private:
    QComboBox* reason_;
};

} // namespace spanwright
