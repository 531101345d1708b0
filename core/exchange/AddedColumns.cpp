// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/AddedColumns.h"

#include "core/exchange/FieldScanner.h"
#include "core/exchange/TableWriter.h"
#include "core/exchange/Words.h"

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

  private:
    FieldScanner scan_;
    const char* copied_;
};

/// Whether a line of the header stands over the columns, and is no preamble.
bool overColumns(std::size_t line, const CsvRules& rules) {
    return line == rules.namesRow || line == rules.unitsRow;
}

/// The number of cells of the longest line of the table: separators at the end of lines make cells too. Error: RaggedRow where a reading
/// holds something behind the columns.
Result<std::size_t> widestLine(std::string_view text, const CsvRules& rules) {
    FieldScanner scan(text, rules.separator, rules.quote);
    std::size_t widest = rules.columns.size();
    for (std::size_t line = 0; scan.toNextRow(); ++line) {
        const std::size_t number = scan.line();
        std::size_t cells = 0;
        bool beyond = false;
        auto after = FieldScanner::After::Separator;
        for (; after == FieldScanner::After::Separator; ++cells) {
            const FieldScanner::Field field = scan.next();
            after = field.after;
            beyond = beyond || (cells >= rules.columns.size() && !withoutBlanks(field.text).empty());
        }
        if (scan.unclosedQuote() != 0)
            return Error(ErrorCode::UnclosedQuote, {{"line", std::to_string(scan.unclosedQuote())}});
        if (line >= rules.headerRows && beyond)
            return Error(ErrorCode::RaggedRow, {{"line", std::to_string(number)}});
        if (line >= rules.headerRows || overColumns(line, rules))
            widest = std::max(widest, cells);
    }
    return widest;
}

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
    const auto width = widestLine(text, rules);
    if (!width)
        return width.error();
    std::string result;
    result.reserve(text.size() * 2);
    if (rules.encoding != Encoding::Utf8 || bytes.starts_with(ByteOrderMark))
        result += ByteOrderMark;
    LineCopier lines(text, rules);
    const auto copyRow = [&] {
        const std::size_t here = lines.copyRow(result);
        for (std::size_t missing = here; here > 0 && missing < *width; ++missing)
            append(result, rules, mark, {});
        return here > 0;
    };
    for (std::size_t line = 0; line < rules.headerRows; ++line) {
        if (!overColumns(line, rules)) {
            lines.copyRow(result);
            continue;
        }
        copyRow();
        for (const AddedColumn& column : added)
            append(result, rules, mark, {headCell(column, line, rules), false});
    }
    for (std::size_t row = 0; copyRow(); ++row)
        for (const AddedCell& cell : cells(row))
            append(result, rules, mark, cell);
    lines.copyRest(result);
    return result;
}

} // namespace spanwright
