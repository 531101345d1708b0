// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace spanwright {

/// Appends the text between quotation marks, escaped; bytes that are no UTF-8 become U+FFFD, so that what is written is JSON.
void appendQuoted(std::string& json, std::string_view text);

/// Builds indented JSON, each member of an object or array on its own line, or all on one.
class JsonText {
  public:
    enum class Layout { Lines, OneLine };

    JsonText& beginObject(Layout layout = Layout::Lines) { return begin('{', layout); }
    JsonText& endObject() { return end('}'); }
    JsonText& beginArray(Layout layout = Layout::Lines) { return begin('[', layout); }
    JsonText& endArray() { return end(']'); }
    JsonText& key(std::string_view name);
    JsonText& string(std::string_view text);
    /// A value that is JSON already.
    JsonText& raw(std::string_view json);
    JsonText& null() { return raw("null"); }

    /// What is written so far; something may be appended that ends a value of its own.
    std::string& text() { return text_; }
    [[nodiscard]] const std::string& text() const { return text_; }

  private:
    struct Level {
        Layout layout;
        bool empty;
    };
    JsonText& begin(char bracket, Layout layout);
    JsonText& end(char bracket);
    void separate();

    std::string text_;
    std::vector<Level> levels_;
    bool afterKey_ = false;
};

} // namespace spanwright
