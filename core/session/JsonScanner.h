// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Error.h"

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

namespace spanwright {

/// Reads JSON (RFC 8259) from front to back, value by value, as its caller expects it. The first failure stays: from then on
/// every call gives nothing, and loops over keys and items end.
class JsonScanner {
  public:
    explicit JsonScanner(std::string_view json) : json_(json) {}

    [[nodiscard]] bool failed() const { return failure_.has_value(); }
    /// Facts: line, and for SessionValueBad the key and the text.
    [[nodiscard]] const Error& failure() const { return *failure_; }
    /// No JSON at this place.
    void failSyntax();
    /// JSON, but not a value that this key can have.
    void failValue(std::string_view key, std::string_view text);

    bool enterObject() { return enter('{'); }
    /// The next key of the object entered last; empty at its end, which is then passed.
    std::optional<std::string> nextKey();
    bool enterArray() { return enter('['); }
    /// Whether there is another item in the array entered last; at its end that is passed.
    bool nextItem() {
        if (at_ < json_.size() && json_[at_] == ',' && !first_ && !failed()) { // as this program writes rows
            ++at_;
            skipBlanks();
            if (at_ < json_.size() && json_[at_] != ']')
                return true;
            failSyntax();
            return false;
        }
        return nextItemAnyhow();
    }

    /// Passes a null, when there is one.
    bool takeNull();
    [[nodiscard]] bool atString();
    std::string string();
    /// A number, true or false as it stands.
    std::string_view scalar();
    /// A whole number of the range; SessionValueBad at `key` for any other value.
    std::int64_t integer(std::string_view key, std::int64_t least, std::int64_t most);
    /// Passes any value, which must be well-formed, and gives it as it stands.
    std::string_view skip();
    /// Whether only blanks follow.
    [[nodiscard]] bool atEnd();

    /// For readers of their own: bytes passed so far, and going on elsewhere.
    [[nodiscard]] std::size_t offset() const { return at_; }
    void passTo(std::size_t offset) { at_ = offset; }
    [[nodiscard]] std::string_view json() const { return json_; }
    [[nodiscard]] std::size_t line() const;

  private:
    bool enter(char bracket);
    bool nextItemAnyhow();
    void skipBlanks() {
        while (at_ < json_.size() && (json_[at_] == ' ' || json_[at_] == '\n' || json_[at_] == '\r' || json_[at_] == '\t'))
            ++at_;
    }
    void skipAny(int depth);
    char32_t hexadecimal();
    void appendEscape(std::string& text);
    [[nodiscard]] char peek() const { return at_ < json_.size() ? json_[at_] : '\0'; }

    std::string_view json_;
    std::size_t at_ = 0;
    bool first_ = true; ///< nothing of the innermost object or array has been read yet
    std::optional<Error> failure_;
};

} // namespace spanwright
