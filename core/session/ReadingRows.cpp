// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/ReadingRows.h"

#include "core/record/Fields.h"
#include "core/session/Moment.h"
#include "core/session/RowField.h"

#include <algorithm>
#include <array>
#include <charconv>

namespace spanwright {

namespace {

bool isUsed(const ReadingColumns& readings, std::span<const std::size_t> rows, RowField field) {
    const auto any = [&](auto&& holds) { return std::any_of(rows.begin(), rows.end(), holds); };
    switch (field) {
    case RowField::Id:
    case RowField::Reference:
    case RowField::Indication: return true;
    case RowField::Phase: return any([&](std::size_t i) { return readings.phases()[i] != Phase::AsFound; });
    case RowField::Run: return any([&](std::size_t i) { return readings.runs()[i] != 0; });
    case RowField::Direction: return any([&](std::size_t i) { return readings.directions()[i] != Direction::Unknown; });
    case RowField::EnteredAt: return any([&](std::size_t i) { return readings.enteredAt()[i] != 0; });
    case RowField::EnteredBy: return any([&](std::size_t i) { return !readings.enteredBy(i).empty(); });
    default: return any([&](std::size_t i) { return readings.number(*numberColumnOf(field)).has(i); });
    }
}

template <class I>
void appendInteger(std::string& json, I number) {
    char digits[24];
    const auto [end, problem] = std::to_chars(digits, digits + sizeof digits, number);
    json.append(digits, static_cast<std::size_t>(end - digits));
}

/// The number as typed between quotation marks, straight from the grid where it lies there.
void appendNumber(std::string& json, const DecimalColumn& column, std::size_t row) {
    static constexpr auto powers = [] {
        std::array<std::uint64_t, 19> all{1};
        for (std::size_t i = 1; i < all.size(); ++i)
            all[i] = all[i - 1] * 10;
        return all;
    }();
    const std::size_t decimals = column.decimals()[row];
    if (decimals == DecimalColumn::Missing) {
        json += "null";
        return;
    }
    json += '"';
    if (decimals == DecimalColumn::KeptAside) {
        json += column.at(row)->text();
    } else {
        const std::int64_t integer = column.grid()[row];
        const auto bits = static_cast<std::uint64_t>(integer);
        const std::uint64_t power = powers[static_cast<std::size_t>(column.scale()) - decimals];
        const std::uint64_t magnitude = (integer < 0 ? 0 - bits : bits) / power;
        char digits[24];
        const auto [end, problem] = std::to_chars(digits, digits + sizeof digits, magnitude);
        const auto count = static_cast<std::size_t>(end - digits);
        if (integer < 0)
            json += '-';
        if (decimals == 0) {
            json.append(digits, count);
        } else if (count > decimals) {
            json.append(digits, count - decimals);
            json += '.';
            json.append(digits + count - decimals, decimals);
        } else {
            json += "0.";
            json.append(decimals - count, '0');
            json.append(digits, count);
        }
    }
    json += '"';
}

struct UsedColumn {
    RowField field;
    const DecimalColumn* numbers; ///< null for those that hold none
};

void appendRow(std::string& json, const ReadingColumns& readings, std::size_t row, const std::vector<UsedColumn>& used) {
    char before = '[';
    for (const UsedColumn& column : used) {
        json += before;
        before = ',';
        switch (column.field) {
        case RowField::Id: appendInteger(json, readings.ids()[row]); break;
        case RowField::Phase: json.append(1, '"').append(nameOf(readings.phases()[row])).append(1, '"'); break;
        case RowField::Run: appendInteger(json, readings.runs()[row]); break;
        case RowField::Direction: json.append(1, '"').append(nameOf(readings.directions()[row])).append(1, '"'); break;
        case RowField::EnteredAt: appendMoment(json, readings.enteredAt()[row]); break;
        case RowField::EnteredBy: appendQuoted(json, readings.enteredBy(row)); break;
        default: appendNumber(json, *column.numbers, row);
        }
    }
    json += ']';
}

} // namespace

void writeReadingRows(JsonText& json, const ReadingColumns& readings) {
    std::vector<std::size_t> rows(readings.size());
    for (std::size_t i = 0; i < rows.size(); ++i)
        rows[i] = i;
    writeReadingRows(json, readings, rows);
}

void writeReadingRows(JsonText& json, const ReadingColumns& readings, std::span<const std::size_t> rows) {
    std::vector<UsedColumn> used;
    json.key("columns").beginArray(JsonText::Layout::OneLine);
    for (std::size_t i = 0; i < rowFieldNames.size(); ++i)
        if (const auto field = static_cast<RowField>(i); isUsed(readings, rows, field)) {
            const auto numbers = numberColumnOf(field);
            used.push_back({field, numbers ? &readings.number(*numbers) : nullptr});
            json.string(rowFieldNames[i]);
        }
    json.endArray();
    json.key("rows").beginArray();
    for (const std::size_t row : rows) {
        json.raw({});
        appendRow(json.text(), readings, row, used);
    }
    json.endArray();
}

} // namespace spanwright
