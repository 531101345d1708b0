// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/Look.h"

#include <QApplication>
#include <QFontDatabase>
#include <QStyle>
#include <QStyleFactory>

#include <cmath>

/// The arrows lie in a library that is linked in, so they must be asked for by name; outside of any namespace, as the macro wants.
static void loadResources() {
    Q_INIT_RESOURCE(resources);
}

namespace spanwright {

namespace {

Scheme lightScheme() {
    return {.name = SchemeName::Light,
            .paper = QColor(0xf5, 0xf4, 0xef),
            .card = QColor(0xff, 0xfe, 0xfb),
            .line = QColor(0xe2, 0xdf, 0xd6),
            .ink = QColor(0x1f, 0x2d, 0x38),
            .quiet = QColor(0x57, 0x63, 0x6e),
            .accent = QColor(0x0a, 0x68, 0x7a),
            .onAccent = QColor(0xff, 0xff, 0xff),
            .band = QColor(0x0b, 0x6e, 0x80, 84),
            .outerBand = QColor(0x0b, 0x6e, 0x80, 26),
            .warning = QColor(0xb3, 0x44, 0x1f),
            .selection = QColor(0xdc, 0xec, 0xee),
            .lackOfFit = QColor(0xc0, 0x87, 0x3a),
            .hysteresis = QColor(0x8d, 0x59, 0x97),
            .runs = QColor(0x4a, 0x73, 0xa9),
            .repeatability = QColor(0x86, 0x92, 0x9b)};
}

Scheme darkScheme() {
    return {.name = SchemeName::Dark,
            .paper = QColor(0x13, 0x17, 0x1a),
            .card = QColor(0x1b, 0x20, 0x24),
            .line = QColor(0x33, 0x3b, 0x41),
            .ink = QColor(0xe8, 0xe6, 0xdf),
            .quiet = QColor(0xa3, 0xad, 0xb4),
            .accent = QColor(0x58, 0xb9, 0xca),
            .onAccent = QColor(0x06, 0x1e, 0x24),
            .band = QColor(0x58, 0xb9, 0xca, 92),
            .outerBand = QColor(0x58, 0xb9, 0xca, 30),
            .warning = QColor(0xf0, 0x93, 0x6c),
            .selection = QColor(0x22, 0x3d, 0x44),
            .lackOfFit = QColor(0xd3, 0x9b, 0x4e),
            .hysteresis = QColor(0xb0, 0x80, 0xbc),
            .runs = QColor(0x6f, 0x9a, 0xd2),
            .repeatability = QColor(0x8f, 0x9b, 0xa4)};
}

Scheme& current() {
    static Scheme held = lightScheme();
    return held;
}

QPalette paletteOf(const Scheme& s) {
    QPalette p;
    p.setColor(QPalette::Window, s.paper);
    p.setColor(QPalette::WindowText, s.ink);
    p.setColor(QPalette::Base, s.card);
    p.setColor(QPalette::AlternateBase, s.paper);
    p.setColor(QPalette::Text, s.ink);
    p.setColor(QPalette::Button, s.card);
    p.setColor(QPalette::ButtonText, s.ink);
    p.setColor(QPalette::ToolTipBase, s.card);
    p.setColor(QPalette::ToolTipText, s.ink);
    p.setColor(QPalette::Highlight, s.accent);
    p.setColor(QPalette::HighlightedText, s.onAccent);
    p.setColor(inkRole::quiet, s.quiet);
    p.setColor(inkRole::accent, s.accent);
    p.setColor(inkRole::warning, s.warning);
    p.setColor(QPalette::LinkVisited, s.accent);
    p.setColor(QPalette::Light, s.card);
    p.setColor(QPalette::Midlight, s.line);
    p.setColor(QPalette::Mid, s.line);
    p.setColor(QPalette::Dark, s.line);
    for (const auto role : {QPalette::WindowText, QPalette::Text, QPalette::ButtonText})
        p.setColor(QPalette::Disabled, role, s.quiet);
    p.setColor(QPalette::Disabled, QPalette::Highlight, s.line);
    p.setColor(QPalette::Disabled, QPalette::HighlightedText, s.ink);
    return p;
}

/// Flat borders in the scheme's colours; everything else is drawn from the palette.
QString sheetOf(const Scheme& s) {
    static const QString form = QStringLiteral(R"(
QLineEdit, QPlainTextEdit, QTextEdit, QAbstractSpinBox, QComboBox {
  background: @card; border: 1px solid @edge; border-radius: 4px; padding: 3px 6px; selection-background-color: @accent;
  selection-color: @onAccent; }
QLineEdit:focus, QPlainTextEdit:focus, QTextEdit:focus, QAbstractSpinBox:focus, QComboBox:focus { border: 1px solid @accent; }
QLineEdit[refused="true"], QComboBox[refused="true"], QAbstractSpinBox[refused="true"] { border: 1px solid @warning; }
QLineEdit:disabled, QComboBox:disabled, QAbstractSpinBox:disabled { background: @paper; }
QComboBox::drop-down { border: none; width: 22px; }
QComboBox::down-arrow, QAbstractSpinBox::down-arrow { image: url(:/look/down-@name.png); width: 10px; height: 6px; }
QAbstractSpinBox::up-arrow { image: url(:/look/up-@name.png); width: 10px; height: 6px; }
QAbstractSpinBox::up-button, QAbstractSpinBox::down-button { border: none; background: transparent; width: 20px; }
QAbstractSpinBox::up-button { subcontrol-position: top right; }
QAbstractSpinBox::down-button { subcontrol-position: bottom right; }
QComboBox QAbstractItemView { background: @card; border: 1px solid @edge; selection-background-color: @selection;
  selection-color: @ink; outline: none; }
QPushButton { background: @card; border: 1px solid @edge; border-radius: 4px; padding: 4px 14px; }
QPushButton:hover { background: @selection; }
QPushButton:pressed { background: @line; }
QPushButton:focus { border: 1px solid @accent; }
QPushButton:default { background: @accent; color: @onAccent; border: 1px solid @accent; }
QPushButton:default:focus { border: 2px solid @ink; padding: 3px 13px; }
QPushButton:disabled { color: @quiet; background: @paper; border: 1px solid @line; }
QToolButton { background: transparent; border: 1px solid transparent; border-radius: 4px; padding: 3px 6px; }
QToolButton:hover, QToolButton:checked { background: @selection; }
QToolButton:focus { border: 1px solid @accent; }
QToolButton:disabled { color: @quiet; }
QToolButton[link="true"] { color: @accent; font-weight: 600; }
QToolButton[tight="true"] { padding: 1px 0px; }
QToolButton[choice="true"] { padding: 2px 4px; }
QToolButton::menu-indicator { image: none; width: 0px; }
QHeaderView { background: @card; }
QHeaderView::section { background: @card; color: @quiet; border: none; border-bottom: 1px solid @line; padding: 4px 8px; }
QTableView, QListView, QTreeView { background: @card; border: 1px solid @line; gridline-color: @line;
  selection-background-color: @selection; selection-color: @ink; }
QTableView[bare="true"] { border: none; }
QListView[bare="true"] { border: none; background: transparent; }
QHeaderView[dense="true"] { font-size: @small; }
QHeaderView[dense="true"]::section { padding: 4px 5px; }
QTableView QTableCornerButton::section { background: @card; border: none; }
QCheckBox::indicator:unchecked, QGroupBox::indicator:unchecked, QTreeView::indicator:unchecked, QListView::indicator:unchecked,
QTableView::indicator:unchecked { border: 1px solid @quiet; border-radius: 2px; background: @card; }
QCheckBox::indicator:checked, QGroupBox::indicator:checked, QTreeView::indicator:checked, QListView::indicator:checked,
QTableView::indicator:checked { border: 1px solid @quiet; border-radius: 2px; background: @card; image: url(:/look/check-@name.png); }
QCheckBox::indicator:focus, QCheckBox::indicator:hover { border: 1px solid @accent; }
QToolTip { background: @card; color: @ink; border: 1px solid @edge; padding: 3px; }
QMenuBar { background: @card; border-bottom: 1px solid @line; }
QMenuBar::item { padding: 4px 10px; background: transparent; }
QMenuBar::item:selected { background: @selection; }
QMenu { background: @card; border: 1px solid @edge; padding: 4px; }
QMenu::item { padding: 5px 24px 5px 16px; border-radius: 3px; }
QMenu::item:selected { background: @selection; color: @ink; }
QMenu::item:disabled { color: @quiet; }
QMenu::separator { height: 1px; background: @line; margin: 4px 8px; }
QScrollArea { border: none; background: transparent; }
QScrollBar:vertical { background: transparent; width: 12px; margin: 0; }
QScrollBar:horizontal { background: transparent; height: 12px; margin: 0; }
QScrollBar::handle { background: @edge; border-radius: 4px; margin: 2px; min-height: 28px; min-width: 28px; }
QScrollBar::handle:hover { background: @quiet; }
QScrollBar::add-line, QScrollBar::sub-line { width: 0; height: 0; }
QScrollBar::add-page, QScrollBar::sub-page { background: transparent; }
QSplitter::handle { background: transparent; }
)");
    const QColor edge = s.name == SchemeName::Light ? s.line.darker(122) : s.line.lighter(150);
    QString sheet = form;
    sheet.replace(QLatin1String("@name"), s.name == SchemeName::Light ? QLatin1String("light") : QLatin1String("dark"));
    sheet.replace(QLatin1String("@small"), QString::number(textFont(TextRole::Small).pointSizeF()) + QLatin1String("pt"));
    // Longer names first, so that @onAccent is not read as @on….
    const std::pair<const char*, QColor> names[] = {{"@selection", s.selection}, {"@onAccent", s.onAccent}, {"@warning", s.warning},
                                                    {"@accent", s.accent},       {"@quiet", s.quiet},       {"@paper", s.paper},
                                                    {"@card", s.card},           {"@line", s.line},         {"@edge", edge},
                                                    {"@ink", s.ink}};
    for (const auto& [name, colour] : names)
        sheet.replace(QLatin1String(name), colour.name());
    return sheet;
}

double linear(double channel) {
    return channel <= 0.04045 ? channel / 12.92 : std::pow((channel + 0.055) / 1.055, 2.4);
}

double luminance(const QColor& c) {
    return 0.2126 * linear(c.redF()) + 0.7152 * linear(c.greenF()) + 0.0722 * linear(c.blueF());
}

} // namespace

const Scheme& scheme() {
    return current();
}

const Scheme& paperScheme() {
    static const Scheme paper = [] {
        Scheme s = lightScheme();
        s.paper = s.card = Qt::white;
        return s;
    }();
    return paper;
}

void setScheme(QApplication& application, SchemeName name) {
    loadResources();
    current() = name == SchemeName::Light ? lightScheme() : darkScheme();
    if (!application.style() || application.style()->name() != QLatin1String("fusion"))
        application.setStyle(QStyleFactory::create(QStringLiteral("Fusion")));
    application.setFont(textFont(TextRole::Body));
    application.setPalette(paletteOf(current()));
    application.setStyleSheet(sheetOf(current()));
}

double contrastRatio(const QColor& a, const QColor& b) {
    const double la = luminance(a), lb = luminance(b);
    return (std::max(la, lb) + 0.05) / (std::min(la, lb) + 0.05);
}

QFont textFont(TextRole role) {
    QFont font;
    // Faces whose figures are all equally wide, so that columns of numbers align.
    font.setFamilies({QStringLiteral("Open Sans"), QStringLiteral("Noto Sans"), QStringLiteral("DejaVu Sans"),
                      QStringLiteral("Liberation Sans"), QStringLiteral("sans-serif")});
    font.setStyleHint(QFont::SansSerif);
    switch (role) {
    case TextRole::Body: font.setPointSizeF(10); break;
    case TextRole::Small: font.setPointSizeF(9); break;
    case TextRole::Heading:
        font.setPointSizeF(10);
        font.setWeight(QFont::DemiBold);
        break;
    case TextRole::Title:
        font.setPointSizeF(11);
        font.setWeight(QFont::DemiBold);
        break;
    case TextRole::Display:
        font.setPointSizeF(30);
        font.setWeight(QFont::DemiBold);
        break;
    }
    return font;
}

} // namespace spanwright
