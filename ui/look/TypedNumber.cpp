// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/look/TypedNumber.h"

namespace spanwright {

Result<Decimal> parseTyped(const QString& text) {
    const std::string typed = text.trimmed().toStdString();
    const bool comma = typed.find(',') != std::string::npos && typed.find('.') == std::string::npos;
    return Decimal::parse(typed, comma ? DecimalMark::Comma : DecimalMark::Point);
}

} // namespace spanwright
