// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/bench/Suspects.h"
#include "ui/look/SheetDialog.h"

class QComboBox;

namespace spanwright {

/// One question about all doubtful numbers of what was typed or pasted: each is recorded as typed unless the number that would fit is chosen
/// instead. Rejecting records nothing.
class SuspectsDialog : public SheetDialog {
    Q_OBJECT

  public:
    /// `names`: what the reading of each suspect is called.
    SuspectsDialog(std::vector<Suspect> suspects, const QStringList& names, QWidget* parent);
    [[nodiscard]] std::vector<Suspect> answers() const;

  private:
    std::vector<Suspect> suspects_;
    std::vector<QComboBox*> choices_;
};

} // namespace spanwright
