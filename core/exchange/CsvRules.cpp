// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/CsvRules.h"

#include "core/exchange/ColumnEvidence.h"
#include "core/exchange/CsvSample.h"
#include "core/exchange/Words.h"

#include <algorithm>
#include <array>
#include <charconv>

namespace spanwright {

namespace {

constexpr std::size_t SampleRows = 1000;
constexpr std::size_t SeparatorRows = 200;
constexpr char Quote = '"';

/// How well a separator explains the table.
struct Candidate {
    char separator = ',';
    double score = 0;
};

/// Share of rows from the first number on that have the usual number of fields, times the share of their cells that are
/// numbers, times or blank (little may be: a table of notes still has columns), times the share of all rows that this is; less
/// when the row before the first numbers, which should name the columns, has another number of fields.
double explains(const std::vector<SampleRow>& rows) {
    const std::size_t width = usualWidth(rows);
    std::size_t regular = 0;
    std::size_t cells = 0;
    std::size_t understood = 0;
    std::optional<std::size_t> widthBefore; // of the last row without a number
    bool numbersSeen = false;
    bool headerFits = true;
    for (const SampleRow& row : rows) {
        std::size_t numbers = 0;
        std::size_t blanks = 0;
        for (const std::string& cell : row.cells) {
            const CellLook look = lookOf(cell);
            numbers += look == CellLook::Number || look == CellLook::Time ? 1 : 0;
            blanks += look == CellLook::Blank ? 1 : 0;
        }
        if (numbers == 0 && !numbersSeen) {
            widthBefore = row.cells.size();
            continue;
        }
        if (!numbersSeen && widthBefore)
            headerFits = *widthBefore == row.cells.size();
        numbersSeen = true;
        regular += row.cells.size() == width ? 1 : 0;
        cells += row.cells.size();
        understood += numbers + blanks;
    }
    if (!numbersSeen)
        return 0;
    const double share = static_cast<double>(regular) / static_cast<double>(rows.size());
    return share * (0.1 + 0.9 * static_cast<double>(understood) / static_cast<double>(cells)) * (headerFits ? 1.0 : 0.9);
}

/// Whether the first row is words and `separator` stands between them: then it parts columns, however the numbers below look.
bool partsTheHeader(const std::vector<SampleRow>& rows) {
    return !rows.empty() && rows.front().cells.size() >= 2 && !hasNumber(rows.front()) &&
           std::none_of(rows.front().cells.begin(), rows.front().cells.end(),
                        [](const std::string& cell) { return lookOf(cell) == CellLook::Blank; });
}

struct SeparatorGuess {
    char separator = ',';
    bool unclear = false;
};

SeparatorGuess guessSeparator(std::string_view text) {
    // In the order of preference when two explain the table equally well. A table of one column has none; any character that
    // does not occur stands for it.
    constexpr std::array<char, 5> usual{'\t', ';', '|', ',', CsvRules::Blanks};
    constexpr char none = ';';
    std::vector<Candidate> candidates;
    bool headerParted = false;
    for (const char separator : usual) {
        const auto rows = sampleRows(text, separator, Quote, SeparatorRows);
        if (usualWidth(rows) < 2)
            continue;
        candidates.push_back({separator, explains(rows) - (separator == CsvRules::Blanks ? 0.02 : 0)});
        headerParted = headerParted || (separator != CsvRules::Blanks && partsTheHeader(rows));
    }
    constexpr char unused = '\x1f';
    const double alone = headerParted ? 0 : explains(sampleRows(text, unused, Quote, SeparatorRows)) - 0.01;
    std::stable_sort(candidates.begin(), candidates.end(),
                     [](const Candidate& a, const Candidate& b) { return a.score > b.score; });
    if (candidates.empty() || alone > candidates.front().score)
        return {none, !candidates.empty() && candidates.front().separator == ',' && candidates.front().score > alone - 0.03};
    // "10,20" may be two whole numbers or one with a decimal comma: only then are both readings possible to the last cell.
    const bool closeSecond = candidates.size() > 1 && candidates[1].separator != CsvRules::Blanks &&
                             candidates[1].score > candidates[0].score - 0.005;
    const bool closeAlone = candidates[0].separator == ',' && alone > candidates[0].score - 0.03;
    return {candidates.front().separator, closeSecond || closeAlone};
}

/// A line of remarks above a table of several columns names none of them.
bool isRemark(const SampleRow& row, std::size_t width) {
    return width > 1 && row.cells.size() == 1 && (row.cells.front().starts_with('#') || row.cells.front().starts_with('%'));
}

struct HeaderGuess {
    std::size_t rows = 0;
    std::optional<std::size_t> names, units;
};

bool looksLikeUnits(const SampleRow& row) {
    constexpr std::size_t longestUnit = 12;
    bool any = false;
    for (const std::string& cell : row.cells) {
        any = any || !cell.empty();
        if (cell.size() > longestUnit)
            return false;
    }
    return any;
}

HeaderGuess guessHeader(const std::vector<SampleRow>& rows, std::size_t width, const CsvWishes& wishes) {
    HeaderGuess header;
    header.rows = wishes.headerRows.value_or(firstDataRow(rows, width));
    if (header.rows == 0 || header.rows > rows.size())
        return header;
    const std::size_t last = header.rows - 1;
    const bool twoNamed = last > 0 && rows[last - 1].cells.size() == rows[last].cells.size() &&
                          rows[last].cells.size() >= std::min<std::size_t>(width, 2) && !hasNumber(rows[last - 1]);
    const bool units = wishes.hasUnitsRow.value_or(twoNamed && looksLikeUnits(rows[last]));
    if (units) {
        header.units = last;
        if (last > 0)
            header.names = last - 1;
    } else if (!isRemark(rows[last], width)) {
        header.names = last;
    }
    return header;
}

struct NameAndUnit {
    std::string name, unit;
};

/// "p / bar", "p [bar]", "p (bar)" (ISO 80000-1, 7.1.4 recommends the first).
NameAndUnit splitName(const std::string& text) {
    for (const auto& [open, close] : {std::pair{'[', ']'}, std::pair{'(', ')'}}) {
        const std::size_t at = text.rfind(open);
        if (at != std::string::npos && at > 0 && text.ends_with(close))
            return {std::string(withoutBlanks(std::string_view(text).substr(0, at))),
                    std::string(withoutBlanks(std::string_view(text).substr(at + 1, text.size() - at - 2)))};
    }
    if (const std::size_t at = text.find(" / "); at != std::string::npos)
        return {text.substr(0, at), std::string(withoutBlanks(std::string_view(text).substr(at + 3)))};
    return {text, {}};
}

std::string bareUnit(std::string_view cell) {
    if (cell.size() > 2 && ((cell.front() == '[' && cell.back() == ']') || (cell.front() == '(' && cell.back() == ')')))
        cell = cell.substr(1, cell.size() - 2);
    return std::string(withoutBlanks(cell));
}

void nameColumns(CsvRules& rules, const std::vector<SampleRow>& rows) {
    const auto cell = [&](std::optional<std::size_t> row, std::size_t column) {
        return row && *row < rows.size() && column < rows[*row].cells.size() ? rows[*row].cells[column] : std::string{};
    };
    for (std::size_t i = 0; i < rules.columns.size(); ++i) {
        CsvColumn& column = rules.columns[i];
        const std::string named = cell(rules.namesRow, i);
        column.unit = bareUnit(cell(rules.unitsRow, i));
        if (!column.unit.empty()) {
            column.name = named;
            continue;
        }
        NameAndUnit split = splitName(named);
        column.name = std::move(split.name);
        column.unit = std::move(split.unit);
    }
}

/// Where the header has fewer cells than the rows, nobody knows which of their columns has no name.
void doubtShortHeader(CsvRules& rules, const std::vector<SampleRow>& rows) {
    if (!rules.namesRow || rows[*rules.namesRow].cells.size() >= rules.columns.size())
        return;
    const SampleRow& header = rows[*rules.namesRow];
    rules.doubts.push_back(Error(ErrorCode::HeaderShort, {{"line", std::to_string(header.line)},
                                                         {"got", std::to_string(header.cells.size())},
                                                         {"needed", std::to_string(rules.columns.size())}}));
}

/// Decides each column's kind, mark and date order from all its cells in the sample.
void judgeColumns(CsvRules& rules, std::span<const SampleRow> data, const CsvWishes& wishes) {
    std::vector<ColumnEvidence> evidence(rules.columns.size());
    for (const SampleRow& row : data)
        for (std::size_t i = 0; i < row.cells.size() && i < evidence.size(); ++i)
            evidence[i].add(row.cells[i]);
    std::optional<DecimalMark> ofFile;
    for (const ColumnEvidence& column : evidence)
        if (column.kind() == ColumnKind::Number && !ofFile)
            ofFile = column.clearMark();

    for (std::size_t i = 0; i < evidence.size(); ++i) {
        CsvColumn& column = rules.columns[i];
        column.kind = evidence[i].kind();
        const auto doubt = [&](ErrorCode code) {
            rules.doubts.push_back(Error(code, {{"column", columnLabel(rules, i)}, {"text", evidence[i].example()}}));
        };
        if (column.kind == ColumnKind::Time) {
            column.dateOrder = wishes.dateOrder.value_or(evidence[i].dateOrder());
            if (!wishes.dateOrder && evidence[i].dateOrderUnclear())
                doubt(ErrorCode::DateOrderUnclear);
        }
        if (column.kind == ColumnKind::Number) {
            column.decimal = wishes.decimal.value_or(evidence[i].mark(ofFile));
            if (!wishes.decimal && evidence[i].markUnclear(ofFile, rules.separator))
                doubt(ErrorCode::DecimalMarkUnclear);
        } else {
            column.decimal = wishes.decimal.value_or(ofFile.value_or(DecimalMark::Point));
        }
        for (const std::string& word : evidence[i].missingWords())
            if (std::find(rules.missingWords.begin(), rules.missingWords.end(), word) == rules.missingWords.end())
                rules.missingWords.push_back(word);
    }
}

Error severalNamed(std::string_view name, const std::vector<std::size_t>& columns) {
    std::string numbers;
    for (const std::size_t column : columns)
        numbers += (numbers.empty() ? "" : ", ") + std::to_string(column + 1);
    return Error(ErrorCode::ColumnUnclear, {{"named", std::string(name)}, {"columns", numbers}});
}

} // namespace

Result<CsvRules> guessRules(std::string_view bytes, const CsvWishes& wishes) {
    if (bytes.empty())
        return Error(ErrorCode::FileEmpty);
    CsvRules rules;
    rules.quote = Quote;
    if (wishes.encoding) {
        rules.encoding = *wishes.encoding;
    } else {
        const auto encoding = guessEncoding(bytes);
        if (!encoding)
            return encoding.error();
        rules.encoding = *encoding;
    }
    const auto decoded = DecodedText::decode(bytes, rules.encoding);
    if (!decoded)
        return decoded.error();
    const std::string_view text = decoded->text();

    const SeparatorGuess guess = wishes.separator ? SeparatorGuess{*wishes.separator} : guessSeparator(text);
    rules.separator = guess.separator;
    if (guess.unclear)
        rules.doubts.push_back(Error(ErrorCode::SeparatorUnclear, {{"separator", std::string(1, rules.separator)}}));

    const CsvSample sample = readCsvSample(text, rules.separator, rules.quote, SampleRows);
    if (sample.unclosedQuote != 0)
        return Error(ErrorCode::UnclosedQuote, {{"line", std::to_string(sample.unclosedQuote)}});
    const std::size_t width = usualWidth(sample.rows);
    const HeaderGuess header = guessHeader(sample.rows, width, wishes);
    if (header.rows >= sample.rows.size())
        return Error(ErrorCode::NoDataRows);
    rules.headerRows = header.rows;
    rules.namesRow = header.names;
    rules.unitsRow = header.units;
    rules.missingWords = wishes.missingWords;

    const std::span<const SampleRow> data = std::span(sample.rows).subspan(header.rows);
    rules.columns.resize(usedWidth(data, header.names ? &sample.rows[*header.names] : nullptr, width));
    nameColumns(rules, sample.rows);
    doubtShortHeader(rules, sample.rows);
    judgeColumns(rules, data, wishes);
    return rules;
}

Result<char> parseSeparatorName(std::string_view text) {
    const std::string name = lowerCase(text);
    constexpr std::array<std::pair<std::string_view, char>, 8> names{{{"tab", '\t'},
                                                                      {"\\t", '\t'},
                                                                      {"semicolon", ';'},
                                                                      {"comma", ','},
                                                                      {"pipe", '|'},
                                                                      {"space", CsvRules::Blanks},
                                                                      {"blanks", CsvRules::Blanks},
                                                                      {"colon", ':'}}};
    for (const auto& [known, separator] : names)
        if (name == known)
            return separator;
    const bool sign = name.size() == 1 && std::string_view("\t;,|: ").find(name.front()) != std::string_view::npos;
    if (sign)
        return name.front();
    return Error(ErrorCode::UsageValueBad, {{"text", std::string(text)}});
}

Result<std::size_t> findColumn(const CsvRules& rules, std::string_view nameOrNumber) {
    const std::string wanted = lowerCase(withoutBlanks(nameOrNumber));
    const NameAndUnit split = splitName(wanted);
    std::vector<std::size_t> named;
    for (std::size_t i = 0; i < rules.columns.size() && !wanted.empty(); ++i)
        if (lowerCase(rules.columns[i].name) == wanted)
            named.push_back(i);
    for (std::size_t i = 0; i < rules.columns.size() && named.empty() && !split.unit.empty(); ++i)
        if (lowerCase(rules.columns[i].name) == split.name && lowerCase(rules.columns[i].unit) == split.unit)
            return i;
    if (named.size() > 1)
        return severalNamed(nameOrNumber, named);
    if (!named.empty())
        return named.front();
    std::size_t number = 0;
    const auto [end, problem] = std::from_chars(wanted.data(), wanted.data() + wanted.size(), number);
    if (problem == std::errc{} && end == wanted.data() + wanted.size() && number >= 1 && number <= rules.columns.size())
        return number - 1;
    return Error(ErrorCode::ColumnMissing, {{"column", std::string(nameOrNumber)}});
}

std::string columnLabel(const CsvRules& rules, std::size_t column) {
    if (column < rules.columns.size() && !rules.columns[column].name.empty())
        return rules.columns[column].name;
    return std::to_string(column + 1);
}

} // namespace spanwright
