// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace spanwright {

/// Writes indented XML 1.0 in UTF-8. Text is escaped and trimmed; characters that XML does not allow become blanks.
class XmlWriter {
  public:
    using Attributes = std::vector<std::pair<std::string, std::string>>;

    XmlWriter();
    XmlWriter& open(std::string_view name, const Attributes& attributes = {});
    XmlWriter& close();
    XmlWriter& leaf(std::string_view name, std::string_view text, const Attributes& attributes = {});
    [[nodiscard]] const std::string& written() const { return text_; }

  private:
    void start(std::string_view name, const Attributes& attributes);

    std::string text_;
    std::vector<std::string> open_;
};

} // namespace spanwright
