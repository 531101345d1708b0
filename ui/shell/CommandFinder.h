// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QDialog>

#include <vector>

class QAction;
class QLineEdit;
class QListWidget;

namespace spanwright {

/// Every action by its words: typing narrows the list, Enter does the first.
class CommandFinder : public QDialog {
    Q_OBJECT

  public:
    CommandFinder(const std::vector<QAction*>& actions, QWidget* parent);
    /// The action that was chosen; null when given up.
    [[nodiscard]] QAction* chosen() const { return chosen_; }

  protected:
    bool eventFilter(QObject* watched, QEvent* event) override;

  private:
    void narrow(const QString& words);
    void take();

    std::vector<QAction*> actions_;
    QLineEdit* words_;
    QListWidget* list_;
    QAction* chosen_ = nullptr;
};

} // namespace spanwright
