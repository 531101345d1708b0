// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <QLocale>
#include <QString>

namespace spanwright {

/// A number as typed, with the locale's decimal mark and a true minus sign (U+2212), digit for digit.
QString typedText(const Decimal& value, const QLocale& locale = QLocale());
/// A computed number to `decimals` digits after the mark; `sign` also shows a plus. A value that rounds to zero has no minus.
enum class SignShown { Minus, Both };
QString fixedText(double value, int decimals, SignShown sign = SignShown::Minus, const QLocale& locale = QLocale());
/// A computed number to `digits` significant digits; an exponent as ×10ⁿ where needed. ∞ and – for infinite and missing.
QString significantText(double value, int digits, const QLocale& locale = QLocale());
/// A number that somebody chose, a set point say, no longer than it need be: "5", "2.5".
QString placeText(double value, const QLocale& locale = QLocale());
/// A share as a percentage; a share below 1 is never printed as 100 %, one above 0 never as 0 %.
QString shareText(double share, const QLocale& locale = QLocale());
/// The same for a table where the parts matter, not how near to the whole one of them comes: above 99.9 % it says just that.
QString briefShareText(double share, const QLocale& locale = QLocale());
/// A p value: "0.34", "< 0.001".
QString pText(double p, const QLocale& locale = QLocale());

} // namespace spanwright
