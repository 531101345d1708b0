// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/CsvReader.h"

#include "core/exchange/FieldScanner.h"
#include "core/exchange/NumberCell.h"
#include "core/exchange/Words.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr std::size_t LongestQuoted = 80;

std::string shortened(std::string_view text) {
    if (text.size() <= LongestQuoted)
        return std::string(text);
    std::size_t length = LongestQuoted;
    while (length > 0 && (static_cast<unsigned char>(text[length]) & 0xC0) == 0x80)
        --length;
    return std::string(text.substr(0, length));
}

bool isMissing(std::string_view cell, const CsvRules& rules) {
    if (cell.empty())
        return true;
    return std::any_of(rules.missingWords.begin(), rules.missingWords.end(), [&](const std::string& word) {
        return word.size() == cell.size() && lowerCase(word) == lowerCase(cell);
    });
}

bool skipHeader(FieldScanner& scan, std::size_t rows) {
    for (std::size_t i = 0; i < rows; ++i) {
        if (!scan.toNextRow())
            return false;
        while (scan.next().after == FieldScanner::After::Separator) {
        }
    }
    return true;
}

Error unclosed(const FieldScanner& scan) {
    return Error(ErrorCode::UnclosedQuote, {{"line", std::to_string(scan.unclosedQuote())}});
}

/// One pass over the rows of a table.
class TableReader {
  public:
    TableReader(std::string_view text, const CsvRules& rules, std::span<const WantedColumn> wanted)
        : scan_(text, rules.separator, rules.quote), rules_(rules), builders_(wanted.size()), wantedAt_(rules.columns.size()) {
        for (std::size_t i = 0; i < wanted.size(); ++i) {
            TableColumn& column = table_.columns.emplace_back();
            column.source = wanted[i].source;
            column.kind = wanted[i].kind;
            wantedAt_[wanted[i].source].push_back(i);
        }
    }

    Result<Table> read(Progress& progress) {
        constexpr std::size_t rowsBetweenLooks = 4096;
        const char* const begin = scan_.position();
        const auto length = static_cast<double>(scan_.end() - begin);
        if (!skipHeader(scan_, rules_.headerRows) && scan_.unclosedQuote() == 0)
            return Error(ErrorCode::NoDataRows);
        while (scan_.toNextRow()) {
            readRow();
            if (table_.rows == 1)
                reserve();
            if (table_.rows % rowsBetweenLooks == 0) {
                if (progress.cancelled())
                    return Error(ErrorCode::Cancelled);
                progress.report(static_cast<double>(scan_.position() - begin) / length);
            }
        }
        if (scan_.unclosedQuote() != 0)
            return unclosed(scan_);
        if (table_.rows == 0)
            return Error(ErrorCode::NoDataRows);
        for (std::size_t i = 0; i < table_.columns.size(); ++i)
            if (isNumber(table_.columns[i].kind))
                table_.columns[i].numbers = std::move(builders_[i]).finish();
        return std::move(table_);
    }

  private:
    static bool isNumber(ColumnKind kind) { return kind == ColumnKind::Number || kind == ColumnKind::Empty; }

    /// Room for as many rows as there would be if all were as long as the first, so that memory is touched once.
    void reserve() {
        const char* const rowEnd = scan_.position();
        const auto left = static_cast<std::size_t>(scan_.end() - rowEnd);
        const auto first = static_cast<std::size_t>(std::max<std::ptrdiff_t>(rowEnd - rowBegin_, 2));
        const std::size_t rows = left / first + left / (first * 8) + 2;
        table_.lines.reserve(rows);
        for (std::size_t i = 0; i < builders_.size(); ++i)
            if (isNumber(table_.columns[i].kind))
                builders_[i].reserve(rows);
            else if (table_.columns[i].kind == ColumnKind::Time)
                table_.columns[i].times.reserve(rows);
    }

    void readRow() {
        rowBegin_ = scan_.position();
        ++table_.rows;
        line_ = scan_.line();
        table_.lines.push_back(static_cast<std::uint32_t>(line_));
        std::size_t column = 0;
        auto after = FieldScanner::After::Separator;
        for (; after == FieldScanner::After::Separator; ++column) {
            if (column < wantedAt_.size()) {
                after = wantedAt_[column].empty() ? scan_.next().after : readCell(column);
                continue;
            }
            const FieldScanner::Field extra = scan_.next();
            after = extra.after;
            if (!withoutBlanks(extra.text).empty()) {
                issue(ErrorCode::RaggedRow, column, extra.text);
                while (after == FieldScanner::After::Separator)
                    after = scan_.next().after;
            }
        }
        if (column < wantedAt_.size())
            fillShortRow(column);
    }

    /// A row that ends early: reported once, and everything that was wanted behind its end is missing.
    void fillShortRow(std::size_t column) {
        // Blanks between columns leave no trace of trailing empty cells; neither do programs that cut off separators at the end
        // of a line, but a lost cell looks the same, so it is said.
        issue(ErrorCode::RaggedRow, column, {});
        for (; column < wantedAt_.size(); ++column)
            for (const std::size_t i : wantedAt_[column])
                addMissing(i);
    }

