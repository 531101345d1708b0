// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QObject>

class QWidget;

namespace spanwright {

/// Gives the keys of undo and redo to the record while nothing is being typed: line editors and spin boxes of the window take them for
/// their own text only as long as it differs from what was handed over.
class UndoKeys : public QObject {
    Q_OBJECT

  public:
    explicit UndoKeys(QWidget* window);

  protected:
    bool eventFilter(QObject* watched, QEvent* event) override;

  private:
    QWidget* window_;
};

} // namespace spanwright
