// SPDX-License-Identifier: GPL-3.0-or-later
// Hostile bytes: a small corpus of tables and sessions, changed in thousands of ways that are the same in every run. Nothing may
// crash, hang or be lost without a word, whatever the bytes; under the sanitizers nothing may be read that is not there.
#include "core/exchange/ReadingImport.h"
#include "core/session/RecordChanges.h"
#include "core/session/RecoveryLog.h"
#include "core/session/SessionJson.h"
#include "tests/support/FilledRecord.h"

#include <QTest>

#include <random>

using namespace spanwright;

namespace {

/// Changes bytes as damaged disks, editors and spiteful people do.
class Mutator {
  public:
    explicit Mutator(std::uint32_t seed) : random_(seed) {}

    std::string changed(std::string bytes, const std::vector<std::string>& tokens, const std::vector<std::string>& corpus) {
        for (std::size_t changes = 1 + below(4); changes > 0; --changes)
            changeOnce(bytes, tokens, corpus);
        return bytes;
    }
    std::size_t below(std::size_t limit) { return limit == 0 ? 0 : random_() % limit; }

  private:
    void changeOnce(std::string& bytes, const std::vector<std::string>& tokens, const std::vector<std::string>& corpus) {
        const std::size_t at = below(bytes.size() + 1);
        switch (below(8)) {
        case 0: // a bit
            if (at < bytes.size())
                bytes[at] = static_cast<char>(bytes[at] ^ (1 << below(8)));
            break;
        case 1: // a byte
            if (at < bytes.size())
                bytes[at] = static_cast<char>(below(256));
            break;
        case 2: bytes.insert(at, tokens[below(tokens.size())]); break;
        case 3: bytes.erase(at, 1 + below(40)); break;
        case 4: bytes.resize(at); break;
        case 5: bytes.insert(at, bytes.substr(below(bytes.size()), below(200))); break;
        case 6: { // the end of another
            const std::string& other = corpus[below(corpus.size())];
            bytes = bytes.substr(0, at) + other.substr(below(other.size()));
            break;
        }
        default: // a token in place of as many bytes
            const std::string& token = tokens[below(tokens.size())];
            bytes.replace(at, token.size(), token);
        }
    }

    std::minstd_rand random_;
};

const std::vector<std::string> tables{
    "p,I\n0.0001,4.002\n0.9986,5.596\n2.0001,7.195\n",
    "Zeit;Druck;Strom;Richtung;Lauf\n;bar;mA;;\n01.03.2026 08:15:30;0,0001;4,002;up;1\n01.03.2026 08:16:00;1,5;8,0;down;1\n",
    "\"a \"\"b\"\"\",\"c,d\"\n\"1,5\",\"2\n3\"\n4,5\n",
    "Logger 7\nSerial;12345\n\np;I\n1,5;OVR\n---;2,5\n3,5;1.408,5\n",
    "t\tx\ty\n2026-03-01T08:15:30.250Z\t1e3\t-0.00\n2026-03-01T08:15:31.250Z\t12345678901234567890\t.5\n",
    std::string("\xFF\xFEp\0;\0I\0\n\0" "1\0;\0" "2\0\n\0" "3\0;\0" "4\0\n\0", 26),
    "T / \xB0""C;R\r1;2\r3;4\r",
    " 1.0   2.0 \n 3.0   4.0 \n",
};
const std::vector<std::string> tableTokens{
    "\"", "\"\"", ",", ";", "\t", "\r", "\n", "\r\n", " ", "|", std::string(1, '\0'), "\xEF\xBB\xBF", "\xFF\xFE", "\xC2\xA0", "\xE2\x88\x92",
    "\xED\xA0\x80", "NaN", "Inf", "-", "--", "1e999", "1e-999", "1E+", "0x10", "1'000", "1,234,567.8", "1.234.567,8", "999999999999999999",
    "-999999999999999999", "1000000000000000000", "0.000000000000000000000000000000000001", "31.02.2026", "2026-13-01", "9999-12-31T23:59:59.999+14:00",
    "0000-01-01", "1/2/26 12:00 AM", ";;;;;;;;", ",\n,\n,\n", std::string(300, '9'), std::string(500, '"'), std::string(400, ',')};

const std::vector<std::string> sessionTokens{
    "{", "}", "[", "]", ",", ":", "\"", "\\", "\\u", "\\u0000", "\\ud83d", "\\ud83d\\ude00", "null", "true", "-", "0", "1e999", "-0", "\"\"",
    "1.5", "999999999999999999999", "9223372036854775807", "-9223372036854775808", std::string(1, '\0'), "\xFF", "\n", "[[[[[[[[", "{\"a\":",
    "\"id\"", "\"layout\": \"spanwright-session\"", "\"version\": 2", "\"columns\": []", "\"rows\": [[]]", "\"seal\": \"\"", "\"2026-02-30T00:00:00Z\"",
    "\"reference\"", "\"1,5\"", "\"1e300\"", std::string(300, '[')};

/// Everything that reads a table, and what must hold of a table that was read.
void readEverything(std::string_view bytes, const CsvWishes& wishes) {
    const auto rules = guessRules(bytes, wishes);
    if (!rules)
        return;
    const auto preview = previewRows(bytes, *rules, 20);
    std::vector<WantedColumn> wanted;
    for (std::size_t i = 0; i < rules->columns.size(); ++i)
        wanted.push_back({i, rules->columns[i].kind});
    Progress progress;
    const auto table = readTable(bytes, *rules, wanted, progress);
    if (!table)
        return;
    QCOMPARE(table->lines.size(), table->rows);
    QVERIFY(!preview || preview->size() == std::min<std::size_t>(20, table->rows));
    std::size_t gone = 0; // values that are neither there nor counted as missing
    for (const TableColumn& column : table->columns) {
        const bool number = column.kind == ColumnKind::Number || column.kind == ColumnKind::Empty;
        QCOMPARE(number ? column.numbers.size() : column.kind == ColumnKind::Time ? column.times.size() : column.texts.size(), table->rows);
        if (number)
            gone += column.numbers.missing() - column.missing;
    }
    QVERIFY(gone == 0 || table->issues.count > 0);
    const auto imported = readReadings(bytes, *rules, mappingByNames(*rules), progress);
    QVERIFY(imported.ok());
    QCOMPARE(imported->block.n, table->rows);
    ReadingColumns readings;
    readings.appendBlock(imported->block, 1);
    QCOMPARE(readings.size(), table->rows);
}

} // namespace

