// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/commands/ReadingCommands.h"

#include "core/record/Fields.h"
#include "ui/commands/ReadingNumbers.h"

#include <QCoreApplication>

#include <algorithm>
#include <cassert>

namespace spanwright {

namespace {

QString tr(const char* text) {
    return QCoreApplication::translate("Commands", text);
}

std::string textOf(const std::optional<Decimal>& value) {
    return value ? value->text() : std::string();
}

std::string placeText(const Reading& r) {
    std::string text = std::string(nameOf(r.phase)) + ", run " + std::to_string(r.run);
    if (r.direction != Direction::Unknown)
        text += ", " + std::string(nameOf(r.direction));
    return text;
}

std::string where(ReadingId id, const char* column = nullptr) {
    std::string text = "reading " + std::to_string(id);
    return column ? text + " " + column : text;
}

/// "reference 2.0001, indication 7.195, as-found, run 1, rising"
std::string wholeText(const Reading& r) {
    std::string text;
    for (const ReadingNumber& c : readingNumbers)
        if (r.*c.field)
            text += std::string(c.name) + " " + (r.*c.field)->text() + ", ";
    return text + placeText(r);
}

void entriesOfChange(std::vector<JournalEntry>& made, const Reading& before, const Reading& after, const std::string& reason) {
    for (const ReadingNumber& c : readingNumbers)
        if (before.*c.field != after.*c.field)
            made.push_back({.who = {}, .what = before.*c.field ? "value-amended" : "value-entered",
                            .where = where(before.id, c.name),
                            .before = textOf(before.*c.field),
                            .after = textOf(after.*c.field),
                            .reason = reason});
    if (placeText(before) != placeText(after))
        made.push_back({.who = {}, .what = "reading-placed",
                        .where = where(before.id, "place"),
                        .before = placeText(before),
                        .after = placeText(after),
                        .reason = reason});
}

void replaceRow(ReadingColumns& columns, const Reading& reading) {
    const std::size_t row = columns.indexOf(reading.id);
    assert(row < columns.size());
    for (const ReadingNumber& c : readingNumbers)
        columns.setNumber(row, c.column, reading.*c.field);
    columns.setPlace(row, reading.phase, reading.run, reading.direction);
    columns.setEntry(row, reading.enteredAt, reading.enteredBy);
}

} // namespace

PutReadings::PutReadings(const QString& text, std::vector<Reading> rows, std::string reason)
    : RecordCommand(text), rows_(std::move(rows)), reason_(std::move(reason)) {
    for (const Reading& row : rows_)
        added_.push_back(row.id == 0);
}

void PutReadings::remark(std::size_t row, const std::string& words) {
    remarks_.resize(rows_.size());
    std::string& said = remarks_[row];
    said += said.empty() ? words : "; " + words;
}

std::string PutReadings::reasonOf(std::size_t row) const {
    if (remarks_.empty() || remarks_[row].empty())
        return reason_;
    return reason_.empty() ? remarks_[row] : reason_ + "; " + remarks_[row];
}

std::vector<ReadingId> PutReadings::ids() const {
    std::vector<ReadingId> all;
    for (const Reading& row : rows_)
        all.push_back(row.id);
    return all;
}

void PutReadings::stamp(std::int64_t now, const std::string& person) {
    for (std::size_t i = 0; i < rows_.size(); ++i) {
        if (!added_[i])
            continue;
        if (rows_[i].enteredAt == 0)
            rows_[i].enteredAt = now;
        if (rows_[i].enteredBy.empty())
            rows_[i].enteredBy = person;
    }
}

void PutReadings::apply(Record& record) {
    ReadingColumns& columns = record.readings.edit();
    replaced_.clear();
    for (std::size_t i = 0; i < rows_.size(); ++i) {
        Reading& row = rows_[i];
        if (added_[i]) {
            if (row.id == 0)
                row.id = record.nextReadingId++;
            columns.append(row);
        } else {
            replaced_.push_back(columns.row(columns.indexOf(row.id)));
            replaceRow(columns, row);
        }
    }
}

void PutReadings::revert(Record& record) {
    ReadingColumns& columns = record.readings.edit();
    for (std::size_t i = 0; i < rows_.size(); ++i)
        if (added_[i])
            columns.remove(rows_[i].id);
    for (const Reading& row : replaced_)
        replaceRow(columns, row);
}

std::vector<JournalEntry> PutReadings::entries(const Record&, const Record&) const {
    std::vector<JournalEntry> made;
    std::size_t replaced = 0;
    for (std::size_t i = 0; i < rows_.size(); ++i) {
        if (added_[i])
            made.push_back(
                {.who = {}, .what = "reading-entered", .where = where(rows_[i].id), .before = {}, .after = wholeText(rows_[i]), .reason = reasonOf(i)});
        else
            entriesOfChange(made, replaced_[replaced++], rows_[i], reasonOf(i));
    }
    return made;
}

bool PutReadings::changesNothing(const Record& record) const {
    const ReadingColumns& columns = *record.readings;
    for (std::size_t i = 0; i < rows_.size(); ++i) {
        if (added_[i])
            return false;
        const std::size_t row = columns.indexOf(rows_[i].id);
        if (row < columns.size() && columns.row(row) != rows_[i])
            return false;
    }
    return true;
}

AddReadings::AddReadings(std::vector<Reading> rows)
    : PutReadings(rows.size() == 1 ? tr("enter a reading") : tr("enter readings"), [&] {
          for (Reading& row : rows)
              row.id = 0;
          return std::move(rows);
      }()) {}

AmendValue::AmendValue(ReadingId id, NumberColumn column, std::optional<Decimal> value, std::string reason)
    : RecordCommand(tr("change a value")), id_(id), column_(column), value_(std::move(value)), reason_(std::move(reason)) {}

void AmendValue::apply(Record& record) {
    ReadingColumns& columns = record.readings.edit();
    const std::size_t row = columns.indexOf(id_);
    assert(row < columns.size());
    before_ = columns.number(column_).at(row);
    columns.setNumber(row, column_, value_);
}

void AmendValue::revert(Record& record) {
    ReadingColumns& columns = record.readings.edit();
    columns.setNumber(columns.indexOf(id_), column_, before_);
}

std::vector<JournalEntry> AmendValue::entries(const Record&, const Record&) const {
    return {{.who = {}, .what = before_ ? "value-amended" : "value-entered",
             .where = where(id_, numberOf(column_).name),
             .before = textOf(before_),
             .after = textOf(value_),
             .reason = reason_}};
}

bool AmendValue::changesNothing(const Record& record) const {
    const std::size_t row = record.readings->indexOf(id_);
    return row == record.readings->size() || record.readings->number(column_).at(row) == value_;
}

PlaceReadings::PlaceReadings(std::vector<ReadingId> ids, Place place)
    : RecordCommand(tr("place readings")), ids_(std::move(ids)), place_(std::move(place)) {}

void PlaceReadings::apply(Record& record) {
    ReadingColumns& columns = record.readings.edit();
    before_.clear();
    for (const ReadingId id : ids_) {
        const std::size_t row = columns.indexOf(id);
        assert(row < columns.size());
        before_.push_back(columns.row(row));
        Reading after = before_.back();
        after.phase = place_.phase.value_or(after.phase);
        after.run = place_.run.value_or(after.run);
        after.direction = place_.direction.value_or(after.direction);
        if (place_.setPoint)
            after.setPoint = place_.setPoint;
        replaceRow(columns, after);
    }
}

void PlaceReadings::revert(Record& record) {
    ReadingColumns& columns = record.readings.edit();
    for (const Reading& row : before_)
        replaceRow(columns, row);
}

std::vector<JournalEntry> PlaceReadings::entries(const Record&, const Record& after) const {
    std::vector<JournalEntry> made;
    for (const Reading& row : before_)
        entriesOfChange(made, row, after.readings->row(after.readings->indexOf(row.id)), {});
    return made;
}

ImportReadings::ImportReadings(ReadingColumns::Block block, std::string origin)
    : RecordCommand(tr("take in readings")), block_(std::move(block)), origin_(std::move(origin)) {}

void ImportReadings::stamp(std::int64_t, const std::string& person) {
    if (block_.enteredBy.empty())
        block_.enteredBy = person;
}

void ImportReadings::apply(Record& record) {
    if (firstId_ == 0) {
        firstId_ = record.nextReadingId;
        record.nextReadingId += static_cast<ReadingId>(block_.n);
    }
    record.readings.edit().appendBlock(block_, firstId_);
}

void ImportReadings::revert(Record& record) {
    record.readings.edit().removeBlock(firstId_, block_.n);
}

std::vector<JournalEntry> ImportReadings::entries(const Record&, const Record&) const {
    return {{.who = {}, .what = "readings-imported",
             .where = "readings " + std::to_string(firstId_) + " to " +
                      std::to_string(firstId_ + static_cast<ReadingId>(block_.n) - 1),
             .before = {},
             .after = std::to_string(block_.n) + " readings from " + origin_,
             .reason = {}}};
}

bool ImportReadings::changesNothing(const Record&) const {
    return block_.n == 0;
}

} // namespace spanwright
