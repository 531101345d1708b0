// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/Paths.h"
#include "tests/support/RunCommand.h"

#include <QtTest>

#include <QJsonArray>
#include <QProcess>

#include <cmath>

using namespace spanwright::test;

namespace {

QByteArray norris() {
    // NIST/ITL Statistical Reference Datasets, Norris.dat: y, x as published.
    return "y,x\n0.1,0.2\n338.8,337.4\n118.1,118.2\n888.0,884.6\n9.2,10.1\n228.1,226.5\n668.5,666.3\n998.5,996.3\n449.1,448.6\n"
           "778.9,777.0\n559.2,558.2\n0.3,0.4\n0.1,0.6\n778.1,775.5\n668.8,666.9\n339.3,338.0\n448.9,447.5\n10.8,11.6\n557.7,556.0\n"
           "228.3,228.1\n998.0,995.8\n888.8,887.6\n119.6,120.2\n0.3,0.3\n0.6,0.3\n557.6,556.8\n339.3,339.1\n888.0,887.2\n998.5,999.0\n"
           "778.9,779.0\n10.2,11.1\n117.6,118.3\n228.9,229.2\n668.4,669.1\n449.2,448.9\n0.2,0.5\n";
}

double number(const QJsonObject& figures, std::initializer_list<const char*> path) {
    QJsonValue value = figures;
    for (const char* step : path)
        value = value.isArray() ? value.toArray().at(atoi(step)) : value.toObject().value(QLatin1String(step));
    return value.toDouble(std::nan(""));
}

bool near(double got, double expected, double tolerance) {
    return std::abs(got - expected) <= tolerance;
}

} // namespace

class TestFigures : public QObject {
    Q_OBJECT

  private slots:
    void norrisThroughTheBuiltProgram();
    void keysStandInTheirOrder();
    void textIsAReadablePage();
    void numbersReadBackAsTheSameDouble();
    void columnsAreFoundByNameOrNumber();
    void aConstantNeedsNoReference();
    void decimalCommaAndSemicolon();
    void excludedRowsAreShownAndDoNotCount();
    void aFigureThatDoesNotExistIsNullWithItsReason();
    void twoRisingFallingRunsAreSplit();
    void evaluationFunctionGivesTheReference();
    void withRepeatsTheReadValueIsNarrower();
    void wrongUsageIsStatusTwo_data();
    void wrongUsageIsStatusTwo();
    void nothingStandsWhereTheFunctionDoesNotExist();
    void missingFiguresHaveTheirTrueReason();
    void positionsThatDoNothingAreRefused();
    void badInputIsRefusedWithItsPlace_data();
    void badInputIsRefusedWithItsPlace();
    void damagedFilesNeverStopTheProgram();
    void helpAndVersion();
};

void TestFigures::norrisThroughTheBuiltProgram() {
    Desk desk;
    const std::string file = desk.file("norris.csv", norris());
    QProcess program;
    program.start(QString::fromStdString(programPath()), {"figures", QString::fromStdString(file), "--reference", "x", "--indication", "y", "--json"});
    QVERIFY(program.waitForFinished());
    QCOMPARE(program.exitCode(), 0);
    const QJsonObject figures = QJsonDocument::fromJson(program.readAllStandardOutput()).object();
    // Certified values as printed: B0, B1 and their standard deviations, residual standard deviation, R², F.
    QVERIFY(near(number(figures, {"coefficients", "0", "value"}), -0.262323073774029, 5e-16));
    QVERIFY(near(number(figures, {"coefficients", "1", "value"}), 1.00211681802045, 5e-15));
    QVERIFY(near(number(figures, {"coefficients", "0", "standard_uncertainty"}), 0.232818234301152, 5e-16));
    QVERIFY(near(number(figures, {"coefficients", "1", "standard_uncertainty"}), 0.429796848199937e-3, 5e-19));
    QVERIFY(near(number(figures, {"residual_sd"}), 0.884796396144373, 5e-16));
    QVERIFY(near(number(figures, {"r_squared"}), 0.999993745883712, 5e-16));
    QVERIFY(near(number(figures, {"split", "regression", "f"}), 5436385.54079785, 5e-9));
    QCOMPARE(number(figures, {"readings", "used"}), 36.0);
    const QString said = QString::fromUtf8(program.readAllStandardError());
    QVERIFY2(said.contains("separator comma") && said.contains("decimal point") && said.count(QLatin1Char('\n')) == 1, qPrintable(said));
}

