// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/KeyFigures.h"
#include "core/evaluate/evaluate.h"
#include "core/session/SessionJson.h"
#include "tests/support/RunCommand.h"
#include "tests/support/SampleRecord.h"

#include <QtTest>

#include <QJsonArray>

using namespace spanwright;
using namespace spanwright::test;
using Words = std::vector<std::string>;

namespace {

StoredResults resultsOf(const Record& record) {
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    return {SPANWRIGHT_VERSION, evaluation ? keyFigures(*evaluation) : decltype(StoredResults::figures)()};
}

QByteArray sessionBytes(const Record& record, const StoredResults& results) {
    return QByteArray::fromStdString(writeSession(record, results));
}

} // namespace

class TestSessions : public QObject {
    Q_OBJECT

  private slots:
    void figuresOfASessionTakeItsChoices();
    void anOptionOverridesAChoice();
    void aSoundSessionIsChecked();
    void aChangedReadingIsFound();
    void aStoredResultThatDiffersIsFound();
    void figuresAndCertificateRefuseAFileThatWasChanged();
    void aCertificateIsDrawnUp();
    void aCertificateIsWrittenOverNothing();
    void ownDocumentsAreWrittenAnew();
    void columnsOfATableAreNotForASession();
    void aCertificateWithGapsIsBlockedAndEachIsNamed();
    void whatIsNoSessionIsRefused();
    void everyTruncationIsRefusedOrWarnedOf();
};

void TestSessions::figuresOfASessionTakeItsChoices() {
    Desk desk;
    Record record = pressureTransmitter();
    record.choices.function = {FunctionFamily::Polynomial, 2};
    const std::string file = desk.file("pt.spanwright", sessionBytes(record, {}));
    const Ran ran = runWords({"figures", file, "--json"});
    QCOMPARE(ran.status, 0);
    const QJsonObject figures = ran.json();
    QCOMPARE(figures["function"].toString(), QStringLiteral("polynomial:2"));
    QCOMPARE(figures["phase"].toString(), QStringLiteral("as-found"));
    QCOMPARE(figures["readings"].toObject()["used"].toInt(), 66);
    QCOMPARE(figures["split"].toObject()["against"].toString(), QStringLiteral("repeatability"));
    const Ran text = runWords({"figures", file});
    for (const char* part : {"Pressure transmitter, serial NV-20318", "As found", "mA", "hysteresis"})
        QVERIFY2(text.out.find(part) != std::string::npos, part);
}

void TestSessions::anOptionOverridesAChoice() {
    Desk desk;
    const std::string file = desk.file("pt.spanwright", sessionBytes(pressureTransmitter(), {}));
    const QJsonObject left = runWords({"figures", file, "--phase", "as-left", "--function", "line", "--exclude", "70", "--json"}).json();
    QCOMPARE(left["phase"].toString(), QStringLiteral("as-left"));
    QCOMPARE(left["readings"].toObject()["used"].toInt(), 9);
    QCOMPARE(left["readings"].toObject()["excluded"].toInt(), 1);
}

void TestSessions::aSoundSessionIsChecked() {
    Desk desk;
    const Record record = pressureTransmitter();
    const Ran ran = runWords({"check", desk.file("pt.spanwright", sessionBytes(record, resultsOf(record)))});
    QVERIFY2(ran.err.empty(), ran.err.c_str());
    QCOMPARE(ran.status, 0);
    QVERIFY2(ran.out.find("76 readings") != std::string::npos, ran.out.c_str());
}

void TestSessions::aChangedReadingIsFound() {
    Desk desk;
    const Record record = pressureTransmitter();
    QByteArray bytes = sessionBytes(record, resultsOf(record));
    QVERIFY(bytes.contains("10.391"));
    bytes.replace("10.391", "10.319");
    const Ran ran = runWords({"check", desk.file("pt.spanwright", bytes)});
    QCOMPARE(ran.status, 1);
    QVERIFY2(ran.err.find("seal does not hold") != std::string::npos, ran.err.c_str());
    QVERIFY2(ran.err.find("residual_sd was stored as") != std::string::npos, ran.err.c_str());
}

void TestSessions::aStoredResultThatDiffersIsFound() {
    Desk desk;
    const Record record = pressureTransmitter();
    StoredResults results = resultsOf(record);
    for (auto& [name, value] : results.figures)
        if (name == "as-found.residual_sd")
            value = "0.0047";
    const Ran ran = runWords({"check", desk.file("pt.spanwright", sessionBytes(record, results))});
    QCOMPARE(ran.status, 1);
    QVERIFY2(ran.err.find("as-found.residual_sd was stored as 0.0047") != std::string::npos, ran.err.c_str());
    QVERIFY(ran.err.find("seal") == std::string::npos);
}

