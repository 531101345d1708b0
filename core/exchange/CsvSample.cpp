// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/CsvSample.h"

#include "core/base/Decimal.h"
#include "core/exchange/FieldScanner.h"
#include "core/exchange/TimeCell.h"
#include "core/exchange/Words.h"

#include <algorithm>
#include <array>
#include <map>

namespace spanwright {

namespace {

constexpr std::array<std::string_view, 9> missingWords{"-", "--", "---", "----", "na", "n/a", "#n/a", "null", "none"};
/// Words that stand where a number should be and are reported, but do not make a column one of words.
constexpr std::array<std::string_view, 14> noValueWords{"nan",      "inf", "-inf", "+inf",  "infinity", "-infinity", "ovr",
                                                        "over",     "ol",  "o.l",  "error", "err",      "overload",  "#value!"};

/// Whether digits stand in threes behind every sign that is no decimal mark, and no such sign behind the mark: thousands, and not
/// two numbers.
bool groupsOfThree(std::string_view cell, DecimalMark mark) {
    if (const std::size_t at = cell.find(static_cast<char>(mark));
        at != std::string_view::npos && cell.find_first_not_of("0123456789", at + 1) != std::string_view::npos)
        return false;
    for (std::size_t i = 0; i < cell.size(); ++i) {
        const char c = cell[i];
        const bool separates = (c < '0' || c > '9') && c != '-' && c != '+' && c != static_cast<char>(mark);
        const std::size_t digits = cell.substr(i + 1).find_first_not_of("0123456789");
        if (separates && (digits == std::string_view::npos ? cell.size() - i - 1 : digits) != 3)
            return false;
    }
    return true;
}

bool isNumberLike(std::string_view cell, DecimalMark mark) {
    const auto number = Decimal::parse(cell, mark);
    return number || number.error().code == ErrorCode::NumberTooLarge ||
           (number.error().code == ErrorCode::ThousandsSeparator && groupsOfThree(cell, mark));
}

bool isData(CellLook look) {
    return look == CellLook::Number || look == CellLook::Time;
}

} // namespace

bool isUsualMissingWord(std::string_view cell) {
    return std::find(missingWords.begin(), missingWords.end(), lowerCase(cell)) != missingWords.end();
}

CellLook lookOf(std::string_view cell) {
    if (cell.empty())
        return CellLook::Blank;
    if (isNumberLike(cell, DecimalMark::Point) || isNumberLike(cell, DecimalMark::Comma))
        return CellLook::Number;
    for (const DateOrder order : {DateOrder::DayMonthYear, DateOrder::MonthDayYear})
        if (parseTime(cell, order))
            return CellLook::Time;
    if (isUsualMissingWord(cell) ||
        std::find(noValueWords.begin(), noValueWords.end(), lowerCase(cell)) != noValueWords.end())
        return CellLook::NoValueWord;
    return CellLook::Text;
}

bool hasNumber(const SampleRow& row) {
    return std::any_of(row.cells.begin(), row.cells.end(), [](const std::string& cell) { return isData(lookOf(cell)); });
}

CsvSample readCsvSample(std::string_view text, char separator, char quote, std::size_t most) {
    FieldScanner scan(text, separator, quote);
    CsvSample sample;
    while (sample.rows.size() < most && scan.toNextRow()) {
        SampleRow& row = sample.rows.emplace_back();
        row.line = scan.line();
        auto after = FieldScanner::After::Separator;
        while (after == FieldScanner::After::Separator) {
            const FieldScanner::Field field = scan.next();
            row.cells.emplace_back(withoutBlanks(field.text));
            after = field.after;
        }
    }
    sample.unclosedQuote = scan.unclosedQuote();
    return sample;
}

std::vector<SampleRow> sampleRows(std::string_view text, char separator, char quote, std::size_t most) {
    return readCsvSample(text, separator, quote, most).rows;
}

std::size_t usualWidth(std::span<const SampleRow> rows) {
    const bool anyNumber = std::any_of(rows.begin(), rows.end(), [](const SampleRow& row) { return hasNumber(row); });
    std::map<std::size_t, std::size_t> counts;
    for (const SampleRow& row : rows)
        if (!anyNumber || hasNumber(row))
            ++counts[row.cells.size()];
    std::size_t width = 0;
    std::size_t most = 0;
    for (const auto& [fields, count] : counts)
        if (count >= most) {
            width = fields;
            most = count;
        }
    return width;
}

std::size_t usedWidth(std::span<const SampleRow> data, const SampleRow* names, std::size_t width) {
    const auto blank = [&](std::size_t column) {
        const auto blankIn = [&](const SampleRow& row) { return column >= row.cells.size() || row.cells[column].empty(); };
        return std::all_of(data.begin(), data.end(), blankIn) && (names == nullptr || blankIn(*names));
    };
    while (width > 1 && blank(width - 1))
        --width;
    return width;
}

std::size_t firstDataRow(std::span<const SampleRow> rows, std::size_t width) {
    // What the second half of the rows holds is what the table holds, however long its preamble.
    std::vector<std::size_t> data(width, 0);
    const std::span<const SampleRow> later = rows.subspan(rows.size() / 2);
    for (const SampleRow& row : later)
        for (std::size_t i = 0; i < width && i < row.cells.size(); ++i)
            data[i] += isData(lookOf(row.cells[i])) ? 1 : 0;
    const auto holdsData = [&](std::size_t column) { return data[column] * 2 >= later.size() && data[column] > 0; };

    struct Match {
        std::size_t filled = 0, met = 0;
    };
    const auto match = [&](const SampleRow& row) {
        Match counts;
        for (std::size_t i = 0; i < width && i < row.cells.size(); ++i) {
            const CellLook look = lookOf(row.cells[i]);
            if (!holdsData(i) || look == CellLook::Blank)
                continue;
            ++counts.filled;
            counts.met += isData(look) || look == CellLook::NoValueWord ? 1 : 0;
        }
        return counts;
    };
    std::size_t first = 0;
    for (; first < rows.size(); ++first)
        if (const Match found = match(rows[first]); found.met * 2 > found.filled)
            break;
    // Rows right before it that hold a number where numbers belong are data with a bad cell, which must be reported; a line of
    // words between them and the data makes them a preamble.
    while (first > 0 && first < rows.size() && match(rows[first - 1]).met > 0)
        --first;
    return first;
}

} // namespace spanwright
