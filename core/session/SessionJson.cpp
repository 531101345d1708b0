// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/SessionJson.h"

#include "core/exchange/TextEncoding.h"
#include "core/record/Fields.h"
#include "core/session/ListsJson.h"
#include "core/session/PartsJson.h"
#include "core/session/ReadingRows.h"
#include "core/session/RowReader.h"
#include "core/session/Sha256.h"
#include "core/session/UnknownKeys.h"

#include <algorithm>
#include <future>
#include <limits>

namespace spanwright {

namespace {

constexpr std::string_view layoutName = "spanwright-session";
constexpr std::string_view sealKey = "\"seal\"";

bool isJsonNumber(const std::string& text) {
    JsonScanner scan(text);
    const std::string_view number = scan.scalar();
    return !scan.failed() && number.size() == text.size() && number != "true" && number != "false";
}

void writeResults(JsonText& json, const Record& record, const StoredResults& results) {
    json.key("results").beginObject();
    json.key("program").string(results.program);
    json.key("figures").beginObject();
    for (const auto& [name, text] : results.figures) {
        json.key(name);
        if (isJsonNumber(text))
            json.raw(text);
        else
            json.string(text);
    }
    json.endObject();
    writeUnknown(json, record, "/results");
    json.endObject();
}

void writeReadings(JsonText& json, const Record& record) {
    json.key("readings").beginObject();
    json.key("next_id").raw(std::to_string(record.nextReadingId));
    writeReadingRows(json, *record.readings);
    writeUnknown(json, record, "/readings");
    json.endObject();
}

/// Reads a session key by key, in whatever order they stand.
class SessionReader {
  public:
    explicit SessionReader(std::string_view json) : scan_(json) {}

    Result<Session> read() {
        hashAhead();
        if (scan_.enterObject())
            while (const auto key = scan_.nextKey())
                readMember(*key);
        if (!scan_.failed() && !scan_.atEnd())
            scan_.failSyntax();
        if (scan_.failed())
            return whyNot();
        if (!layoutSeen_)
            return Error(ErrorCode::NotASession);
        if (!sealSeen_ || sealBroken_)
            session_.warnings.push_back({WarningCode::SealBroken, {}});
        if (firstBrokenEntry_ != 0)
            session_.warnings.push_back({WarningCode::JournalBroken, {{"entry", std::to_string(firstBrokenEntry_)}}});
        finishIds();
        return std::move(session_);
    }

  private:
    void readMember(const std::string& key) {
        const std::string pointer = childPointer({}, key);
        if (std::find(seen_.begin(), seen_.end(), key) != seen_.end())
            scan_.failValue(pointer, key);
        seen_.push_back(key);
        sealBroken_ = sealBroken_ || sealSeen_;
        if (key == "layout") {
            layoutSeen_ = scan_.skip() == "\"" + std::string(layoutName) + "\"";
            if (!layoutSeen_)
                scan_.failValue(pointer, {});
        } else if (key == "version") {
            readVersion();
        } else if (key == "program") {
            scan_.skip();
        } else if (key == "readings") {
            readReadings(pointer);
        } else if (key == "exclusions") {
            readExclusions(scan_, session_.record);
        } else if (key == "journal") {
            firstBrokenEntry_ = readJournal(scan_, session_.record, {});
        } else if (key == "results") {
            readResults(pointer);
        } else if (key == "seal") {
            readSeal();
        } else if (!readPart(scan_, session_.record, key)) {
            keepUnknown(scan_, session_.record, pointer);
        }
    }

    void readVersion() {
        session_.version = static_cast<int>(scan_.integer("/version", 1, std::numeric_limits<int>::max()));
        session_.readOnly = session_.version > SessionVersion;
    }

    void readReadings(const std::string& pointer) {
        std::vector<std::string> columns;
        if (!scan_.enterObject())
            return;
        while (const auto key = scan_.nextKey()) {
            if (*key == "next_id") {
                session_.record.nextReadingId = scan_.integer(childPointer(pointer, *key), 1, LargestReadingId);
            } else if (*key == "columns") {
                columns = readColumnNames(scan_, session_.readOnly ? StrangeColumn::PassOver : StrangeColumn::Refuse);
            } else if (*key == "rows") {
                session_.record.readings = readReadingRows(scan_, columns);
            } else {
                keepUnknown(scan_, session_.record, childPointer(pointer, *key));
            }
        }
    }

    void readResults(const std::string& pointer) {
        if (!scan_.enterObject())
            return;
        while (const auto key = scan_.nextKey()) {
            if (*key == "program" && scan_.atString())
                session_.results.program = scan_.string();
            else if (*key == "figures")
                readFigures();
            else
                keepUnknown(scan_, session_.record, childPointer(pointer, *key));
        }
    }

