// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/JsonText.h"

#include "core/exchange/TextEncoding.h"

#include <cstdio>

namespace spanwright {

namespace {

void appendEscaped(std::string& json, std::string_view text) {
    for (const char c : text) {
        switch (c) {
        case '"': json += "\\\""; break;
        case '\\': json += "\\\\"; break;
        case '\n': json += "\\n"; break;
        case '\r': json += "\\r"; break;
        case '\t': json += "\\t"; break;
        default:
            if (static_cast<unsigned char>(c) < 0x20 || c == 0x7F) {
                char code[8];
                std::snprintf(code, sizeof code, "\\u%04x", static_cast<unsigned>(c));
                json += code;
            } else {
                json += c;
            }
        }
    }
}

} // namespace

void appendQuoted(std::string& json, std::string_view text) {
    json += '"';
    while (!text.empty()) {
        const std::size_t valid = validUtf8(text);
        appendEscaped(json, text.substr(0, valid));
        text.remove_prefix(valid);
        if (!text.empty()) {
            json += "\xEF\xBF\xBD";
            text.remove_prefix(1);
        }
    }
    json += '"';
}

void JsonText::separate() {
    if (afterKey_) {
        afterKey_ = false;
        return;
    }
    if (levels_.empty())
        return;
    Level& level = levels_.back();
    if (!level.empty)
        text_ += level.layout == Layout::OneLine ? ", " : ",";
    level.empty = false;
    if (level.layout == Layout::Lines)
        text_.append("\n").append(2 * levels_.size(), ' ');
}

JsonText& JsonText::key(std::string_view name) {
    separate();
    appendQuoted(text_, name);
    text_ += ": ";
    afterKey_ = true;
    return *this;
}

JsonText& JsonText::string(std::string_view text) {
    separate();
    appendQuoted(text_, text);
    return *this;
}

JsonText& JsonText::raw(std::string_view json) {
    separate();
    text_ += json;
    return *this;
}

JsonText& JsonText::begin(char bracket, Layout layout) {
    separate();
    text_ += bracket;
    levels_.push_back({layout, true});
    return *this;
}

JsonText& JsonText::end(char bracket) {
    const Level level = levels_.back();
    levels_.pop_back();
    if (!level.empty && level.layout == Layout::Lines)
        text_.append("\n").append(2 * levels_.size(), ' ');
    text_ += bracket;
    return *this;
}

} // namespace spanwright
