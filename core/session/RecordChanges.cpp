// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/RecordChanges.h"

#include "core/exchange/TextEncoding.h"
#include "core/record/Fields.h"
#include "core/session/ListsJson.h"
#include "core/session/PartsJson.h"
#include "core/session/ReadingRows.h"
#include "core/session/RowReader.h"
#include "core/session/UnknownKeys.h"

#include <algorithm>
#include <limits>

namespace spanwright {

namespace {

/// Compares rows of two sets of readings without taking them apart where their numbers lie on the same grid.
class RowComparison {
  public:
    RowComparison(const ReadingColumns& before, const ReadingColumns& after) : before_(before), after_(after) {
        for (const NumberColumn column : numberColumns) {
            const DecimalColumn& a = before.number(column);
            const DecimalColumn& b = after.number(column);
            pairs_.push_back({a, b, a.scale() == b.scale()});
        }
    }

    [[nodiscard]] bool same(std::size_t i, std::size_t j) const {
        return before_.phases()[i] == after_.phases()[j] && before_.runs()[i] == after_.runs()[j] &&
               before_.directions()[i] == after_.directions()[j] && before_.enteredAt()[i] == after_.enteredAt()[j] &&
               before_.enteredBy(i) == after_.enteredBy(j) &&
               std::all_of(pairs_.begin(), pairs_.end(), [&](const Pair& pair) { return pair.same(i, j); });
    }

