// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/ReadingImport.h"
#include "core/exchange/TableWriter.h"

#include <QTest>

using namespace spanwright;

namespace {

Table readAll(std::string_view bytes, const CsvRules& rules) {
    std::vector<WantedColumn> wanted;
    for (std::size_t i = 0; i < rules.columns.size(); ++i)
        wanted.push_back({i, rules.columns[i].kind});
    Progress progress;
    auto table = readTable(bytes, rules, wanted, progress);
    return table ? std::move(*table) : Table{};
}

ImportedReadings importFirstTwo(std::string_view bytes) {
    const auto rules = guessRules(bytes);
    Progress progress;
    auto imported = readReadings(bytes, *rules, firstTwoColumns(*rules), progress);
    return imported ? std::move(*imported) : ImportedReadings{};
}

std::string utf16(std::string_view ascii, bool little) {
    std::string bytes = little ? "\xFF\xFE" : "\xFE\xFF";
    for (const char c : ascii) {
        if (!little)
            bytes += '\0';
        bytes += c;
        if (little)
            bytes += '\0';
    }
    return bytes;
}

std::string texts(const DecimalColumn& column) {
    std::string joined;
    for (std::size_t i = 0; i < column.size(); ++i)
        joined += (i > 0 ? " " : "") + (column.at(i) ? column.at(i)->text() : std::string("_"));
    return joined;
}

ErrorCode guessError(std::string_view bytes) {
    const auto rules = guessRules(bytes);
    return rules ? ErrorCode::Cancelled : rules.error().code;
}

} // namespace

class CsvReaderTest : public QObject {
    Q_OBJECT

