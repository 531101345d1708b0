// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/RecordFile.h"

#include "app/ChoiceOptions.h"
#include "app/TableOptions.h"
#include "core/exchange/FileBytes.h"
#include "core/exchange/MatrixTable.h"
#include "core/exchange/ReadingImport.h"
#include "core/fit/StatedCovariance.h"
#include "core/record/Fields.h"
#include "core/session/SessionJson.h"
#include "ui/words/Words.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr OptionSpec known[] = {{"--reference"},   {"--indication"},   {"--set-point"}, {"--direction"}, {"--run"},    {"--u-reference"},
                                {"--u-indication"}, {"--u-covariance"}, {"--uncertainty-matrix"}, {"--time"}, {"--decimal"},   {"--separator"}, {"--encoding"}, {"--missing"},
                                {"--exclude"}, {"--positions"}};

/// Columns named by options; the first two columns of numbers stand in for those that are not named. A constant needs no
/// reference: it is taken only where it is named, or where two columns are there and none is named.
Result<ImportMapping> mappingOf(const Arguments& arguments, const CsvRules& rules, const FunctionChoice& function) {
    struct Named {
        const char* option;
        std::optional<std::size_t> ImportMapping::* column;
    };
    static constexpr Named named[] = {
        {"--reference", &ImportMapping::reference},    {"--indication", &ImportMapping::indication}, {"--set-point", &ImportMapping::setPoint},
        {"--direction", &ImportMapping::direction},    {"--run", &ImportMapping::run},               {"--u-reference", &ImportMapping::uReference},
        {"--u-indication", &ImportMapping::uIndication}, {"--u-covariance", &ImportMapping::uCovariance}, {"--time", &ImportMapping::time}};
    ImportMapping mapping;
    for (const Named& one : named)
        if (const auto text = arguments.value(one.option)) {
            const auto column = findColumn(rules, *text);
            if (!column)
                return column.error();
            mapping.*one.column = *column;
        }
    const bool constant = function.family == FunctionFamily::Constant;
    if (!mapping.reference && !mapping.indication)
        mapping.reference = firstNumbersBut(rules, std::nullopt);
    if (!mapping.indication)
        mapping.indication = firstNumbersBut(rules, mapping.reference);
    else if (!mapping.reference && !constant)
        mapping.reference = firstNumbersBut(rules, mapping.indication);
    if (!mapping.indication && constant)
        std::swap(mapping.reference, mapping.indication);
    if (!mapping.indication)
        return Error(ErrorCode::ColumnMissing, {{"quantity", "indication"}});
    if (!mapping.reference && !constant)
        return Error(ErrorCode::ColumnMissing, {{"quantity", "reference"}});
    if (mapping.reference == mapping.indication)
        return Error(ErrorCode::ColumnUnfit, {{"twice", columnLabel(rules, *mapping.indication)}});
    return mapping;
}

Quantity quantityOf(const CsvRules& rules, std::optional<std::size_t> column) {
    return column ? Quantity{rules.columns[*column].name, rules.columns[*column].unit} : Quantity{};
}

Result<std::vector<std::size_t>> excludedRows(const Arguments& arguments) {
    std::vector<std::size_t> rows;
    for (const auto& [option, text] : arguments.options) {
        if (option != "--exclude")
            continue;
        const auto more = rowList(option, text);
        if (!more)
            return more.error();
        rows.insert(rows.end(), more->begin(), more->end());
    }
    std::sort(rows.begin(), rows.end());
    return rows;
}

/// The first issue that no exclusion covers.
const CellIssue* standingIssue(const CellIssues& issues, const std::vector<std::size_t>& excluded) {
    for (const CellIssue& issue : issues.first)
        if (!std::binary_search(excluded.begin(), excluded.end(), issue.row))
            return &issue;
    // Beyond the issues that are kept, nobody knows whether their rows are excluded.
    return issues.count > issues.first.size() ? &issues.first.back() : nullptr;
}

Result<LoadedRecord> loadTable(const std::string& path, std::string_view bytes, const Arguments& arguments,
                               const std::vector<std::size_t>& excluded) {
    const auto wishes = wishesOf(arguments);
    if (!wishes)
        return wishes.error();
    const auto rules = guessRules(bytes, *wishes);
    if (!rules)
        return rules.error().with("file", path);
    const auto mark = arguments.has("--decimal") ? *wishes->decimal : DecimalMark::Point;
    const auto choices = withOptions({}, arguments, mark);
    if (!choices)
        return choices.error();
    const auto mapping = mappingOf(arguments, *rules, choices->function);
    if (!mapping)
        return mapping.error().with("file", path);
    if (const Error* doubt = doubtToRefuse(*rules, *mapping))
        return doubt->with("file", path);
    Progress progress;
    auto imported = readReadings(bytes, *rules, *mapping, progress);
    if (!imported)
        return imported.error().with("file", path);
    if (const CellIssue* issue = standingIssue(imported->issues, excluded))
        return issue->error(*rules).with("file", path);

    LoadedRecord loaded;
    loaded.notes.push_back(understood(path, *rules, *mapping));
    for (const Error& doubt : rules->doubts)
        loaded.notes.push_back(errorText(doubt.with("file", path)).toStdString());
    loaded.record.choices = *choices;
    loaded.record.item.reference = quantityOf(*rules, mapping->reference);
    loaded.record.item.indication = quantityOf(*rules, mapping->indication);
    const std::size_t n = imported->block.n;
    loaded.record.readings.edit().appendBlock(std::move(imported->block), loaded.record.nextReadingId);
    loaded.record.nextReadingId += static_cast<ReadingId>(n);
    return loaded;
}

