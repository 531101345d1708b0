// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/ReadingImport.h"

#include "core/exchange/Words.h"

#include <algorithm>
#include <array>
#include <cmath>

namespace spanwright {

namespace {

constexpr double MostRuns = 1e6;

constexpr std::array<std::string_view, 8> risingWords{"up", "rising", "increasing", "u", "r", "1", "+1", "\xE2\x86\x91"};
constexpr std::array<std::string_view, 8> fallingWords{"down", "falling", "decreasing", "d", "f", "-1", "\xE2\x88\x92\x31",
                                                       "\xE2\x86\x93"};

/// Names by which a column says what it is: letters and digits only, in lower case.
struct KnownNames {
    std::optional<std::size_t> ImportMapping::* target;
    std::array<std::string_view, 8> names;
};
constexpr std::array<KnownNames, 9> knownNames{{
    {&ImportMapping::uReference, {"ureference", "uref", "ux"}},
    {&ImportMapping::uIndication, {"uindication", "uind", "uy"}},
    {&ImportMapping::uCovariance, {"ucovariance", "covariance", "cov", "uxy", "covxy"}},
    {&ImportMapping::setPoint, {"setpoint", "nominal", "sp", "point", "level", "target"}},
    {&ImportMapping::direction, {"direction", "dir", "updown"}},
    {&ImportMapping::run, {"run", "pass", "cycle", "series"}},
    {&ImportMapping::time, {"time", "timestamp", "date", "datetime", "date/time"}},
    {&ImportMapping::reference, {"reference", "ref", "standard", "referencevalue", "x", "stimulus"}},
    {&ImportMapping::indication, {"indication", "ind", "item", "y", "response", "output", "uut", "dut"}},
}};

std::string bareName(std::string_view name) {
    std::string bare;
    for (const char c : lowerCase(name))
        if (c != ' ' && c != '_' && c != '-' && c != '.' && c != '(' && c != ')')
            bare += c;
    return bare;
}

bool isNumeric(const CsvRules& rules, std::size_t column) {
    return rules.columns[column].kind == ColumnKind::Number;
}

/// Fills reference and indication, where they are not known, from the columns of numbers that nothing else uses.
ImportMapping withValues(const CsvRules& rules, ImportMapping mapping) {
    for (std::size_t i = 0; i < rules.columns.size(); ++i) {
        const bool used = std::any_of(knownNames.begin(), knownNames.end(), [&](const KnownNames& known) {
            return mapping.*known.target == i;
        });
        if (used || !isNumeric(rules, i))
            continue;
        if (!mapping.reference)
            mapping.reference = i;
        else if (!mapping.indication)
            mapping.indication = i;
    }
    return mapping;
}

/// Columns of the mapping that are read, and where each lands in the table.
struct Plan {
    std::vector<WantedColumn> wanted;
    std::optional<std::size_t> add(std::optional<std::size_t> column, ColumnKind kind) {
        if (!column)
            return std::nullopt;
        wanted.push_back({*column, kind});
        return wanted.size() - 1;
    }
};

class RowWords {
  public:
    RowWords(const CsvRules& rules, const Table& table, CellIssues& issues) : rules_(rules), table_(table), issues_(issues) {}

    std::vector<Direction> directions(const TableColumn& column) {
        std::vector<Direction> all;
        all.reserve(table_.rows);
        for (std::size_t i = 0; i < table_.rows; ++i) {
            const auto direction = parseDirection(column.texts[i]);
            if (!direction && !isMissingWord(column.texts[i]))
                issue(ErrorCode::DirectionUnknown, i, column, column.texts[i]);
            all.push_back(direction.value_or(Direction::Unknown));
        }
        return all;
    }

    std::vector<std::int32_t> runs(const TableColumn& column) {
        std::vector<std::int32_t> all;
        all.reserve(table_.rows);
        for (std::size_t i = 0; i < table_.rows; ++i) {
            std::int32_t run = 0;
            if (column.numbers.has(i)) {
                const double value = column.numbers.toDouble(i);
                if (value >= 1 && value <= MostRuns && value == std::floor(value))
                    run = static_cast<std::int32_t>(value);
                else
                    issue(ErrorCode::CellOutOfRange, i, column, column.numbers.at(i)->text());
            }
            all.push_back(run);
        }
        return all;
    }