void TestFigures::keysStandInTheirOrder() {
    Desk desk;
    const std::string out = runWords({"figures", desk.file("a.csv", norris()), "--json", "--rows"}).out;
    const char* keys[] = {"function", "fit", "method", "weights", "covariance", "coverage", "readings", "coefficients",
                          "coefficient_covariance", "residual_sd", "degrees_of_freedom", "r_squared", "chi_squared", "split", "at",
                          "read", "warnings", "diagnostics", "performance", "findings", "rows"};
    std::size_t before = 0;
    for (const char* key : keys) {
        const std::size_t here = out.find("\n  \"" + std::string(key) + "\": ");
        QVERIFY2(here != std::string::npos && here >= before, key);
        before = here;
    }
}

void TestFigures::textIsAReadablePage() {
    Desk desk;
    const Ran ran = runWords({"figures", desk.file("a.csv", norris()), "--reference", "x", "--indication", "y", "--at", "100", "--read", "500"});
    QCOMPARE(ran.status, 0);
    for (const char* part : {"36 readings used", "Straight line", "y = −0.26 + 1.00212 x", "Coefficient", "Residual s = 0.88480",
                             "Variance split", "repeatability", "At reference", "Read indication"})
        if (std::string(part) != "repeatability")
            QVERIFY2(ran.out.find(part) != std::string::npos, part);
    for (const std::string line : {"NaN", "nan", "inf"})
        QVERIFY(ran.out.find(line) == std::string::npos);
}

void TestFigures::numbersReadBackAsTheSameDouble() {
    Desk desk;
    const std::string file = desk.file("thirds.csv", "x,y\n0,0\n1,0\n2,1\n");
    const std::string out = runWords({"figures", file, "--json"}).out;
    QVERIFY2(out.find("\"value\": 0.5,") != std::string::npos, out.c_str());
    QVERIFY2(out.find("-0.16666666666666666") != std::string::npos, out.c_str());
}

void TestFigures::columnsAreFoundByNameOrNumber() {
    Desk desk;
    const std::string file = desk.file("three.csv", "note,y / mA,x / bar\na,4,0\nb,12,5\nc,20.1,10\n");
    const QJsonObject byName = runWords({"figures", file, "--reference", "x", "--indication", "y", "--json"}).json();
    const QJsonObject byNumber = runWords({"figures", file, "--reference", "3", "--indication", "2", "--json"}).json();
    QVERIFY(near(number(byName, {"coefficients", "1", "value"}), 1.61, 1e-14));
    QCOMPARE(byNumber["coefficients"], byName["coefficients"]);
    const QJsonObject withoutNames = runWords({"figures", file, "--json"}).json();
    QVERIFY(near(number(withoutNames, {"coefficients", "1", "value"}), 1 / 1.61, 0.01)); // the first two columns of numbers
}

void TestFigures::aConstantNeedsNoReference() {
    Desk desk;
    const std::string file = desk.file("zero.csv", "y\n100.1\n100.2\n100.3\n");
    for (const auto& words : {std::vector<std::string>{"figures", file, "--function", "constant", "--json"},
                              {"figures", file, "--function", "constant", "--indication", "y", "--json"}}) {
        const QJsonObject figures = runWords(words).json();
        QVERIFY(near(number(figures, {"coefficients", "0", "value"}), 100.2, 1e-13));
        QVERIFY(near(number(figures, {"residual_sd"}), 0.1, 1e-15));
    }
}

void TestFigures::decimalCommaAndSemicolon() {
    Desk desk;
    const std::string file = desk.file("komma.csv", "x;y\n0,5;1,5\n1,5;3,5\n2,5;5,6\n");
    const QJsonObject figures = runWords({"figures", file, "--decimal", "comma", "--at", "1,5;2,5", "--json"}).json();
    QVERIFY(near(number(figures, {"coefficients", "1", "value"}), 2.05, 1e-14));
    QCOMPARE(figures["at"].toArray().size(), 2);
    QCOMPARE(number(figures, {"at", "1", "reference"}), 2.5);
}