Result<LoadedSession> sessionFrom(const std::string& path, std::string_view bytes) {
    auto session = readSession(bytes);
    if (!session)
        return session.error().with("file", path);
    if (session->readOnly)
        return Error(ErrorCode::NewerLayout, {{"version", std::to_string(session->version)}, {"file", path}});
    return LoadedSession{std::move(session->record), std::move(session->results), std::move(session->warnings)};
}

Result<LoadedRecord> loadSession(const std::string& path, std::string_view bytes, const Arguments& arguments) {
    auto session = sessionFrom(path, bytes);
    if (!session)
        return session.error();
    const auto mark = decimalMark(arguments);
    if (!mark)
        return mark.error();
    const auto choices = withOptions(session->record.choices, arguments, *mark);
    if (!choices)
        return choices.error();
    session->record.choices = *choices;
    return LoadedRecord{std::move(session->record), {}, std::move(session->broken), true};
}

/// Covariances between readings from the file that the option names.
Result<void> takeMatrix(Record& record, const Arguments& arguments) {
    const auto path = arguments.value("--uncertainty-matrix");
    if (!path)
        return {};
    const auto file = FileBytes::read(*path);
    if (!file)
        return file.error();
    std::optional<DecimalMark> mark;
    if (arguments.has("--decimal")) {
        const auto stated = decimalMark(arguments);
        if (!stated)
            return stated.error();
        mark = *stated;
    }
    const auto numbers = readMatrix(file->bytes(), mark);
    if (!numbers)
        return numbers.error().with("file", *path);
    auto matrix = uncertaintyMatrix(*numbers, record, record.choices.phase, path->substr(path->find_last_of('/') + 1));
    if (!matrix)
        return matrix.error().with("file", *path);
    record.uncertaintyMatrix = std::move(matrix).value();
    return {};
}

Result<void> exclude(Record& record, const std::vector<std::size_t>& rows) {
    for (const std::size_t row : rows) {
        if (row > record.readings->size())
            return Error(ErrorCode::ReadingMissing, {{"reading", std::to_string(row)}, {"last", std::to_string(record.readings->size())}});
        record.exclusions.edit().add({record.readings->ids()[row - 1], ExclusionReason::Other, "left out on the command line", {}, 0});
    }
    return {};
}

} // namespace

std::span<const OptionSpec> tableOptions() {
    return known;
}

Result<DecimalMark> decimalMark(const Arguments& arguments) {
    const std::string text = arguments.value("--decimal").value_or("point");
    if (text == "point")
        return DecimalMark::Point;
    if (text == "comma")
        return DecimalMark::Comma;
    return Error(ErrorCode::UsageValueBad, {{"option", "--decimal"}, {"text", text}});
}

Error noReadingsOf(Phase phase) {
    return Error(ErrorCode::NoReadings, {{"phase", std::string(nameOf(phase))}});
}

bool looksLikeSession(const std::string& path, std::string_view bytes) {
    constexpr std::string_view byteOrderMark = "\xEF\xBB\xBF";
    if (bytes.starts_with(byteOrderMark))
        bytes.remove_prefix(byteOrderMark.size());
    const std::size_t first = bytes.find_first_not_of(" \t\r\n");
    return path.ends_with(".spanwright") || (first != std::string_view::npos && (bytes[first] == '{' || bytes[first] == '['));
}

Result<LoadedSession> loadSessionFile(const std::string& path) {
    const auto file = FileBytes::read(path);
    return file ? sessionFrom(path, file->bytes()) : file.error();
}

Result<LoadedRecord> loadRecord(const std::string& path, const Arguments& arguments) {
    const auto excluded = excludedRows(arguments);
    if (!excluded)
        return excluded.error();
    const auto file = FileBytes::read(path);
    if (!file)
        return file.error();
    auto loaded = looksLikeSession(path, file->bytes()) ? loadSession(path, file->bytes(), arguments)
                                                        : loadTable(path, file->bytes(), arguments, *excluded);
    if (!loaded)
        return loaded;
    if (const auto text = arguments.value("--positions")) {
        const auto mark = decimalMark(arguments);
        const auto positions = mark ? numberList("--positions", *text, *mark) : mark.error();
        if (!positions)
            return positions.error();
        loaded->record.plan.positions = *positions;
    }
    const auto done = exclude(loaded->record, *excluded);
    if (!done)
        return done.error().with("file", path);
    if (const auto taken = takeMatrix(loaded->record, arguments); !taken)
        return taken.error();
    return loaded;
}

} // namespace spanwright
