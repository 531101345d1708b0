// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <QString>

namespace spanwright {

/// A number as it is typed: a decimal point or a comma, never a thousands separator. Kept digit for digit.
/// Errors: CellEmpty, ThousandsSeparator, NumberTooLarge, CellNotANumber (facts: text).
Result<Decimal> parseTyped(const QString& text);

} // namespace spanwright
