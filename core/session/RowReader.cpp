// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/RowReader.h"

#include "core/exchange/NumberCell.h"
#include "core/record/Fields.h"
#include "core/session/Moment.h"
#include "core/session/RowField.h"

#include <algorithm>
#include <array>
#include <charconv>
#include <limits>

namespace spanwright {

namespace {

constexpr std::string_view rowsKey = "/readings/rows";

std::string cellKey(std::size_t row, std::string_view field) {
    return std::string(rowsKey) + "/" + std::to_string(row) + "/" + std::string(field);
}

/// Gathers the rows of a file into columns.
class RowReader {
  public:
    RowReader(JsonScanner& scan, const std::vector<std::string>& names) : scan_(scan) {
        for (const std::string& name : names)
            columns_.push_back(rowFieldOf(name));
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
        DecimalColumn* const targets[] = {&all_.setPoint, &all_.reference, &all_.indication, &all_.uReference,
                                          &all_.uIndication, &all_.uCovariance};
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
        case RowField::Run: all_.runs.push_back(static_cast<std::int32_t>(readInteger(field, 0, LargestRun))); return;
        case RowField::Direction: all_.directions.push_back(readName(direction_, field)); return;
        case RowField::EnteredAt: all_.enteredAt.push_back(readTimeCell()); return;
        case RowField::EnteredBy: readPerson(); return;
        default: readNumber(field);
        }
    }

    void readId() {
        const std::int64_t least = all_.ids.empty() ? 1 : all_.ids.back() + 1;
        all_.ids.push_back(readInteger(RowField::Id, least, LargestReadingId));
    }

    std::int64_t readInteger(RowField field, std::int64_t least, std::int64_t most) {
        // The key is a text of its own only when it is needed: there are millions of cells.
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
        NumberColumnBuilder& builder = numbers_[static_cast<std::size_t>(*numberColumnOf(field))];
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

    void bad(RowField field, std::string_view text) { scan_.failValue(cellKey(row_, nameOf(field)), text); }
    [[nodiscard]] std::string rowKey() const { return std::string(rowsKey) + "/" + std::to_string(row_); }

    static constexpr std::int64_t LargestRun = std::numeric_limits<std::int32_t>::max();
    static constexpr std::size_t MostPeople = std::numeric_limits<std::uint16_t>::max();

    JsonScanner& scan_;
    std::vector<std::optional<RowField>> columns_;
    std::size_t row_ = 0;
    ReadingColumns::Whole all_;
    std::array<NumberColumnBuilder, 6> numbers_;
    LastName<Phase> phase_;
    LastName<Direction> direction_;
    std::size_t person_ = 0;
};

} // namespace

std::vector<std::string> readColumnNames(JsonScanner& scan, StrangeColumn strange) {
    std::vector<std::string> names;
    if (!scan.enterArray())
        return names;
    while (scan.nextItem()) {
        std::string name = scan.string();
        const bool twice = std::find(names.begin(), names.end(), name) != names.end();
        if (twice || (strange == StrangeColumn::Refuse && !rowFieldOf(name)))
            scan.failValue("/readings/columns", name);
        names.push_back(std::move(name));
    }
    return names;
}

ReadingColumns readReadingRows(JsonScanner& scan, const std::vector<std::string>& columns) {
    return RowReader(scan, columns).read();
}

} // namespace spanwright
