// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/JsonWriter.h"

#include <algorithm>
#include <charconv>
#include <cmath>

namespace spanwright {

std::string jsonText(std::string_view text) {
    static constexpr char digits[] = "0123456789abcdef";
    std::string quoted = "\"";
    for (const char c : text) {
        const auto byte = static_cast<unsigned char>(c);
        if (c == '"' || c == '\\') {
            quoted += '\\';
            quoted += c;
        } else if (byte < 0x20) {
            quoted += "\\u00";
            quoted += digits[byte >> 4U];
            quoted += digits[byte & 15U];
        } else {
            quoted += c;
        }
    }
    return quoted + '"';
}

JsonWriter::JsonWriter(Start start) {
    if (start == Start::InsideObject)
        levels_.push_back({Layout::Lines, true, true, {}});
}

void JsonWriter::separate() {
    if (levels_.empty())
        return;
    Level& level = levels_.back();
    if (level.any)
        written_ += level.layout == Layout::Lines ? "," : ", ";
    if (level.layout == Layout::Lines)
        written_ += '\n' + std::string(2 * levels_.size(), ' ');
    level.any = true;
}

JsonWriter& JsonWriter::key(std::string_view name) {
    separate();
    key_ = name;
    written_ += jsonText(name) + ": ";
    return *this;
}

std::string JsonWriter::path() const {
    const std::string outer = levels_.empty() ? std::string() : levels_.back().path;
    return outer.empty() || key_.empty() ? outer + key_ : outer + "." + key_;
}

JsonWriter& JsonWriter::raw(std::string_view text) {
    if (levels_.empty() || !levels_.back().object)
        separate();
    written_ += text;
    key_.clear();
    return *this;
}

JsonWriter& JsonWriter::begin(char bracket, Layout layout) {
    const std::string here = path();
    raw(std::string_view(&bracket, 1));
    levels_.push_back({layout, bracket == '{', false, here});
    return *this;
}

JsonWriter& JsonWriter::end(char bracket) {
    const Level level = levels_.back();
    levels_.pop_back();
    if (level.layout == Layout::Lines && level.any)
        written_ += '\n' + std::string(2 * levels_.size(), ' ');
    written_ += bracket;
    return *this;
}

JsonWriter& JsonWriter::beginObject(Layout layout) { return begin('{', layout); }
JsonWriter& JsonWriter::endObject() { return end('}'); }
JsonWriter& JsonWriter::beginArray(Layout layout) { return begin('[', layout); }
JsonWriter& JsonWriter::endArray() { return end(']'); }

JsonWriter& JsonWriter::value(double number) {
    if (!std::isfinite(number))
        return null();
    char text[32];
    const auto end = std::to_chars(std::begin(text), std::end(text), number).ptr;
    return raw(std::string_view(text, static_cast<std::size_t>(end - text)));
}

JsonWriter& JsonWriter::value(std::string_view text) { return raw(jsonText(text)); }
JsonWriter& JsonWriter::value(bool flag) { return raw(flag ? "true" : "false"); }

JsonWriter& JsonWriter::null() {
    const std::string here = path();
    if (std::find(missing_.begin(), missing_.end(), here) == missing_.end())
        missing_.push_back(here);
    return raw("null");
}

} // namespace spanwright
