// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/ReadingRows.h"

#include "core/exchange/NumberCell.h"
#include "core/exchange/TimeCell.h"
#include "core/record/Fields.h"

#include <algorithm>
#include <array>
#include <charconv>
#include <limits>

namespace spanwright {

namespace {

enum class RowField { Id, Phase, Run, Direction, SetPoint, Reference, Indication, UReference, UIndication, EnteredAt, EnteredBy };
constexpr std::array<std::string_view, 11> fieldNames{"id",        "phase",      "run",         "direction",   "set_point", "reference",
                                                      "indication", "u_reference", "u_indication", "entered_at", "entered_by"};
constexpr std::string_view rowsKey = "/readings/rows";

std::string cellKey(std::size_t row, std::string_view field) {
    return std::string(rowsKey) + "/" + std::to_string(row) + "/" + std::string(field);
}

std::optional<RowField> fieldOf(const std::string& name) {
    const auto found = std::find(fieldNames.begin(), fieldNames.end(), name);
    if (found == fieldNames.end())
        return std::nullopt;
    return static_cast<RowField>(found - fieldNames.begin());
}

std::optional<NumberColumn> numberOf(RowField field) {
    switch (field) {
    case RowField::SetPoint: return NumberColumn::SetPoint;
    case RowField::Reference: return NumberColumn::Reference;
    case RowField::Indication: return NumberColumn::Indication;
    case RowField::UReference: return NumberColumn::UReference;
    case RowField::UIndication: return NumberColumn::UIndication;
    default: return std::nullopt;
    }
}

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
    default: return any([&](std::size_t i) { return readings.number(*numberOf(field)).has(i); });
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
    static constexpr std::uint64_t powers[] = {1ull,
                                               10ull,
                                               100ull,
                                               1'000ull,
                                               10'000ull,
                                               100'000ull,
                                               1'000'000ull,
                                               10'000'000ull,
                                               100'000'000ull,
                                               1'000'000'000ull,
                                               10'000'000'000ull,
                                               100'000'000'000ull,
                                               1'000'000'000'000ull,
                                               10'000'000'000'000ull,
                                               100'000'000'000'000ull,
                                               1'000'000'000'000'000ull,
                                               10'000'000'000'000'000ull,
                                               100'000'000'000'000'000ull,
                                               1'000'000'000'000'000'000ull};
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
        const std::uint64_t magnitude = (integer < 0 ? 0 - static_cast<std::uint64_t>(integer) : static_cast<std::uint64_t>(integer)) /
                                        powers[static_cast<std::size_t>(column.scale()) - decimals];
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

/// Gathers the rows of a file into columns.
class RowReader {
  public:
    RowReader(JsonScanner& scan, const std::vector<std::string>& names) : scan_(scan) {
        for (const std::string& name : names)
            columns_.push_back(fieldOf(name));
        if (std::find(columns_.begin(), columns_.end(), std::optional(RowField::Id)) == columns_.end())
            scan_.failValue("/readings/columns", "");
    }

    ReadingColumns read() {
        if (scan_.failed() || !scan_.enterArray())
            return {};
        while (scan_.nextItem())
            readRow();
        if (scan_.failed())
            return {};
        const std::size_t n = all_.ids.size();
        all_.phases.resize(n, Phase::AsFound);
        all_.runs.resize(n, 0);
        all_.directions.resize(n, Direction::Unknown);
        all_.enteredAt.resize(n, 0);
        all_.enteredBy.resize(n, 0);
        DecimalColumn* const targets[] = {&all_.setPoint, &all_.reference, &all_.indication, &all_.uReference, &all_.uIndication};
        for (std::size_t i = 0; i < numbers_.size(); ++i) {
            *targets[i] = std::move(numbers_[i]).finish();
            targets[i]->resize(n);
        }
        return ReadingColumns::fromWhole(std::move(all_));
    }

