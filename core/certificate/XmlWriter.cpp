// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/XmlWriter.h"

namespace spanwright {

namespace {

std::string escaped(std::string_view raw) {
    constexpr std::string_view blanks = " \t\r\n";
    std::string allowed(raw);
    for (char& c : allowed)
        if (static_cast<unsigned char>(c) < 0x20 && c != '\n' && c != '\t')
            c = ' ';
    std::string_view text = allowed;
    const auto first = text.find_first_not_of(blanks);
    if (first == std::string_view::npos)
        return {};
    text = text.substr(first, text.find_last_not_of(blanks) - first + 1);
    std::string result;
    for (const char c : text) {
        switch (c) {
        case '&': result += "&amp;"; break;
        case '<': result += "&lt;"; break;
        case '>': result += "&gt;"; break;
        case '"': result += "&quot;"; break;
        default: result += c;
        }
    }
    return result;
}

} // namespace

XmlWriter::XmlWriter() : text_("<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n") {}

void XmlWriter::start(std::string_view name, const Attributes& attributes) {
    text_.append(2 * open_.size(), ' ').append("<").append(name);
    for (const auto& [key, value] : attributes)
        text_.append(" ").append(key).append("=\"").append(escaped(value)).append("\"");
}

XmlWriter& XmlWriter::open(std::string_view name, const Attributes& attributes) {
    start(name, attributes);
    text_ += ">\n";
    open_.emplace_back(name);
    return *this;
}

XmlWriter& XmlWriter::close() {
    const std::string name = open_.back();
    open_.pop_back();
    text_.append(2 * open_.size(), ' ').append("</").append(name).append(">\n");
    return *this;
}

XmlWriter& XmlWriter::leaf(std::string_view name, std::string_view text, const Attributes& attributes) {
    start(name, attributes);
    text_.append(">").append(escaped(text)).append("</").append(name).append(">\n");
    return *this;
}

} // namespace spanwright
