// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <concepts>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace spanwright {

/// Writes JSON as it is told, keys in the order told. Doubles are the shortest text that reads back as the same double; one that
/// is missing, infinite or not a number is null, and its path is remembered so that a reason can be given for it.
class JsonWriter {
  public:
    /// How the children of an object or array stand: each on a line of its own, or all in one.
    enum class Layout { Lines, OneLine };

    /// Where the text begins: on its own, or between two keys of an outermost object that stands in lines.
    enum class Start { Outside, InsideObject };

    explicit JsonWriter(Start start = Start::Outside);
    JsonWriter& key(std::string_view name);
    JsonWriter& beginObject(Layout layout = Layout::OneLine);
    JsonWriter& endObject();
    JsonWriter& beginArray(Layout layout = Layout::OneLine);
    JsonWriter& endArray();

    JsonWriter& value(double number);
    JsonWriter& value(std::string_view text);
    JsonWriter& value(const char* text) { return value(std::string_view(text)); }
    JsonWriter& value(bool flag);
    template <std::integral I>
        requires(!std::same_as<I, bool>)
    JsonWriter& value(I number) {
        return raw(std::to_string(number));
    }
    template <class T>
    JsonWriter& value(const std::optional<T>& something) {
        return something ? value(*something) : null();
    }
    JsonWriter& null();

    template <class T>
    JsonWriter& field(std::string_view name, const T& something) {
        key(name);
        return value(something);
    }

    [[nodiscard]] const std::string& written() const { return written_; }
    /// Paths of the values that were null, such as "split.lack_of_fit", each once, in the order written.
    [[nodiscard]] const std::vector<std::string>& missing() const { return missing_; }

  private:
    struct Level {
        Layout layout = Layout::OneLine;
        bool object = false;
        bool any = false;
        std::string path;
    };
    JsonWriter& raw(std::string_view text);
    JsonWriter& begin(char bracket, Layout layout);
    JsonWriter& end(char bracket);
    void separate();
    [[nodiscard]] std::string path() const;

    std::string written_;
    std::vector<Level> levels_;
    std::string key_;
    std::vector<std::string> missing_;
};

/// Text between quotation marks, with what JSON needs escaped.
std::string jsonText(std::string_view text);

} // namespace spanwright
