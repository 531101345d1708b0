// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Fields.h"

#include <string>
#include <utility>
#include <vector>

namespace spanwright {

/// A part of the record as lines of path and text, "standards.1.due" and "2027-03-14", in the order of the file. Things in a
/// list are counted from 0, as in the file; what is missing has no text.
using FieldLines = std::vector<std::pair<std::string, std::string>>;

/// A whole matrix on one line: it is changed only as a whole, so it is one entry of the journal.
std::string matrixText(const UncertaintyMatrix& matrix);

namespace detail {

struct IgnoreField {
    void operator()(std::string_view, const auto&) const {}
};
template <class P>
concept HasFields = requires(const P& part) { fields(part, IgnoreField{}); };

inline void flatten(FieldLines& lines, const std::string& path, const std::string& value) {
    lines.emplace_back(path, value);
}
inline void flatten(FieldLines& lines, const std::string& path, bool value) {
    lines.emplace_back(path, value ? "true" : "false");
}
inline void flatten(FieldLines& lines, const std::string& path, ReadingId value) {
    lines.emplace_back(path, std::to_string(value));
}
inline void flatten(FieldLines& lines, const std::string& path, int value) {
    lines.emplace_back(path, std::to_string(value));
}
inline void flatten(FieldLines& lines, const std::string& path, const UncertaintyMatrix& matrix) {
    lines.emplace_back(path, matrixText(matrix));
}
inline void flatten(FieldLines& lines, const std::string& path, const Decimal& value) {
    lines.emplace_back(path, value.text());
}
inline void flatten(FieldLines& lines, const std::string& path, const FunctionChoice& value) {
    lines.emplace_back(path, functionName(value));
}
template <class E>
    requires std::is_enum_v<E>
void flatten(FieldLines& lines, const std::string& path, E value) {
    lines.emplace_back(path, std::string(nameOf(value)));
}
template <class T>
void flatten(FieldLines& lines, const std::string& path, const std::optional<T>& value);
template <class T>
void flatten(FieldLines& lines, const std::string& path, const std::vector<T>& values);
template <HasFields P>
void flatten(FieldLines& lines, const std::string& path, const P& part);

template <class T>
void flatten(FieldLines& lines, const std::string& path, const std::optional<T>& value) {
    if (value)
        flatten(lines, path, *value);
}
template <class T>
void flatten(FieldLines& lines, const std::string& path, const std::vector<T>& values) {
    for (std::size_t i = 0; i < values.size(); ++i)
        flatten(lines, path + "." + std::to_string(i), values[i]);
}
template <HasFields P>
void flatten(FieldLines& lines, const std::string& path, const P& part) {
    fields(part, [&](std::string_view name, const auto& field) { flatten(lines, path + "." + std::string(name), field); });
}

} // namespace detail

template <class P>
FieldLines fieldLines(const std::string& path, const P& part) {
    FieldLines lines;
    detail::flatten(lines, path, part);
    return lines;
}

/// One journal entry ("changed") for every path whose text differs.
std::vector<JournalEntry> differences(const FieldLines& before, const FieldLines& after);

} // namespace spanwright
