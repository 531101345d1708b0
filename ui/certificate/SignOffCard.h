// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"
#include "ui/look/Card.h"

class QLineEdit;

namespace spanwright {

/// Who performed, checked and authorised: name, position and date for each.
class SignOffCard : public Card {
    Q_OBJECT

  public:
    explicit SignOffCard(Workbench& workbench, QWidget* parent = nullptr);

  private:
    struct Editors {
        QLineEdit *name, *position, *date;
    };
    Editors addRole(SignOffRole role);
    QLineEdit* addEditor(const QString& id, const QString& name, const QString& placeholder);
    void refresh();
    void commit(SignOffRole role);

    Workbench& workbench_;
    std::array<Editors, 3> roles_{};
};

} // namespace spanwright
