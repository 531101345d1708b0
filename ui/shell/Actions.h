// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QAction>
#include <QKeySequence>
#include <QObject>
#include <QString>

#include <vector>

class QMenu;
class QWidget;

namespace spanwright {

/// What an action is called and how it is reached. Without a shortcut `reason` says why there is none.
struct ActionSpec {
    const char* id;
    QString text; ///< with its mnemonic
    QKeySequence shortcut;
    const char* reason = nullptr;
};

/// Every action of a window by id, in the order in which they were made. The list of commands and the list of keys are this.
class Actions : public QObject {
    Q_OBJECT

  public:
    explicit Actions(QWidget* window);
    QAction* add(QMenu* menu, const ActionSpec& spec);
    [[nodiscard]] QAction* find(const QString& id) const;
    [[nodiscard]] const std::vector<QAction*>& all() const { return all_; }
    /// Takes up the actions of a page of another room (QWidget::actions()), so that they can be found too.
    void adopt(QWidget* page);

  private:
    QWidget* window_;
    std::vector<QAction*> all_;
};

/// The text of an action without its mnemonic and dots.
QString plainText(const QAction* action);

} // namespace spanwright
