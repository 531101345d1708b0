// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/session/SessionJson.h"

#include "core/record/Fields.h"
#include "core/session/Sha256.h"
#include "tests/support/FilledRecord.h"
#include "tests/support/JsonSchema.h"
#include "tests/support/Paths.h"
#include "tests/support/SampleRecord.h"

#include <QFile>
#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>
#include <QTest>

using namespace spanwright;

namespace {

const StoredResults results{"0.1.0", {{"as-found.b0", "3.9994288"}, {"as-found.s", "1e-05"}, {"note", "none yet"}}};

QByteArray bytesOf(const std::string& text) {
    return {text.data(), static_cast<qsizetype>(text.size())};
}

bool sameHistory(const Record& a, const Record& b) {
    return a == b && *a.journal == *b.journal && a.nextReadingId == b.nextReadingId;
}

std::string replaced(std::string text, const std::string& what, const std::string& with) {
    const std::size_t at = text.find(what);
    return at == std::string::npos ? std::string{} : text.replace(at, what.size(), with);
}

QList<WarningCode> codes(const Session& session) {
    QList<WarningCode> list;
    for (const Warning& warning : session.warnings)
        list << warning.code;
    return list;
}

} // namespace

class SessionJsonTest : public QObject {
    Q_OBJECT

    static void checkRefused(const std::string& json, ErrorCode code, std::string_view line, std::string_view key) {
        const auto session = readSession(json);
        QVERIFY(!session.ok());
        QCOMPARE(session.error().code, code);
        QCOMPARE(session.error().fact("line"), line);
        QCOMPARE(session.error().fact("key"), key);
    }

  private slots:
    void everyFieldSurvives() {
        const Record record = test::filledRecord();
        const auto session = readSession(writeSession(record, results));
        QVERIFY(session.ok());
        QVERIFY(sameHistory(session->record, record));
        QVERIFY(session->results == results);
        QVERIFY(session->warnings.empty());
        QVERIFY(!session->readOnly);
        parts(session->record, [&](std::string_view name, const auto& part) {
            parts(record, [&](std::string_view other, const auto& before) {
                if constexpr (std::same_as<decltype(part), decltype(before)>) {
                    if (name == other && !(part == before))
                        QFAIL(std::string(name).c_str());
                }
            });
        });
    }

    void anEmptyRecordSurvives() {
        const auto session = readSession(writeSession({}, {}));
        QVERIFY(session.ok());
        QVERIFY(sameHistory(session->record, Record{}));
    }

    void savingWhatWasOpenedGivesTheSameBytes() {
        for (const Record& record : {Record{}, test::pressureTransmitter(), test::filledRecord()}) {
            const std::string first = writeSession(record, results);
            const auto session = readSession(first);
            QVERIFY(session.ok());
            QCOMPARE(bytesOf(writeSession(session->record, session->results)), bytesOf(first));
        }
    }

    void theBytesAreJsonForOthersToo() {
        const QByteArray bytes = bytesOf(writeSession(test::filledRecord(), results));
        QJsonParseError problem;
        const QJsonDocument document = QJsonDocument::fromJson(bytes, &problem);
        QCOMPARE(problem.error, QJsonParseError::NoError);
        QCOMPARE(document.object()["readings"].toObject()["rows"].toArray()[0].toArray()[5].toString(), QString("100.101"));
    }

    void holdsTheSchema() {
        QFile file(QString::fromStdString(test::sourceDir()) + "/resources/session.schema.json");
        QVERIFY(file.open(QIODevice::ReadOnly));
        const QJsonObject schema = QJsonDocument::fromJson(file.readAll()).object();
        QVERIFY(!schema.isEmpty());
        for (const Record& record : {Record{}, test::pressureTransmitter(), test::filledRecord()}) {
            const QByteArray bytes = bytesOf(writeSession(record, results));
            QCOMPARE(test::schemaBreaches(schema, QJsonDocument::fromJson(bytes).object()), QStringList{});
        }
        // The validator itself must see a breach.
        QJsonObject broken = QJsonDocument::fromJson(bytesOf(writeSession({}, {}))).object();
        broken.remove("plan");
        broken["version"] = "one";
        QCOMPARE(test::schemaBreaches(schema, broken).size(), 2);
    }

    void theSampleSessionHoldsTheSchemaAndIsStable() {
        QFile schemaFile(QString::fromStdString(test::sourceDir()) + "/resources/session.schema.json");
        QFile sample(QString::fromStdString(test::sourceDir()) + "/sample-data/pressure-transmitter.spanwright");
        QVERIFY(schemaFile.open(QIODevice::ReadOnly) && sample.open(QIODevice::ReadOnly));
        const QByteArray bytes = sample.readAll();
        const QJsonObject schema = QJsonDocument::fromJson(schemaFile.readAll()).object();
        QCOMPARE(test::schemaBreaches(schema, QJsonDocument::fromJson(bytes).object()), QStringList{});
        const auto session = readSession(bytes.toStdString());
        QVERIFY(session.ok());
        QVERIFY(session->warnings.empty());
        QCOMPARE(bytesOf(writeSession(session->record, session->results)), bytes);
    }

