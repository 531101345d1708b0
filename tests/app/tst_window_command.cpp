// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/WindowCommand.h"
#include "core/evaluate/evaluate.h"
#include "core/session/SessionJson.h"
#include "tests/support/Paths.h"
#include "tests/support/RunCommand.h"
#include "tests/support/SampleRecord.h"
#include "ui/certificate/writeCertificate.h"
#include "ui/shell/MainWindow.h"

#include <QJsonArray>
#include <QProcess>
#include <QTimer>
#include <QtTest>

#include <sstream>

using namespace spanwright;
using namespace spanwright::test;

namespace {

std::string session(Desk& desk, const Record& record) {
    return desk.file(QStringLiteral("s.spanwright"), QByteArray::fromStdString(writeSession(record, {})));
}

/// The built program, with a home of its own and nothing that would give it a display.
struct Program {
    explicit Program(Desk& desk) : home(QString::fromStdString(desk.path("home"))) {}

    Ran run(const QStringList& words) const {
        QProcess process;
        QProcessEnvironment around = QProcessEnvironment::systemEnvironment();
        for (const char* display : {"DISPLAY", "WAYLAND_DISPLAY", "QT_QPA_PLATFORM"})
            around.remove(QLatin1String(display));
        around.insert(QStringLiteral("HOME"), home);
        process.setProcessEnvironment(around);
        process.start(QString::fromStdString(programPath()), words);
        if (!process.waitForFinished())
            return {};
        return {process.exitCode(), process.readAllStandardOutput().toStdString(), process.readAllStandardError().toStdString()};
    }
    QString home;
};

} // namespace

class TestWindowCommand : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() {
        // Settings and recovery of whoever runs the test stay untouched.
        qputenv("XDG_CONFIG_HOME", own_.filePath("config").toUtf8());
        qputenv("XDG_DATA_HOME", own_.filePath("data").toUtf8());
        qputenv("HOME", own_.path().toUtf8());
    }
    void stageSchemeAndFilesAreUnderstood();
    void whatIsNotUnderstoodIsRefused();
    void theWindowOpensAtTheStageInTheScheme();
    void everyCommandRunsWithoutADisplay();
    void whatLiesOutsideTheRangeStaysOffTheCertificate();

  private:
    QTemporaryDir own_;
};

void TestWindowCommand::stageSchemeAndFilesAreUnderstood() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter());
    const auto options = startOptions({"--stage", "budget", "--scheme=dark", file});
    QVERIFY(options.ok());
    QVERIFY(options->stage == Stage::Budget);
    QVERIFY(options->scheme == SchemeName::Dark);
    QCOMPARE(options->files, QStringList{QString::fromStdString(file)});
    QVERIFY(!startOptions({})->stage && !startOptions({})->scheme);
}

void TestWindowCommand::whatIsNotUnderstoodIsRefused() {
    const std::vector<std::pair<Words, const char*>> wrong{{{"--stage", "kitchen"}, "“kitchen”"}, {{"--scheme", "pink"}, "“pink”"}, {{"--stage"}, "--stage"},
                                                           {{"--shape", "round"}, "--shape"}, {{"figure"}, "“figure”"}, {{"no/such.csv"}, "no/such.csv"}};
    for (const auto& [words, named] : wrong) {
        std::ostringstream out, err;
        int count = 0;
        const int status = windowCommand(count, nullptr, words, {out, err});
        QVERIFY2(status == (words.front() == "no/such.csv" ? 1 : 2), named);
        const std::string said = err.str();
        QVERIFY2(said.find(named) != std::string::npos, said.c_str());
        QCOMPARE(std::count(said.begin(), said.end(), '\n'), 1);
    }
}

