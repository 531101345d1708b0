// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/Flow.h"

#include <QLocale>

#include <algorithm>

namespace spanwright {

namespace {

constexpr double Ascent = 0.76;      // of the line height, to the baseline
constexpr double Gutter = 2.5;       // mm between columns of a table
constexpr double RowPadding = 0.55;  // mm above and below the text of a row
constexpr double LabelShare = 0.3;   // of a column of labels
constexpr double ColumnGap = 8;      // mm between two columns of labels
constexpr TextStyle Body{9, false, PageInk::Text};

QString afterDecimalMark(const QString& text) {
    const auto mark = text.indexOf(QLocale().decimalPoint());
    return mark < 0 ? QString() : text.mid(mark);
}

bool isNumber(const QString& text) {
    return std::any_of(text.begin(), text.end(), [](QChar c) { return c.isDigit(); });
}

TextStyle cellStyle(const Table& table, const TableCell& cell) {
    return {table.points, cell.strong, cell.ink};
}

/// A number in its column is never broken.
bool staysWhole(const TableColumn& column, const TableCell& cell) {
    return column.align != ColumnAlign::Left && isNumber(cell.text) && (column.align == ColumnAlign::DecimalMark || !cell.text.contains(QLatin1Char(' ')));
}

constexpr double MarkRoom = 3.2; // mm before the text of a cell with a mark

double roomFor(const TableCell& cell, double width) {
    return (cell.mark ? width - MarkRoom : width) - cell.indent;
}

} // namespace

PageBlock textBlock(double x, double baseline, const QString& text, const TextStyle& style, Qt::Alignment end) {
    const double width = textWidth(text, style);
    const double left = end & Qt::AlignRight ? x - width : end & Qt::AlignHCenter ? x - width / 2 : x;
    const double height = lineHeight(style);
    return {QRectF(left, baseline - Ascent * height, width, height), TextLine{text, style, baseline}};
}

Flow::Flow(Pages document, const QRectF& area) : document_(std::move(document)), area_(area) {
    newPage();
}

void Flow::newPage() {
    document_.pages.emplace_back();
    y_ = area_.top();
}

void Flow::space(double mm) {
    if (y_ > area_.top())
        y_ += mm;
}

void Flow::keepTogether(double mm) {
    if (y_ + mm > area_.bottom() && y_ > area_.top())
        newPage();
}

void Flow::place(PageBlock block) {
    page().blocks.push_back(std::move(block));
}

void Flow::textAt(double x, double baseline, const QString& text, const TextStyle& style, Qt::Alignment end) {
    if (!text.isEmpty())
        place(textBlock(x, baseline, text, style, end));
}

void Flow::leaveFirstPage() {
    if (document_.pages.size() == 1)
        newPage();
}

void Flow::title(const QString& text) {
    const TextStyle style{21, true, PageInk::Text};
    for (const QString& line : wrapped(text, style, area_.width())) {
        keepTogether(lineHeight(style));
        textAt(area_.left(), y_ + Ascent * lineHeight(style), line, style);
        y_ += lineHeight(style);
    }
}

void Flow::heading(const QString& text, const QString& note, double follow) {
    const TextStyle style{11, true, PageInk::Text}, quiet{8.5, false, PageInk::Quiet};
    space(6.5);
    const double height = lineHeight(style);
    keepTogether(height + follow);
    const double baseline = y_ + Ascent * height;
    textAt(area_.left(), baseline, text, style);
    textAt(area_.right(), baseline, note, quiet, Qt::AlignRight);
    y_ += height + 1.2;
}

void Flow::paragraph(const QString& text, const TextStyle& style) {
    for (const QString& line : wrapped(text, style, area_.width())) {
        keepTogether(lineHeight(style));
        textAt(area_.left(), y_ + Ascent * lineHeight(style), line, style);
        y_ += lineHeight(style);
    }
}

void Flow::notice(const QString& text, PageInk ink) {
    const TextStyle style{9, true, ink};
    constexpr double inset = 4, padding = 1.6;
    const auto lines = wrapped(text, style, area_.width() - 2 * inset);
    const double height = static_cast<double>(lines.size()) * lineHeight(style) + 2 * padding;
    space(2.5);
    keepTogether(height);
    place({QRectF(area_.left(), y_, area_.width(), height), Fill{PageInk::Shade}});
    const QRectF bar(area_.left() + 0.5, y_, 0, height);
    place({bar, Rule{1.0, ink, Qt::SolidLine, true}});
    y_ += padding;
    for (const QString& line : lines) {
        textAt(area_.left() + inset, y_ + Ascent * lineHeight(style), line, style);
        y_ += lineHeight(style);
    }
    y_ += padding;
}

/// Height that the entries take; they are set beside each other from y_ on, and y_ stays.
double Flow::column(const std::vector<LabelledText>& entries, double left, double width) {
    const TextStyle label{8, false, PageInk::Quiet};
    const double labelWidth = width * LabelShare;
    double y = y_;
    for (const LabelledText& entry : entries) {
        const TextStyle style{Body.points, false, entry.ink};
        const double height = lineHeight(style) + 0.45;
        const auto labels = wrapped(entry.label, label, labelWidth - 1.5);
        const auto texts = wrapped(entry.text, style, width - labelWidth);
        for (std::size_t i = 0; i < std::max(labels.size(), texts.size()); ++i) {
            const double baseline = y + Ascent * height;
            if (i < labels.size())
                textAt(left, baseline, labels[i], label);
            if (i < texts.size())
                textAt(left + labelWidth, baseline, texts[i], style);
            y += height;
        }
    }
    return y - y_;
}

void Flow::labelled(const std::vector<LabelledText>& left, const std::vector<LabelledText>& right) {
    const bool two = !right.empty();
    const double width = two ? (area_.width() - ColumnGap) / 2 : area_.width() * 0.75;
    // Entries are taken in pairs where they must go on on another page.
    std::size_t i = 0, j = 0;
    const auto fits = [&](const std::vector<LabelledText>& entries, std::size_t& next) {
        std::vector<LabelledText> part;
        double height = 0;
        const TextStyle label{8, false, PageInk::Quiet};
        while (next < entries.size()) {
            const auto& entry = entries[next];
            const auto lines = std::max(wrapped(entry.label, label, width * LabelShare - 1.5).size(),
                                        wrapped(entry.text, Body, width * (1 - LabelShare)).size());
            height += static_cast<double>(lines) * (lineHeight(Body) + 0.45);
            if (y_ + height > area_.bottom() && !(part.empty() && y_ <= area_.top()))
                break;
            part.push_back(entry);
            ++next;
        }
        return part;
    };
    while (i < left.size() || j < right.size()) {
        const auto a = fits(left, i), b = fits(right, j);
        if (a.empty() && b.empty()) {
            newPage();
            continue;
        }
        const double first = column(a, area_.left(), width);
        const double second = two ? column(b, area_.left() + width + ColumnGap, width) : 0;
        y_ += std::max(first, second);
    }
}

Flow::Widths Flow::widthsOf(const Table& table) const {
    Widths widths;
    double shares = 0;
    for (const TableColumn& column : table.columns)
        shares += column.share;
    double left = area_.left();
    for (std::size_t c = 0; c < table.columns.size(); ++c) {
        const double width = area_.width() * table.columns[c].share / shares;
        const bool first = c == 0;
        widths.left.push_back(first ? left : left + Gutter);
        widths.width.push_back(first ? width : width - Gutter);
        double after = 0;
        for (const auto& row : table.rows)
            after = std::max(after, textWidth(afterDecimalMark(row[c].text), cellStyle(table, row[c])));
        widths.afterMark.push_back(after);
        left += width;
    }
    return widths;
}

double Flow::headHeight(const Table& table, const Widths& widths) {
    const TextStyle head{table.points - 0.5, true, PageInk::Quiet};
    std::size_t most = 1;
    bool units = false;
    for (std::size_t c = 0; c < table.columns.size(); ++c) {
        most = std::max(most, wrapped(table.columns[c].head, head, widths.width[c]).size());
        units = units || !table.columns[c].unit.isEmpty();
    }
    return static_cast<double>(most + (units ? 1 : 0)) * lineHeight(head);
}

/// Units stand in the last line of the head, names end in the line above it.
void Flow::tableHead(const Table& table, const Widths& widths) {
    const TextStyle head{table.points - 0.5, true, PageInk::Quiet}, unit{table.points - 0.5, false, PageInk::Quiet};
    const double height = lineHeight(head), total = headHeight(table, widths);
    const bool units = std::any_of(table.columns.begin(), table.columns.end(), [](const TableColumn& c) { return !c.unit.isEmpty(); });
    const double last = y_ + total - (1 - Ascent) * height;
    for (std::size_t c = 0; c < table.columns.size(); ++c) {
        const bool left = table.columns[c].align == ColumnAlign::Left;
        const double x = left ? widths.left[c] : widths.left[c] + widths.width[c];
        const Qt::Alignment end = left ? Qt::AlignLeft : Qt::AlignRight;
        const auto lines = wrapped(table.columns[c].head, head, widths.width[c]);
        double baseline = last - static_cast<double>(lines.size() - (units ? 0 : 1)) * height;
        for (const QString& line : lines) {
            textAt(x, baseline, line, head, end);
            baseline += height;
        }
        textAt(x, last, table.columns[c].unit, unit, end);
    }
    y_ += total + 1.0;
    place({QRectF(area_.left(), y_, area_.width(), 0), Rule{0.25, PageInk::Line}});
    y_ += 0.7;
}

void Flow::tableCell(const Table& table, const TableCell& cell, std::size_t column, const Widths& widths) {
    const TextStyle style = cellStyle(table, cell);
    const ColumnAlign align = table.columns[column].align;
    double left = widths.left[column] + cell.indent;
    const double right = widths.left[column] + widths.width[column];
    double baseline = y_ + RowPadding + Ascent * lineHeight(style);
    if (cell.mark) {
        const QRectF box(left, y_ + RowPadding, MarkRoom - 0.8, lineHeight(style));
        place({box, PlotMark{*cell.mark, cell.ink}});
        left += MarkRoom;
    }
    if (align == ColumnAlign::DecimalMark && isNumber(cell.text)) {
        const double short_ = widths.afterMark[column] - textWidth(afterDecimalMark(cell.text), style);
        textAt(right - short_, baseline, cell.text, style, Qt::AlignRight);
        return;
    }
    if (staysWhole(table.columns[column], cell)) {
        textAt(right, baseline, cell.text, style, Qt::AlignRight);
        return;
    }
    for (const QString& line : wrapped(cell.text, style, right - left)) {
        if (align == ColumnAlign::Left)
            textAt(left, baseline, line, style);
        else
            textAt(right, baseline, line, style, Qt::AlignRight);
        baseline += lineHeight(style);
    }
}

void Flow::tableRow(const Table& table, const std::vector<TableCell>& row, const Widths& widths, double height) {
    for (std::size_t c = 0; c < row.size(); ++c)
        tableCell(table, row[c], c, widths);
    y_ += height;
}

double Flow::rowHeight(const Table& table, const std::vector<TableCell>& row, const Widths& widths) {
    double height = 0;
    for (std::size_t c = 0; c < row.size(); ++c) {
        const TextStyle style = cellStyle(table, row[c]);
        const auto lines = staysWhole(table.columns[c], row[c]) ? 1 : wrapped(row[c].text, style, roomFor(row[c], widths.width[c])).size();
        height = std::max(height, static_cast<double>(std::max<std::size_t>(lines, 1)) * lineHeight(style) + 2 * RowPadding);
    }
    return height;
}

double Flow::heightOf(const Table& table) const {
    const Widths widths = widthsOf(table);
    double height = headHeight(table, widths) + 3.5;
    for (const auto& row : table.rows)
        height += rowHeight(table, row, widths);
    return height;
}

void Flow::headedTable(const QString& text, const QString& note, const Table& table) {
    constexpr double headingRoom = 14, startRoom = 32; // mm
    const double whole = heightOf(table);
    heading(text, note, whole + headingRoom <= area_.height() ? whole : startRoom);
    this->table(table);
}

void Flow::table(const Table& table) {
    const Widths widths = widthsOf(table);
    const double head = headHeight(table, widths);
    keepTogether(head + (table.rows.empty() ? 0 : rowHeight(table, table.rows.front(), widths) + 3));
    tableHead(table, widths);
    for (const auto& row : table.rows) {
        const double height = rowHeight(table, row, widths);
        if (y_ + height + 0.5 > area_.bottom()) {
            newPage();
            tableHead(table, widths);
        }
        tableRow(table, row, widths, height);
    }
    y_ += 0.5;
    place({QRectF(area_.left(), y_, area_.width(), 0), Rule{0.25, PageInk::Line}});
    y_ += 1.2;
}

QRectF Flow::picture(double height) {
    keepTogether(height);
    const QRectF box(area_.left(), y_, area_.width(), height);
    y_ += height;
    return box;
}

} // namespace spanwright
