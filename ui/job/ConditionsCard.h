// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

class QVBoxLayout;

namespace spanwright {

/// The influence quantities at start and end with the limits of the method, and what else describes the setup.
class ConditionsCard : public Card {
    Q_OBJECT

  public:
    explicit ConditionsCard(Workbench& bench, QWidget* parent = nullptr);

  private:
    void show();
    void add(const std::vector<Quantity>& quantities);

    Workbench& bench_;
    QVBoxLayout* rows_;
    std::size_t shown_ = static_cast<std::size_t>(-1);
};

} // namespace spanwright
