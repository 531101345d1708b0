// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/bench/ChoiceMenus.h"

namespace spanwright {

/// Which phase readings are taken for. Going on to those after adjustment while those before it are incomplete would lose the evidence of
/// how the item was found, so that is asked first.
class PhaseChoice : public ChoiceButton {
    Q_OBJECT

  public:
    explicit PhaseChoice(Workbench& workbench, QWidget* parent = nullptr);

  private:
    void ask(Phase phase);
    void choose(Phase phase);
    void refresh();

    Workbench& workbench_;
};

} // namespace spanwright
