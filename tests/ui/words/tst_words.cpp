// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/Decimal.h"
#include "tests/support/FilledRecord.h"
#include "ui/commands/Differences.h"
#include "ui/words/JournalText.h"
#include "ui/words/Words.h"

#include <QtTest>

using namespace spanwright;

namespace {

/// Every value of an enumeration from the first to `last`.
template <class E>
std::vector<E> walk(E last) {
    std::vector<E> all;
    for (int i = 0; i <= static_cast<int>(last); ++i)
        all.push_back(static_cast<E>(i));
    return all;
}

/// What a sentence for the user must be: more than a few words, ended, on one line, with nothing left to fill in.
bool isSentence(const QString& text) {
    return text.size() > 15 && text.endsWith(QLatin1Char('.')) && !text.contains(QLatin1Char('\n')) && !text.contains(QLatin1Char('%') + QStringLiteral("1")) &&
           text.contains(QLatin1Char(' '));
}

Fit lineFit() {
    Fit fit;
    fit.coefficients = {{"b0", "mA", 3.99943, 0.00117, 0, 0}, {"b1", "mA/bar", 1.600102, 0.000198, 0, 0}};
    return fit;
}

} // namespace

class TestWords : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() { QLocale::setDefault(QLocale::c()); }
    void everyErrorHasASentenceOfItsOwn();
    void everyWarningHasASentenceOfItsOwn();
    void everyFindingHasASentenceOfItsOwn();
    void whereItHappenedStandsBeforeTheSentence();
    void textFromAFileStaysOneQuotedLine();
    void aFactThatTheSentenceDoesNotUseIsNotLost();
    void everyNameHasWords();
    void figuresOfAFindingCarryTheirUnits();
    void theEquationHasTheDigitsThatItsUncertaintiesSupport();
    void anEquationThatGivesTheReferenceIsTurnedRound();
    void everyFieldThatTheJournalNamesHasWords();
    void theJournalIsSaidInWords_data();
    void theJournalIsSaidInWords();
};

void TestWords::everyErrorHasASentenceOfItsOwn() {
    QSet<QString> seen;
    for (const ErrorCode code : walk(lastErrorCode)) {
        const QString text = errorText(Error(code));
        QVERIFY2(isSentence(text), qPrintable(QString::number(static_cast<int>(code)) + ": " + text));
        QVERIFY2(!seen.contains(text), qPrintable(text));
        QVERIFY2(text[0].isUpper(), qPrintable(text));
        seen.insert(text);
    }
    QVERIFY(seen.size() > 40);
}

void TestWords::everyWarningHasASentenceOfItsOwn() {
    QSet<QString> seen;
    for (const WarningCode code : walk(lastWarningCode)) {
        const QString text = warningText({code, {}});
        QVERIFY2(isSentence(text), qPrintable(text));
        QVERIFY2(!seen.contains(text), qPrintable(text));
        seen.insert(text);
    }
}

void TestWords::everyFindingHasASentenceOfItsOwn() {
    QSet<QString> seen;
    for (const FindingCode code : walk(lastFindingCode)) {
        Finding finding;
        finding.code = code;
        const FindingWords words = findingWords(finding, Record());
        QVERIFY2(words.sentence.size() > 15, qPrintable(words.sentence));
        QVERIFY2(!seen.contains(words.sentence), qPrintable(words.sentence));
        QVERIFY(words.remedy.isEmpty());
        seen.insert(words.sentence);
    }
    for (const Remedy remedy : walk(Remedy::CheckRun)) {
        Finding finding;
        finding.remedy = remedy;
        QCOMPARE(findingWords(finding, Record()).remedy.isEmpty(), remedy == Remedy::None);
    }
}

void TestWords::whereItHappenedStandsBeforeTheSentence() {
    const QString text =
        errorText(Error(ErrorCode::NotANumber, {{"text", "OVR"}, {"line", "12"}, {"column", "P1"}, {"file", "bench.csv"}}));
    QVERIFY2(text.startsWith(QStringLiteral("bench.csv, line 12, column P1: “OVR” is not a number.")), qPrintable(text));
}

void TestWords::textFromAFileStaysOneQuotedLine() {
    const QString text = errorText(Error(ErrorCode::NotANumber, {{"text", "<b>a\nb\x1b[31m" + std::string(500, 'x')}}));
    QVERIFY(!text.contains(QLatin1Char('\n')));
    QVERIFY(!text.contains(QChar(0x1b)));
    QVERIFY(text.contains(QStringLiteral("<b>a b")));
    QVERIFY(text.size() < 200);
}

void TestWords::aFactThatTheSentenceDoesNotUseIsNotLost() {
    const QString text = errorText(Error(ErrorCode::FileNotReadable, {{"file", "x.csv"}, {"reason", "Permission denied"}}));
    QVERIFY2(text.contains(QStringLiteral("Permission denied")), qPrintable(text));
}

void TestWords::everyNameHasWords() {
    for (const Phase phase : bothPhases)
        QVERIFY(!phaseText(phase).isEmpty());
    for (const Direction direction : walk(Direction::Falling))
        QVERIFY(!directionText(direction).isEmpty());
    for (const FunctionFamily family : walk(FunctionFamily::Table))
        QVERIFY(!functionText({family, 2}).isEmpty());
    for (const ExclusionReason reason : walk(ExclusionReason::Other))
        QVERIFY(!reasonText(reason).isEmpty());
    for (const Distribution distribution : walk(Distribution::Student))
        QVERIFY(!distributionText(distribution).isEmpty());
    for (const DerivedLine line : walk(DerivedLine::Fit))
        QVERIFY(!derivedLineText(line).isEmpty());
    for (const ConformityState state : walk(ConformityState::Fail))
        QVERIFY(!conformityText(state).isEmpty());
    for (const SignOffRole role : walk(SignOffRole::Authorised))
        QVERIFY(!signOffText(role).isEmpty());
    for (const SplitPart part : walk(SplitPart::Repeatability))
        QVERIFY(!splitPartText(part).isEmpty());
    for (const ValueState state : walk(lastValueState))
        QCOMPARE(valueStateText(state).isEmpty(), state == ValueState::Sound);
    Limits limits;
    for (const DecisionRule rule : walk(DecisionRule::FourState)) {
        limits.rule = rule;
        QVERIFY(!decisionRuleText(limits).isEmpty());
    }
}

