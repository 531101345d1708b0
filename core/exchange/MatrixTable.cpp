// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/MatrixTable.h"

#include "core/exchange/Words.h"

#include <algorithm>
#include <string>

namespace spanwright {

namespace {

std::vector<std::string_view> linesOf(std::string_view text) {
    constexpr std::string_view byteOrderMark = "\xEF\xBB\xBF";
    if (text.starts_with(byteOrderMark))
        text.remove_prefix(byteOrderMark.size());
    std::vector<std::string_view> lines;
    while (!text.empty()) {
        const std::size_t end = std::min(text.find('\n'), text.size());
        const std::string_view line = withoutBlanks(text.substr(0, end));
        if (!line.empty() && line.front() != '#')
            lines.push_back(line);
        text.remove_prefix(std::min(end + 1, text.size()));
    }
    return lines;
}

/// What stands between the numbers: the first of these that occurs, else blanks.
char separatorOf(const std::vector<std::string_view>& lines, std::optional<DecimalMark> mark) {
    const auto occurs = [&](char c) {
        return std::any_of(lines.begin(), lines.end(), [c](std::string_view line) { return line.find(c) != std::string_view::npos; });
    };
    for (const char c : {'\t', ';'})
        if (occurs(c))
            return c;
    return occurs(',') && mark != DecimalMark::Comma ? ',' : ' ';
}

std::vector<std::string_view> cellsOf(std::string_view line, char separator) {
    std::vector<std::string_view> cells;
    while (true) {
        const std::size_t end = std::min(line.find(separator), line.size());
        const std::string_view cell = withoutBlanks(line.substr(0, end));
        if (separator != ' ' || !cell.empty())
            cells.push_back(cell);
        if (end == line.size())
            return cells;
        line.remove_prefix(end + 1);
    }
}

} // namespace

Result<MatrixNumbers> readMatrix(std::string_view text, std::optional<DecimalMark> mark) {
    const std::vector<std::string_view> lines = linesOf(text);
    if (lines.empty())
        return Error(ErrorCode::NoDataRows);
    const char separator = separatorOf(lines, mark);
    const bool commas = separator != ',' && std::any_of(lines.begin(), lines.end(), [](std::string_view line) {
                            return line.find(',') != std::string_view::npos;
                        });
    const DecimalMark decimal = mark.value_or(commas ? DecimalMark::Comma : DecimalMark::Point);
    MatrixNumbers rows;
    for (const std::string_view line : lines) {
        std::vector<Decimal>& row = rows.emplace_back();
        for (const std::string_view cell : cellsOf(line, separator)) {
            Result<Decimal> number = Decimal::parse(cell, decimal);
            if (!number)
                return Error(number.error().code, {{"row", std::to_string(rows.size())},
                                                   {"column", std::to_string(row.size() + 1)},
                                                   {"text", std::string(cell.substr(0, 80))}});
            row.push_back(std::move(number).value());
        }
    }
    return rows;
}

} // namespace spanwright
