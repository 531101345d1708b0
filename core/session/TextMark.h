// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>

namespace spanwright {

/// What stands around a mark, so that it is a remark in the form of the text that bears it.
struct MarkFrame {
    std::string_view before, after;
};

/// The text with a last line that names the program and a check sum of all that stands before it (the first 16 digits of SHA-256).
std::string withMark(std::string text, const MarkFrame& frame);

/// Whether a text ends with such a line and is unchanged since: then nothing is lost when it is written anew.
bool bearsMark(std::string_view text);

} // namespace spanwright
