// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/TextMark.h"

#include "core/session/Sha256.h"

namespace spanwright {

namespace {

constexpr std::string_view Program = "Written by Spanwright ";
constexpr std::string_view CheckSum = "; check sum ";
constexpr std::size_t SumDigits = 16;

std::string checkSum(std::string_view text) {
    return sha256(text).substr(std::string_view("sha256:").size(), SumDigits);
}

} // namespace

std::string withMark(std::string text, const MarkFrame& frame) {
    std::string line(frame.before);
    line.append(Program).append(SPANWRIGHT_VERSION).append(CheckSum).append(checkSum(text)).append(frame.after);
    return text + line + '\n';
}

bool bearsMark(std::string_view text) {
    if (!text.ends_with('\n'))
        return false;
    const std::size_t before = text.substr(0, text.size() - 1).rfind('\n');
    const std::size_t begin = before == std::string_view::npos ? 0 : before + 1;
    const std::string_view line = text.substr(begin);
    const std::size_t sum = line.find(CheckSum);
    return sum != std::string_view::npos && line.find(Program) < sum &&
           line.substr(sum + CheckSum.size(), SumDigits) == checkSum(text.substr(0, begin));
}

} // namespace spanwright