  private:
    void readRow() {
        if (!scan_.enterArray())
            return;
        for (const std::optional<RowField>& field : columns_) {
            if (!scan_.nextItem()) {
                scan_.failValue(rowKey(), "");
                return;
            }
            if (field)
                readCell(*field);
            else
                scan_.skip();
        }
        if (scan_.nextItem())
            scan_.failValue(rowKey(), scan_.skip());
        ++row_;
    }

    void readCell(RowField field) {
        switch (field) {
        case RowField::Id: readId(); return;
        case RowField::Phase: all_.phases.push_back(readName(phase_, field)); return;
        case RowField::Run: all_.runs.push_back(static_cast<std::int32_t>(readInteger(field, 0, std::numeric_limits<std::int32_t>::max()))); return;
        case RowField::Direction: all_.directions.push_back(readName(direction_, field)); return;
        case RowField::EnteredAt: all_.enteredAt.push_back(readTimeCell()); return;
        case RowField::EnteredBy: readPerson(); return;
        default: readNumber(field);
        }
    }

    void readId() {
        const std::int64_t least = all_.ids.empty() ? 1 : all_.ids.back() + 1;
        all_.ids.push_back(readInteger(RowField::Id, least, std::numeric_limits<std::int64_t>::max() - 1));
    }

    std::int64_t readInteger(RowField field, std::int64_t least, std::int64_t most) {
        const std::string_view json = scan_.json();
        const PlainNumber plain = readPlainNumber(json.data() + scan_.offset(), json.data() + json.size(), DecimalMark::Point);
        const auto isDigit = [](char c) { return c >= '0' && c <= '9'; };
        if (plain.end != nullptr && isDigit(json[scan_.offset()]) && isDigit(plain.end[-1]) && plain.decimals == 0 &&
            plain.end != json.data() + json.size() && (*plain.end == ',' || *plain.end == ']') && plain.mantissa >= least &&
            plain.mantissa <= most) {
            scan_.passTo(static_cast<std::size_t>(plain.end - json.data()));
            return plain.mantissa;
        }
        const std::string_view digits = scan_.skip();
        std::int64_t number = 0;
        const auto [end, problem] = std::from_chars(digits.data(), digits.data() + digits.size(), number);
        if (problem != std::errc{} || end != digits.data() + digits.size() || number < least || number > most)
            bad(field, digits);
        return number;
    }

    template <class E>
    struct LastName {
        std::string text;
        std::optional<E> value;
    };
    template <class E>
    E readName(LastName<E>& last, RowField field) {
        if (!scan_.atString()) {
            bad(field, scan_.skip());
            return E{};
        }
        std::string text = scan_.string();
        if (!last.value || text != last.text) {
            last.value = valueOf<E>(text);
            last.text = std::move(text);
        }
        if (!last.value)
            bad(field, last.text);
        return last.value.value_or(E{});
    }

    std::int64_t readTimeCell() {
        if (scan_.takeNull())
            return 0;
        return readMoment(scan_, "/readings/rows/entered_at");
    }

    void readPerson() {
        if (!scan_.atString()) {
            bad(RowField::EnteredBy, scan_.skip());
            return;
        }
        const std::string initials = scan_.string();
        std::vector<std::string>& people = all_.people;
        if (people[person_] != initials) {
            person_ = static_cast<std::size_t>(std::find(people.begin(), people.end(), initials) - people.begin());
            if (person_ == people.size())
                people.push_back(initials);
        }
        if (person_ > MostPeople) {
            bad(RowField::EnteredBy, initials);
            person_ = 0;
        }
        all_.enteredBy.push_back(static_cast<std::uint16_t>(person_));
    }

    void readNumber(RowField field) {
        NumberColumnBuilder& builder = numbers_[static_cast<std::size_t>(field) - static_cast<std::size_t>(RowField::SetPoint)];
        const std::string_view json = scan_.json();
        const std::size_t at = scan_.offset();
        const char* const end = json.data() + json.size();
        if (at < json.size() && json[at] == '"') {
            const PlainNumber number = readPlainNumber(json.data() + at + 1, end, DecimalMark::Point);
            if (number.end != nullptr && number.end != end && *number.end == '"') {
                builder.add(number);
                scan_.passTo(static_cast<std::size_t>(number.end + 1 - json.data()));
                return;
            }
        }
        if (scan_.takeNull()) {
            builder.addMissing();
            return;
        }
        const std::string text = scan_.atString() ? scan_.string() : std::string(scan_.skip());
        const auto parsed = Decimal::parse(text);
        if (parsed)
            builder.add(*parsed);
        else
            bad(field, text);
    }

