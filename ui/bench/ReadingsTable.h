// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/bench/ReadingsColumns.h"
#include "ui/bench/ReadingsDelegate.h"
#include "ui/bench/ReadingsModel.h"

#include <QTableView>

#include <functional>

class QLabel;

namespace spanwright {

class NumberEdit;
struct Place;

/// The readings, typed by keyboard: Enter goes on to the next planned cell, a block from a spreadsheet is pasted at the current
/// cell, X excludes the selected readings. What is refused stays in its cell, with the reason under it.
class ReadingsTable : public QTableView {
    Q_OBJECT

  public:
    explicit ReadingsTable(Workbench& workbench, QWidget* parent = nullptr);

    [[nodiscard]] ReadingsModel& readings() const { return *model_; }
    /// Opens the editor of the cell in which the next value belongs.
    void typeNext();
    /// The words under a refused cell; empty when nothing is refused.
    [[nodiscard]] QString refusal() const;
    void paste(const QString& text);
    /// Columns of stated uncertainties, to type in what no reading has yet.
    void showStated(bool shown) { columns_.showStated(shown); }
    /// The selected rows as text for a spreadsheet.
    [[nodiscard]] QString selectedText() const;

  signals:
    void excludeRequested();
    void readmitRequested();

  protected:
    void keyPressEvent(QKeyEvent* event) override;
    void mousePressEvent(QMouseEvent* event) override;
    void contextMenuEvent(QContextMenuEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;
    void selectionChanged(const QItemSelection& now, const QItemSelection& before) override;
    void scrollContentsBy(int dx, int dy) override;

  private:
    void accept(const QModelIndex& index, const Decimal& value, Onward onward);
    void amend(ReadingId id, NumberColumn column, const Decimal& before, const Decimal& after, Onward onward);
    void enter(Reading reading, NumberColumn column, const Decimal& value, Onward onward);
    void editAgain(int row, NumberColumn column, const Decimal& value);
    void goOn(const QModelIndex& from);
    void say(const QString& words, const QRect& under);
    void silence();
    void showSelection();
    void place(const std::function<void(Place&)>& edit);

    Workbench& workbench_;
    ReadingsModel* model_;
    ReadingsColumns columns_;
    ReadingsDelegate* delegate_;
    QLabel* words_;
    bool following_ = false; ///< the selection is being taken over from the workbench
};

} // namespace spanwright
