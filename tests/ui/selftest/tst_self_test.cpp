// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/RunCommand.h"
#include "ui/selftest/SelfTestDialog.h"

#include <QLabel>
#include <QPushButton>
#include <QTreeWidget>

#include <QtTest>

using namespace spanwright;
using namespace spanwright::test;

class TestSelfTest : public QObject {
    Q_OBJECT

  private slots:
    void everyPublishedFigureIsMet();
    void eachCaseNamesItsSource();
    void aFigureThatDiffersIsSaid();
    void theCommandPrintsAndWritesARecord();
    void theDialogShowsWhatDiffersFirstAndSavesTheRecord();
    void everyFigureHasWords();
};

void TestSelfTest::everyPublishedFigureIsMet() {
    const SelfTestOutcome outcome = runSelfTest();
    QVERIFY(outcome.cases.size() >= 15);
    QVERIFY(outcome.figures() >= 100);
    for (const SelfTestCase& one : outcome.cases)
        for (const SelfTestFigure& figure : one.figures)
            QVERIFY2(figure.holds, qPrintable(one.name + ' ' + figure.name + ' ' + figure.printed + ' ' + QString::number(figure.got, 'g', 17)));
    QCOMPARE(outcome.failed(), std::size_t{0});
}

void TestSelfTest::eachCaseNamesItsSource() {
    for (const SelfTestCase& one : runSelfTest().cases) {
        QVERIFY(one.source.size() > 10);
        QVERIFY(!one.figures.empty());
        QVERIFY(one.readings >= 3);
    }
}

void TestSelfTest::aFigureThatDiffersIsSaid() {
    SelfTestOutcome outcome = runSelfTest();
    outcome.cases[0].figures[0].holds = false;
    QCOMPARE(outcome.failed(), std::size_t{1});
    QVERIFY(selfTestText(outcome).contains(QStringLiteral("DIFFERS")));
}

void TestSelfTest::theCommandPrintsAndWritesARecord() {
    Desk desk;
    const Ran ran = runWords({"self-test", "--to", desk.path("record.pdf")});
    QVERIFY2(ran.status == 0, ran.out.c_str());
    QVERIFY(ran.out.find("-0.262323073774029") != std::string::npos);
    QVERIFY(ran.out.find("All ") != std::string::npos);
    QFile pdf(QString::fromStdString(desk.path("record.pdf")));
    QVERIFY(pdf.open(QIODevice::ReadOnly));
    QVERIFY(pdf.read(5) == "%PDF-");
    QCOMPARE(runWords({"self-test", "--to", desk.path("no/folder/record.pdf")}).status, 1);
    QCOMPARE(runWords({"self-test", "extra"}).status, 2);
}

void TestSelfTest::theDialogShowsWhatDiffersFirstAndSavesTheRecord() {
    Desk desk;
    const QString path = QString::fromStdString(desk.path("record.pdf"));
    SelfTestDialog dialog([&](QWidget*, const QString&) { return path; });
    dialog.show();
    auto* save = dialog.findChild<QPushButton*>(QStringLiteral("selfTestSave"));
    QVERIFY(!save->isEnabled()); // it runs beside the window
    QTRY_VERIFY(save->isEnabled());
    QVERIFY(dialog.findChild<QLabel*>(QStringLiteral("selfTestVerdict"))->text().startsWith(QStringLiteral("All ")));
    auto* table = dialog.findChild<QTreeWidget*>(QStringLiteral("selfTestTable"));
    QCOMPARE(table->topLevelItemCount(), static_cast<int>(runSelfTest().cases.size()));
    QVERIFY(table->topLevelItem(0)->text(0).contains(QStringLiteral("NIST/ITL Statistical Reference Datasets")));
    QCOMPARE(table->topLevelItem(0)->childCount(), static_cast<int>(runSelfTest().cases.front().figures.size()));
    save->click();
    QVERIFY(QFile::exists(path));

    SelfTestOutcome outcome = runSelfTest();
    outcome.cases.back().figures.front().holds = false;
    QCOMPARE(failuresFirst(outcome).front(), &outcome.cases.back());
    Progress cancelled;
    cancelled.cancel();
    QVERIFY(runSelfTest(cancelled).cases.empty());
}

void TestSelfTest::everyFigureHasWords() {
    for (const SelfTestCase& one : runSelfTest().cases)
        for (const SelfTestFigure& figure : one.figures) {
            const QString words = selfTestFigureText(figure.name);
            QVERIFY2(!words.isEmpty() && !words.contains(u'_') && !words.contains(u'.'), qPrintable(words));
        }
}

QTEST_MAIN(TestSelfTest)
#include "tst_self_test.moc"