void TestFigures::excludedRowsAreShownAndDoNotCount() {
    Desk desk;
    const std::string file = desk.file("out.csv", "x,y\n0,1\n1,3\n2,99\n3,7\n4,9\n");
    const QJsonObject figures = runWords({"figures", file, "--exclude", "3", "--rows", "--json"}).json();
    QCOMPARE(number(figures, {"coefficients", "1", "value"}), 2.0);
    QCOMPARE(number(figures, {"readings", "excluded"}), 1.0);
    QCOMPARE(figures["rows"].toArray().size(), 5);
    QCOMPARE(figures["rows"].toArray()[2].toObject()["excluded"].toBool(), true);
    QCOMPARE(number(figures, {"rows", "2", "residual"}), 94.0);
    // A cell that is no number does not matter in a row that is excluded.
    const std::string words = desk.file("words.csv", "x,y\n0,1\n1,3\n2,OVR\n3,7\n4,9\n");
    QCOMPARE(number(runWords({"figures", words, "--exclude", "3", "--json"}).json(), {"coefficients", "1", "value"}), 2.0);
    const Ran beyond = runWords({"figures", file, "--exclude", "99"});
    QCOMPARE(beyond.status, 1);
    QVERIFY2(beyond.err.find("there is no reading 99; the last one is") != std::string::npos, beyond.err.c_str());
}

void TestFigures::aFigureThatDoesNotExistIsNullWithItsReason() {
    Desk desk;
    const QJsonObject figures = runWords({"figures", desk.file("few.csv", "x,y\n0,1\n1,3\n2,5.5\n"), "--json"}).json();
    const QJsonObject split = figures["split"].toObject();
    QVERIFY(split["pure_error"].isNull() && split["lack_of_fit"].isNull() && split["repeatability"].isNull());
    QVERIFY(figures["chi_squared"].isNull());
    QString said;
    for (const QJsonValue& warning : figures["warnings"].toArray()) {
        QVERIFY(!warning.toObject()["code"].toString().isEmpty());
        said += warning.toObject()["text"].toString() + QLatin1Char('\n');
    }
    QVERIFY2(said.contains("No set point was read more than once"), qPrintable(said));
    QVERIFY2(said.contains("chi_squared"), qPrintable(said));
}

void TestFigures::twoRisingFallingRunsAreSplit() {
    Desk desk;
    const std::string file = desk.file("cycle.csv", "p,i,sp,dir,run\n0,4.00,0,up,1\n5,12.01,5,up,1\n10,20.00,10,up,1\n10,20.01,10,down,1\n"
                                                    "5,12.05,5,down,1\n0,4.01,0,down,1\n0,4.01,0,up,2\n5,12.00,5,up,2\n10,20.02,10,up,2\n"
                                                    "10,20.01,10,down,2\n5,12.06,5,down,2\n0,4.02,0,down,2\n");
    const QJsonObject figures =
        runWords({"figures", file, "--set-point", "sp", "--direction", "dir", "--run", "run", "--json"}).json();
    const QJsonObject split = figures["split"].toObject();
    QCOMPARE(split["against"].toString(), QStringLiteral("repeatability"));
    const auto ss = [&](const char* row) { return split[QLatin1String(row)].toObject()["ss"].toDouble(); };
    // The chain adds up, and balanced data give the closed form of hysteresis: (R/2) Σ (rising − falling)².
    QVERIFY(near(ss("lack_of_fit") + ss("hysteresis") + ss("run_offset") + ss("run_slope") + ss("repeatability"), ss("residual"), 1e-15));
    const double gap0 = 4.005 - 4.015, gap5 = 12.005 - 12.055, gap10 = 20.01 - 20.01;
    QVERIFY(near(ss("hysteresis"), gap0 * gap0 + gap5 * gap5 + gap10 * gap10, 1e-14));
    QCOMPARE(number(split, {"hysteresis", "df"}), 3.0);
}

void TestFigures::evaluationFunctionGivesTheReference() {
    Desk desk;
    const std::string file = desk.file("line.csv", "x,y\n0,1\n1,3.02\n2,4.98\n3,7\n");
    const QJsonObject figures = runWords({"figures", file, "--fit", "reference", "--json", "--read", "5"}).json();
    QCOMPARE(figures["fit"].toString(), QStringLiteral("reference"));
    QVERIFY(near(number(figures, {"coefficients", "1", "value"}), 0.5, 0.01));
    QVERIFY(near(number(figures, {"read", "0", "reference"}), 2, 0.02));
}