  private slots:
    void understandsSeparatorMarkHeaderAndUnits_data() {
        QTest::addColumn<QByteArray>("bytes");
        QTest::addColumn<char>("separator");
        QTest::addColumn<char>("mark");
        QTest::addColumn<int>("headerRows");
        QTest::addColumn<QString>("names");
        QTest::addColumn<QString>("values");
        const auto row = [](const char* name, QByteArray bytes, char separator, char mark, int headerRows, const char* names,
                            const char* values) {
            QTest::newRow(name) << bytes << separator << mark << headerRows << names << values;
        };
        row("comma and point", "p,I\n0.0001,4.002\n10.0003,20.004\n", ',', '.', 1, "p,I", "0.0001 10.0003|4.002 20.004");
        row("semicolon and comma", "p;I\r\n0,0001;4,002\r\n10,0003;20,004\r\n", ';', ',', 1, "p,I",
            "0.0001 10.0003|4.002 20.004");
        row("tabs", "p\tI\n1.0\t4.10\n2.0\t5.60", '\t', '.', 1, "p,I", "1.0 2.0|4.10 5.60");
        row("blanks", " 1.0   4.10 \n 2.0   5.60 \n", ' ', '.', 0, ",", "1.0 2.0|4.10 5.60");
        row("pipes", "a|b\n1|2\n3|4\n", '|', '.', 1, "a,b", "1 3|2 4");
        row("units row", "ref;P1\nbar;mA\n1,50;8,0\n2,50;12,0\n", ';', ',', 2, "ref [bar],P1 [mA]", "1.50 2.50|8.0 12.0");
        row("units in the names", "p / bar,I [mA]\n1.5,8\n2.5,12\n", ',', '.', 1, "p [bar],I [mA]", "1.5 2.5|8 12");
        row("preamble", "Logger 7\nSerial;12345\n\np;I\n1,5;2,5\n2,5;3,5\n3,5;4,5\n", ';', ',', 3, "p,I", "1.5 2.5 3.5|2.5 3.5 4.5");
        row("no header", "1.5,2.5\n3.5,4.5\n", ',', '.', 0, ",", "1.5 3.5|2.5 4.5");
        row("separator at the ends", "p;I;\n1,5;2,5;\n3,5;4,5;\n", ';', ',', 1, "p,I", "1.5 3.5|2.5 4.5");
        row("blank lines", "\n\np,I\n\n1.5,2.5\n\n3.5,4.5\n\n\n", ',', '.', 1, "p,I", "1.5 3.5|2.5 4.5");
        row("rows of separators", "p,I\n1.5,2.5\n,\n3.5,4.5\n,\n", ',', '.', 1, "p,I", "1.5 3.5|2.5 4.5");
        row("old line ends", "p,I\r1.5,2.5\r3.5,4.5\r", ',', '.', 1, "p,I", "1.5 3.5|2.5 4.5");
        row("quotes", "\"p, upper\",\"I \"\"x\"\"\"\n\"1,5\",\"2,5\"\n\"3,5\",\"4,5\"\n", ',', ',', 1, "p, upper,I \"x\"",
            "1.5 3.5|2.5 4.5");
        row("a single column", "I\n12,5\n12,7\n", ';', ',', 1, "I", "12.5 12.7");
        row("a mark of order", "\xEF\xBB\xBFp,I\n1.5,2.5\n3.5,4.5\n", ',', '.', 1, "p,I", "1.5 3.5|2.5 4.5");
        row("missing words", "p,I\n1.5,---\n3.5,4.5\nNA,5.5\n", ',', '.', 1, "p,I", "1.5 3.5 _|_ 4.5 5.5");
        row("windows-1252", "T / \xB0""C;R / \x80\n1,5;2,5\n3,5;4,5\n", ';', ',', 1,
            "T [\xC2\xB0""C],R [\xE2\x82\xAC]", "1.5 3.5|2.5 4.5");
    }
    void understandsSeparatorMarkHeaderAndUnits() {
        QFETCH(QByteArray, bytes);
        const auto rules = guessRules(bytes.toStdString());
        QVERIFY(rules.ok());
        QTEST(rules->separator, "separator");
        QTEST(static_cast<char>(rules->columns.front().decimal), "mark");
        QTEST(static_cast<int>(rules->headerRows), "headerRows");
        QVERIFY(rules->doubts.empty());
        QString names;
        for (const CsvColumn& column : rules->columns)
            names += (&column == &rules->columns.front() ? "" : ",") + QString::fromStdString(column.name) +
                     (column.unit.empty() ? "" : " [" + QString::fromStdString(column.unit) + "]");
        QTEST(names, "names");
        const std::string kept = bytes.toStdString();
        const Table table = readAll(kept, *rules);
        QStringList values;
        for (const TableColumn& column : table.columns)
            values << QString::fromStdString(texts(column.numbers));
        QTEST(values.join('|'), "values");
        QCOMPARE(table.issues.count, std::size_t(0));
    }

    void utf16ReadsLikeUtf8() {
        for (const bool little : {true, false}) {
            const std::string bytes = utf16("p;I\n1,50;2,5\n3,50;4,5\n", little);
            const ImportedReadings imported = importFirstTwo(bytes);
            QCOMPARE(texts(imported.block.reference), std::string("1.50 3.50"));
            const std::string withoutMark = bytes.substr(2);
            QCOMPARE(texts(importFirstTwo(withoutMark).block.indication), std::string("2.5 4.5"));
        }
    }

    void saysWhatCouldAlsoBeMeant_data() {
        QTest::addColumn<QByteArray>("bytes");
        QTest::addColumn<int>("doubt");
        QTest::newRow("two numbers or one") << QByteArray("10,20\n11,21\n") << int(ErrorCode::SeparatorUnclear);
        QTest::newRow("thousands or decimals") << QByteArray("p;I\n1,408;2\n1,512;3\n") << int(ErrorCode::DecimalMarkUnclear);
        QTest::newRow("points among whole numbers") << QByteArray("p;I\n1.408;2\n998;3\n") << int(ErrorCode::DecimalMarkUnclear);
        QTest::newRow("point in a file of commas") << QByteArray("p;I\n1.408;2,5\n1.512;3,5\n") << int(ErrorCode::DecimalMarkUnclear);
        QTest::newRow("day or month") << QByteArray("t;I\n01/02/2026 10:00;2\n03/02/2026 10:01;3\n") << int(ErrorCode::DateOrderUnclear);
    }
    void saysWhatCouldAlsoBeMeant() {
        QFETCH(QByteArray, bytes);
        QFETCH(int, doubt);
        const auto rules = guessRules(bytes.toStdString());
        QVERIFY(rules.ok());
        QCOMPARE(rules->doubts.size(), std::size_t(1));
        QCOMPARE(int(rules->doubts.front().code), doubt);
    }