    void bad(RowField field, std::string_view text) { scan_.failValue(cellKey(row_, fieldNames[static_cast<std::size_t>(field)]), text); }
    [[nodiscard]] std::string rowKey() const { return std::string(rowsKey) + "/" + std::to_string(row_); }

    static constexpr std::size_t MostPeople = std::numeric_limits<std::uint16_t>::max();

    JsonScanner& scan_;
    std::vector<std::optional<RowField>> columns_;
    std::size_t row_ = 0;
    ReadingColumns::Whole all_;
    std::array<NumberColumnBuilder, 5> numbers_;
    LastName<Phase> phase_;
    LastName<Direction> direction_;
    std::size_t person_ = 0;
};

} // namespace

void appendMoment(std::string& json, std::int64_t milliseconds) {
    constexpr std::int64_t yearZero = -62'167'219'200'000;
    constexpr std::int64_t yearTenThousand = 253'402'300'800'000;
    if (milliseconds == 0)
        json += "null";
    else if (milliseconds >= yearZero && milliseconds < yearTenThousand)
        json.append(1, '"').append(isoTime(milliseconds)).append(1, '"');
    else
        appendInteger(json, milliseconds);
}

std::int64_t readMoment(JsonScanner& scan, std::string_view key) {
    if (scan.takeNull())
        return 0;
    if (scan.atString()) {
        const std::string text = scan.string();
        const auto time = parseTime(text, DateOrder::YearMonthDay);
        if (!time)
            scan.failValue(key, text);
        return time.value_or(0);
    }
    const std::string_view digits = scan.skip();
    std::int64_t number = 0;
    const auto [end, problem] = std::from_chars(digits.data(), digits.data() + digits.size(), number);
    if (problem != std::errc{} || end != digits.data() + digits.size())
        scan.failValue(key, digits);
    return number;
}

void writeReadingRows(JsonText& json, const ReadingColumns& readings) {
    std::vector<std::size_t> rows(readings.size());
    for (std::size_t i = 0; i < rows.size(); ++i)
        rows[i] = i;
    writeReadingRows(json, readings, rows);
}

void writeReadingRows(JsonText& json, const ReadingColumns& readings, std::span<const std::size_t> rows) {
    std::vector<UsedColumn> used;
    json.key("columns").beginArray(JsonText::Layout::OneLine);
    for (std::size_t i = 0; i < fieldNames.size(); ++i)
        if (const auto field = static_cast<RowField>(i); isUsed(readings, rows, field)) {
            const auto numbers = numberOf(field);
            used.push_back({field, numbers ? &readings.number(*numbers) : nullptr});
            json.string(fieldNames[i]);
        }
    json.endArray();
    json.key("rows").beginArray();
    for (const std::size_t row : rows) {
        json.raw({});
        appendRow(json.text(), readings, row, used);
    }
    json.endArray();
}

std::vector<std::string> readColumnNames(JsonScanner& scan, StrangeColumn strange) {
    std::vector<std::string> names;
    if (!scan.enterArray())
        return names;
    while (scan.nextItem()) {
        std::string name = scan.string();
        const bool twice = std::find(names.begin(), names.end(), name) != names.end();
        if (twice || (strange == StrangeColumn::Refuse && !fieldOf(name)))
            scan.failValue("/readings/columns", name);
        names.push_back(std::move(name));
    }
    return names;
}

ReadingColumns readReadingRows(JsonScanner& scan, const std::vector<std::string>& columns) {
    return RowReader(scan, columns).read();
}

} // namespace spanwright