void TestWindowCommand::theWindowOpensAtTheStageInTheScheme() {
    Desk desk;
    const QString file = QString::fromStdString(session(desk, pressureTransmitter()));
    Stage seen = Stage::Job;
    std::size_t readings = 0;
    QTimer::singleShot(0, qApp, [&] {
        for (QWidget* widget : QApplication::topLevelWidgets())
            if (auto* window = qobject_cast<MainWindow*>(widget)) {
                seen = window->stage();
                readings = window->workbench().record().readings->size();
                window->close();
            }
        qApp->quit();
    });
    QCOMPARE(runWindow(*qApp, {Stage::Certificate, SchemeName::Dark, {file}}), 0);
    QVERIFY(seen == Stage::Certificate);
    QCOMPARE(readings, std::size_t{76});
    QVERIFY(scheme().name == SchemeName::Dark);
}

void TestWindowCommand::everyCommandRunsWithoutADisplay() {
    Desk desk;
    const Program program(desk);
    const QString file = QString::fromStdString(session(desk, pressureTransmitter()));
    const QString csv = QString::fromStdString(desk.file(QStringLiteral("in.csv"), "current / mA\n12.000\n"));
    const QString out = QString::fromStdString(desk.path("out.csv"));
    for (const QStringList& words : {QStringList{"figures", file}, {"figures", file, "--json"}, {"convert", csv, "--with", file, "--to", out}, {"coefficients", file, "--form", "c"},
                                     {"check", file}, {"self-test", "--to", QString::fromStdString(desk.path("t.pdf"))}, {"--help"}}) {
        const Ran ran = program.run(words);
        QVERIFY2(ran.status == 0, qPrintable(words.join(u' ') + QString::fromStdString(ran.err)));
        QVERIFY(!ran.out.empty());
    }
    QCOMPARE(program.run({"certificate", file, "--to", QString::fromStdString(desk.path("c.pdf"))}).status, 0);
    const Ran window = program.run({file});
    QCOMPARE(window.status, 1);
    QVERIFY2(window.err.find("no display") != std::string::npos, window.err.c_str());
}

/// Answers beyond the readings are marked in the figures, and nothing of them is printed on the certificate or in its XML.
void TestWindowCommand::whatLiesOutsideTheRangeStaysOffTheCertificate() {
    Desk desk;
    Record record = pressureTransmitter();
    record.choices.at = {number("53.217")};
    record.choices.read = {number("87.654")};
    const std::string file = session(desk, record);
    const QJsonObject figures = runWords({"figures", file, "--json"}).json();
    const QJsonObject at = figures["at"].toArray()[0].toObject(), read = figures["read"].toArray()[0].toObject();
    QCOMPARE(at["inside_range"].toBool(true), false);
    QCOMPARE(read["inside_range"].toBool(true), false);
    QVERIFY(!read.contains(QStringLiteral("expanded_uncertainty")));
    int extrapolated = 0;
    for (const QJsonValue& warning : figures["warnings"].toArray())
        extrapolated += warning.toObject()["code"].toString() == QLatin1String("extrapolated") ? 1 : 0;
    QCOMPARE(extrapolated, 2);
    const std::string xmlPath = desk.path("c.xml");
    QCOMPARE(runWords({"certificate", file, "--to", desk.path("c.pdf"), "--xml", xmlPath}).status, 0);
    QFile xml(QString::fromStdString(xmlPath));
    QVERIFY(xml.open(QIODevice::ReadOnly));
    const QByteArray text = xml.readAll();
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    const QString pages = plainText(layOutCertificate(record, *evaluation, certificateContext(record, *evaluation, QStringLiteral("2026-10-14"))));
    QVERIFY(pages.contains(QStringLiteral("NV-20318")));
    for (const QString& digits : {QStringLiteral("53.21"), QStringLiteral("87.65"), QString::number(at["indication"].toDouble(), 'f', 2),
                                  QString::number(read["reference"].toDouble(), 'f', 2)}) {
        QVERIFY2(!pages.contains(digits), qPrintable(digits));
        QVERIFY2(!text.left(text.indexOf("base64") < 0 ? text.size() : text.indexOf("base64")).contains(digits.toUtf8()), qPrintable(digits));
    }
}

QTEST_MAIN(TestWindowCommand)
#include "tst_window_command.moc"