    void isCertainOfATableOfThreesOnOneLine() {
        // "120.003,146.0886,120" has three digits behind each comma and is no single number all the same.
        const auto rules = guessRules("reference,resistance,set point\n°C,Ω,°C\n80.036,130.9289,80\n120.003,146.088,120\n2.002,0.203,2\n");
        QVERIFY(rules.ok());
        QVERIFY(rules->doubts.empty());
        QCOMPARE(rules->separator, ',');
        QCOMPARE(rules->columns.size(), std::size_t(3));
    }

    void aWishOverrulesTheGuess() {
        const std::string bytes = "1,408;2,5\n1,512;3,5\n";
        CsvWishes wishes;
        wishes.separator = ',';
        QCOMPARE(guessRules(bytes, wishes)->columns.size(), std::size_t(3));
        wishes = {};
        wishes.decimal = DecimalMark::Point;
        const auto rules = guessRules(bytes, wishes);
        QVERIFY(rules->doubts.empty());
        QCOMPARE(readAll(bytes, *rules).issues.first.front().code, ErrorCode::ThousandsSeparator);
        wishes = {};
        wishes.headerRows = 1;
        QCOMPARE(guessRules(bytes, wishes)->columns.front().name, std::string("1,408"));
    }

    void refusesWhatIsNoTable_data() {
        QTest::addColumn<QByteArray>("bytes");
        QTest::addColumn<int>("code");
        QTest::newRow("nothing") << QByteArray() << int(ErrorCode::FileEmpty);
        QTest::newRow("blank lines") << QByteArray("\n \n\n") << int(ErrorCode::NoDataRows);
        QTest::newRow("only a header") << QByteArray("p,I\n") << int(ErrorCode::NoDataRows);
        QTest::newRow("only words") << QByteArray("p,I\nlow,high\n") << int(ErrorCode::NoDataRows);
        QTest::newRow("binary") << QByteArray("\x7F" "ELF\x02\x01\x01\x00\x00\x10", 10) << int(ErrorCode::FileBinary);
        QTest::newRow("open quote") << QByteArray("p,I\n1,2\n3,\"4\n5,6\n") << int(ErrorCode::UnclosedQuote);
    }
    void refusesWhatIsNoTable() {
        QFETCH(QByteArray, bytes);
        QFETCH(int, code);
        QCOMPARE(int(guessError(bytes.toStdString())), code);
    }

    void namesTheLineOfAnOpenQuote() {
        std::string bytes = "p,I\n";
        for (int i = 0; i < 3000; ++i)
            bytes += "1.5,2.5\n";
        bytes += "3,\"4\n5,6\n";
        const auto rules = guessRules(bytes);
        Progress progress;
        const auto table = readReadings(bytes, *rules, firstTwoColumns(*rules), progress);
        QVERIFY(!table.ok());
        QCOMPARE(table.error().code, ErrorCode::UnclosedQuote);
        QCOMPARE(table.error().fact("line"), std::string_view("3002"));
    }

