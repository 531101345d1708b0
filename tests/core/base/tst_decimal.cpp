// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/Decimal.h"

#include <QTest>

using namespace spanwright;

class DecimalTest : public QObject {
    Q_OBJECT

  private slots:
    void keepsTheDigitsAsTyped_data() {
        QTest::addColumn<QString>("typed");
        QTest::addColumn<QString>("kept");
        QTest::newRow("last zero") << "100.10" << "100.10";
        QTest::newRow("negative") << "-0.0011" << "-0.0011";
        QTest::newRow("minus sign") << QString::fromUtf16(u"\u22120.5") << "-0.5";
        QTest::newRow("no zero before the mark") << ".11019" << "0.11019";
        QTest::newRow("leading zeros") << "007.0" << "7.0";
        QTest::newRow("zero with decimals") << "0.000" << "0.000";
        QTest::newRow("zero with a minus") << "-0.00" << "-0.00";
        QTest::newRow("exponent down") << "1.50e-3" << "0.00150";
        QTest::newRow("exponent up") << "1.5e3" << "1.5e3";
        QTest::newRow("nineteen digits") << "1000000000000.4000001" << "1000000000000.4000001";
        QTest::newRow("blanks around") << " 12.0 " << "12.0";
    }
    void keepsTheDigitsAsTyped() {
        QFETCH(QString, typed);
        QFETCH(QString, kept);
        const auto number = Decimal::parse(typed.toStdString());
        QVERIFY(number.ok());
        QCOMPARE(QString::fromStdString(number->text()), kept);
        const auto again = Decimal::parse(number->text());
        QVERIFY(again.ok());
        QVERIFY(*again == *number);
    }

    void refusesWhatIsNoNumber_data() {
        QTest::addColumn<QString>("typed");
        QTest::addColumn<int>("code");
        QTest::newRow("empty") << "  " << int(ErrorCode::CellEmpty);
        QTest::newRow("word") << "high" << int(ErrorCode::CellNotANumber);
        QTest::newRow("not a number") << "NaN" << int(ErrorCode::CellNotANumber);
        QTest::newRow("infinite") << "inf" << int(ErrorCode::CellNotANumber);
        QTest::newRow("two marks") << "1.2.3" << int(ErrorCode::CellNotANumber);
        QTest::newRow("thousands separator") << "1,234.5" << int(ErrorCode::ThousandsSeparator);
        QTest::newRow("thousands blank") << "12 345" << int(ErrorCode::ThousandsSeparator);
        QTest::newRow("huge exponent") << "1e99999" << int(ErrorCode::NumberTooLarge);
        QTest::newRow("exponent without digits") << "1e" << int(ErrorCode::CellNotANumber);
        QTest::newRow("lone sign") << "-" << int(ErrorCode::CellNotANumber);
    }
    void refusesWhatIsNoNumber() {
        QFETCH(QString, typed);
        QFETCH(int, code);
        const auto number = Decimal::parse(typed.toStdString());
        QVERIFY(!number.ok());
        QCOMPARE(int(number.error().code), code);
    }

    void readsADecimalComma() {
        const auto number = Decimal::parse("3,970", DecimalMark::Comma);
        QVERIFY(number.ok());
        QCOMPARE(number->text(), std::string("3.970"));
        QCOMPARE(int(Decimal::parse("1.234,5", DecimalMark::Comma).error().code), int(ErrorCode::ThousandsSeparator));
    }

    void doubleDoubleHoldsMoreThanADouble() {
        const DoubleDouble value = Decimal::parse("1000000000000.4")->toDoubleDouble();
        const DoubleDouble rest = (value - 1000000000000.0) * 10.0 - 4.0;
        QVERIFY(std::abs(toDouble(rest)) < 1e-17);
        QCOMPARE(Decimal::parse("0.1")->toDouble(), 0.1);
        QCOMPARE(Decimal::parse("123456789012345678901234567890e-20")->toDouble(), 1234567890.1234567890123456789);
    }

    void comparesByValue() {
        QCOMPARE(compareValue(*Decimal::parse("100.1"), *Decimal::parse("100.10")), 0);
        QVERIFY(compareValue(*Decimal::parse("-2"), *Decimal::parse("1.5")) < 0);
        QVERIFY(compareValue(*Decimal::parse("1e3"), *Decimal::parse("999.999")) > 0);
        QVERIFY(*Decimal::parse("100.1") != *Decimal::parse("100.10"));
    }
};

QTEST_APPLESS_MAIN(DecimalTest)
#include "tst_decimal.moc"