void TestSessions::figuresAndCertificateRefuseAFileThatWasChanged() {
    Desk desk;
    QByteArray bytes = sessionBytes(pressureTransmitter(), {});
    bytes.replace("10.391", "10.319");
    const std::string file = desk.file("pt.spanwright", bytes);
    for (const Ran& ran : {runWords({"figures", file}), runWords({"certificate", file, "--to", desk.path("a.pdf")})}) {
        QCOMPARE(ran.status, 1);
        QVERIFY2(ran.err.find("pt.spanwright: The seal does not hold") != std::string::npos, ran.err.c_str());
        QVERIFY(ran.out.empty());
    }
    const Ran certificate = runWords({"certificate", file, "--to", desk.path("a.pdf"), "--xml", desk.path("a.xml")});
    QVERIFY2(certificate.err.find("pt.spanwright: no certificate was written") != std::string::npos, certificate.err.c_str());
    for (const char* name : {"a.pdf", "a.xml"})
        QVERIFY(!QFile::exists(QString::fromStdString(desk.path(name))));
}

void TestSessions::aCertificateIsDrawnUp() {
    Desk desk;
    const std::string file = desk.file("pt.spanwright", sessionBytes(pressureTransmitter(), {}));
    const Ran ran = runWords({"certificate", file, "--to", desk.path("a.pdf")});
    QVERIFY2(ran.status == 0, ran.err.c_str());
    QFile pdf(QString::fromStdString(desk.path("a.pdf")));
    QVERIFY(pdf.open(QIODevice::ReadOnly));
    QVERIFY(pdf.read(5) == "%PDF-");
    QCOMPARE(runWords({"certificate", file, "--to", desk.path("a.pdf"), "--xml", desk.path("a.xml"), "--replace"}).status, 0);
    QFile xml(QString::fromStdString(desk.path("a.xml")));
    QVERIFY(xml.open(QIODevice::ReadOnly));
    QVERIFY(xml.readAll().contains("NV-20318"));
    const Ran nowhere = runWords({"certificate", file, "--to", desk.path("no/such/folder/a.pdf")});
    QCOMPARE(nowhere.status, 1);
    QCOMPARE(runWords({"certificate", file}).status, 2);
}

void TestSessions::aCertificateIsWrittenOverNothing() {
    Desk desk;
    const QByteArray bytes = sessionBytes(pressureTransmitter(), {});
    const std::string file = desk.file("pt.spanwright", bytes), old = desk.file("old.pdf", "precious"), fresh = desk.path("new.pdf");
    const auto held = [](const std::string& path) {
        QFile read(QString::fromStdString(path));
        return read.open(QIODevice::ReadOnly) ? read.readAll() : QByteArray();
    };
    const std::string link = desk.path("link.pdf");
    QVERIFY(QFile::link(QString::fromStdString(file), QString::fromStdString(link)));
    for (const std::string& input : {file, link}) {
        QCOMPARE(runWords({"certificate", file, "--to", input, "--replace"}).status, 1);
        QCOMPARE(runWords({"certificate", file, "--to", fresh, "--xml", input, "--replace"}).status, 1);
    }
    const Ran there = runWords({"certificate", file, "--to", old});
    QCOMPARE(there.status, 1);
    QVERIFY2(there.err.find("--replace") != std::string::npos, there.err.c_str());
    QCOMPARE(runWords({"certificate", file, "--to", fresh, "--xml", old}).status, 1);
    QCOMPARE(runWords({"certificate", file, "--to", fresh, "--xml", fresh}).status, 2);
    QCOMPARE(runWords({"certificate", file, "--to", fresh, "--xml", desk.path("./new.pdf")}).status, 2);
    QCOMPARE(runWords({"self-test", "--to", old}).status, 1);
    QVERIFY(!QFile::exists(QString::fromStdString(fresh)));
    QCOMPARE(held(file), bytes);
    QCOMPARE(held(old), QByteArray("precious"));
    QCOMPARE(runWords({"certificate", file, "--to", old, "--replace"}).status, 0);
    QVERIFY(held(old).startsWith("%PDF-"));
}

