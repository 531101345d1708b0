// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/Page.h"

#include "ui/look/Look.h"

#include <QFontMetricsF>
#include <QPainter>
#include <QRegularExpression>
#include <QPainterPath>
#include <QTextLayout>

#include <cmath>

namespace spanwright {

namespace {

constexpr double UnitsPerMm = 100;
constexpr double MmPerPoint = 25.4 / 72;
constexpr double Leading = 1.36;
constexpr double MarkSize = 2.0; // mm

QColor colour(PageInk ink) {
    const Scheme& paper = paperScheme();
    switch (ink) {
    case PageInk::Text: return paper.ink;
    case PageInk::Quiet: return paper.quiet;
    case PageInk::Accent: return paper.accent;
    case PageInk::Line: return paper.line.darker(112);
    case PageInk::Warning: return paper.warning;
    case PageInk::Shade: break;
    }
    // The accent, faint enough that text on it keeps its contrast.
    const QColor accent = paper.accent;
    const auto faint = [](int channel) { return 255 - (255 - channel) * 7 / 100; };
    return {faint(accent.red()), faint(accent.green()), faint(accent.blue())};
}

class PagePainter {
  public:
    explicit PagePainter(QPainter& painter) : painter_(painter) {}

    void operator()(const QRectF& box, const TextLine& line) {
        painter_.setPen(colour(line.style.ink));
        painter_.setFont(pageFont(line.style));
        painter_.drawText(QPointF(box.left(), line.baseline) * UnitsPerMm, line.text);
    }
    void operator()(const QRectF& box, const Rule& rule) {
        QPen pen(colour(rule.ink), rule.width * UnitsPerMm, rule.style, Qt::FlatCap);
        painter_.setPen(pen);
        const QPointF from = rule.falls ? box.topLeft() : box.bottomLeft();
        const QPointF to = rule.falls ? box.bottomRight() : box.topRight();
        painter_.drawLine(from * UnitsPerMm, to * UnitsPerMm);
    }
    void operator()(const QRectF& box, const Fill& fill) {
        painter_.fillRect(QRectF(box.topLeft() * UnitsPerMm, box.size() * UnitsPerMm), colour(fill.ink));
    }
    void operator()(const QRectF& box, const Watermark& mark) {
        const TextStyle style{mark.points, true, mark.ink};
        painter_.save();
        painter_.translate(box.center() * UnitsPerMm);
        painter_.rotate(-mark.degrees);
        // As a shape, so that who copies or searches the text of the page does not meet its letters.
        QPainterPath shape;
        const QFontMetricsF metrics(pageFont(style));
        shape.addText(QPointF(-metrics.horizontalAdvance(mark.text) / 2, metrics.capHeight() / 2), pageFont(style), mark.text);
        painter_.fillPath(shape, colour(mark.ink));
        painter_.restore();
    }
    void operator()(const QRectF& box, const PlotMark& mark) {
        painter_.setPen(Qt::NoPen);
        painter_.setBrush(colour(mark.ink));
        const QPointF at = box.center() * UnitsPerMm;
        const double r = MarkSize / 2 * UnitsPerMm;
        if (mark.shape == PlotMark::Shape::Dot) {
            painter_.drawEllipse(at, r * 0.9, r * 0.9);
            return;
        }
        const double tip = mark.shape == PlotMark::Shape::Up ? -1.15 * r : 1.15 * r;
        painter_.drawPolygon(QPolygonF{at + QPointF(0, tip), at + QPointF(r, -tip * 0.62), at + QPointF(-r, -tip * 0.62)});
    }

  private:
    QPainter& painter_;
};

} // namespace

QFont pageFont(const TextStyle& style) {
    QFont font = textFont(TextRole::Body);
    font.setPixelSize(static_cast<int>(std::lround(style.points * MmPerPoint * UnitsPerMm)));
    font.setWeight(style.strong ? QFont::DemiBold : QFont::Normal);
    font.setHintingPreference(QFont::PreferNoHinting);
    // Any spacing turns ligatures off: a copied or searched “fi” stays two letters.
    font.setLetterSpacing(QFont::AbsoluteSpacing, 1.0 / 64);
    return font;
}

double textWidth(const QString& text, const TextStyle& style) {
    return QFontMetricsF(pageFont(style)).horizontalAdvance(text) / UnitsPerMm;
}

double lineHeight(const TextStyle& style) {
    return style.points * MmPerPoint * Leading;
}

namespace {

constexpr QChar Glue(0x00A0);

/// A number with its unit, and a symbol with its value, held together by a blank at which no line ends.
QString glued(QString text, const TextStyle& style, double width) {
    static const QRegularExpression pair(QStringLiteral("(\\S*\\d) (?=([%‰°ΩµA-Za-z/]{1,6})(?:[\\s;,.)]|$))|(\\S+ =) (?=([+\u2212-]?\\d\\S*))|(\\S+) (?=(= ?\\S*\\d\\S*))"));
    for (qsizetype from = 0;;) {
        const QRegularExpressionMatch match = pair.match(text, from);
        if (!match.hasMatch())
            return text;
        const QString whole = match.captured(0) + match.captured(2) + match.captured(4) + match.captured(6);
        if (textWidth(whole, style) <= width)
            text[match.capturedEnd(0) - 1] = Glue;
        from = match.capturedEnd(0);
    }
}

} // namespace

std::vector<QString> wrapped(const QString& text, const TextStyle& style, double width) {
    std::vector<QString> lines;
    for (const QString& part : text.split(QLatin1Char('\n'))) {
        if (part.isEmpty()) {
            lines.emplace_back();
            continue;
        }
        const QString held = glued(part, style, width);
        QTextLayout layout(held, pageFont(style));
        QTextOption option;
        option.setWrapMode(QTextOption::WrapAtWordBoundaryOrAnywhere);
        layout.setTextOption(option);
        layout.beginLayout();
        for (QTextLine line = layout.createLine(); line.isValid(); line = layout.createLine()) {
            line.setLineWidth(width * UnitsPerMm);
            lines.push_back(part.mid(line.textStart(), line.textLength()).trimmed());
        }
        layout.endLayout();
    }
    return lines;
}

void paintPage(QPainter& painter, const Pages& pages, std::size_t index, const QRectF& target) {
    painter.save();
    painter.setRenderHints(QPainter::Antialiasing | QPainter::TextAntialiasing);
    painter.translate(target.topLeft());
    const double scale = target.width() / (pages.size.width() * UnitsPerMm);
    painter.scale(scale, scale);
    PagePainter paint(painter);
    for (const PageBlock& block : pages.pages[index].blocks)
        std::visit([&](const auto& what) { paint(block.mm, what); }, block.what);
    painter.restore();
}

QString plainText(const Pages& pages) {
    QStringList lines;
    for (const Page& page : pages.pages)
        for (const PageBlock& block : page.blocks)
            if (const auto* line = std::get_if<TextLine>(&block.what))
                lines << line->text;
    return lines.join(QLatin1Char('\n'));
}

} // namespace spanwright