    void reportsEachCellThatIsNoNumber_data() {
        QTest::addColumn<QString>("cell");
        QTest::addColumn<int>("code");
        const auto row = [](const char* cell, ErrorCode code) { QTest::newRow(cell) << cell << int(code); };
        row("OVR", ErrorCode::CellNotANumber);
        row("NaN", ErrorCode::CellNotANumber);
        row("Inf", ErrorCode::CellNotANumber);
        row("1'408", ErrorCode::ThousandsSeparator);
        row("1 408.5", ErrorCode::ThousandsSeparator);
        row("1e999", ErrorCode::NumberTooLarge);
        row("1.2.3", ErrorCode::CellNotANumber);
        row("0x1F", ErrorCode::CellNotANumber);
        row("4.5 mA", ErrorCode::CellNotANumber);
        row("-", ErrorCode::CellNotANumber);
    }
    void reportsEachCellThatIsNoNumber() {
        QFETCH(QString, cell);
        QFETCH(int, code);
        std::string bytes = "p;I\n1.5;2.5\n2.5;3.25\n3.5;" + cell.toStdString() + "\n4.5;5.5\n";
        auto rules = guessRules(bytes);
        rules->missingWords.clear();
        Progress progress;
        const auto imported = readReadings(bytes, *rules, firstTwoColumns(*rules), progress);
        QVERIFY(imported.ok());
        QCOMPARE(imported->issues.count, std::size_t(1));
        const CellIssue& issue = imported->issues.first.front();
        QCOMPARE(int(issue.code), code);
        QCOMPARE(issue.line, std::size_t(4));
        QCOMPARE(issue.row, std::size_t(3));
        QCOMPARE(issue.column, std::size_t(1));
        QCOMPARE(QString::fromStdString(issue.text), cell);
        QCOMPARE(issue.error(*rules).fact("column"), std::string_view("I"));
        QCOMPARE(texts(imported->block.indication), std::string("2.5 3.25 _ 5.5"));
    }

    void reportsRaggedRows() {
        const std::string bytes = "p,I,run\n1.5,2.5,1\n3.5\n4.5,5.5,1,9\n6.5,7.5,1,,\n8.5,9.5,1\n";
        const auto rules = guessRules(bytes);
        const Table table = readAll(bytes, *rules);
        QCOMPARE(table.rows, std::size_t(5));
        QCOMPARE(table.issues.count, std::size_t(2));
        QCOMPARE(table.issues.first[0].code, ErrorCode::RaggedRow);
        QCOMPARE(table.issues.first[0].line, std::size_t(3));
        QCOMPARE(table.issues.first[1].line, std::size_t(4));
        QCOMPARE(table.issues.first[1].text, std::string("9"));
        QCOMPARE(texts(table.columns[1].numbers), std::string("2.5 _ 5.5 7.5 9.5"));
    }

    void namesInTheHeaderPartTheColumnsThatFewRaggedRowsBlur() {
        // "1,2" alone could be one number with a decimal comma; the header says that it is two.
        const std::string bytes = "x,y\n1,2\n2,3\n4\n5,6,7\n";
        const auto rules = guessRules(bytes);
        QCOMPARE(rules->separator, ',');
        QCOMPARE(rules->columns.size(), std::size_t(2));
        const Table table = readAll(bytes, *rules);
        QCOMPARE(table.issues.count, std::size_t(2));
        QCOMPARE(table.issues.first[0].line, std::size_t(4));
        QCOMPARE(table.issues.first[1].line, std::size_t(5));
        QCOMPARE(guessError("x,y\n1,2\n3,\"4\n5,6\n"), ErrorCode::UnclosedQuote);
    }

    void manyIssuesAreCountedAndTheFirstKept() {
        std::string bytes = "p,I\n";
        for (int i = 0; i < 5000; ++i)
            bytes += "1.5,2.5\n";
        for (int i = 0; i < 2000; ++i)
            bytes += "1.5,OVR\n";
        const ImportedReadings imported = importFirstTwo(bytes);
        QCOMPARE(imported.issues.count, std::size_t(2000));
        QCOMPARE(imported.issues.first.size(), CellIssues::MostKept);
        QCOMPARE(imported.block.n, std::size_t(7000));
    }

