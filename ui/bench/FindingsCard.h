// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Finding.h"
#include "ui/look/Card.h"

namespace spanwright {

class FindingsView;
class Workbench;

/// What the readings say about themselves. A finding leads to its readings or its remedy, or is dismissed with a reason and can be
/// brought back.
class FindingsCard : public Card {
    Q_OBJECT

  public:
    explicit FindingsCard(Workbench& workbench, QWidget* parent = nullptr);

  signals:
    void remedyChosen(const spanwright::Finding& finding);

  private:
    void refresh();
    void dismiss(const Finding& finding);
    void recall(const Finding& finding);

    Workbench& workbench_;
    FindingsView* view_;
};

} // namespace spanwright