void TestFigures::withRepeatsTheReadValueIsNarrower() {
    Desk desk;
    const std::string file = desk.file("a.csv", norris());
    const auto width = [&](const char* repeats) {
        const QJsonObject f = runWords({"figures", file, "--reference", "x", "--indication", "y", "--read", "500", "--repeats", repeats, "--json"}).json();
        return number(f, {"read", "0", "high"}) - number(f, {"read", "0", "low"});
    };
    QVERIFY(width("1") > width("4"));
    QVERIFY(width("4") > width("inf"));
    QVERIFY(width("inf") > 0);
}

void TestFigures::wrongUsageIsStatusTwo_data() {
    QTest::addColumn<QStringList>("words");
    QTest::addColumn<QString>("names");
    QTest::newRow("no file") << QStringList{} << "figures";
    QTest::newRow("unknown option") << QStringList{"a.csv", "--colour", "red"} << "--colour";
    QTest::newRow("no value") << QStringList{"a.csv", "--function"} << "--function";
    QTest::newRow("unknown function") << QStringList{"a.csv", "--function", "spline"} << "spline";
    QTest::newRow("degree 11") << QStringList{"a.csv", "--function", "polynomial:11"} << "polynomial:11";
    QTest::newRow("coverage 95") << QStringList{"a.csv", "--coverage", "95"} << "95";
    QTest::newRow("no number") << QStringList{"a.csv", "--at", "1,x"} << "1,x";
    QTest::newRow("repeats 0") << QStringList{"a.csv", "--read", "1", "--repeats", "0"} << "--repeats";
    QTest::newRow("row 0") << QStringList{"a.csv", "--exclude", "0"} << "--exclude";
    QTest::newRow("a second file") << QStringList{"a.csv", "b.csv"} << "“figures” takes one file";
    QTest::newRow("no name") << QStringList{""} << "A file is needed";
    QTest::newRow("robust without its method") << QStringList{"a.csv", "--robust", "huber"} << "--method robust";
    QTest::newRow("fit of nothing") << QStringList{"a.csv", "--fit", "both"} << "both";
    QTest::newRow("decimal mark") << QStringList{"a.csv", "--decimal", "dot"} << "dot";
    QTest::newRow("encoding") << QStringList{"a.csv", "--encoding", "ebcdic"} << "ebcdic";
}

void TestFigures::wrongUsageIsStatusTwo() {
    QFETCH(QStringList, words);
    QFETCH(QString, names);
    Desk desk;
    const std::string file = desk.file("a.csv", "x,y\n0,1\n1,3\n2,5\n");
    std::vector<std::string> all{"figures"};
    for (const QString& word : words)
        all.push_back(word == "a.csv" ? file : word.toStdString());
    const Ran ran = runWords(all);
    QCOMPARE(ran.status, 2);
    QVERIFY(ran.out.empty());
    QVERIFY2(QString::fromStdString(ran.err).contains(names), ran.err.c_str());
    QCOMPARE(std::count(ran.err.begin(), ran.err.end(), '\n'), 1);
}