    void theSchemaKnowsEveryKey() {
        QFile file(QString::fromStdString(test::sourceDir()) + "/resources/session.schema.json");
        QVERIFY(file.open(QIODevice::ReadOnly));
        const QJsonObject schema = QJsonDocument::fromJson(file.readAll()).object();
        const QByteArray bytes = bytesOf(writeSession(test::filledRecord(), results));
        QCOMPARE(test::undescribedKeys(schema, QJsonDocument::fromJson(bytes).object()).join('\n'), QString());
    }

    void unknownKeysSurviveLoadAndSave() {
        std::string json = writeSession(test::filledRecord(), results);
        json = replaced(json, "\"job\": {", "\"future\": {\"a/b\": [1, 2.50, null]},\n  \"job\": {\"shift~x/\": \"night\",");
        json = replaced(json, "\"standards\": [\n    {", "\"standards\": [\n    {\"owner\": true,");
        json = replaced(json, "\"readings\": {", "\"readings\": {\"clock\": \"bench\",");
        json = replaced(json, "{\"id\": 3, ", "{\"id\": 3, \"seen\": [\"TL\"], ");
        json = replaced(json, "\"reason\": \"digits \\\"swapped\\\"\", ", "\"reason\": \"digits \\\"swapped\\\"\", \"device\": \"pad\", ");
        QVERIFY(!json.empty());
        const auto first = readSession(json);
        QVERIFY(first.ok());
        QCOMPARE(first->record.unknown.size(), std::size_t(6));
        QCOMPARE(first->record.unknown.at("/future"), std::string("{\"a/b\": [1, 2.50, null]}"));
        const std::string saved = writeSession(first->record, first->results);
        auto second = readSession(saved);
        QVERIFY(second.ok());
        QVERIFY(second->warnings.empty());
        for (const auto& [pointer, raw] : first->record.unknown)
            QCOMPARE(QString::fromStdString(pointer + " " + second->record.unknown[pointer]), QString::fromStdString(pointer + " " + raw));
        QVERIFY(sameHistory(second->record, first->record));
        QCOMPARE(bytesOf(writeSession(second->record, second->results)), bytesOf(saved));
    }

