// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QColor>
#include <QFont>
#include <QPointF>
#include <QRectF>
#include <QSizeF>
#include <QString>

#include <variant>
#include <vector>

class QPainter;

namespace spanwright {

/// What a mark on paper is for; paperScheme() gives the colour.
enum class PageInk { Text, Quiet, Accent, Line, Warning, Shade };

/// How a piece of text is set. Sizes are in points.
struct TextStyle {
    double points = 9;
    bool strong = false;
    PageInk ink = PageInk::Text;
};

/// One line of text, with its baseline; `left` and the width it takes are measured when the page is laid out.
struct TextLine {
    QString text;
    TextStyle style;
    double baseline = 0; ///< mm from the top of the page
};

struct Rule {
    double width = 0.2; ///< mm
    PageInk ink = PageInk::Line;
    Qt::PenStyle style = Qt::SolidLine;
    bool falls = false; ///< from the lower left corner of the block to the upper right one when not
};

/// A filled area.
struct Fill {
    PageInk ink = PageInk::Shade;
};

/// A large word across the page, behind everything.
struct Watermark {
    QString text;
    double points = 100;
    double degrees = 0; ///< anticlockwise
    PageInk ink = PageInk::Shade;
};

/// A mark of a picture: how a value was approached.
struct PlotMark {
    enum class Shape { Dot, Up, Down };
    Shape shape = Shape::Dot;
    PageInk ink = PageInk::Text;
};

/// One thing on the page and the rectangle that it keeps to, in mm from the upper left corner of the page.
struct PageBlock {
    QRectF mm;
    std::variant<TextLine, Rule, Fill, Watermark, PlotMark> what;
};

struct Page {
    std::vector<PageBlock> blocks;
};

/// The pages of a document, as data. A4.
struct Pages {
    QSizeF size{210, 297};
    QRectF content; ///< inside the margins; no block but the watermark leaves it
    std::vector<Page> pages;
};

/// The face of a style, in hundredths of a millimetre, so that measuring and painting never depend on a device.
QFont pageFont(const TextStyle& style);
/// Width of a line of text, mm.
double textWidth(const QString& text, const TextStyle& style);
/// Distance from one baseline to the next, mm.
double lineHeight(const TextStyle& style);
/// Text broken into lines that are no wider than `width` mm; a word that is wider is broken, a number stays with its unit where
/// both fit. Line ends in the text are kept.
std::vector<QString> wrapped(const QString& text, const TextStyle& style, double width);

/// Paints a page into a rectangle of the painter, whatever the device: paper, file or screen.
void paintPage(QPainter& painter, const Pages& pages, std::size_t index, const QRectF& target);

/// All text of the pages, line by line, for people who listen.
QString plainText(const Pages& pages);

} // namespace spanwright
