// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

class QTableView;

namespace spanwright {

/// Gives a table as much of its height as whole rows fill, so that none is cut in half at the foot.
class WholeRows : public QWidget {
    Q_OBJECT

  public:
    explicit WholeRows(QTableView* table, QWidget* parent = nullptr);
    [[nodiscard]] QSize sizeHint() const override;
    [[nodiscard]] QSize minimumSizeHint() const override;

  protected:
    void resizeEvent(QResizeEvent* event) override;

  private:
    void place();
    [[nodiscard]] int headHeight() const;
    QTableView* table_;
};

} // namespace spanwright
