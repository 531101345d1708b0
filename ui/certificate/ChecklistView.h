// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/certificate/Checklist.h"

#include <QListWidget>

namespace spanwright {

/// What is missing, and below it what is to be looked at; each entry leads to its field, by mouse or with Enter.
class ChecklistView : public QListWidget {
    Q_OBJECT

  public:
    explicit ChecklistView(QWidget* parent = nullptr);
    void show(const std::vector<ChecklistItem>& items, const Record& record, const Evaluation& evaluation);

  signals:
    void goTo(const QString& stage, const QString& field);

  protected:
    void keyPressEvent(QKeyEvent* event) override;
    void changeEvent(QEvent* event) override;

  private:
    void addHeading(const QString& text);
    void addEntry(const ChecklistItem& item, const QString& text);
    void follow(const QListWidgetItem* item);
    void colour();
};

} // namespace spanwright