/// The same command twice is no mistake. A document of another kind, or one that was added to since, stays.
void TestSessions::ownDocumentsAreWrittenAnew() {
    Desk desk;
    const std::string file = desk.file("pt.spanwright", sessionBytes(pressureTransmitter(), {})), pdf = desk.path("a.pdf"), xml = desk.path("a.xml"), record = desk.path("r.pdf");
    const auto bytesOf = [](const std::string& path) {
        QFile read(QString::fromStdString(path));
        return read.open(QIODevice::ReadOnly) ? read.readAll() : QByteArray();
    };
    const Words certificate{"certificate", file, "--to", pdf, "--xml", xml, "--country", "NO"};
    for (int time = 0; time < 2; ++time) {
        const Ran ran = runWords(certificate);
        QVERIFY2(ran.status == 0, ran.err.c_str());
        QCOMPARE(runWords({"self-test", "--to", record}).status, 0);
    }
    QCOMPARE(runWords({"self-test", "--to", pdf}).status, 1);
    QCOMPARE(runWords({"certificate", file, "--to", record}).status, 1);
    QCOMPARE(runWords({"certificate", file, "--to", xml}).status, 1);
    const QByteArray signedXml = bytesOf(xml).replace("NV-20318", "NV-20319"), whole = bytesOf(pdf);
    desk.file("a.xml", signedXml);
    QCOMPARE(runWords(certificate).status, 1);
    QCOMPARE(bytesOf(xml), signedXml);
    QVERIFY(QFile::remove(QString::fromStdString(xml)));
    // A signature is appended to a PDF with references of its own (ISO 32000-1, 7.5.6).
    desk.file("a.pdf", whole + "5 0 obj\n<< /Type /Sig >>\nendobj\nxref\n0 0\ntrailer\n<< >>\nstartxref\n0\n%%EOF\n");
    QCOMPARE(runWords(certificate).status, 1);
    desk.file("a.pdf", whole + "x");
    QCOMPARE(runWords(certificate).status, 1);
    QVERIFY(!QFile::exists(QString::fromStdString(xml)));
    Words replacing = certificate;
    replacing.emplace_back("--replace");
    QCOMPARE(runWords(replacing).status, 0);
    const Ran idle = runWords({"certificate", file, "--to", pdf, "--country", "NO"});
    QVERIFY2(idle.status == 0 && idle.err.find("--country changes nothing") != std::string::npos, idle.err.c_str());
}

void TestSessions::columnsOfATableAreNotForASession() {
    Desk desk;
    const std::string file = desk.file("pt.spanwright", sessionBytes(pressureTransmitter(), {}));
    const Ran ran = runWords({"figures", file, "--reference", "2"});
    QCOMPARE(ran.status, 2);
    QVERIFY2(ran.err.find("--reference is for a table") != std::string::npos, ran.err.c_str());
    QCOMPARE(runWords({"figures", file, "--decimal", "comma", "--at", "5,5"}).status, 0);
}

void TestSessions::aCertificateWithGapsIsBlockedAndEachIsNamed() {
    Desk desk;
    Record record = pressureTransmitter();
    record.job.customer.clear();
    record.item.serial.clear();
    const std::string file = desk.file("pt.spanwright", sessionBytes(record, {}));
    const Ran blocked = runWords({"certificate", file, "--to", desk.path("a.pdf")});
    QCOMPARE(blocked.status, 3);
    QVERIFY2(std::count(blocked.err.begin(), blocked.err.end(), '\n') >= 3, blocked.err.c_str());
    QVERIFY2(blocked.err.find("none was written") != std::string::npos, blocked.err.c_str());
    QVERIFY2(QString::fromStdString(blocked.err).contains("customer", Qt::CaseInsensitive), blocked.err.c_str());
    QVERIFY2(QString::fromStdString(blocked.err).contains("serial", Qt::CaseInsensitive), blocked.err.c_str());
    QVERIFY(!QFile::exists(QString::fromStdString(desk.path("a.pdf"))));
    QCOMPARE(runWords({"certificate", file, "--to", desk.path("a.pdf"), "--incomplete"}).status, 0);
    QVERIFY(QFile::exists(QString::fromStdString(desk.path("a.pdf"))));
}

void TestSessions::whatIsNoSessionIsRefused() {
    Desk desk;
    for (const QByteArray& bytes : {QByteArray(), QByteArray("{"), QByteArray("[1, 2]"), QByteArray("x,y\n1,2\n"), QByteArray("{\"a\": 1}")}) {
        const Ran ran = runWords({"check", desk.file("no.spanwright", bytes)});
        QCOMPARE(ran.status, 1);
        QVERIFY2(ran.err.find("no.spanwright") != std::string::npos, ran.err.c_str());
        QCOMPARE(std::count(ran.err.begin(), ran.err.end(), '\n'), 1);
    }
    QCOMPARE(runWords({"check"}).status, 2);
    QCOMPARE(runWords({"check", desk.path("missing.spanwright")}).status, 1);
}

void TestSessions::everyTruncationIsRefusedOrWarnedOf() {
    Desk desk;
    const Record record = pressureTransmitter();
    const QByteArray whole = sessionBytes(record, {});
    for (qsizetype n = 0; n + 2 < whole.size(); n += 97) {
        const Ran ran = runWords({"check", desk.file("cut.spanwright", whole.left(n))});
        QVERIFY2(ran.status == 1 && !ran.err.empty(), qPrintable(QString::number(n)));
    }
}

QTEST_MAIN(TestSessions)
#include "tst_sessions.moc"