    void aQuotedCellMaySpanLines() {
        const std::string bytes = "p,note,I\n1.5,\"two\nlines\",2.5\n3.5,x,bad\n";
        const auto rules = guessRules(bytes);
        const Table table = readAll(bytes, *rules);
        QCOMPARE(table.columns[1].texts.front(), std::string("two\nlines"));
        QCOMPARE(table.lines.back(), 4u);
    }

    void readsDirectionRunTimeAndUncertainty() {
        const std::string bytes = "Time;Set point;Dir;Run;Ref;Item;u ref\n"
                                  "01.03.2026 08:15:30,250;0;up;1;0,0001;4,002;0,01\n"
                                  "01.03.2026 08:16:00;10;DOWN;1;10,0007;20,004;0,01\n"
                                  "01.03.2026 08:17:00;5;;2;5,0;12,0;\n"
                                  "01.03.2026 08:18:00;5;sideways;2,5;5,0;12,0;0,01\n";
        const auto rules = guessRules(bytes);
        QVERIFY(rules.ok());
        const ImportMapping mapping = mappingByNames(*rules);
        QCOMPARE(*mapping.setPoint, std::size_t(1));
        QCOMPARE(*mapping.direction, std::size_t(2));
        QCOMPARE(*mapping.run, std::size_t(3));
        QCOMPARE(*mapping.uReference, std::size_t(6));
        Progress progress;
        const auto imported = readReadings(bytes, *rules, mapping, progress);
        QVERIFY(imported.ok());
        const auto& block = imported->block;
        QCOMPARE(block.directions[0], Direction::Rising);
        QCOMPARE(block.directions[1], Direction::Falling);
        QCOMPARE(block.directions[2], Direction::Unknown);
        QCOMPARE(block.runs[2], 2);
        QCOMPARE(isoTime(block.enteredAt[0]), std::string("2026-03-01T08:15:30.250Z"));
        QCOMPARE(texts(block.indication), std::string("4.002 20.004 12.0 12.0"));
        QCOMPARE(imported->issues.count, std::size_t(2));
        QCOMPARE(imported->issues.first[0].code, ErrorCode::DirectionUnknown);
        QCOMPARE(imported->issues.first[1].code, ErrorCode::CellOutOfRange);
        QCOMPARE(imported->issues.first[1].line, std::size_t(5));
    }

    void columnsAreFoundByNameOrNumber() {
        const auto rules = guessRules("p / bar,2\n1.5,2.5\n");
        CsvWishes wishes;
        wishes.headerRows = 1;
        const auto named = guessRules("p / bar,I\n1.5,2.5\n", wishes);
        QCOMPARE(*findColumn(*named, "P"), std::size_t(0));
        QCOMPARE(*findColumn(*named, "p / bar"), std::size_t(0));
        QCOMPARE(*findColumn(*named, "2"), std::size_t(1));
        QCOMPARE(findColumn(*named, "3").error().code, ErrorCode::ColumnMissing);
        QCOMPARE(findColumn(*named, "q").error().fact("column"), std::string_view("q"));
    }

    void thePreviewShowsWhatWasUnderstood() {
        const std::string bytes = "t;p;I\n2026-03-01 08:00;1,50;OVR\n2026-03-01 08:01;2,50;3,5\n2026-03-01 08:02;2,50;3,5;9\n";
        const auto rules = guessRules(bytes);
        const auto rows = previewRows(bytes, *rules, 5);
        QVERIFY(rows.ok());
        QCOMPARE(rows->size(), std::size_t(3));
        QCOMPARE((*rows)[0].cells[0].understood, std::string("2026-03-01T08:00:00Z"));
        QCOMPARE((*rows)[0].cells[1].understood, std::string("1.50"));
        QCOMPARE(*(*rows)[0].cells[2].refused, ErrorCode::CellNotANumber);
        QCOMPARE(*(*rows)[2].cells[3].refused, ErrorCode::RaggedRow);
        QCOMPARE((*rows)[0].line, std::size_t(2));
    }

