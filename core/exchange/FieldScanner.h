// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <string>
#include <string_view>

namespace spanwright {

/// Splits a table of text into fields: separator, quotes doubled inside quotes, lines ended by LF, CRLF or CR (RFC 4180, and
/// what programs write besides). A separator of ' ' stands for any run of blanks.
class FieldScanner {
  public:
    FieldScanner(std::string_view text, char separator, char quote)
        : at_(text.data()), end_(text.data() + text.size()), separator_(separator), quote_(quote) {}

    enum class After { Separator, LineEnd, TextEnd };
    struct Field {
        std::string_view text; ///< valid until the next call
        bool quoted = false;
        After after = After::Separator;
    };

    /// The next field, which begins where the scanner stands.
    Field next();
    /// At the beginning of a line: passes over lines that hold nothing but blanks and separators, and in a table separated by
    /// blanks the blanks in front. False at the end of the text.
    bool toNextRow();

    /// Line of the text, from 1, in which the scanner stands.
    [[nodiscard]] std::size_t line() const { return line_; }
    /// Line in which a quote was opened that is never closed; 0 when there is none.
    [[nodiscard]] std::size_t unclosedQuote() const { return unclosedQuote_; }

    /// For a reader that takes a field by itself: where the scanner stands, and going on from the character after it.
    [[nodiscard]] const char* position() const { return at_; }
    [[nodiscard]] const char* end() const { return end_; }
    [[nodiscard]] bool endsField(const char* p) const { return p == end_ || *p == separator_ || *p == '\n' || *p == '\r'; }
    After passTo(const char* fieldEnd);

  private:
    Field quotedField();
    void skipSeparatorBlanks();

    const char* at_;
    const char* end_;
    char separator_;
    char quote_;
    std::size_t line_ = 1;
    std::size_t unclosedQuote_ = 0;
    std::string scratch_;
};

} // namespace spanwright
