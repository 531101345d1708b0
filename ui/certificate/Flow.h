// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/certificate/Page.h"

#include <QStringList>

#include <optional>
#include <utility>

namespace spanwright {

/// How the cells of a column stand.
enum class ColumnAlign { Left, Right, DecimalMark };

struct TableColumn {
    QString head, unit;
    ColumnAlign align = ColumnAlign::Right;
    double share = 1; ///< of the table's width
};

struct TableCell {
    QString text;
    PageInk ink = PageInk::Text;
    bool strong = false;
    std::optional<PlotMark::Shape> mark = std::nullopt; ///< drawn before the text
    double indent = 0;                                  ///< mm, of a cell that stands at the left
};

struct Table {
    std::vector<TableColumn> columns;
    std::vector<std::vector<TableCell>> rows;
    double points = 8.5;
};

/// A label with what is said of it.
struct LabelledText {
    QString label, text;
    PageInk ink = PageInk::Text;
};

/// Fills pages from the top: text is wrapped, tables go on on the next page under a repeated head, and headings stay with what
/// follows them.
class Flow {
  public:
    /// `area`: where content goes on every page, mm. `document`: its size and margins.
    Flow(Pages document, const QRectF& area);

    void space(double mm);
    /// Goes on at the top of the second page, unless the first is full already.
    void leaveFirstPage();
    void title(const QString& text);
    /// `note` stands at the right end. Moves to the next page unless `follow` mm of what comes after fit below.
    void heading(const QString& text, const QString& note = {}, double follow = 18);
    void paragraph(const QString& text, const TextStyle& style);
    /// A paragraph on a shaded ground with a bar before it.
    void notice(const QString& text, PageInk ink);
    /// Two columns of labels and texts beside each other.
    void labelled(const std::vector<LabelledText>& left, const std::vector<LabelledText>& right);
    void table(const Table& table);
    /// A heading with its table, on one page where they fit on one at all.
    void headedTable(const QString& heading, const QString& note, const Table& table);
    /// A rectangle of this height for a picture, whole on one page; its blocks are added by place().
    QRectF picture(double height);
    void place(PageBlock block);
    void keepTogether(double mm);

    [[nodiscard]] const QRectF& area() const { return area_; }
    [[nodiscard]] double y() const { return y_; }
    [[nodiscard]] Pages take() { return std::move(document_); }

    /// Adds a line of text whose left (or right) end is at `x`.
    void textAt(double x, double baseline, const QString& text, const TextStyle& style, Qt::Alignment end = Qt::AlignLeft);

  private:
    struct Widths {
        std::vector<double> left, width, afterMark;
    };
    void newPage();
    Page& page() { return document_.pages.back(); }
    double column(const std::vector<LabelledText>& entries, double left, double width);
    Widths widthsOf(const Table& table) const;
    static double headHeight(const Table& table, const Widths& widths);
    static double rowHeight(const Table& table, const std::vector<TableCell>& row, const Widths& widths);
    [[nodiscard]] double heightOf(const Table& table) const;
    void tableHead(const Table& table, const Widths& widths);
    void tableRow(const Table& table, const std::vector<TableCell>& row, const Widths& widths, double height);
    void tableCell(const Table& table, const TableCell& cell, std::size_t column, const Widths& widths);

    Pages document_;
    QRectF area_;
    double y_ = 0;
};

/// A block of text measured and set at a place, for whoever lays out without a Flow.
PageBlock textBlock(double x, double baseline, const QString& text, const TextStyle& style, Qt::Alignment end = Qt::AlignLeft);

} // namespace spanwright
