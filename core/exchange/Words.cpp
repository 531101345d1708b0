// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/Words.h"

namespace spanwright {

namespace {

constexpr std::string_view blanks[] = {" ", "\t", "\f", "\xC2\xA0", "\xE2\x80\xAF"};

} // namespace

std::string_view withoutBlanks(std::string_view text) {
    const auto plain = [](char c) { return c > ' ' && c < '\x7F'; };
    if (!text.empty() && plain(text.front()) && plain(text.back()))
        return text;
    const auto cut = [&] {
        for (const std::string_view blank : blanks) {
            if (text.starts_with(blank)) {
                text.remove_prefix(blank.size());
                return true;
            }
            if (text.ends_with(blank)) {
                text.remove_suffix(blank.size());
                return true;
            }
        }
        return false;
    };
    while (cut()) {
    }
    return text;
}

std::string lowerCase(std::string_view text) {
    std::string lower(text);
    for (char& c : lower)
        if (c >= 'A' && c <= 'Z')
            c = static_cast<char>(c - 'A' + 'a');
    return lower;
}

} // namespace spanwright
