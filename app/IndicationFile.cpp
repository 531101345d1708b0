// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/IndicationFile.h"

#include "app/TableOptions.h"
#include "core/exchange/ReadingImport.h"
#include "core/exchange/Words.h"

#include <algorithm>

namespace spanwright {

namespace {

/// Whether a column is named like the reference, or so itself, and not like the indication too.
bool isReference(const CsvRules& rules, std::size_t column, const Item& item) {
    const std::string name = lowerCase(rules.columns[column].name);
    const auto namedLike = [&](const Quantity& quantity) { return !name.empty() && name == lowerCase(withoutBlanks(quantity.name)); };
    return (namedLike(item.reference) || name == "reference") && !namedLike(item.indication);
}

std::string labels(const CsvRules& rules, const std::vector<std::size_t>& columns) {
    std::string text;
    for (const std::size_t column : columns)
        text += (text.empty() ? "" : ", ") + columnLabel(rules, column);
    return text;
}

/// Of several, those in the unit of the indication, where there are any.
std::vector<std::size_t> likeliest(const CsvRules& rules, std::vector<std::size_t> columns, const Quantity& indication) {
    const auto inUnit = [&](std::size_t column) { return !indication.unit.empty() && rules.columns[column].unit == indication.unit; };
    if (columns.size() > 1 && std::any_of(columns.begin(), columns.end(), inUnit))
        std::erase_if(columns, [&](std::size_t column) { return !inUnit(column); });
    return columns;
}

Result<std::size_t> indicationColumn(const Arguments& arguments, const CsvRules& rules, const Item& item) {
    if (const auto text = arguments.value("--indication"))
        return findColumn(rules, *text);
    for (const std::string& name : {item.indication.name, std::string("indication")})
        if (!name.empty())
            if (const auto named = findColumn(rules, name); named || named.error().code == ErrorCode::ColumnUnclear)
                return named;
    std::vector<std::size_t> numbers, references;
    for (std::size_t i = 0; i < rules.columns.size(); ++i)
        if (rules.columns[i].kind == ColumnKind::Number)
            (isReference(rules, i, item) ? references : numbers).push_back(i);
    numbers = likeliest(rules, numbers, item.indication);
    if (numbers.size() == 1)
        return numbers.front();
    if (numbers.empty() && references.empty())
        return std::size_t{0}; // no column of numbers: the cells of the first one say what is wrong
    Error unclear(ErrorCode::ColumnUnclear, {{"quantity", "indication"}});
    unclear.facts.push_back(numbers.empty() ? Fact{"reference", labels(rules, references)} : Fact{"columns", labels(rules, numbers)});
    if (!item.indication.name.empty())
        unclear.facts.push_back({"name", item.indication.name});
    return unclear;
}

} // namespace

Result<LoadedIndications> loadIndications(const std::string& path, const Arguments& arguments, const Item& item) {
    auto file = FileBytes::read(path);
    if (!file)
        return file.error();
    const auto wishes = wishesOf(arguments);
    if (!wishes)
        return wishes.error();
    auto rules = guessRules(file->bytes(), *wishes);
    if (!rules)
        return rules.error().with("file", path);
    ImportMapping mapping;
    if (const Error* doubt = doubtToRefuse(*rules, mapping))
        return doubt->with("file", path);
    const auto column = indicationColumn(arguments, *rules, item);
    if (!column)
        return column.error().with("file", path);
    mapping.indication = *column;
    if (const Error* doubt = doubtToRefuse(*rules, mapping))
        return doubt->with("file", path);
    const std::string& unit = rules->columns[*column].unit;
    if (!unit.empty() && !item.indication.unit.empty() && unit != item.indication.unit)
        return Error(ErrorCode::UnitsDiffer,
                     {{"name", columnLabel(*rules, *column)}, {"unit", unit}, {"expected", item.indication.unit}, {"file", path}});
    Progress progress;
    auto imported = readReadings(file->bytes(), *rules, mapping, progress);
    if (!imported)
        return imported.error().with("file", path);
    if (!imported->issues.first.empty())
        return imported->issues.first.front().error(*rules).with("file", path);
    std::vector<std::string> notes{understood(path, *rules, mapping)};
    if (isReference(*rules, *column, item))
        notes.push_back(path + ": column \"" + columnLabel(*rules, *column) + "\" is named like the reference; it was taken as the indication, as asked for");
    return LoadedIndications{std::move(*file), std::move(*rules), *column, std::move(imported->block.indication), std::move(notes)};
}

} // namespace spanwright
