// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleRecord.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"

#include <QtTest>

#include <limits>

using namespace spanwright;

namespace {
const QLocale english(QLocale::C);
const QLocale german(QLocale::German, QLocale::Germany);
const double missing = std::numeric_limits<double>::quiet_NaN();
const double infinite = std::numeric_limits<double>::infinity();
} // namespace

class NumberTextTest : public QObject {
    Q_OBJECT

  private slots:
    void aTypedNumberKeepsItsDigits() {
        QCOMPARE(typedText(test::number("100.10"), english), QStringLiteral("100.10"));
        QCOMPARE(typedText(test::number("-0.0011"), english), QStringLiteral("\u22120.0011"));
        QCOMPARE(typedText(test::number("1234567.5"), german), QStringLiteral("1234567,5"));
    }
    void aNumberThatRoundsToZeroHasNoSign() {
        QCOMPARE(fixedText(-0.00004, 3, SignShown::Minus, english), QStringLiteral("0.000"));
        QCOMPARE(fixedText(0.00004, 3, SignShown::Both, english), QStringLiteral("0.000"));
        QCOMPARE(fixedText(0.0145, 4, SignShown::Both, english), QStringLiteral("+0.0145"));
        QCOMPARE(fixedText(-0.0145, 4, SignShown::Both, german), QStringLiteral("\u22120,0145"));
    }
    void whatIsMissingOrInfiniteSaysSo() {
        QCOMPARE(fixedText(missing, 2, SignShown::Minus, english), QStringLiteral("\u2013"));
        QCOMPARE(significantText(infinite, 2, english), QStringLiteral("\u221e"));
        QCOMPARE(significantText(-infinite, 2, english), QStringLiteral("\u2212\u221e"));
    }
    void significantDigitsAreCountedAfterRounding() {
        QCOMPARE(significantText(9.996, 3, english), QStringLiteral("10.0"));
        QCOMPARE(significantText(0.0048432, 3, english), QStringLiteral("0.00484"));
        QCOMPARE(significantText(1.600102, 7, english), QStringLiteral("1.600102"));
        QCOMPARE(significantText(2e-12, 2, english), QStringLiteral("2.0\u2009\u00d7\u200910\u207b\u00b9\u00b2"));
        QCOMPARE(significantText(0, 3, english), QStringLiteral("0"));
    }
    void aShareBelowOneIsNeverAllOfIt() {
        QCOMPARE(shareText(1, english), QStringLiteral("100 %"));
        QCOMPARE(shareText(0, english), QStringLiteral("0 %"));
        QCOMPARE(shareText(0.614, english), QStringLiteral("61 %"));
        QVERIFY(!shareText(0.99999957, english).startsWith(QStringLiteral("100")));
        QCOMPARE(shareText(0.99999957, english), QStringLiteral("99.999957 %"));
        QCOMPARE(briefShareText(0.99999957, english), QStringLiteral("> 99.9 %"));
        QCOMPARE(briefShareText(0.614, english), QStringLiteral("61 %"));
        QCOMPARE(briefShareText(1, english), QStringLiteral("100 %"));
        QCOMPARE(shareText(1e-9, english), QStringLiteral("< 0.01 %"));
        QCOMPARE(shareText(0.004, english), QStringLiteral("0.4 %"));
        for (double rest = 0.1; rest > 1e-12; rest /= 3)
            QVERIFY2(!shareText(1 - rest, english).startsWith(QStringLiteral("100")), qPrintable(QString::number(rest)));
    }
    void aSmallPValueIsABound() {
        QCOMPARE(pText(2e-12, english), QStringLiteral("< 0.001"));
        QCOMPARE(pText(0.3412, english), QStringLiteral("0.34"));
        QCOMPARE(pText(0.0432, english), QStringLiteral("0.043"));
    }
    void bothSchemesCanBeRead() {
        for (const SchemeName name : {SchemeName::Light, SchemeName::Dark}) {
            setScheme(*qApp, name);
            const Scheme& s = scheme();
            QCOMPARE(s.name, name);
            // WCAG 2.1, 1.4.3: 4.5 for text; 1.4.11: 3 for graphics.
            for (const QColor& behind : {s.paper, s.card, s.selection}) {
                QVERIFY(contrastRatio(s.ink, behind) >= 7);
                QVERIFY2(contrastRatio(s.quiet, behind) >= 4.5, qPrintable(behind.name()));
                QVERIFY(contrastRatio(s.accent, behind) >= 4.5);
                QVERIFY(contrastRatio(s.warning, behind) >= 4.5);
            }
            QVERIFY(contrastRatio(s.onAccent, s.accent) >= 4.5);
            for (const QColor& part : {s.hysteresis, s.runs, s.repeatability, s.lackOfFit})
                QVERIFY2(contrastRatio(part, s.card) >= 3, qPrintable(part.name()));
        }
    }
    // WCAG 2.1, definition of contrast ratio: black on white is 21.
    void theContrastRatioIsTheOneDefined() { QCOMPARE(contrastRatio(Qt::black, Qt::white), 21.0); }
};

QTEST_MAIN(NumberTextTest)
#include "tst_number_text.moc"
