// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QDialog>

#include <vector>

class QAction;
class QLineEdit;
class QListWidget;

namespace spanwright {

/// Something that can be done, as it is found.
struct FindableCommand {
    QString words;
    QAction* action;
};

/// Every command by its words: typing narrows the list, Enter does the first.
class CommandFinder : public QDialog {
    Q_OBJECT

  public:
    CommandFinder(std::vector<FindableCommand> commands, QWidget* parent);
    /// The action that was chosen; null when given up.
    [[nodiscard]] QAction* chosen() const { return chosen_; }

  protected:
    bool eventFilter(QObject* watched, QEvent* event) override;

  private:
    void narrow(const QString& words);
    void take();

    std::vector<FindableCommand> commands_;
    QLineEdit* words_;
    QListWidget* list_;
    QAction* chosen_ = nullptr;
};

} // namespace spanwright