class FuzzReadersTest : public QObject {
    Q_OBJECT

  private slots:
    void tablesNeverCrash() {
        Mutator mutator(20260301);
        constexpr char separators[] = {',', ';', '\t', ' ', '|'};
        for (int i = 0; i < 20'000; ++i) {
            const std::string bytes = mutator.changed(tables[mutator.below(tables.size())], tableTokens, tables);
            CsvWishes wishes;
            if (mutator.below(4) == 0)
                wishes.separator = separators[mutator.below(5)];
            if (mutator.below(4) == 0)
                wishes.decimal = mutator.below(2) == 0 ? DecimalMark::Comma : DecimalMark::Point;
            if (mutator.below(8) == 0)
                wishes.headerRows = mutator.below(5);
            if (mutator.below(8) == 0)
                wishes.hasUnitsRow = mutator.below(2) == 0;
            if (mutator.below(8) == 0)
                wishes.encoding = static_cast<Encoding>(mutator.below(4));
            readEverything(bytes, wishes);
            if (QTest::currentTestFailed())
                QFAIL(QByteArray(bytes.data(), static_cast<qsizetype>(bytes.size())).toPercentEncoding().constData());
        }
    }

    void sessionsNeverCrash() {
        Mutator mutator(20260302);
        Record small;
        small.item.serial = "NV-20318";
        const std::vector<std::string> sessions{writeSession(test::filledRecord(), {"0.1.0", {{"b0", "1.5"}, {"text", "x"}}}), writeSession(small, {})};
        for (int i = 0; i < 6000; ++i) {
            const std::string bytes = mutator.changed(sessions[mutator.below(2)], sessionTokens, sessions);
            const auto session = readSession(bytes);
            if (!session)
                continue;
            // What was taken in is written so that it reads back the same.
            const std::string again = writeSession(session->record, session->results);
            const auto second = readSession(again);
            QVERIFY2(second.ok(), QByteArray(bytes.data(), static_cast<qsizetype>(bytes.size())).toPercentEncoding().constData());
            QVERIFY(second->record == session->record);
            QVERIFY(*second->record.journal == *session->record.journal);
            QVERIFY(second->warnings.empty());
        }
    }

    void recoveryFilesNeverCrash() {
        Mutator mutator(20260303);
        Record before;
        const Record after = test::filledRecord();
        const std::string changes = *writeChanges(before, after);
        const std::string log = RecoveryLog::heading("a \"b\".spanwright") + RecoveryLog::entry(writeSession(before, {}), 0) +
                                RecoveryLog::entry(changes, after.readings->size());
        const std::vector<std::string> corpus{changes, log};
        std::size_t whole = 0;
        for (int i = 0; i < 6000; ++i) {
            Record record = before;
            const auto applied = applyChanges(record, mutator.changed(changes, sessionTokens, corpus));
            if (applied) {
                const auto session = readSession(writeSession(record, {}));
                QVERIFY2(session.ok(), session.ok() ? "" : session.error().facts.back().value.c_str());
            }
            const std::string bytes = mutator.changed(log, sessionTokens, corpus);
            if (const auto parsed = RecoveryLog::parse(bytes))
                for (const RecoveryLog::Entry& entry : parsed->entries)
                    whole += entry.payload == changes || entry.payload == writeSession(before, {}) ? 1 : 0;
        }
        QVERIFY(whole > 0);
    }

    void aQuoteThatIsNeverClosedTakesTimeInProportion() {
        // A reader that starts over at every quote would need minutes for this.
        std::string bytes = "p,I\n1,2\n";
        for (int i = 0; i < 200'001; ++i)
            bytes += "3,\"4\n";
        const auto rules = guessRules(bytes);
        QVERIFY(rules.ok());
        Progress progress;
        QCOMPARE(readReadings(bytes, *rules, firstTwoColumns(*rules), progress).error().code, ErrorCode::UnclosedQuote);
    }
};

QTEST_APPLESS_MAIN(FuzzReadersTest)
#include "tst_fuzz_readers.moc"