    void readFigures() {
        if (!scan_.enterObject())
            return;
        while (auto name = scan_.nextKey()) {
            std::string text = scan_.atString() ? scan_.string() : std::string(scan_.skip());
            session_.results.figures.emplace_back(std::move(*name), std::move(text));
        }
    }

    /// Digests what is most likely sealed while the rows are read: it takes as long as they do.
    void hashAhead() {
        constexpr std::size_t large = std::size_t{1} << 20;
        hashedTo_ = scan_.json().rfind(sealKey);
        if (scan_.json().size() > large && hashedTo_ != std::string_view::npos)
            ahead_ = std::async(std::launch::async, [sealed = scan_.json().substr(0, hashedTo_)] { return sha256(sealed); });
    }

    void readSeal() {
        const std::size_t sealAt = scan_.json().rfind(sealKey, scan_.offset());
        const std::string_view stated = scan_.skip();
        const std::string digest =
            ahead_.valid() && hashedTo_ == sealAt ? ahead_.get() : sha256(scan_.json().substr(0, sealAt));
        sealSeen_ = true;
        sealBroken_ = stated != "\"" + digest + "\"";
    }

    Error whyNot() {
        const Error& failure = scan_.failure();
        if (failure.code != ErrorCode::SessionValueBad) {
            JsonScanner whole(scan_.json());
            whole.skip();
            return !whole.failed() && whole.atEnd() ? Error(ErrorCode::NotASession) : failure;
        }
        if (!layoutSeen_)
            return Error(ErrorCode::NotASession);
        // A newer program may use words that this one does not know.
        if (session_.readOnly)
            return Error(ErrorCode::NewerLayout, failure.facts).with("version", std::to_string(session_.version));
        return failure;
    }

    /// Ids are never handed out twice, whatever the file says.
    void finishIds() {
        Record& record = session_.record;
        const ReadingId last = record.readings->empty() ? 0 : record.readings->ids().back();
        record.nextReadingId = std::max(record.nextReadingId, last + 1);
    }

    JsonScanner scan_;
    std::size_t hashedTo_ = 0;
    std::future<std::string> ahead_;
    Session session_;
    std::vector<std::string> seen_;
    bool layoutSeen_ = false;
    bool sealSeen_ = false;
    bool sealBroken_ = false;
    std::size_t firstBrokenEntry_ = 0;
};

} // namespace

std::string writeSession(const Record& record, const StoredResults& results) {
    constexpr std::size_t bytesPerReading = 64;
    JsonText json;
    json.text().reserve(16'384 + record.readings->size() * bytesPerReading);
    json.beginObject();
    json.key("layout").string(layoutName);
    json.key("version").raw(std::to_string(SessionVersion));
    json.key("program").string(SPANWRIGHT_VERSION);
    parts(record, [&](std::string_view name, const auto&) {
        if (name == "choices") {
            writeReadings(json, record);
            json.key("exclusions");
            writeExclusions(json, record, record.exclusions->all());
        }
        json.key(name);
        writePart(json, record, name);
    });
    json.key("journal");
    writeJournal(json, record, record.journal->entries(), {});
    writeResults(json, record, results);
    writeUnknown(json, record, {});

    std::string& text = json.text();
    text += ",\n  ";
    const std::string seal = sha256(text);
    text.append(sealKey).append(": \"").append(seal).append("\"\n}\n");
    return std::move(text);
}

Result<Session> readSession(std::string_view json) {
    if (json.empty())
        return Error(ErrorCode::FileEmpty);
    constexpr std::string_view byteOrderMark = "\xEF\xBB\xBF";
    if (json.starts_with(byteOrderMark))
        json.remove_prefix(byteOrderMark.size());
    if (const std::string_view valid = json.substr(0, validUtf8(json)); valid.size() != json.size())
        return Error(ErrorCode::NotJson, {{"line", std::to_string(std::count(valid.begin(), valid.end(), '\n') + 1)}});
    return SessionReader(json).read();
}

std::vector<JournalEntry> entriesAbout(const std::vector<Warning>& warnings, std::int64_t at, const std::string& who) {
    std::vector<JournalEntry> entries;
    for (const Warning& warning : warnings) {
        JournalEntry entry;
        entry.at = at;
        entry.who = who;
        if (warning.code == WarningCode::SealBroken) {
            entry.what = "seal-broken";
            entry.where = "session";
        } else if (warning.code == WarningCode::JournalBroken) {
            entry.what = "journal-broken";
            entry.where = "journal entry " + warning.facts.front().value;
        } else {
            continue;
        }
        entries.push_back(std::move(entry));
    }
    return entries;
}

} // namespace spanwright
