// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Result.h"

#include <string>
#include <string_view>

namespace spanwright {

enum class Encoding { Utf8, Utf16LittleEndian, Utf16BigEndian, Windows1252 };

/// "utf-8", "utf-16le", "utf-16be", "windows-1252".
std::string_view encodingName(Encoding encoding);
/// Also "latin-1", "iso-8859-1" and "utf8". Error: UsageValueBad (facts: text).
Result<Encoding> parseEncodingName(std::string_view text);

/// The encoding that the bytes show: a byte order mark, every other byte zero, valid UTF-8, else Windows-1252 (which contains
/// Latin-1). Error: FileBinary when they are no text (facts: byte, the position from 1).
Result<Encoding> guessEncoding(std::string_view bytes);

/// How many bytes at the beginning are valid UTF-8; all of them when the text is.
std::size_t validUtf8(std::string_view text);

/// Appends one character of Unicode.
void appendUtf8(std::string& text, char32_t character);

/// Text in UTF-8 without a byte order mark. Looks into the bytes where nothing had to be converted, so they must outlive it.
class DecodedText {
  public:
    /// Errors: FileBinary; FileEncoding (facts: encoding, line) where the bytes are not of that encoding.
    static Result<DecodedText> decode(std::string_view bytes, Encoding encoding);

    [[nodiscard]] std::string_view text() const { return converted_.empty() ? seen_ : std::string_view(converted_); }

  private:
    std::string_view seen_;
    std::string converted_;
};

} // namespace spanwright