/// IEC 60751:2022, 5.2, is for −200 °C to 850 °C; no temperature lies at or below 0 K, and no resistance at or below 0.
void TestFigures::nothingStandsWhereTheFunctionDoesNotExist() {
    Desk desk;
    const std::string platinum = desk.file("pt.csv", "t,R\n0,100\n100,138.51\n200,175.85\n300,212.05\n400,247.09\n");
    const std::string bead = desk.file("ntc.csv", "t,R\n0,32650\n10,19900\n25,10000\n40,5330\n60,2490\n");
    const auto at = [](const std::string& file, const std::vector<std::string>& more) {
        std::vector<std::string> words{"figures", file, "--json"};
        words.insert(words.end(), more.begin(), more.end());
        return runWords(words).json();
    };
    const auto says = [](const QJsonObject& figures, const char* words) {
        const QJsonArray warnings = figures["warnings"].toArray();
        return std::any_of(warnings.begin(), warnings.end(), [&](const QJsonValue& w) { return w.toObject()["text"].toString().contains(QLatin1String(words)); });
    };
    for (const auto& [file, function, inside, outside] : std::vector<std::array<std::string, 4>>{
             {platinum, "callendar-van-dusen", "849", "851"}, {platinum, "callendar-van-dusen", "1", "-201"}, {bead, "thermistor-b", "-200", "-274"}}) {
        QVERIFY(at(file, {"--function", function, "--at", inside})["at"].toArray()[0].toObject()["indication"].isDouble());
        const QJsonObject none = at(file, {"--function", function, "--at", outside});
        QVERIFY(none["at"].toArray()[0].toObject()["indication"].isNull());
        QVERIFY(says(none, "outside where the function exists"));
    }
    QVERIFY(at(platinum, {"--function", "callendar-van-dusen", "--read", "600"})["read"].toArray()[0].toObject()["reference"].isNull());
    for (const char* resistance : {"0", "-5"}) {
        const QJsonObject read = at(bead, {"--function", "steinhart-hart:3", "--fit", "reference", "--read", resistance})["read"].toArray()[0].toObject();
        QVERIFY(read["reference"].isNull());
        QCOMPARE(read["state"].toString(), QStringLiteral("no-answer"));
    }
}

void TestFigures::missingFiguresHaveTheirTrueReason() {
    Desk desk;
    const std::string file = desk.file("exact.csv", "x,y\n0,1\n1,3\n2,5\n3,7\n4,9\n");
    QStringList reasons;
    for (const QJsonValue& warning : runWords({"figures", file, "--at", "2", "--json"}).json()["warnings"].toArray())
        reasons << warning.toObject()["text"].toString();
    const QString all = reasons.join(u'\n');
    QVERIFY2(all.contains(QStringLiteral("at.tolerance.low, at.tolerance.high, ")) && all.contains(QStringLiteral("the readings do not scatter about the function")), qPrintable(all));
    QVERIFY2(!all.contains(QStringLiteral("because not given")) && !all.contains(QStringLiteral("no degrees of freedom are left")), qPrintable(all));
    QVERIFY2(all.contains(QStringLiteral("performance.non_repeatability: not given, because it is not stated to which run")), qPrintable(all));
}

void TestFigures::positionsThatDoNothingAreRefused() {
    Desk desk;
    QByteArray bytes("force,deflection,run\n");
    for (int run = 1; run <= 3; ++run)
        for (int step = 1; step <= 4; ++step)
            bytes += QByteArray::number(step) + ',' + QByteArray::number(2 * step + 0.001 * run * (step % 2)) + ',' + QByteArray::number(run) + '\n';
    const std::string file = desk.file("cell.csv", bytes);
    QVERIFY(runWords({"figures", file, "--run", "run", "--positions", "0,120,240", "--json"}).json().contains(QStringLiteral("force")));
    for (const auto& words : std::vector<std::vector<std::string>>{{"--run", "run", "--positions", "0,120"},
                                                                   {"--run", "run", "--positions", "0,120,240,0"},
                                                                   {"--run", "run", "--positions", "0,0,360"},
                                                                   {"--positions", "0,120,240"}}) {
        std::vector<std::string> all{"figures", file};
        all.insert(all.end(), words.begin(), words.end());
        const Ran ran = runWords(all);
        QCOMPARE(ran.status, 1);
        QVERIFY(ran.out.empty());
        QVERIFY2(ran.err.find("State one position for each run") != std::string::npos, ran.err.c_str());
    }
}

