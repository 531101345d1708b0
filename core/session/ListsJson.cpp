// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/ListsJson.h"

#include "core/record/Fields.h"
#include "core/session/Moment.h"
#include "core/session/Sha256.h"
#include "core/session/UnknownKeys.h"

#include <algorithm>
#include <limits>

namespace spanwright {

namespace {

constexpr std::string_view exclusionsPointer = "/exclusions";
constexpr std::string_view journalPointer = "/journal";

void writeMoment(JsonText& json, std::int64_t milliseconds) {
    std::string moment;
    appendMoment(moment, milliseconds);
    json.raw(moment);
}

std::string textAt(JsonScanner& scan, const std::string& pointer) {
    if (scan.atString())
        return scan.string();
    scan.failValue(pointer, scan.skip());
    return {};
}

Exclusion readExclusion(JsonScanner& scan, Record& record, const std::string& pointer) {
    Exclusion exclusion;
    if (!scan.enterObject())
        return exclusion;
    while (const auto key = scan.nextKey()) {
        const std::string at = childPointer(pointer, *key);
        if (*key == "id") {
            exclusion.id = scan.integer(at, 1, std::numeric_limits<ReadingId>::max());
        } else if (*key == "reason") {
            const std::string name = textAt(scan, at);
            const auto reason = valueOf<ExclusionReason>(name);
            if (!reason)
                scan.failValue(at, name);
            exclusion.reason = reason.value_or(ExclusionReason::Other);
        } else if (*key == "words") {
            exclusion.words = textAt(scan, at);
        } else if (*key == "by") {
            exclusion.by = textAt(scan, at);
        } else if (*key == "at") {
            exclusion.at = readMoment(scan, at);
        } else {
            keepUnknown(scan, record, at);
        }
    }
    if (exclusion.id == 0) // of no reading
        scan.failValue(childPointer(pointer, "id"), {});
    return exclusion;
}

struct ChainedEntry {
    JournalEntry entry;
    std::string previous;
};

ChainedEntry readEntry(JsonScanner& scan, Record& record, const std::string& pointer) {
    ChainedEntry read;
    if (!scan.enterObject())
        return read;
    struct Name {
        std::string_view key;
        std::string JournalEntry::* field;
    };
    static constexpr Name names[] = {{"who", &JournalEntry::who},       {"what", &JournalEntry::what},
                                     {"where", &JournalEntry::where},   {"before", &JournalEntry::before},
                                     {"after", &JournalEntry::after},   {"reason", &JournalEntry::reason}};
    while (const auto key = scan.nextKey()) {
        const std::string at = childPointer(pointer, *key);
        const auto* const known =
            std::find_if(std::begin(names), std::end(names), [&](const Name& name) { return name.key == *key; });
        if (known != std::end(names))
            read.entry.*known->field = textAt(scan, at);
        else if (*key == "at")
            read.entry.at = readMoment(scan, at);
        else if (*key == "previous")
            read.previous = textAt(scan, at);
        else
            keepUnknown(scan, record, at);
    }
    return read;
}

} // namespace

void writeExclusions(JsonText& json, const Record& record, std::span<const Exclusion> exclusions) {
    json.beginArray();
    for (std::size_t i = 0; i < exclusions.size(); ++i) {
        const Exclusion& exclusion = exclusions[i];
        json.beginObject(JsonText::Layout::OneLine);
        json.key("id").raw(std::to_string(exclusion.id));
        json.key("reason").string(nameOf(exclusion.reason));
        json.key("words").string(exclusion.words);
        json.key("by").string(exclusion.by);
        json.key("at");
        writeMoment(json, exclusion.at);
        writeUnknown(json, record, childPointer(exclusionsPointer, i));
        json.endObject();
    }
    json.endArray();
}

void readExclusions(JsonScanner& scan, Record& record) {
    if (!scan.enterArray())
        return;
    for (std::size_t i = 0; scan.nextItem(); ++i) {
        const std::string pointer = childPointer(exclusionsPointer, i);
        const Exclusion exclusion = readExclusion(scan, record, pointer);
        if (record.exclusions->contains(exclusion.id))
            scan.failValue(childPointer(pointer, "id"), std::to_string(exclusion.id));
        record.exclusions.edit().add(exclusion);
    }
}

void writeJournal(JsonText& json, const Record& record, std::span<const JournalEntry> entries, std::string previous) {
    json.beginArray();
    for (std::size_t i = 0; i < entries.size(); ++i) {
        const JournalEntry& entry = entries[i];
        JsonText line;
        line.beginObject(JsonText::Layout::OneLine);
        line.key("at");
        writeMoment(line, entry.at);
        line.key("who").string(entry.who);
        line.key("what").string(entry.what);
        line.key("where").string(entry.where);
        line.key("before").string(entry.before);
        line.key("after").string(entry.after);
        line.key("reason").string(entry.reason);
        writeUnknown(line, record, childPointer(journalPointer, i));
        line.key("previous").string(previous);
        line.endObject();
        json.raw(line.text());
        previous = sha256(line.text());
    }
    json.endArray();
}

std::size_t readJournal(JsonScanner& scan, Record& record, std::string previous) {
    std::size_t broken = 0;
    if (!scan.enterArray())
        return broken;
    for (std::size_t i = 0; scan.nextItem(); ++i) {
        const std::size_t from = scan.offset();
        ChainedEntry read = readEntry(scan, record, childPointer(journalPointer, i));
        if (broken == 0 && read.previous != previous)
            broken = i + 1;
        previous = sha256(scan.json().substr(from, scan.offset() - from));
        record.journal.edit().append(std::move(read.entry));
    }
    return broken;
}

} // namespace spanwright
