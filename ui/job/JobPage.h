// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/commands/Workbench.h"

#include <QWidget>

class QScrollArea;

namespace spanwright {

class StandardsCard;

/// What is calibrated, for whom, by which method, against what, under which conditions, and the plan.
class JobPage : public QWidget {
    Q_OBJECT

  public:
    explicit JobPage(Workbench& bench, QWidget* parent = nullptr);
    /// Makes the editor of a field exist and visible ("standards.1.due" chooses the second standard).
    void prepareField(const QString& field);
    void bringIntoView(QWidget* editor);

  private:
    QScrollArea* scroll_;
    StandardsCard* standards_;
};

} // namespace spanwright
