// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/JsonScanner.h"

#include "core/exchange/TextEncoding.h"

#include <algorithm>
#include <charconv>

namespace spanwright {

namespace {

constexpr int DeepestNesting = 200;

bool isDigit(char c) {
    return c >= '0' && c <= '9';
}

/// Length of a number of RFC 8259, section 6, at the beginning of the text; 0 when there is none.
std::size_t numberLength(std::string_view text) {
    std::size_t at = text.starts_with('-') ? 1 : 0;
    const auto digits = [&] {
        const std::size_t from = at;
        while (at < text.size() && isDigit(text[at]))
            ++at;
        return at > from;
    };
    if (at < text.size() && text[at] == '0')
        ++at;
    else if (!digits())
        return 0;
    if (at < text.size() && text[at] == '.') {
        ++at;
        if (!digits())
            return 0;
    }
    if (at < text.size() && (text[at] == 'e' || text[at] == 'E')) {
        ++at;
        if (at < text.size() && (text[at] == '+' || text[at] == '-'))
            ++at;
        if (!digits())
            return 0;
    }
    return at;
}

} // namespace

std::size_t JsonScanner::line() const {
    const std::string_view passed = json_.substr(0, std::min(at_, json_.size()));
    return static_cast<std::size_t>(std::count(passed.begin(), passed.end(), '\n')) + 1;
}

void JsonScanner::failSyntax() {
    if (!failure_)
        failure_ = Error(ErrorCode::NotJson, {{"line", std::to_string(line())}});
}

void JsonScanner::failValue(std::string_view key, std::string_view text) {
    if (!failure_)
        failure_ = Error(ErrorCode::SessionValueBad, {{"line", std::to_string(line())},
                                                      {"key", std::string(key)},
                                                      {"text", std::string(text.substr(0, 80))}});
}

bool JsonScanner::enter(char bracket) {
    skipBlanks();
    if (failed() || peek() != bracket) {
        failSyntax();
        return false;
    }
    ++at_;
    first_ = true;
    return true;
}

bool JsonScanner::nextItemAnyhow() {
    skipBlanks();
    if (failed())
        return false;
    if (peek() == ']') {
        ++at_;
        first_ = false;
        return false;
    }
    if (!first_) {
        if (peek() != ',') {
            failSyntax();
            return false;
        }
        ++at_;
        skipBlanks();
    }
    first_ = false;
    if (at_ == json_.size() || peek() == ']') {
        failSyntax();
        return false;
    }
    return true;
}

std::optional<std::string> JsonScanner::nextKey() {
    skipBlanks();
    if (failed())
        return std::nullopt;
    if (peek() == '}') {
        ++at_;
        first_ = false;
        return std::nullopt;
    }
    if (!first_) {
        if (peek() != ',') {
            failSyntax();
            return std::nullopt;
        }
        ++at_;
    }
    first_ = false;
    std::string key = string();
    skipBlanks();
    if (failed() || peek() != ':') {
        failSyntax();
        return std::nullopt;
    }
    ++at_;
    return key;
}

bool JsonScanner::takeNull() {
    skipBlanks();
    if (failed() || json_.substr(at_, 4) != "null")
        return false;
    at_ += 4;
    return true;
}

bool JsonScanner::atString() {
    skipBlanks();
    return !failed() && peek() == '"';
}

std::string JsonScanner::string() {
    if (!atString()) {
        failSyntax();
        return {};
    }
    ++at_;
    std::string text;
    for (;;) {
        const std::size_t from = at_;
        while (at_ < json_.size() && json_[at_] != '"' && json_[at_] != '\\' && static_cast<unsigned char>(json_[at_]) >= 0x20)
            ++at_;
        text.append(json_, from, at_ - from);
        if (failed())
            return {};
        if (peek() == '"' && at_ < json_.size()) {
            ++at_;
            return text;
        }
        if (peek() != '\\') {
            failSyntax();
            return {};
        }
        ++at_;
        appendEscape(text);
    }
}

void JsonScanner::appendEscape(std::string& text) {
    const char c = peek();
    ++at_;
    switch (c) {
    case '"':
    case '\\':
    case '/': text += c; return;
    case 'b': text += '\b'; return;
    case 'f': text += '\f'; return;
    case 'n': text += '\n'; return;
    case 'r': text += '\r'; return;
    case 't': text += '\t'; return;
    case 'u': break;
    default:
        at_ = std::min(at_, json_.size());
        failSyntax();
        return;
    }
    char32_t code = hexadecimal();
    if (code >= 0xD800 && code < 0xE000) {
        char32_t low = 0;
        if (code < 0xDC00 && json_.substr(at_, 2) == "\\u") {
            at_ += 2;
            low = hexadecimal();
        }
        if (low < 0xDC00 || low > 0xDFFF) {
            failSyntax();
            return;
        }
        code = 0x10000 + ((code - 0xD800) << 10) + (low - 0xDC00);
    }
    appendUtf8(text, code);
}

char32_t JsonScanner::hexadecimal() {
    char32_t code = 0;
    for (int i = 0; i < 4; ++i, ++at_) {
        const char c = peek();
        const int digit = isDigit(c) ? c - '0' : c >= 'a' && c <= 'f' ? c - 'a' + 10 : c >= 'A' && c <= 'F' ? c - 'A' + 10 : -1;
        if (digit < 0) {
            failSyntax();
            return 0;
        }
        code = code * 16 + static_cast<char32_t>(digit);
    }
    return code;
}

std::string_view JsonScanner::scalar() {
    skipBlanks();
    if (failed())
        return {};
    const std::string_view rest = json_.substr(at_);
    std::size_t length = rest.starts_with("true") ? 4 : rest.starts_with("false") ? 5 : numberLength(rest);
    if (length < rest.size() && length > 0 && std::string_view(",]} \n\r\t").find(rest[length]) == std::string_view::npos)
        length = 0;
    if (length == 0) {
        failSyntax();
        return {};
    }
    at_ += length;
    return rest.substr(0, length);
}

std::int64_t JsonScanner::integer(std::string_view key, std::int64_t least, std::int64_t most) {
    const std::string_view digits = skip();
    std::int64_t number = 0;
    const auto [end, problem] = std::from_chars(digits.data(), digits.data() + digits.size(), number);
    if (problem == std::errc{} && end == digits.data() + digits.size() && number >= least && number <= most)
        return number;
    failValue(key, digits);
    return least;
}

std::string_view JsonScanner::skip() {
    skipBlanks();
    const std::size_t from = at_;
    skipAny(0);
    first_ = false;
    return failed() ? std::string_view{} : json_.substr(from, at_ - from);
}

void JsonScanner::skipAny(int depth) {
    skipBlanks();
    const char c = peek();
    if (depth > DeepestNesting) {
        failSyntax();
    } else if (c == '{') {
        enterObject();
        while (nextKey())
            skipAny(depth + 1);
    } else if (c == '[') {
        enterArray();
        while (nextItem())
            skipAny(depth + 1);
    } else if (c == '"') {
        string();
    } else if (!takeNull()) {
        scalar();
    }
}

bool JsonScanner::atEnd() {
    skipBlanks();
    return at_ == json_.size();
}

} // namespace spanwright
