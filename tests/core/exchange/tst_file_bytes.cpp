// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/exchange/FileBytes.h"
#include "core/exchange/TextEncoding.h"
#include "core/exchange/TimeCell.h"
#include "tests/support/Faults.h"

#include <QFile>
#include <QTemporaryDir>
#include <QTest>

#include <unistd.h>

using namespace spanwright;

class FileBytesTest : public QObject {
    Q_OBJECT

    QTemporaryDir folder_;

    std::string write(const QString& name, const QByteArray& bytes) {
        QFile file(folder_.filePath(name));
        if (!file.open(QIODevice::WriteOnly) || file.write(bytes) != bytes.size())
            return {};
        return file.fileName().toStdString();
    }

  private slots:
    void readsAFileWhole() {
        const QByteArray bytes = QByteArray(100'000, 'x') + "\nend";
        const auto read = FileBytes::read(write("whole", bytes));
        QVERIFY(read.ok());
        QCOMPARE(QByteArray(read->bytes().data(), static_cast<qsizetype>(read->bytes().size())), bytes);
    }

    void saysWhyItCannot() {
        const std::string missing = folder_.filePath("missing").toStdString();
        QCOMPARE(FileBytes::read(missing).error().code, ErrorCode::FileMissing);
        QCOMPARE(FileBytes::read(missing).error().fact("file"), std::string_view(missing));
        QCOMPARE(FileBytes::read(folder_.path().toStdString()).error().code, ErrorCode::FileIsDirectory);
        QCOMPARE(FileBytes::read(write("empty", {})).error().code, ErrorCode::FileEmpty);
    }

    void aFileWithoutPermissionIsNotReadable() {
        const std::string path = write("secret", "1,2\n");
        QVERIFY(QFile::setPermissions(QString::fromStdString(path), QFileDevice::WriteOwner));
        const test::AsNobody nobody;
        const auto read = FileBytes::read(path);
        QVERIFY(!read.ok());
        QCOMPARE(read.error().code, ErrorCode::FileNotReadable);
        QVERIFY(!read.error().fact("reason").empty());
    }

    void aLinkThatLeadsToItselfIsNotReadable() {
        const std::string loop = folder_.filePath("loop").toStdString();
        QCOMPARE(::symlink(loop.c_str(), loop.c_str()), 0);
        const auto read = FileBytes::read(loop);
        QCOMPARE(read.error().code, ErrorCode::FileNotReadable);
        QVERIFY(!read.error().fact("reason").empty());
    }

    void encodingsAreTold() {
        QCOMPARE(*guessEncoding("p,I\n"), Encoding::Utf8);
        QCOMPARE(*guessEncoding("\xC2\xB0""C"), Encoding::Utf8);
        QCOMPARE(*guessEncoding("\xB0""C"), Encoding::Windows1252);
        QCOMPARE(*guessEncoding(std::string_view("\xFF\xFEp\0", 4)), Encoding::Utf16LittleEndian);
        QCOMPARE(*guessEncoding(std::string_view("\0p\0,\0I\0\n", 8)), Encoding::Utf16BigEndian);
        QCOMPARE(guessEncoding(std::string_view("\x01\x02\x03", 3)).error().code, ErrorCode::FileBinary);
    }

    void bytesThatAreNotOfTheEncodingAreRefusedWithTheirLine() {
        // An overlong form, a surrogate and a value beyond U+10FFFF are no UTF-8 (Unicode Standard, table 3-7).
        for (const char* bad : {"\xC0\xAF", "\xED\xA0\x80", "\xF4\x90\x80\x80", "\xE2\x82"}) {
            const std::string bytes = std::string("one\ntwo\n") + bad;
            const auto decoded = DecodedText::decode(bytes, Encoding::Utf8);
            QVERIFY(!decoded.ok());
            QCOMPARE(decoded.error().code, ErrorCode::FileEncoding);
            QCOMPARE(decoded.error().fact("line"), std::string_view("3"));
        }
        QCOMPARE(DecodedText::decode("odd", Encoding::Utf16BigEndian).error().code, ErrorCode::FileEncoding);
        QCOMPARE(DecodedText::decode("\x81", Encoding::Windows1252).error().code, ErrorCode::FileEncoding);
        const std::string surrogates("\x3D\xD8\x00\xDE", 4);
        QCOMPARE(DecodedText::decode(surrogates, Encoding::Utf16LittleEndian)->text(), std::string_view("\xF0\x9F\x98\x80"));
    }

    void encodingNamesReadBack() {
        for (const Encoding e : {Encoding::Utf8, Encoding::Utf16LittleEndian, Encoding::Utf16BigEndian, Encoding::Windows1252})
            QCOMPARE(*parseEncodingName(encodingName(e)), e);
        QCOMPARE(*parseEncodingName("Latin-1"), Encoding::Windows1252);
        QCOMPARE(parseEncodingName("klingon").error().code, ErrorCode::UsageValueBad);
    }

    void timesAreRead_data() {
        QTest::addColumn<QString>("text");
        QTest::addColumn<int>("order");
        QTest::addColumn<QString>("iso");
        const auto row = [](const char* text, DateOrder order, const char* iso) { QTest::newRow(text) << text << int(order) << iso; };
        const auto ymd = DateOrder::YearMonthDay;
        const auto dmy = DateOrder::DayMonthYear;
        const auto mdy = DateOrder::MonthDayYear;
        row("2026-03-01T08:15:30.25Z", ymd, "2026-03-01T08:15:30.250Z");
        row("2026-03-01 08:15", ymd, "2026-03-01T08:15:00Z");
        row("2026-03-01T08:15:30+01:00", ymd, "2026-03-01T07:15:30Z");
        row("2026/3/1", dmy, "2026-03-01T00:00:00Z");
        row("01.02.2026 08:15:30,5", dmy, "2026-02-01T08:15:30.500Z");
        row("01/02/2026 08:15", dmy, "2026-02-01T08:15:00Z");
        row("01/02/2026 08:15", mdy, "2026-01-02T08:15:00Z");
        row("1/2/26 12:05 AM", mdy, "2026-01-02T00:05:00Z");
        row("1/2/2026 1:05:06 pm", mdy, "2026-01-02T13:05:06Z");
        row("29.02.2028", dmy, "2028-02-29T00:00:00Z");
        row("1969-12-31T23:59:59.999Z", ymd, "1969-12-31T23:59:59.999Z");
        row("29.02.2026", dmy, "");
        row("13/13/2026", dmy, "");
        row("01.02.2026", ymd, "");
        row("2026-03-01T24:00", ymd, "");
        row("2026-03-01T08:60", ymd, "");
        row("2026-03-01 8", ymd, "");
        row("2026-03-01 08:15 Uhr", ymd, "");
        row("12.5", dmy, "");
        row("1.2.3", dmy, "");
        row("", ymd, "");
    }
    void timesAreRead() {
        QFETCH(QString, text);
        QFETCH(int, order);
        const auto time = parseTime(text.toStdString(), static_cast<DateOrder>(order));
        QTEST(QString::fromStdString(time ? isoTime(*time) : std::string{}), "iso");
    }
};

QTEST_APPLESS_MAIN(FileBytesTest)
#include "tst_file_bytes.moc"
