// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/TextEncoding.h"

#include "core/exchange/Words.h"

#include <algorithm>
#include <array>
#include <cstdint>
#include <cstring>
#include <optional>

namespace spanwright {

namespace {

constexpr std::string_view utf8Mark = "\xEF\xBB\xBF";

/// Characters of Windows-1252 from 0x80 to 0x9F; 0 where it has none (WHATWG Encoding Standard, index windows-1252, except that
/// unassigned places are refused).
constexpr std::array<char16_t, 32> windows1252{0x20AC, 0,      0x201A, 0x0192, 0x201E, 0x2026, 0x2020, 0x2021,
                                               0x02C6, 0x2030, 0x0160, 0x2039, 0x0152, 0,      0x017D, 0,
                                               0,      0x2018, 0x2019, 0x201C, 0x201D, 0x2022, 0x2013, 0x2014,
                                               0x02DC, 0x2122, 0x0161, 0x203A, 0x0153, 0,      0x017E, 0x0178};

/// Length of the valid UTF-8 sequence at `at`, 0 when there is none (Unicode Standard, table 3-7).
std::size_t utf8Length(std::string_view s, std::size_t at) {
    const auto byte = [&](std::size_t i) { return at + i < s.size() ? static_cast<unsigned char>(s[at + i]) : 0u; };
    const auto follows = [&](std::size_t i, unsigned low = 0x80, unsigned high = 0xBF) {
        return byte(i) >= low && byte(i) <= high;
    };
    const unsigned lead = byte(0);
    if (lead < 0x80)
        return 1;
    if (lead >= 0xC2 && lead <= 0xDF)
        return follows(1) ? 2 : 0;
    if (lead >= 0xE0 && lead <= 0xEF)
        return follows(1, lead == 0xE0 ? 0xA0 : 0x80, lead == 0xED ? 0x9F : 0xBF) && follows(2) ? 3 : 0;
    if (lead >= 0xF0 && lead <= 0xF4)
        return follows(1, lead == 0xF0 ? 0x90 : 0x80, lead == 0xF4 ? 0x8F : 0xBF) && follows(2) && follows(3) ? 4 : 0;
    return 0;
}

/// Position of the first byte in the first megabyte that no text has: a control character other than tab, line feed, carriage
/// return, form feed, or the end-of-file mark of old systems as the very last byte. Binary files show themselves early; a stray
/// character farther on is found in its cell.
std::optional<std::size_t> firstControl(std::string_view whole) {
    constexpr std::size_t looked = std::size_t{1} << 20;
    const std::string_view s = whole.substr(0, looked);
    const auto found = std::find_if(s.begin(), s.end(), [&](char c) {
        const auto byte = static_cast<unsigned char>(c);
        const bool endOfFile = byte == 0x1A && &c == &whole.back();
        return byte < 0x20 && byte != '\t' && byte != '\n' && byte != '\r' && byte != '\f' && !endOfFile;
    });
    if (found == s.end())
        return std::nullopt;
    return static_cast<std::size_t>(found - s.begin());
}

Error binary(std::size_t at) {
    return Error(ErrorCode::FileBinary, {{"byte", std::to_string(at + 1)}});
}

Error wrongEncoding(std::string_view before, Encoding encoding) {
    const auto line = std::count(before.begin(), before.end(), '\n') + 1;
    return Error(ErrorCode::FileEncoding, {{"encoding", std::string(encodingName(encoding))}, {"line", std::to_string(line)}});
}

Result<std::string> fromWindows1252(std::string_view bytes) {
    std::string text;
    text.reserve(bytes.size() + bytes.size() / 8);
    for (std::size_t i = 0; i < bytes.size(); ++i) {
        const auto byte = static_cast<unsigned char>(bytes[i]);
        const char32_t c = byte >= 0x80 && byte < 0xA0 ? windows1252[byte - 0x80] : byte;
        if (byte >= 0x80 && c == 0)
            return wrongEncoding(bytes.substr(0, i), Encoding::Windows1252);
        appendUtf8(text, c);
    }
    return text;
}

Result<std::string> fromUtf16(std::string_view bytes, Encoding encoding) {
    const bool little = encoding == Encoding::Utf16LittleEndian;
    std::string text;
    text.reserve(bytes.size());
    if (bytes.size() % 2 != 0)
        return wrongEncoding(bytes, encoding);
    const auto unit = [&](std::size_t i) -> char32_t {
        const auto first = static_cast<unsigned char>(bytes[i]);
        const auto second = static_cast<unsigned char>(bytes[i + 1]);
        return little ? static_cast<char32_t>(first | (second << 8)) : static_cast<char32_t>((first << 8) | second);
    };
    for (std::size_t i = 0; i < bytes.size(); i += 2) {
        char32_t c = unit(i);
        if (i == 0 && c == 0xFEFF)
            continue;
        if (c >= 0xD800 && c <= 0xDFFF) {
            const char32_t low = c < 0xDC00 && i + 2 < bytes.size() ? unit(i + 2) : 0;
            if (low < 0xDC00 || low > 0xDFFF)
                return wrongEncoding(text, encoding);
            c = 0x10000 + ((c - 0xD800) << 10) + (low - 0xDC00);
            i += 2;
        }
        appendUtf8(text, c);
    }
    return text;
}

} // namespace

void appendUtf8(std::string& text, char32_t c) {
    const auto byte = [&](char32_t bits) { text += static_cast<char>(static_cast<unsigned char>(bits)); };
    if (c < 0x80) {
        byte(c);
    } else if (c < 0x800) {
        byte(0xC0 | (c >> 6));
        byte(0x80 | (c & 0x3F));
    } else if (c < 0x10000) {
        byte(0xE0 | (c >> 12));
        byte(0x80 | ((c >> 6) & 0x3F));
        byte(0x80 | (c & 0x3F));
    } else {
        byte(0xF0 | (c >> 18));
        byte(0x80 | ((c >> 12) & 0x3F));
        byte(0x80 | ((c >> 6) & 0x3F));
        byte(0x80 | (c & 0x3F));
    }
}

std::size_t validUtf8(std::string_view s) {
    std::size_t at = 0;
    while (at < s.size()) {
        constexpr std::uint64_t highBits = 0x8080808080808080u;
        std::uint64_t eight = 0;
        while (at + sizeof eight <= s.size()) {
            std::memcpy(&eight, s.data() + at, sizeof eight);
            if (eight & highBits)
                break;
            at += sizeof eight;
        }
        if (at == s.size())
            break;
        const std::size_t length = utf8Length(s, at);
        if (length == 0)
            return at;
        at += length;
    }
    return s.size();
}

std::string_view encodingName(Encoding encoding) {
    switch (encoding) {
    case Encoding::Utf8: return "utf-8";
    case Encoding::Utf16LittleEndian: return "utf-16le";
    case Encoding::Utf16BigEndian: return "utf-16be";
    case Encoding::Windows1252: break;
    }
    return "windows-1252";
}

Result<Encoding> parseEncodingName(std::string_view text) {
    const std::string name = lowerCase(text);
    for (const Encoding encoding :
         {Encoding::Utf8, Encoding::Utf16LittleEndian, Encoding::Utf16BigEndian, Encoding::Windows1252})
        if (name == encodingName(encoding))
            return encoding;
    if (name == "utf8")
        return Encoding::Utf8;
    if (name == "utf-16" || name == "utf16")
        return Encoding::Utf16LittleEndian;
    if (name == "latin-1" || name == "latin1" || name == "iso-8859-1" || name == "cp1252")
        return Encoding::Windows1252;
    return Error(ErrorCode::UsageValueBad, {{"text", std::string(text)}});
}

Result<Encoding> guessEncoding(std::string_view bytes) {
    if (bytes.starts_with(utf8Mark))
        return Encoding::Utf8;
    if (bytes.starts_with("\xFF\xFE"))
        return Encoding::Utf16LittleEndian;
    if (bytes.starts_with("\xFE\xFF"))
        return Encoding::Utf16BigEndian;
    const std::string_view start = bytes.substr(0, 4096);
    if (const std::size_t zero = start.find('\0'); zero != std::string_view::npos) {
        // Tables are mostly ASCII, whose UTF-16 has a zero in every other byte.
        std::size_t zeros[2] = {0, 0};
        for (std::size_t i = 0; i < start.size(); ++i)
            zeros[i % 2] += start[i] == '\0' ? 1 : 0;
        const std::size_t most = start.size() / 2;
        if (zeros[1] * 10 >= most * 7 && zeros[0] * 10 < most)
            return Encoding::Utf16LittleEndian;
        if (zeros[0] * 10 >= most * 7 && zeros[1] * 10 < most)
            return Encoding::Utf16BigEndian;
        return binary(zero);
    }
    if (const auto control = firstControl(bytes))
        return binary(*control);
    return validUtf8(bytes) == bytes.size() ? Encoding::Utf8 : Encoding::Windows1252;
}

Result<DecodedText> DecodedText::decode(std::string_view bytes, Encoding encoding) {
    DecodedText decoded;
    if (encoding == Encoding::Utf8) {
        if (bytes.starts_with(utf8Mark))
            bytes.remove_prefix(utf8Mark.size());
        if (const std::size_t bad = validUtf8(bytes); bad != bytes.size())
            return wrongEncoding(bytes.substr(0, bad), encoding);
        decoded.seen_ = bytes;
    } else {
        auto text = encoding == Encoding::Windows1252 ? fromWindows1252(bytes) : fromUtf16(bytes, encoding);
        if (!text)
            return text.error();
        decoded.converted_ = std::move(*text);
    }
    if (const auto control = firstControl(decoded.text()))
        return binary(*control);
    return decoded;
}

} // namespace spanwright
