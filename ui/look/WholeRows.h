// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

class QTableView;

namespace spanwright {

/// Gives a table as much of its height as whole rows fill, so that none is cut in half at the foot; on wish no more than its rows
/// fill.
class WholeRows : public QWidget {
    Q_OBJECT

  public:
    enum class Fill { Room, Rows }; ///< how far the table reaches down: to the end of the room, or of its rows
    explicit WholeRows(QTableView* table, Fill fill = Fill::Room, QWidget* parent = nullptr);
    [[nodiscard]] QSize sizeHint() const override;
    [[nodiscard]] QSize minimumSizeHint() const override;

  protected:
    void resizeEvent(QResizeEvent* event) override;

  private:
    void place();
    [[nodiscard]] int headHeight() const;
    QTableView* table_;
    Fill fill_;
};

} // namespace spanwright
