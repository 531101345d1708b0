// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/ShortText.h"

#include <charconv>
#include <cmath>

namespace spanwright {

std::string shortText(double value) {
    char buffer[400];
    const double size = std::fabs(value);
    const bool plain = size == 0 || (size >= 1e-6 && size < 1e15);
    const auto format = plain ? std::chars_format::fixed : std::chars_format::scientific;
    const auto end = std::to_chars(buffer, buffer + sizeof buffer, value, format);
    return {buffer, end.ptr};
}

int decimalsIn(const std::string& text) {
    const std::size_t point = text.find('.');
    return point == std::string::npos || text.find('e') != std::string::npos ? 0 : static_cast<int>(text.size() - point - 1);
}

} // namespace spanwright