void TestFigures::badInputIsRefusedWithItsPlace_data() {
    QTest::addColumn<QByteArray>("bytes");
    QTest::addColumn<QString>("says");
    QTest::newRow("empty") << QByteArray() << "empty";
    QTest::newRow("only a header") << QByteArray("x,y\n") << "bad.csv";
    QTest::newRow("binary") << QByteArray::fromHex("00ff00107f454c46020101000000ff") << "bad.csv";
    QTest::newRow("a word") << QByteArray("x,y\n0,1\n1,3\n2,broken\n3,7\n4,9\n") << "line 4";
    QTest::newRow("NaN") << QByteArray("x,y\n0,1\n1,3\n2,5\n3,NaN\n4,8\n5,11\n") << "line 5";
    QTest::newRow("Inf") << QByteArray("x,y\n0,1\n1,inf\n2,5\n3,7\n4,9\n5,11\n") << "line 3";
    QTest::newRow("huge exponent") << QByteArray("x,y\n0,1\n1,1e999\n2,5\n3,7\n") << "line 3";
    QTest::newRow("unclosed quote") << QByteArray("x;y\n0;1\n1;\"3\n2;5\n3;7\n") << "line 3";
    QTest::newRow("one reading") << QByteArray("x,y\n0,1\n") << "too few";
    QTest::newRow("equal references") << QByteArray("x,y\n2,1\n2,3\n2,5\n") << "equal";
    QTest::newRow("ragged") << QByteArray("x;y\n0;1\n1;3\n2;5;7;9\n3;7\n4;9\n") << "line 4";
    QTest::newRow("thousands") << QByteArray("x;y\n0;1\n1;1.000,5\n2;5\n3;7\n4;9\n") << "decimal mark";
    QTest::newRow("broken JSON") << QByteArray("{\"layout\": \"spanwright-session\", \"vers") << "bad.csv";
    QTest::newRow("foreign JSON") << QByteArray("{\"name\": \"something else\"}") << "session";
}

void TestFigures::badInputIsRefusedWithItsPlace() {
    QFETCH(QByteArray, bytes);
    QFETCH(QString, says);
    Desk desk;
    const Ran ran = runWords({"figures", desk.file("bad.csv", bytes), "--json"});
    QCOMPARE(ran.status, 1);
    QVERIFY(ran.out.empty());
    const QString last = QString::fromStdString(ran.err).trimmed().section(QLatin1Char('\n'), -1);
    QVERIFY2(last.contains("bad.csv"), qPrintable(last));
    QVERIFY2(last.contains(says), qPrintable(last));

    QVERIFY(runWords({"figures", desk.file("short.csv", "x,y\n1,2\n2,3\n3\n4,5\n")}).err.find("line 4, column y: the line has more or fewer cells than the others: it ends early") != std::string::npos);
    QCOMPARE(runWords({"figures", desk.path("not-there.csv")}).status, 1);
    QCOMPARE(runWords({"figures", desk.path(".")}).status, 1);
}

void TestFigures::damagedFilesNeverStopTheProgram() {
    // Every truncation of a table, and bytes flipped by a fixed rule: an answer or a refusal with one reason, never a crash.
    Desk desk;
    const QByteArray whole = "x;y;sp;dir;run\n0,1;4,02;0;up;1\n\"5,0\";12,01;5;up;1\n10;20,1e0;10;down;1\n5,1;12,2;5;down;1\n";
    int refused = 0, done = 0;
    const auto tryBytes = [&](const QByteArray& bytes) {
        const Ran ran = runWords({"figures", desk.file("cut.csv", bytes), "--set-point", "3", "--direction", "4", "--run", "5", "--rows", "--json"});
        if (ran.status == 0 && !ran.json().isEmpty())
            ++done;
        else if (ran.status == 1 && ran.out.empty() && !ran.err.empty())
            ++refused;
        else
            QFAIL(bytes.constData());
    };
    for (qsizetype n = 0; n <= whole.size(); ++n)
        tryBytes(whole.left(n));
    unsigned state = 12345;
    for (int i = 0; i < 400; ++i) {
        QByteArray bytes = whole;
        for (int flips = 0; flips < 1 + i % 3; ++flips) {
            state = state * 1664525U + 1013904223U;
            bytes[static_cast<qsizetype>((state >> 8U) % static_cast<unsigned>(bytes.size()))] = static_cast<char>(state >> 24U);
        }
        tryBytes(bytes);
    }
    QVERIFY(refused > 20);
    QVERIFY(done > 20);
}

void TestFigures::helpAndVersion() {
    const Ran help = runWords({"--help"});
    QCOMPARE(help.status, 0);
    for (const char* part : {"figures FILE", "certificate SESSION", "--u-reference", "--outlier-level", "Exit status"})
        QVERIFY2(help.out.find(part) != std::string::npos, part);
    QVERIFY(runWords({"--version"}).out.starts_with("spanwright "));
}

QTEST_APPLESS_MAIN(TestFigures)
#include "tst_figures.moc"