void TestWords::figuresOfAFindingCarryTheirUnits() {
    Record record;
    record.item.reference = {"pressure", "bar"};
    record.item.indication = {"current", "mA"};
    Finding finding;
    finding.figures = {{"f", 19.6}, {"p", 2e-12}, {"value", 0.0142}, {"set_point", 5}};
    QCOMPARE(findingWords(finding, record).figures, QStringLiteral("F = 19.6, p < 0.001, 0.0142 mA, at 5 bar"));
}

void TestWords::theEquationHasTheDigitsThatItsUncertaintiesSupport() {
    Item item;
    item.reference = {"pressure", "bar"};
    item.indication = {"current", "mA"};
    const QString text = equationText(lineFit(), item);
    QCOMPARE(text, QStringLiteral("y = 3.9994 + 1.60010 x   (y current in mA, x pressure in bar)"));
    Fit falling = lineFit();
    falling.coefficients[1].value = -1.600102;
    QCOMPARE(equationText(falling, Item()), QStringLiteral("y = 3.9994 − 1.60010 x"));
}

void TestWords::anEquationThatGivesTheReferenceIsTurnedRound() {
    Fit fit = lineFit();
    fit.direction = FitDirection::Reference;
    fit.function = {FunctionFamily::Polynomial, 2};
    fit.coefficients.push_back({"b2", "", 0.00021, 0.00001, 0, 0});
    QCOMPARE(equationText(fit, Item()), QStringLiteral("x = 3.9994 + 1.60010 y + 0.000210 y²"));
}

void TestWords::everyFieldThatTheJournalNamesHasWords() {
    int seen = 0;
    const Record record = test::filledRecord();
    parts(record, [&](std::string_view name, const auto& part) {
        for (const auto& [path, text] : fieldLines(std::string(name), part)) {
            const QString words = fieldText(path);
            QVERIFY2(!words.isEmpty(), path.c_str());
            QVERIFY2(!words.contains(QLatin1Char('_')) && !words.contains(QLatin1Char('.')) && !words.contains(QLatin1String("%1")) && !words.contains(QLatin1String("%2")),
                     qPrintable(words));
            ++seen;
        }
    });
    QVERIFY(seen > 150);
    QCOMPARE(fieldText("item.colour"), QString());
}

void TestWords::theJournalIsSaidInWords_data() {
    QTest::addColumn<QStringList>("entry"); // what, where, before, after, reason
    QTest::addColumn<QStringList>("words");
    QTest::newRow("an amended value") << QStringList{"value-amended", "reading 17 indication", "-1.847", "-1.4870", "digits swapped"}
                                      << QStringList{"value amended", "reading 17, indication", "−1.847", "−1.4870", "digits swapped"};
    QTest::newRow("a reading") << QStringList{"reading-entered", "reading 3", "", "set point 2.0, reference 2.0001, as-found, run 1, rising", ""}
                               << QStringList{"reading entered", "reading 3", "", "set point 2.0, reference 2.0001, as found, run 1, rising", ""};
    QTest::newRow("a choice") << QStringList{"changed", "choices.function", "line", "polynomial:2", ""}
                              << QStringList{"changed", "calibration function", "straight line", "polynomial of degree 2", ""};
    QTest::newRow("a tick") << QStringList{"changed", "job.adjusted", "false", "true", ""} << QStringList{"changed", "the item was adjusted", "no", "yes", ""};
    QTest::newRow("a standard") << QStringList{"changed", "standards.1.form", "absolute", "percent-of-reading", ""}
                                << QStringList{"changed", "standard 2, U stated", "in the unit", "in % of reading", ""};
    QTest::newRow("a text that looks like a number") << QStringList{"changed", "job.method_edition", "-2", "2.10", ""}
                                                     << QStringList{"changed", "edition of the procedure", "-2", "2.10", ""};
    QTest::newRow("undone") << QStringList{"undone", "item.serial", "20318", "", "changed"}
                            << QStringList{"undone: changed", "item, serial number", "20318", "", ""};
    QTest::newRow("undone with a reason") << QStringList{"undone", "reading 4", "typing-slip: swapped", "", "excluded: asked by the customer: twice"}
                                          << QStringList{"undone: excluded", "reading 4", "typing slip: swapped", "", "asked by the customer: twice"};
    QTest::newRow("taken in") << QStringList{"readings-imported", "readings 1 to 66", "", "66 readings from a: b.csv", ""}
                              << QStringList{"readings taken in", "readings 1 to 66", "", "66 reading(s) from a: b.csv", ""};
}

void TestWords::theJournalIsSaidInWords() {
    QFETCH(QStringList, entry);
    QFETCH(QStringList, words);
    const auto text = [&](int i) { return entry[i].toStdString(); };
    const JournalWords got = journalWords({0, "TL", text(0), text(1), text(2), text(3), text(4)});
    QCOMPARE((QStringList{got.what, got.where, got.before, got.after, got.reason}), words);
}

QTEST_APPLESS_MAIN(TestWords)
#include "tst_words.moc"