    void aKeyThatIsMissingHasItsDefault() {
        const auto session = readSession(R"({"layout": "spanwright-session", "version": 1, "item": {"serial": "NV-20318"},
                                             "plan": {"runs": 3}})");
        QVERIFY(session.ok());
        QCOMPARE(session->record.item.serial, std::string("NV-20318"));
        QCOMPARE(session->record.plan.runs, 3);
        QCOMPARE(session->record.plan.directions, PlanDirections::RisingThenFalling);
        QVERIFY(codes(*session) == QList{WarningCode::SealBroken});
    }

    void aNewerLayoutOpensToBeLookedAt() {
        std::string json = replaced(writeSession(test::filledRecord(), results), "\"version\": 1", "\"version\": 2");
        json = replaced(json, "\"columns\": [", "\"columns\": [\"humidity\", ");
        std::size_t at = json.find("\"rows\": [");
        for (int row = 0; row < 5; ++row) {
            at = json.find("\n      [", at) + 8;
            json.insert(at, "{\"percent\": 40},");
        }
        const auto session = readSession(json);
        QVERIFY(session.ok());
        QVERIFY(session->readOnly);
        QCOMPARE(session->version, 2);
        QVERIFY(session->record.readings == test::filledRecord().readings);
        const std::string strange = replaced(json, "\"function\": \"polynomial:3\"", "\"function\": \"spline\"");
        const auto refused = readSession(strange);
        QVERIFY(!refused.ok());
        QCOMPARE(refused.error().code, ErrorCode::NewerLayout);
        QCOMPARE(refused.error().fact("key"), std::string_view("/choices/function"));
        QCOMPARE(refused.error().fact("version"), std::string_view("2"));
    }

    void refusesWhatIsNoSession() {
        QCOMPARE(readSession("").error().code, ErrorCode::FileEmpty);
        checkRefused("p;I\n1;2\n", ErrorCode::NotJson, "1", "");
        checkRefused("{\n\"layout\": \"spanwright-session\",\n\"job\": {\"number\": }}", ErrorCode::NotJson, "3", "");
        checkRefused("{\"a\": \"\xFF\"}", ErrorCode::NotJson, "1", "");
        for (const char* foreign : {"{}", "[1, 2]", "\"text\"", "{\"layout\": \"drawing\", \"version\": 1}", "{\"job\": 5}",
                                    "{\"name\": \"x\", \"plan\": [1]}", "{\"layout\": 7}"})
            QCOMPARE(readSession(foreign).error().code, ErrorCode::NotASession);
    }

    void namesTheLineAndKeyOfABadValue_data() {
        QTest::addColumn<QByteArray>("what");
        QTest::addColumn<QByteArray>("with");
        QTest::addColumn<QByteArray>("key");
        QTest::addColumn<QByteArray>("text");
        const auto row = [](const char* what, const char* with, const char* key, const char* text) {
            QTest::newRow(key) << QByteArray(what) << QByteArray(with) << QByteArray(key) << QByteArray(text);
        };
        row("\"adjusted\": true", "\"adjusted\": 1", "/job/adjusted", "1");
        row("\"runs\": ", "\"runs\": 2.5e0", "/plan/runs", "");
        row("\"directions\": \"rising\"", "\"directions\": \"sideways\"", "/plan/directions", "sideways");
        row("\"function\": \"polynomial:3\"", "\"function\": \"spline\"", "/choices/function", "spline");
        row("\"fraction\": \"", "\"fraction\": \"1,", "/limits/fraction", "");
        row("[1,\"as-found\"", "[1,\"as-lost\"", "/readings/rows/0/phase", "as-lost");
        row("[3,\"as-found\",3", "[1,\"as-found\",3", "/readings/rows/1/id", "1");
        row("[5,\"as-found\",5", "[5,\"as-found\",-5", "/readings/rows/2/run", "-5");
        row("\"100.101\"", "\"100.1O1\"", "/readings/rows/0/reference", "100.1O1");
        row("\"12345678901234567890.10\",", "", "/readings/rows/0/u_indication", "");
        row("\"-0.000250\"]", "\"-0.000250\",null]", "/readings/rows/0", "");
        row("\"id\", \"phase\"", "\"id\", \"mood\"", "/readings/columns", "mood");
        row("\"id\", \"phase\"", "\"phase\", \"phase\"", "/readings/columns", "phase");
        row("\"reason\": \"typing-slip\"", "\"reason\": \"whim\"", "/exclusions/1/reason", "whim");
        row("{\"id\": 7,", "{\"id\": 3,", "/exclusions/1/id", "3");
        row("\"at\": \"2026", "\"at\": \"2026-13", "/exclusions/0/at", "");
        row("\"serial\": \"", "\"serial\": \"x\", \"serial\": \"", "/item/serial", "serial");
        row("\"version\": 1", "\"version\": 0", "/version", "0");
    }
    void namesTheLineAndKeyOfABadValue() {
        QFETCH(QByteArray, what);
        QFETCH(QByteArray, with);
        QFETCH(QByteArray, key);
        QFETCH(QByteArray, text);
        const std::string good = writeSession(test::filledRecord(), results);
        const std::string bad = replaced(good, what.toStdString(), with.toStdString());
        QVERIFY(!bad.empty());
        const auto session = readSession(bad);
        QVERIFY(!session.ok());
        QCOMPARE(session.error().code, ErrorCode::SessionValueBad);
        QCOMPARE(QByteArray(std::string(session.error().fact("key")).c_str()), key);
        const auto at = static_cast<std::ptrdiff_t>(good.find(what.toStdString()));
        QCOMPARE(std::string(session.error().fact("line")), std::to_string(std::count(good.begin(), good.begin() + at, '\n') + 1));
        if (!text.isEmpty())
            QCOMPARE(QByteArray(std::string(session.error().fact("text")).c_str()), text);
    }

    void anyByteThatChangesIsNoticed() {
        const Record record = test::filledRecord();
        const std::string good = writeSession(record, results);
        // Every class of character in the file, each where it first and last stands before the seal.
        const std::size_t sealAt = good.rfind("\"seal\"");
        for (int c = 1; c < 256; ++c)
            for (const std::size_t at : {good.find(static_cast<char>(c)), good.rfind(static_cast<char>(c), sealAt - 1)}) {
                if (at >= sealAt)
                    continue;
                std::string changed = good;
                changed[at] = static_cast<char>(changed[at] == '1' ? '7' : changed[at] ^ 1);
                const auto session = readSession(changed);
                QVERIFY2(!session.ok() || codes(*session).contains(WarningCode::SealBroken), qPrintable(QString::number(at)));
            }
        const auto resealed = readSession(replaced(good, "sha256:" + good.substr(good.size() - 68, 8), "sha256:00000000"));
        QVERIFY(resealed.ok());
        QVERIFY(codes(*resealed).contains(WarningCode::SealBroken));
        const auto after = readSession(replaced(good, "\"\n}\n", "\",\n  \"more\": 1\n}\n"));
        QVERIFY(!after.ok() || codes(*after).contains(WarningCode::SealBroken));
    }

    void theFirstJournalEntryThatDoesNotFitIsNamed() {
        const std::string good = writeSession(test::filledRecord(), results);
        const auto brokenAt = [](const std::string& json) {
            const auto session = readSession(json);
            if (!session.ok())
                return std::string("refused");
            for (const Warning& warning : session->warnings)
                if (warning.code == WarningCode::JournalBroken)
                    return warning.facts.front().value;
            return std::string("whole");
        };
        QCOMPARE(brokenAt(good), std::string("whole"));
        QCOMPARE(brokenAt(replaced(good, "reading 2 indication", "reading 9 indication")), std::string("3"));
        const std::size_t second = good.find("\n", good.find("reading 1 indication"));
        const std::size_t third = good.find("\n", second + 1);
        std::string without = good;
        without.erase(second, third - second);
        QCOMPARE(brokenAt(without), std::string("2"));
        const std::size_t first = good.rfind("\n", good.find("reading 1 indication"));
        without = good;
        without.erase(first, second - first);
        QCOMPARE(brokenAt(without), std::string("1"));
        // The last entry has none after it: there the seal tells.
        const auto last = readSession(replaced(good, "reading 4 indication", "reading 5 indication"));
        QVERIFY(codes(*last) == QList{WarningCode::SealBroken});
    }

    void whatDidNotHoldIsToldInTheJournal() {
        const std::string changed =
            replaced(writeSession(test::filledRecord(), results), "reading 2 indication", "reading 9 indication");
        auto session = readSession(changed);
        const auto entries = entriesAbout(session->warnings, 77, "TL");
        QCOMPARE(entries.size(), std::size_t(2));
        QVERIFY((entries[0] == JournalEntry{77, "TL", "seal-broken", "session", "", "", ""}));
        QVERIFY((entries[1] == JournalEntry{77, "TL", "journal-broken", "journal entry 3", "", "", ""}));
        // Saved with them, the file holds again and says that it once did not.
        for (const JournalEntry& entry : entries)
            session->record.journal.edit().append(entry);
        const auto again = readSession(writeSession(session->record, results));
        QVERIFY(again->warnings.empty());
        QCOMPARE(again->record.journal->entries().back().what, std::string("journal-broken"));
    }

    void aTruncatedFileIsRefusedWhereverItEnds() {
        const std::string good = writeSession(test::filledRecord(), results);
        const std::size_t lastBrace = good.rfind('}');
        for (std::size_t length = 1; length <= lastBrace; length += 7) {
            const auto session = readSession(good.substr(0, length));
            QVERIFY(!session.ok());
            QVERIFY(session.error().code == ErrorCode::NotJson || session.error().code == ErrorCode::SessionValueBad ||
                    session.error().code == ErrorCode::NotASession);
        }
    }

    void theDigestIsThePublishedOne() {
        // NIST, Secure Hash Algorithm-Message Digest Length = 256, examples: "abc" and the message of 56 characters.
        QCOMPARE(sha256("abc"), std::string("sha256:ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad"));
        QCOMPARE(sha256("abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq"),
                 std::string("sha256:248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1"));
    }

    void textThatIsNoUtf8IsWrittenAsJsonAllTheSame() {
        Record record;
        record.item.serial = "N\xFFV";
        const auto session = readSession(writeSession(record, {}));
        QVERIFY(session.ok());
        QCOMPARE(session->record.item.serial, std::string("N\xEF\xBF\xBDV"));
    }

    void textIsTextAndNothingElse() {
        Record record;
        record.item.description = "<img src=\"file:///etc/passwd\"> ${HOME} ../../x";
        const auto session = readSession(writeSession(record, {}));
        QCOMPARE(session->record.item.description, record.item.description);
    }

    void deepNestingIsRefused() {
        const std::string deep = "{\"layout\": \"spanwright-session\", \"x\": " + std::string(100'000, '[');
        QCOMPARE(readSession(deep).error().code, ErrorCode::NotJson);
    }

    void aHundredThousandReadingsSurvive() {
        Record record;
        ReadingColumns::Block block;
        block.n = 100'000;
        for (std::size_t i = 0; i < block.n; ++i) {
            block.reference.push_back(Decimal{static_cast<std::int64_t>(i * 7919 % 100'003), static_cast<int>(i % 5), {}});
            block.indication.push_back(i % 11 == 0 ? std::optional<Decimal>{} : Decimal{-static_cast<std::int64_t>(i) - 1, 6, {}});
        }
        record.readings.edit().appendBlock(std::move(block), 5);
        record.nextReadingId = 100'005;
        const auto session = readSession(writeSession(record, {}));
        QVERIFY(session.ok());
        QVERIFY(sameHistory(session->record, record));
    }
};

QTEST_APPLESS_MAIN(SessionJsonTest)
#include "tst_session_json.moc"
