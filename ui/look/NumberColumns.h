// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QObject>

class QTableView;

namespace spanwright {

/// The widths of a table of numbers: a column is never narrower than its head and its widest number. Words give way first, down
/// to a few letters and an ellipsis; then the table scrolls sideways. Room that is left is shared by all columns, as much as lets
/// them breathe and no more, so that a row can still be read along in a very wide window.
class NumberColumns : public QObject {
    Q_OBJECT

  public:
    static constexpr int NoWords = -1;
    /// `words` is the column that gives way.
    explicit NumberColumns(QTableView* table, int words = NoWords);

  protected:
    bool eventFilter(QObject* watched, QEvent* event) override;

  private:
    void follow();
    void place();

    QTableView* table_;
    int words_;
    bool placing_ = false;
};

} // namespace spanwright
