// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/AddedColumns.h"

#include "core/exchange/FieldScanner.h"
#include "core/exchange/TableWriter.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr std::string_view ByteOrderMark = "\xEF\xBB\xBF";

/// Copies the text from line to line, and lets something be put before the end of a line.
class LineCopier {
  public:
    LineCopier(std::string_view text, const CsvRules& rules) : scan_(text, rules.separator, rules.quote), copied_(text.data()) {}

    /// Passes over a row and copies it without its line end; the number of its cells, 0 at the end of the text.
    std::size_t copyRow(std::string& to) {
        if (!scan_.toNextRow())
            return 0;
        line_ = scan_.line();
        std::size_t cells = 0;
        auto after = FieldScanner::After::Separator;
        for (; after == FieldScanner::After::Separator; ++cells)
            after = scan_.next().after;
        const char* end = scan_.position();
        if (after == FieldScanner::After::LineEnd) {
            --end;
            if (*end == '\n' && end != copied_ && end[-1] == '\r')
                --end;
        }
        to.append(copied_, end);
        copied_ = end;
        return cells;
    }
    void copyRest(std::string& to) { to.append(copied_, scan_.end()); }

    [[nodiscard]] std::size_t line() const { return line_; }
    [[nodiscard]] std::size_t unclosedQuote() const { return scan_.unclosedQuote(); }

  private:
    FieldScanner scan_;
    const char* copied_;
    std::size_t line_ = 0;
};

void append(std::string& to, const CsvRules& rules, DecimalMark mark, const AddedCell& cell) {
    to += rules.separator;
    std::string text = cell.text;
    if (cell.number && mark == DecimalMark::Comma)
        std::replace(text.begin(), text.end(), '.', ',');
    // Where blanks separate, an empty cell would be none.
    to += text.empty() && rules.separator == CsvRules::Blanks ? std::string("\"\"") : TableWriter(rules.separator).text(text).written();
}

/// What stands in a header line over an added column.
std::string headCell(const AddedColumn& column, std::size_t line, const CsvRules& rules) {
    if (line == rules.namesRow)
        return rules.unitsRow || column.unit.empty() ? column.name : column.name + " / " + column.unit;
    return column.unit;
}

} // namespace

Result<std::string> withAddedColumns(std::string_view bytes, const CsvRules& rules, DecimalMark mark, std::span<const AddedColumn> added,
                                     const AddedCells& cells) {
    const auto decoded = DecodedText::decode(bytes, rules.encoding);
    if (!decoded)
        return decoded.error();
    const std::string_view text = decoded->text();
    std::string result;
    result.reserve(text.size() * 2);
    if (rules.encoding != Encoding::Utf8 || bytes.starts_with(ByteOrderMark))
        result += ByteOrderMark;
    LineCopier lines(text, rules);
    for (std::size_t line = 0; line < rules.headerRows; ++line) {
        const std::size_t here = lines.copyRow(result);
        if (line != rules.namesRow && line != rules.unitsRow)
            continue;
        for (std::size_t missing = here; missing < rules.columns.size(); ++missing)
            append(result, rules, mark, {});
        for (const AddedColumn& column : added)
            append(result, rules, mark, {headCell(column, line, rules), false});
    }
    for (std::size_t row = 0;; ++row) {
        const std::size_t here = lines.copyRow(result);
        if (lines.unclosedQuote() != 0)
            return Error(ErrorCode::UnclosedQuote, {{"line", std::to_string(lines.unclosedQuote())}});
        if (here == 0)
            break;
        if (here > rules.columns.size())
            return Error(ErrorCode::RaggedRow, {{"line", std::to_string(lines.line())}});
        for (const AddedCell& cell : cells(row))
            append(result, rules, mark, cell);
    }
    lines.copyRest(result);
    return result;
}

} // namespace spanwright
