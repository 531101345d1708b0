// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QColor>
#include <QFont>
#include <QPalette>
#include <QString>

class QApplication;

namespace spanwright {

enum class SchemeName { Light, Dark };

/// The colours of a scheme. Shape and position carry meaning; colour only repeats it.
struct Scheme {
    SchemeName name = SchemeName::Light;
    QColor paper;      ///< behind everything
    QColor card;       ///< sheets that carry content
    QColor line;       ///< borders, rules, grid
    QColor ink;        ///< text
    QColor quiet;      ///< secondary text
    QColor accent;     ///< the fitted function, what can be pressed
    QColor onAccent;   ///< text on accent
    QColor band;       ///< band of the function, translucent
    QColor outerBand;  ///< band of a new reading, translucent
    QColor warning;    ///< excluded, out of limits, overdue
    QColor selection;  ///< behind selected rows
    QColor lackOfFit, hysteresis, runs, repeatability; ///< parts of the variance split
};

/// The scheme in use. Paper output always uses paperScheme().
const Scheme& scheme();
const Scheme& paperScheme();
/// Sets palette, style and font of the application. Widgets that paint by hand repaint on QEvent::PaletteChange.
void setScheme(QApplication& application, SchemeName name);

/// Roles of the palette in the scheme's terms: label->setForegroundRole(inkRole::quiet) follows a change of scheme by itself.
namespace inkRole {
inline constexpr QPalette::ColorRole quiet = QPalette::PlaceholderText;
inline constexpr QPalette::ColorRole accent = QPalette::Link;
inline constexpr QPalette::ColorRole warning = QPalette::BrightText;
} // namespace inkRole

/// WCAG 2.1 contrast ratio of two opaque colours, 1 to 21.
double contrastRatio(const QColor& a, const QColor& b);

/// Distances in device-independent pixels: a step is 8.
namespace space {
inline constexpr int half = 4;
inline constexpr int step = 8;
inline constexpr int card = 16;
} // namespace space

enum class TextRole { Body, Small, Heading, Title, Display };
QFont textFont(TextRole role);

} // namespace spanwright
