// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QTableWidget>

#include <set>
#include <vector>

namespace spanwright {

/// A line of figures. The first cell is a name, the others are numbers in words.
struct FiguresRow {
    QStringList cells;
    int level = 0;      ///< how far the name is indented
    bool quiet = false; ///< beside the matter
};

/// A heading over its unit: "value\nmA".
QString headed(const QString& name, const QString& unit);

/// A table to be read, selected and copied: Ctrl+C or the menu of the right button put the selected rows, or all of them where
/// none is selected, on the clipboard as text with tabs under their headings.
class FiguresTable : public QTableWidget {
    Q_OBJECT

  public:
    FiguresTable(const QString& id, const QString& name, QWidget* parent = nullptr);
    void setFigures(const QStringList& headings, const std::vector<FiguresRow>& rows);
    /// Columns that hold words, which stand at the left.
    void setTextColumns(std::set<int> columns);
    /// A column of words that speak against their row.
    void setObjectionColumn(int column);
    /// At most this many rows are seen without scrolling.
    void setMostRowsShown(int rows);
    [[nodiscard]] QString text() const; ///< of every row
    [[nodiscard]] QString selectedText() const;
    void copy();

    [[nodiscard]] QSize sizeHint() const override;
    [[nodiscard]] QSize minimumSizeHint() const override;

  protected:
    void keyPressEvent(QKeyEvent* event) override;
    void contextMenuEvent(QContextMenuEvent* event) override;

  private:
    [[nodiscard]] QString textOf(const std::vector<int>& rows) const;
    [[nodiscard]] Qt::Alignment sideOf(int column) const;

    std::set<int> words_{0};
    int objections_ = -1, mostRows_ = 16, headHeight_ = 0;
};

} // namespace spanwright