    FieldScanner::After readCell(std::size_t column) {
        const std::vector<std::size_t>& places = wantedAt_[column];
        const DecimalMark mark = rules_.columns[column].decimal;
        if (places.size() == 1 && isNumber(table_.columns[places.front()].kind) && static_cast<char>(mark) != rules_.separator) {
            const PlainNumber number = readPlainNumber(scan_.position(), scan_.end(), mark);
            if (number.end != nullptr && scan_.endsField(number.end)) {
                builders_[places.front()].add(number);
                return scan_.passTo(number.end);
            }
        }
        const FieldScanner::Field field = scan_.next();
        const std::string_view cell = withoutBlanks(field.text);
        for (const std::size_t i : places)
            store(i, column, cell);
        return field.after;
    }

    void store(std::size_t i, std::size_t column, std::string_view cell) {
        TableColumn& target = table_.columns[i];
        if (target.kind == ColumnKind::Text) {
            target.missing += isMissing(cell, rules_) ? 1 : 0;
            target.texts.emplace_back(cell);
            return;
        }
        if (isMissing(cell, rules_)) {
            ++target.missing;
            addMissing(i);
            return;
        }
        if (target.kind == ColumnKind::Time) {
            const auto time = parseTime(cell, rules_.columns[column].dateOrder);
            if (!time)
                issue(ErrorCode::CellDateBad, column, cell);
            target.times.push_back(time);
            return;
        }
        const auto number = Decimal::parse(cell, rules_.columns[column].decimal);
        if (number) {
            builders_[i].add(*number);
            return;
        }
        issue(number.error().code, column, cell);
        builders_[i].addMissing();
    }

    void addMissing(std::size_t i) {
        TableColumn& target = table_.columns[i];
        if (target.kind == ColumnKind::Text)
            target.texts.emplace_back();
        else if (target.kind == ColumnKind::Time)
            target.times.emplace_back();
        else
            builders_[i].addMissing();
    }

    void issue(ErrorCode code, std::size_t column, std::string_view text) {
        table_.issues.add({code, table_.rows, line_, column, shortened(text)});
    }

    FieldScanner scan_;
    const CsvRules& rules_;
    Table table_;
    std::vector<NumberColumnBuilder> builders_;
    std::vector<std::vector<std::size_t>> wantedAt_; ///< by column of the file, places in table_.columns
    const char* rowBegin_ = nullptr;
    std::size_t line_ = 0;
};

PreviewCell previewCell(std::string_view text, const CsvRules& rules, const CsvColumn* column) {
    const std::string_view cell = withoutBlanks(text);
    PreviewCell shown{.text = std::string(text), .understood = {}, .refused = {}};
    if (column == nullptr) {
        if (!cell.empty())
            shown.refused = ErrorCode::RaggedRow;
    } else if (isMissing(cell, rules)) {
        return shown;
    } else if (column->kind == ColumnKind::Number) {
        const auto number = Decimal::parse(cell, column->decimal);
        if (number)
            shown.understood = number->text();
        else
            shown.refused = number.error().code;
    } else if (column->kind == ColumnKind::Time) {
        const auto time = parseTime(cell, column->dateOrder);
        if (time)
            shown.understood = isoTime(*time);
        else
            shown.refused = ErrorCode::CellDateBad;
    } else {
        shown.understood = std::string(cell);
    }
    return shown;
}

} // namespace

Error CellIssue::error(const CsvRules& rules) const {
    return Error(code, {{"line", std::to_string(line)}, {"column", columnLabel(rules, column)}, {"text", text}});
}

void CellIssues::add(CellIssue issue) {
    ++count;
    if (first.size() < MostKept)
        first.push_back(std::move(issue));
}

Result<Table> readTable(std::string_view bytes, const CsvRules& rules, std::span<const WantedColumn> wanted,
                        Progress& progress) {
    for (const WantedColumn& column : wanted)
        if (column.source >= rules.columns.size())
            return Error(ErrorCode::ColumnMissing, {{"column", std::to_string(column.source + 1)}});
    const auto decoded = DecodedText::decode(bytes, rules.encoding);
    if (!decoded)
        return decoded.error();
    return TableReader(decoded->text(), rules, wanted).read(progress);
}

Result<std::vector<PreviewRow>> previewRows(std::string_view bytes, const CsvRules& rules, std::size_t most) {
    const auto decoded = DecodedText::decode(bytes, rules.encoding);
    if (!decoded)
        return decoded.error();
    FieldScanner scan(decoded->text(), rules.separator, rules.quote);
    std::vector<PreviewRow> rows;
    skipHeader(scan, rules.headerRows);
    while (rows.size() < most && scan.toNextRow()) {
        PreviewRow& row = rows.emplace_back();
        row.line = scan.line();
        auto after = FieldScanner::After::Separator;
        while (after == FieldScanner::After::Separator) {
            const FieldScanner::Field field = scan.next();
            const std::size_t column = row.cells.size();
            row.cells.push_back(
                previewCell(field.text, rules, column < rules.columns.size() ? &rules.columns[column] : nullptr));
            after = field.after;
        }
    }
    if (scan.unclosedQuote() != 0)
        return unclosed(scan);
    return rows;
}

} // namespace spanwright
