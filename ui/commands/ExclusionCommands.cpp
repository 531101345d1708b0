// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/commands/ExclusionCommands.h"

#include "core/record/Fields.h"

#include <QCoreApplication>

#include <algorithm>
#include <cassert>

namespace spanwright {

namespace {

std::string textOf(const Exclusion& e) {
    std::string text{nameOf(e.reason)};
    return e.words.empty() ? text : text + ": " + e.words;
}

std::string where(ReadingId id) {
    return "reading " + std::to_string(id);
}

} // namespace

Exclude::Exclude(std::vector<ReadingId> ids, ExclusionReason reason, std::string words)
    : RecordCommand(QCoreApplication::translate("Commands", "exclude %n reading(s)", nullptr, static_cast<int>(ids.size()))) {
    assert(reason != ExclusionReason::Other || !words.empty());
    for (const ReadingId id : ids)
        made_.push_back({.id = id, .reason = reason, .words = words, .by = {}, .at = 0});
}

void Exclude::stamp(std::int64_t now, const std::string& person) {
    for (Exclusion& e : made_) {
        e.at = now;
        e.by = person;
    }
}

void Exclude::apply(Record& record) {
    Exclusions& all = record.exclusions.edit();
    before_.clear();
    for (const Exclusion& e : made_) {
        if (const Exclusion* earlier = all.find(e.id))
            before_.push_back(*earlier);
        all.add(e);
    }
}

void Exclude::revert(Record& record) {
    Exclusions& all = record.exclusions.edit();
    for (const Exclusion& e : made_)
        all.remove(e.id);
    for (const Exclusion& e : before_)
        all.add(e);
}

std::vector<JournalEntry> Exclude::entries(const Record& before, const Record&) const {
    std::vector<JournalEntry> entries;
    for (const Exclusion& e : made_) {
        const Exclusion* earlier = before.exclusions->find(e.id);
        entries.push_back({.who = {}, .what = "excluded",
                           .where = where(e.id),
                           .before = earlier ? textOf(*earlier) : std::string(),
                           .after = textOf(e),
                           .reason = e.words});
    }
    return entries;
}

bool Exclude::changesNothing(const Record&) const {
    return made_.empty();
}

Readmit::Readmit(std::vector<ReadingId> ids, std::string reason)
    : RecordCommand(QCoreApplication::translate("Commands", "readmit %n reading(s)", nullptr, static_cast<int>(ids.size()))),
      ids_(std::move(ids)), reason_(std::move(reason)) {}

void Readmit::apply(Record& record) {
    Exclusions& all = record.exclusions.edit();
    before_.clear();
    for (const ReadingId id : ids_) {
        if (const Exclusion* earlier = all.find(id))
            before_.push_back(*earlier);
        all.remove(id);
    }
}

void Readmit::revert(Record& record) {
    Exclusions& all = record.exclusions.edit();
    for (const Exclusion& e : before_)
        all.add(e);
}

std::vector<JournalEntry> Readmit::entries(const Record&, const Record&) const {
    std::vector<JournalEntry> entries;
    for (const Exclusion& e : before_)
        entries.push_back({.who = {}, .what = "readmitted", .where = where(e.id), .before = textOf(e), .after = {}, .reason = reason_});
    return entries;
}

bool Readmit::changesNothing(const Record& record) const {
    return std::none_of(ids_.begin(), ids_.end(), [&](ReadingId id) { return record.exclusions->contains(id); });
}

} // namespace spanwright