  private:
    bool isMissingWord(const std::string& cell) const {
        return std::any_of(rules_.missingWords.begin(), rules_.missingWords.end(),
                           [&](const std::string& word) { return lowerCase(word) == lowerCase(cell); });
    }
    void issue(ErrorCode code, std::size_t row, const TableColumn& column, const std::string& text) {
        issues_.add({code, row + 1, table_.lines[row], column.source, text.substr(0, 80)});
    }

    const CsvRules& rules_;
    const Table& table_;
    CellIssues& issues_;
};

} // namespace

ImportMapping firstTwoColumns(const CsvRules& rules) {
    return withValues(rules, {});
}

ImportMapping mappingByNames(const CsvRules& rules) {
    ImportMapping mapping;
    for (const KnownNames& known : knownNames)
        for (const std::string_view name : known.names)
            for (std::size_t i = 0; i < rules.columns.size() && !name.empty(); ++i) {
                const bool time = rules.columns[i].kind == ColumnKind::Time;
                const bool text = known.target == &ImportMapping::direction;
                const bool fits = known.target == &ImportMapping::time ? time : text || isNumeric(rules, i);
                if (!(mapping.*known.target) && fits && bareName(rules.columns[i].name) == name)
                    mapping.*known.target = i;
            }
    return withValues(rules, mapping);
}

std::optional<Direction> parseDirection(std::string_view word) {
    const std::string bare = lowerCase(withoutBlanks(word));
    if (bare.empty())
        return Direction::Unknown;
    if (std::find(risingWords.begin(), risingWords.end(), bare) != risingWords.end())
        return Direction::Rising;
    if (std::find(fallingWords.begin(), fallingWords.end(), bare) != fallingWords.end())
        return Direction::Falling;
    return std::nullopt;
}

Result<ImportedReadings> readReadings(std::string_view bytes, const CsvRules& rules, const ImportMapping& mapping,
                                      Progress& progress) {
    Plan plan;
    const auto reference = plan.add(mapping.reference, ColumnKind::Number);
    const auto indication = plan.add(mapping.indication, ColumnKind::Number);
    const auto setPoint = plan.add(mapping.setPoint, ColumnKind::Number);
    const auto direction = plan.add(mapping.direction, ColumnKind::Text);
    const auto run = plan.add(mapping.run, ColumnKind::Number);
    const auto uReference = plan.add(mapping.uReference, ColumnKind::Number);
    const auto uIndication = plan.add(mapping.uIndication, ColumnKind::Number);
    const auto uCovariance = plan.add(mapping.uCovariance, ColumnKind::Number);
    const auto time = plan.add(mapping.time, ColumnKind::Time);

    auto read = readTable(bytes, rules, plan.wanted, progress);
    if (!read)
        return read.error();
    Table& table = *read;
    ImportedReadings imported;
    imported.issues = std::move(table.issues);
    ReadingColumns::Block& block = imported.block;
    block.n = table.rows;
    RowWords words(rules, table, imported.issues);
    if (direction)
        block.directions = words.directions(table.columns[*direction]);
    if (run)
        block.runs = words.runs(table.columns[*run]);
    if (time) {
        block.enteredAt.reserve(table.rows);
        for (const auto& at : table.columns[*time].times)
            block.enteredAt.push_back(at.value_or(0));
    }
    for (const auto& value : {reference, indication})
        imported.missing += value ? table.columns[*value].missing : 0;
    const auto take = [&](std::optional<std::size_t> from, DecimalColumn& to) {
        if (from)
            to = std::move(table.columns[*from].numbers);
    };
    take(reference, block.reference);
    take(indication, block.indication);
    take(setPoint, block.setPoint);
    take(uReference, block.uReference);
    take(uIndication, block.uIndication);
    take(uCovariance, block.uCovariance);
    imported.lines = std::move(table.lines);
    return imported;
}

} // namespace spanwright