    void everyDigitSurvives() {
        const std::string bytes = "p;I\n100.10;-0.000\n.5;1e3\n007;+3.25\n12345678901234567890.5;0.000000000000000001\n"
                                  "123456789012345678;1.50e-3\n";
        const ImportedReadings imported = importFirstTwo(bytes);
        QCOMPARE(imported.issues.count, std::size_t(0));
        QCOMPARE(texts(imported.block.reference), std::string("100.10 0.5 7 12345678901234567890.5 123456789012345678"));
        QCOMPARE(texts(imported.block.indication), std::string("-0.000 1e3 3.25 0.000000000000000001 0.00150"));
    }

    void whatWasWrittenReadsBackEqual_data() {
        QTest::addColumn<char>("separator");
        QTest::addColumn<char>("mark");
        QTest::newRow("comma, point") << ',' << '.';
        QTest::newRow("semicolon, comma") << ';' << ',';
        QTest::newRow("tab, comma") << '\t' << ',';
        QTest::newRow("comma, comma") << ',' << ',';
    }
    void whatWasWrittenReadsBackEqual() {
        QFETCH(char, separator);
        QFETCH(char, mark);
        // A linear congruential sequence (Knuth, MMIX) so that every run tests the same numbers.
        std::uint64_t state = 20260301;
        const auto next = [&] { return (state = state * 6364136223846793005u + 1442695040888963407u) >> 20; };
        DecimalColumn a, b;
        const auto decimal = static_cast<DecimalMark>(mark);
        TableWriter writer(separator, decimal);
        writer.text("first").text("sec" + std::string(1, separator) + "ond \"q\"").endRow();
        for (int i = 0; i < 100'000; ++i) {
            const auto value = [&]() -> std::optional<Decimal> {
                if (next() % 50 == 0)
                    return std::nullopt;
                const auto digits = static_cast<std::int64_t>(next() % 1'000'000'000);
                return Decimal{next() % 2 == 0 && digits > 0 ? -digits : digits, static_cast<int>(next() % 8), {}};
            };
            const auto first = value();
            // A row without anything would be passed over.
            const auto second = first ? value() : Decimal{12345, 3, {}};
            a.push_back(first);
            b.push_back(second);
            const auto cell = [&](const std::optional<Decimal>& number) {
                std::string text = number ? number->text() : std::string{};
                if (const auto point = text.find('.'); point != std::string::npos)
                    text[point] = mark;
                writer.text(text);
            };
            cell(first);
            if (separator == mark)
                cell(second);
            else
                writer.number(second);
            writer.endRow();
        }
        CsvWishes wishes;
        wishes.separator = separator;
        wishes.decimal = decimal;
        const auto rules = guessRules(writer.written(), wishes);
        QVERIFY(rules.ok());
        QCOMPARE(rules->columns[1].name, "sec" + std::string(1, separator) + "ond \"q\"");
        const Table table = readAll(writer.written(), *rules);
        QCOMPARE(table.issues.count, std::size_t(0));
        QVERIFY(table.columns[0].numbers == a);
        QVERIFY(table.columns[1].numbers == b);
    }

    void doublesAreWrittenAsTheShortestThatReadsBack() {
        TableWriter writer(';', DecimalMark::Comma);
        writer.number(0.1).number(1.0 / 3).number(std::numeric_limits<double>::quiet_NaN()).number(7LL).endRow();
        QCOMPARE(writer.written(), std::string("0,1;0,3333333333333333;;7\n"));
    }

    void readingCanBeCancelled() {
        std::string bytes;
        for (int i = 0; i < 10'000; ++i)
            bytes += "1.5,2.5\n";
        const auto rules = guessRules(bytes);
        Progress progress;
        progress.cancel();
        QCOMPARE(readReadings(bytes, *rules, firstTwoColumns(*rules), progress).error().code, ErrorCode::Cancelled);
    }
};

QTEST_APPLESS_MAIN(CsvReaderTest)
#include "tst_csv_reader.moc"