  private:
    struct Pair {
        const DecimalColumn& a;
        const DecimalColumn& b;
        bool oneGrid;
        [[nodiscard]] bool same(std::size_t i, std::size_t j) const {
            const bool onGrid = oneGrid && a.decimals()[i] != DecimalColumn::KeptAside;
            return onGrid ? a.grid()[i] == b.grid()[j] && a.decimals()[i] == b.decimals()[j] : a.at(i) == b.at(j);
        }
    };
    const ReadingColumns& before_;
    const ReadingColumns& after_;
    std::vector<Pair> pairs_;
};

struct ReadingChanges {
    std::vector<ReadingId> removed;
    std::vector<std::size_t> written; ///< rows of `after` that are new or different
};

ReadingChanges readingChanges(const ReadingColumns& before, const ReadingColumns& after) {
    ReadingChanges changes;
    const RowComparison rows(before, after);
    std::size_t i = 0;
    std::size_t j = 0;
    while (i < before.size() || j < after.size()) {
        if (j == after.size() || (i < before.size() && before.ids()[i] < after.ids()[j])) {
            changes.removed.push_back(before.ids()[i++]);
        } else if (i == before.size() || after.ids()[j] < before.ids()[i]) {
            changes.written.push_back(j++);
        } else {
            if (!rows.same(i, j))
                changes.written.push_back(j);
            ++i;
            ++j;
        }
    }
    return changes;
}

void writeIds(JsonText& json, std::string_view key, const std::vector<ReadingId>& ids) {
    if (ids.empty())
        return;
    json.key(key).beginArray(JsonText::Layout::OneLine);
    for (const ReadingId id : ids)
        json.raw(std::to_string(id));
    json.endArray();
}

void writeExclusionChanges(JsonText& json, const Record& before, const Record& after) {
    std::vector<ReadingId> removed;
    std::vector<Exclusion> written;
    for (const Exclusion& exclusion : before.exclusions->all())
        if (!after.exclusions->contains(exclusion.id))
            removed.push_back(exclusion.id);
    for (const Exclusion& exclusion : after.exclusions->all()) {
        const Exclusion* const old = before.exclusions->find(exclusion.id);
        if (old == nullptr || !(*old == exclusion)) {
            removed.push_back(exclusion.id);
            written.push_back(exclusion);
        }
    }
    writeIds(json, "exclusions_removed", removed);
    if (!written.empty()) {
        json.key("exclusions");
        writeExclusions(json, Record{}, written);
    }
}

void writePartChanges(JsonText& json, const Record& before, const Record& after) {
    const bool strange = before.unknown != after.unknown;
    parts(after, [&](std::string_view name, const auto& part) {
        bool differs = strange;
        parts(before, [&](std::string_view other, const auto& old) {
            if constexpr (std::same_as<decltype(part), decltype(old)>)
                differs = differs || (name == other && !(part == old));
        });
        if (!differs)
            return;
        json.key(name);
        writePart(json, after, name);
    });
}

std::vector<ReadingId> readIds(JsonScanner& scan) {
    std::vector<ReadingId> ids;
    if (!scan.enterArray())
        return ids;
    while (scan.nextItem())
        ids.push_back(scan.integer("/readings_removed", 1, std::numeric_limits<ReadingId>::max()));
    return ids;
}

void putReadings(ReadingColumns& readings, const ReadingColumns& changed) {
    for (std::size_t i = 0; i < changed.size(); ++i) {
        const Reading reading = changed.row(i);
        const std::size_t row = readings.indexOf(reading.id);
        if (row == readings.size()) {
            readings.restore(reading);
            continue;
        }
        readings.setPlace(row, reading.phase, reading.run, reading.direction);
        readings.setEntry(row, reading.enteredAt, reading.enteredBy);
        for (const NumberColumn column : numberColumns)
            readings.setNumber(row, column, changed.number(column).at(i));
    }
}

} // namespace

std::optional<std::string> writeChanges(const Record& before, const Record& after) {
    constexpr std::size_t fewRows = 1000;
    const std::vector<JournalEntry>& entries = after.journal->entries();
    const std::size_t known = before.journal->size();
    if (entries.size() < known || (known > 0 && !(entries[known - 1] == before.journal->entries()[known - 1])))
        return std::nullopt;

    JsonText json;
    json.beginObject();
    writePartChanges(json, before, after);
    if (&*before.readings != &*after.readings) {
        const ReadingChanges changes = readingChanges(*before.readings, *after.readings);
        if (changes.removed.size() + changes.written.size() > std::max(fewRows, after.readings->size() / 4))
            return std::nullopt;
        writeIds(json, "readings_removed", changes.removed);
        if (!changes.written.empty())
            writeReadingRows(json, *after.readings, changes.written);
    }
    if (&*before.exclusions != &*after.exclusions)
        writeExclusionChanges(json, before, after);
    if (entries.size() > known) {
        json.key("journal");
        writeJournal(json, Record{}, std::span(entries).subspan(known), {});
    }
    if (before.nextReadingId != after.nextReadingId)
        json.key("next_id").raw(std::to_string(after.nextReadingId));
    json.endObject();
    return json.text();
}

Result<void> applyChanges(Record& record, std::string_view changes) {
    JsonScanner scan(changes);
    std::vector<std::string> columns;
    if (validUtf8(changes) != changes.size())
        scan.failSyntax();
    if (scan.enterObject())
        while (const auto key = scan.nextKey()) {
            if (*key == "readings_removed") {
                for (const ReadingId id : readIds(scan))
                    if (record.readings->indexOf(id) != record.readings->size())
                        record.readings.edit().remove(id);
            } else if (*key == "columns") {
                columns = readColumnNames(scan, StrangeColumn::Refuse);
            } else if (*key == "rows") {
                const ReadingColumns changed = readReadingRows(scan, columns);
                putReadings(record.readings.edit(), changed);
            } else if (*key == "exclusions_removed") {
                for (const ReadingId id : readIds(scan))
                    record.exclusions.edit().remove(id);
            } else if (*key == "exclusions") {
                readExclusions(scan, record);
            } else if (*key == "journal") {
                readJournal(scan, record, {});
            } else if (*key == "next_id") {
                record.nextReadingId = scan.integer("/next_id", 1, LargestReadingId);
            } else if (!readPart(scan, record, *key)) {
                scan.skip();
            }
        }
    if (!scan.failed() && !scan.atEnd())
        scan.failSyntax();
    if (scan.failed())
        return scan.failure();
    return {};
}

} // namespace spanwright
