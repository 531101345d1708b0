// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/Calibration.h"
#include "core/evaluate/evaluate.h"
#include "core/exchange/AddedColumns.h"
#include "core/session/SessionJson.h"
#include "tests/support/FitHelp.h"
#include "tests/support/RunCommand.h"
#include "tests/support/SampleRecord.h"

#include <QtTest>

#include <QJsonArray>

#include <sys/stat.h>

using namespace spanwright;
using namespace spanwright::test;

namespace {

std::string session(Desk& desk, const Record& record, const char* name = "s.spanwright") {
    return desk.file(QString::fromLatin1(name), QByteArray::fromStdString(writeSession(record, {})));
}

QByteArray bytesOf(const std::string& path) {
    QFile file(QString::fromStdString(path));
    return file.open(QIODevice::ReadOnly) ? file.readAll() : QByteArray("no file");
}

/// Cells of a line of a table separated by commas, without quotes.
QStringList cellsOf(const std::string& path, int line, QChar separator = u',') {
    return QString::fromUtf8(bytesOf(path)).split(u'\n').value(line).split(separator);
}

/// A session with the readings of a published set and nothing else that is uncertain.
Record published(const char* set, const ReadingsFrom& from, const char* function, const char* coverage) {
    Record record = recordOf(publishedSet(QString::fromLatin1(set)), from);
    record.choices.function = *parseFunctionName(function);
    record.choices.coverage = number(coverage);
    record.budget.coverage = number(coverage);
    return record;
}

} // namespace

class TestConvert : public QObject {
    Q_OBJECT

  private slots:
    void everyValueHasItsOwnUncertainty();
    void panelFiguresAndConvertAgree();
    void loadCellInverseOfTheHandbook();
    void lineOfIso28037ReadsBack();
    void thermometerOfTheGuide();
    void onlyRepeatabilityIsAveraged();
    void whatTheTableHoldsStaysAsItIs();
    void aValueThatCannotBeStatedSaysWhy();
    void wordsInTheColumnAreRefusedWithTheirLine();
    void aHeaderThatIsTooShortIsRefused();
    void theColumnIsNamedWhereItIsNotCertain();
    void separatorsAtTheEndOfLinesAreKept();
    void nothingIsWrittenOver();
    void ownResultsAreWrittenAnew();
    void standardOutputIsADash();
    void anotherUnitIsRefused();
    void aPhaseWithoutReadingsIsRefused();
    void coefficientsAreWrittenInEveryForm();
};

/// Worked by hand: without a budget of standards U = k √(u²(f) + s²) / |b1|, k of Student for n − 2; it grows away from the middle.
void TestConvert::everyValueHasItsOwnUncertainty() {
    Desk desk;
    const Record record = published("norris", {"x", "y", {}, {}, {}}, "line", "0.95");
    const std::string out = desk.path("out.csv");
    const Ran ran = runWords({"convert", desk.file("in.csv", "y\n0.9\n300\n700\n999\n"), "--with", session(desk, record), "--to", out});
    QVERIFY2(ran.status == 0, ran.err.c_str());
    Record used = record;
    const Fit fit = fitted(used, "line").fit;
    std::vector<double> expanded;
    for (int line = 1; line <= 4; ++line) {
        const QStringList cells = cellsOf(out, line);
        const double y = cells[0].toDouble(), x = (y - fit.coefficients[0].value) / fit.coefficients[1].value;
        const auto& v = fit.covariance;
        const double u = std::sqrt(v[0] + 2 * x * v[1] + x * x * v[3] + fit.residualSd * fit.residualSd) / fit.coefficients[1].value;
        QVERIFY2(agreesAsPrinted(x, cells[1].toStdString()), qPrintable(cells.join(u',')));
        expanded.push_back(fit.coverageFactor * u);
        QVERIFY2(std::fabs(cells[2].toDouble() / expanded.back() - 1) < 0.05, qPrintable(cells.join(u',')));
        QCOMPARE(cells[1].section(u'.', 1).size(), cells[2].section(u'.', 1).size()); // value to the decimal place of U
    }
    QVERIFY(expanded[0] > expanded[1] && expanded[3] > expanded[2]);
    QCOMPARE(bytesOf(out).count('\n'), 5);
}

void TestConvert::panelFiguresAndConvertAgree() {
    Desk desk;
    Record record = pressureTransmitter();
    record.choices.read = {number("4.0312"), number("11.987"), number("19.99")};
    const std::string file = session(desk, record), out = desk.path("out.csv");
    QCOMPARE(runWords({"convert", desk.file("in.csv", "current\n4.0312\n11.987\n19.99\n"), "--with", file, "--to", out}).status, 0);
    const QJsonArray read = runWords({"figures", file, "--json"}).json()["read"].toArray();
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    const PhaseEvaluation& phase = *calibrationOf(*evaluation, record.choices.phase);
    for (int i = 0; i < 3; ++i) {
        const QStringList cells = cellsOf(out, i + 1);
        const QJsonObject one = read[i].toObject();
        const ReadValue value = readValue(record, *phase.fit, &*phase.split, record.choices.read[static_cast<std::size_t>(i)].toDouble(), 1);
        const StatedValue stated = statedValue(value, phase.budget.readBack);
        QCOMPARE(cells.mid(1, 3), (QStringList{QString::fromStdString(stated.value), QString::fromStdString(stated.expanded), QString::fromStdString(stated.coverageFactor)}));
        QCOMPARE(one["reference"].toDouble(), *value.reference);
        QCOMPARE(one["expanded_uncertainty"].toDouble(), value.budget->expandedReference);
        QCOMPARE(one["state"].toString(), QStringLiteral("sound"));
        // Never beyond the largest one, which the certificate states; and more than the function alone gives.
        QVERIFY(value.budget->expandedReference <= phase.budget.readBack->expandedReference * (1 + 1e-12));
        QVERIFY(value.budget->combined > value.standardUncertainty * std::fabs(phase.fit->curve->derivative(*value.reference)));
    }
}

/// NIST/SEMATECH e-Handbook 4.6.1: a new deflection of 1.239722 belongs to the load 1 705 106; 95 % limits are
/// 1 704 513 and 1 705 698. ±U by propagation agrees with their half-width where g is small.
void TestConvert::loadCellInverseOfTheHandbook() {
    Desk desk;
    const PublishedSet set = publishedSet("loadcell");
    const Record record = published("loadcell", {"load", "deflection", {}, {}, {}}, "polynomial:2", "0.95");
    const std::string out = desk.path("out.csv");
    const Ran ran = runWords({"convert", desk.file("in.csv", "n,deflection\n1,1.239722\n"), "--with", session(desk, record), "--to", out, "--indication", "2"});
    QVERIFY2(ran.status == 0, ran.err.c_str());
    const QStringList cells = cellsOf(out, 1);
    // 1705106 with 592 to two digits of U.
    QCOMPARE(cells.mid(2, 3), (QStringList{"1705110", "590", "2.03"}));
    QCOMPARE(std::lround(std::stod(set.published.at("calibration.x0")) / 10) * 10, 1705110L);
    const double published = (std::stod(set.published.at("calibration.upper")) - std::stod(set.published.at("calibration.lower"))) / 2;
    QVERIFY(std::fabs(cells[3].toDouble() / published - 1) < 0.005);
}

/// ISO/TS 28037:2010, 6.3: y = 10.5 with u = 0.5 gives x = 4.913 with u(x) = 0.322; the stated uncertainties are taken as they are, so k
/// is that of the normal distribution.
void TestConvert::lineOfIso28037ReadsBack() {
    Desk desk;
    Record record = published("iso28037_equal_weights", {"x", "y", {}, {}, "u"}, "line", "0.95");
    record.choices.weights = Weights::Stated;
    record.choices.covariance = CovarianceScale::Stated;
    const std::string file = session(desk, record), out = desk.path("out.csv");
    QCOMPARE(runWords({"convert", desk.file("in.csv", "y\n10.5\n"), "--with", file, "--to", out}).status, 0);
    QCOMPARE(cellsOf(out, 1), (QStringList{"10.5", "4.91", "0.63", "1.96", ""}));
    const QJsonObject read = runWords({"figures", file, "--read", "10.5", "--json"}).json()["read"].toArray()[0].toObject();
    QVERIFY(agreesAsPrinted(read["reference"].toDouble(), "4.913"));
    QVERIFY(agreesAsPrinted(read["standard_uncertainty"].toDouble(), "0.322"));
    QVERIFY(agreesAsPrinted(read["expanded_uncertainty"].toDouble() / read["coverage_factor"].toDouble(), "0.322"));
}

/// JCGM 100:2008, H.3: the correction at 30 °C is −0.1494 °C with u = 0.0041 °C; as a function of the thermometer reading the correction is
/// evaluated, not inverted, and an exact reading carries the uncertainty of the function alone. 30 °C lies outside the eleven readings, so
/// no U is stated; inside, at 24.0085 °C, u is that of the mean.
void TestConvert::thermometerOfTheGuide() {
    Desk desk;
    Record record = published("gum_h3", {"b", "t", {}, {}, {}}, "line", "0.95");
    record.choices.fit = FitDirection::Reference;
    const std::string file = session(desk, record), out = desk.path("out.csv");
    const QJsonObject far = runWords({"figures", file, "--read", "30", "--repeats", "inf", "--json"}).json()["read"].toArray()[0].toObject();
    QVERIFY(agreesAsPrinted(far["reference"].toDouble(), "-0.1494"));
    QVERIFY(agreesAsPrinted(far["standard_uncertainty"].toDouble(), "0.0041"));
    QCOMPARE(far["state"].toString(), QStringLiteral("outside-range"));
    QCOMPARE(runWords({"convert", desk.file("in.csv", "t\n30\n24.0085\n"), "--with", file, "--to", out, "--repeats", "inf"}).status, 0);
    QCOMPARE(cellsOf(out, 1)[2], QString());
    QCOMPARE(cellsOf(out, 1)[4], QStringLiteral("outside the calibrated range"));
    // The mean of the eleven abscissae is 24.0085: u = s/√11 = 0.0035/√11, k = t(9) = 2.26.
    QVERIFY(std::fabs(cellsOf(out, 2)[2].toDouble() - 2.262 * 0.0035 / std::sqrt(11.0)) < 5e-5);
    QCOMPARE(cellsOf(out, 2)[3], QStringLiteral("2.26"));
}

/// Pairs that differ by 0.2 about a curve fitted by a line: pure error is 3·0.02/3 = 0.02, and only that is divided (JCGM 100:2008, 4.2.3).
void TestConvert::onlyRepeatabilityIsAveraged() {
    Desk desk;
    const Record record = recordOf({{"0", "0", "1", "1", "2", "2"}, {"0.1", "-0.1", "2.1", "1.9", "2.1", "1.9"}, {}, {}});
    const std::string file = session(desk, record), in = desk.file("in.csv", "y\n1.2\n");
    const auto squared = [&](const QString& repeats) {
        const QJsonObject read = runWords({"figures", file, "--read", "1.2", "--repeats", repeats.toStdString(), "--json"}).json()["read"].toArray()[0].toObject();
        const double u = read["expanded_uncertainty"].toDouble() / read["coverage_factor"].toDouble();
        return u * u;
    };
    // In the unit of the reference: the slope is 1.
    QVERIFY(std::fabs(squared("1") - squared("inf") - 0.02) < 1e-12);
    QVERIFY(std::fabs(squared("1") - squared("4") - 0.015) < 1e-12);
    QVERIFY(squared("inf") > 0.3); // the lack of fit stays: 4/3 + 0.06 over 4 degrees of freedom, less 0.02
    QVERIFY(runWords({"convert", in, "--with", file, "--to", desk.path("a.csv"), "--repeats", "4"}).err.find("averages out") == std::string::npos);
    // Nothing repeated: U is that of one reading, and it is said.
    const std::string once = session(desk, recordOf({{"0", "1", "2", "3"}, {"0.1", "1.2", "1.9", "3.1"}, {}, {}}), "once.spanwright");
    QCOMPARE(runWords({"convert", in, "--with", once, "--to", desk.path("one.csv")}).status, 0);
    const Ran many = runWords({"convert", in, "--with", once, "--to", desk.path("many.csv"), "--repeats", "100"});
    QVERIFY2(many.err.find("averages out") != std::string::npos, many.err.c_str());
    QCOMPARE(bytesOf(desk.path("many.csv")), bytesOf(desk.path("one.csv")));
}

void TestConvert::whatTheTableHoldsStaysAsItIs() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter());
    const std::string out = desk.path("out.csv");
    const QByteArray in = "\xEF\xBB\xBFZeit;\"current, raw\";Notiz\r\ns;mA;\r\n1;4,03120;\" a;\"\"b\"\"\"\r\n\r\n2;11,987; x \r\n3;;y";
    QCOMPARE(runWords({"convert", desk.file("in.csv", in), "--with", file, "--to", out, "--indication", "2"}).status, 0);
    const QByteArray made = bytesOf(out);
    QVERIFY2(made.startsWith("\xEF\xBB\xBFZeit;\"current, raw\";Notiz;pressure;U;k;remark\r\ns;mA;;bar;bar;;\r\n1;4,03120;\" a;\"\"b\"\"\";0,01"), made.constData());
    QVERIFY2(made.contains("\r\n\r\n2;11,987; x ;4,99"), made.constData());
    QVERIFY2(made.endsWith("\r\n3;;y;;;;no indication"), made.constData());
    // Separated by blanks an empty cell would be none.
    const auto rules = guessRules("a b\n1 2\n");
    const std::vector<AddedColumn> added{{"c", "V"}, {"d", {}}};
    const auto spaced = withAddedColumns("a b\n1 2 \n", *rules, DecimalMark::Point, added, [](std::size_t) { return std::vector<AddedCell>{{"1.5", true}, {}}; });
    QCOMPARE(QString::fromStdString(*spaced), QStringLiteral("a b \"c / V\" d\n1 2  1.5 \"\"\n"));
    // A table that was converted before gets further columns, not the same names once more.
    const std::string again = desk.path("again.csv");
    QCOMPARE(runWords({"convert", out, "--with", file, "--to", again, "--indication", "2"}).status, 0);
    QVERIFY2(bytesOf(again).contains(";pressure;U;k;remark;pressure 2;U 2;k 2;remark 2\r\n"), bytesOf(again).constData());
    // Without a header there is none to add to.
    QCOMPARE(runWords({"convert", desk.file("bare.csv", "12.000\n13.000\n"), "--with", file, "--to", out, "--replace"}).status, 0);
    QVERIFY2(bytesOf(out).startsWith("12.000,5.000"), bytesOf(out).constData());
}

void TestConvert::aValueThatCannotBeStatedSaysWhy() {
    Desk desk;
    Record turning = recordOf({{"-3", "-2", "-1", "0", "1", "2", "3", "3"}, {"9.1", "4.0", "1.1", "0.1", "1.0", "4.1", "9.0", "9.2"}, {}, {}});
    turning.choices.function = {FunctionFamily::Polynomial, 2};
    const std::string out = desk.path("out.csv");
    const Ran ran = runWords({"convert", desk.file("in.csv", "y\n4\n-5\n20\n"), "--with", session(desk, turning), "--to", out});
    QCOMPARE(ran.status, 0);
    QVERIFY2(QString::fromUtf8(bytesOf(out)).contains(QStringLiteral("several values belong to this indication: ")), bytesOf(out).constData());
    QCOMPARE(cellsOf(out, 2)[1], QString());
    QCOMPARE(cellsOf(out, 2)[4], QStringLiteral("no value belongs to this indication"));
    QVERIFY2(QString::fromStdString(ran.out).contains(QStringLiteral("3 of them without an uncertainty")), ran.out.c_str());
    Record exact = recordOf({{"1", "3"}, {"0.1", "0.4"}, {}, {}});
    QCOMPARE(runWords({"convert", desk.file("in.csv", "y\n0.2\n"), "--with", session(desk, exact), "--to", out, "--replace"}).status, 0);
    QCOMPARE(cellsOf(out, 1)[4], QStringLiteral("too few readings for an uncertainty"));
}

void TestConvert::wordsInTheColumnAreRefusedWithTheirLine() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter()), out = desk.path("out.csv");
    const Ran word = runWords({"convert", desk.file("in.csv", "current\n4.1\n\nover\n"), "--with", file, "--to", out});
    QCOMPARE(word.status, 1);
    QVERIFY2(word.err.find("in.csv, line 4, column current: “over” is no number") != std::string::npos, word.err.c_str());
    const Ran shorter = runWords({"convert", desk.file("in.csv", "a,current\n1,4.1\n2\n"), "--with", file, "--to", out, "--indication", "current"});
    QCOMPARE(shorter.status, 1);
    QVERIFY2(shorter.err.find("line 3") != std::string::npos, shorter.err.c_str());
    const Ran unclear = runWords({"convert", desk.file("in.csv", "current;n\n4,123;1\n4,567;2\n"), "--with", file, "--to", out});
    QVERIFY2(unclear.status == 0 || unclear.err.find("decimal") != std::string::npos, unclear.err.c_str());
    QCOMPARE(runWords({"convert", desk.file("in.csv", "current\n4.1\n"), "--to", out}).status, 2);
    QCOMPARE(runWords({"convert", "--with", file, "--to", out}).status, 2);
    QCOMPARE(runWords({"convert", desk.file("in.csv", "current\n4.1\n"), "--with", file, "--to", out, "--indication", "voltage"}).status, 1);
}

void TestConvert::aHeaderThatIsTooShortIsRefused() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter()), out = desk.path("out.csv");
    for (const QByteArray& table : {QByteArray("current\n4.1,5,6\n4.2,5,6\n"), QByteArray("current\n4.1;5;6\n4.2;5;6\n"), QByteArray("current\n4.1 5 6\n4.2 5 6\n"),
                                    QByteArray("n,current\n1,4.1,5\n2,4.2,6\n")}) {
        const std::string in = desk.file("in.csv", table);
        for (const Ran& ran : {runWords({"convert", in, "--with", file, "--to", out}), runWords({"figures", in})}) {
            QCOMPARE(ran.status, 1);
            QVERIFY2(ran.err.find("in.csv, line 1: the header names") != std::string::npos, ran.err.c_str());
            QVERIFY(ran.out.empty());
        }
    }
    // A blank name is a name, a separator at the end of the lines makes no column, and a remark above a table is no header.
    for (const QByteArray& table : {QByteArray("current,\n4.1,5\n4.2,6\n"), QByteArray("current,n\n4.1,5,\n4.2,6,\n"), QByteArray("# by hand\n4.1,5\n4.2,6\n")})
        QCOMPARE(runWords({"figures", desk.file("in.csv", table)}).status, 0);
}

void TestConvert::theColumnIsNamedWhereItIsNotCertain() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter()), out = desk.path("out.csv");
    const auto convert = [&](const QByteArray& table, const std::vector<std::string>& more = {}) {
        std::vector<std::string> words{"convert", desk.file("in.csv", table), "--with", file, "--to", out, "--replace"};
        words.insert(words.end(), more.begin(), more.end());
        return runWords(words);
    };
    const Ran reference = convert("pressure\n4.1\n");
    QCOMPARE(reference.status, 1);
    QVERIFY2(reference.err.find("“pressure” is named like the reference") != std::string::npos && reference.err.find("--indication") != std::string::npos, reference.err.c_str());
    const Ran several = convert("a,b\n4.1,5.2\n");
    QCOMPARE(several.status, 1);
    QVERIFY2(several.err.find("a, b could be meant, and none is named “current”") != std::string::npos, several.err.c_str());
    QVERIFY(!QFile::exists(QString::fromStdString(out)));
    const Ran twins = convert("current,current\n4.1,5.2\n");
    QCOMPARE(twins.status, 1);
    QVERIFY2(twins.err.find("several columns are named “current”: 1, 2") != std::string::npos, twins.err.c_str());
    QCOMPARE(runWords({"figures", desk.file("in.csv", "x,y,y\n1,2,3\n2,4,5\n3,6,8\n"), "--indication", "y"}).status, 1);
    QCOMPARE(runWords({"figures", desk.file("in.csv", "x,y,y\n1,2,3\n2,4,5\n3,6,8\n"), "--indication", "3"}).status, 0);
    // One that is left, one in the unit of the indication, the one that is asked for: said on the error stream.
    const std::vector<std::pair<Ran, const char*>> taken{{convert("pressure,raw\n1,4.1\n"), "column 2 \"raw\""},
                                                         {convert("n,indication\n1,4.1\n"), "column 2 \"indication\""},
                                                         {convert("reference,b\n1,4.1\n"), "column 2 \"b\""},
                                                         {convert("a,b / mA\n1,4.1\n"), "column 2 \"b\""},
                                                         {convert("a,b\n1,4.1\n", {"--indication", "b"}), "column 2 \"b\""},
                                                         {convert("pressure,b\n4.1,2\n", {"--indication", "1"}), "taken as the indication, as asked for"}};
    for (const auto& [ran, said] : taken) {
        QVERIFY2(ran.status == 0, ran.err.c_str());
        QVERIFY2(ran.err.find(said) != std::string::npos, ran.err.c_str());
    }
}

void TestConvert::separatorsAtTheEndOfLinesAreKept() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter()), out = desk.path("out.csv");
    QCOMPARE(runWords({"convert", desk.file("in.csv", "current,n\n12.000,1,\n12.000,2\n"), "--with", file, "--to", out}).status, 0);
    // Each line has as many cells as the longest, so the value stands under its name.
    const QList<QByteArray> lines = bytesOf(out).split('\n');
    QCOMPARE(lines[0], QByteArray("current,n,,pressure / bar,U / bar,k,remark"));
    QVERIFY2(lines[1].startsWith("12.000,1,,5.000"), lines[1].constData());
    QVERIFY2(lines[2].startsWith("12.000,2,,5.000"), lines[2].constData());
    const Ran beyond = runWords({"convert", desk.file("in.csv", "current,n\n12.000,1\n12.000,2,3\n12.000,4\n"), "--with", file, "--to", out});
    QCOMPARE(beyond.status, 1);
    QVERIFY2(beyond.err.find("line 3") != std::string::npos, beyond.err.c_str());
}

/// A script that runs twice does not fail; what somebody else wrote, or changed since, stays unless --replace is given.
void TestConvert::ownResultsAreWrittenAnew() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter());
    const std::string table = desk.path("out.csv");
    for (const QByteArray& in : {QByteArray("current\n4.1\n"), QByteArray("current\n4.1\n"), QByteArray("current\n4.1\n4.2\n")}) {
        const Ran ran = runWords({"convert", desk.file("in.csv", in), "--with", file, "--to", table});
        QVERIFY2(ran.status == 0, ran.err.c_str());
        QCOMPARE(bytesOf(table).count('\n'), in.count('\n'));
    }
    // Another table, and one without a header, which cannot be told from somebody else's once its values differ.
    const QByteArray before = bytesOf(table);
    QCOMPARE(runWords({"convert", desk.file("in.csv", "n,current\n1,4.1\n"), "--with", file, "--to", table}).status, 1);
    QCOMPARE(bytesOf(table), before);
    const std::string bare = desk.path("bare.csv");
    for (const int status : {0, 0})
        QCOMPARE(runWords({"convert", desk.file("in.csv", "4.1\n4.2\n"), "--with", file, "--to", bare}).status, status);
    QCOMPARE(runWords({"convert", desk.file("in.csv", "4.3\n4.2\n"), "--with", file, "--to", bare}).status, 1);

    const std::string to = desk.path("c.txt");
    for (const char* form : {"plain", "c", "csv", "plain"})
        QCOMPARE(runWords({"coefficients", file, "--form", form, "--to", to}).status, 0);
    QByteArray changed = bytesOf(to);
    changed.replace("b1 = ", "b1 =  ");
    desk.file("c.txt", changed);
    QCOMPARE(runWords({"coefficients", file, "--to", to}).status, 1);
    QCOMPARE(bytesOf(to), changed);
    desk.file("c.txt", changed.replace("b1 =  ", "b1 = ") + "used in logger 7\n");
    QCOMPARE(runWords({"coefficients", file, "--to", to}).status, 1);
    QCOMPARE(runWords({"coefficients", file, "--to", to, "--replace"}).status, 0);
    // A session is no result.
    const std::string other = session(desk, pressureTransmitter(), "other.spanwright");
    const QByteArray kept = bytesOf(other);
    const Ran over = runWords({"coefficients", file, "--to", other, "--replace"});
    QCOMPARE(over.status, 1);
    QVERIFY2(over.err.find("is a session") != std::string::npos, over.err.c_str());
    QCOMPARE(bytesOf(other), kept);
}

void TestConvert::standardOutputIsADash() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter()), in = desk.file("in.csv", "current\n4.1\n"), out = desk.path("out.csv");
    const Ran ran = runWords({"convert", in, "--with", file, "--to", "-"});
    QCOMPARE(ran.status, 0);
    QVERIFY2(ran.err.find(" written to standard output") != std::string::npos, ran.err.c_str());
    QCOMPARE(runWords({"convert", in, "--with", file, "--to", out}).status, 0);
    QCOMPARE(QByteArray::fromStdString(ran.out), bytesOf(out));
    QCOMPARE(runWords({"coefficients", file, "--to", "-"}).out, runWords({"coefficients", file}).out);
    // Documents go to a file.
    QCOMPARE(runWords({"certificate", file, "--to", "-"}).status, 2);
    QCOMPARE(runWords({"certificate", file, "--to", desk.path("a.pdf"), "--xml", "-"}).status, 2);
    QCOMPARE(runWords({"self-test", "--to", "-"}).status, 2);
    QVERIFY(!QFile::exists(QStringLiteral("-")));
}

void TestConvert::aPhaseWithoutReadingsIsRefused() {
    Desk desk;
    const Record record = published("norris", {"x", "y", {}, {}, {}}, "line", "0.95");
    const std::string file = session(desk, record), in = desk.file("in.csv", "y\n300\n"), out = desk.path("out.csv");
    for (const Ran& ran : {runWords({"convert", in, "--with", file, "--to", out, "--phase", "as-left"}), runWords({"coefficients", file, "--phase", "as-left"}),
                           runWords({"figures", file, "--phase", "as-left"}), runWords({"figures", desk.file("t.csv", "x,y\n1,2\n2,4\n3,7\n"), "--phase", "as-left"})}) {
        QCOMPARE(ran.status, 1);
        QVERIFY2(ran.err.find("no readings as left") != std::string::npos, ran.err.c_str());
        QVERIFY(ran.out.empty());
    }
}

void TestConvert::nothingIsWrittenOver() {
    Desk desk;
    const std::string file = session(desk, pressureTransmitter());
    const std::string in = desk.file("in.csv", "current\n4.1\n"), old = desk.file("old.csv", "precious");
    const Ran there = runWords({"convert", in, "--with", file, "--to", old});
    QCOMPARE(there.status, 1);
    QVERIFY2(there.err.find("--replace") != std::string::npos, there.err.c_str());
    QCOMPARE(bytesOf(old), QByteArray("precious"));
    const std::string link = desk.path("link.csv");
    QVERIFY(QFile::link(QString::fromStdString(in), QString::fromStdString(link)));
    const QByteArray before = bytesOf(file);
    for (const std::string& input : {in, link, file})
        QCOMPARE(runWords({"convert", in, "--with", file, "--to", input, "--replace"}).status, 1);
    QCOMPARE(runWords({"coefficients", file, "--to", file, "--replace"}).status, 1);
    QCOMPARE(bytesOf(in), QByteArray("current\n4.1\n"));
    QCOMPARE(bytesOf(file), before);
    QCOMPARE(runWords({"convert", in, "--with", file, "--to", old, "--replace"}).status, 0);
    QCOMPARE(runWords({"convert", in, "--with", file, "--to", desk.file("empty.csv", {})}).status, 0);
    QCOMPARE(runWords({"convert", in, "--with", file, "--to", desk.path("no/such/out.csv")}).status, 1);
    // A pipe or a device is not turned into a file, nor a folder.
    const std::string pipe = desk.path("pipe");
    QCOMPARE(mkfifo(pipe.c_str(), 0600), 0);
    for (const std::string& target : {pipe, desk.path(".")}) {
        QCOMPARE(runWords({"convert", in, "--with", file, "--to", target, "--replace"}).status, 1);
        QCOMPARE(runWords({"certificate", file, "--to", target, "--incomplete", "--replace"}).status, 1);
    }
    QVERIFY(!QFileInfo(QString::fromStdString(pipe)).isFile());
}

void TestConvert::anotherUnitIsRefused() {
    Desk desk;
    const Ran ran = runWords({"convert", desk.file("in.csv", "current / A\n0.0041\n"), "--with", session(desk, pressureTransmitter()), "--to", desk.path("out.csv")});
    QCOMPARE(ran.status, 1);
    QVERIFY2(ran.err.find("“current” is in A, the calibration in mA") != std::string::npos, ran.err.c_str());
    QVERIFY(!QFile::exists(QString::fromStdString(desk.path("out.csv"))));
}

void TestConvert::coefficientsAreWrittenInEveryForm() {
    Desk desk;
    const Record small = recordOf({{"0.0002", "0.5", "1", "0.0002"}, {"4.01", "12.02", "19.99", "4.02"}, {}, {}});
    const Ran sentence = runWords({"coefficients", session(desk, small, "small.spanwright")});
    QVERIFY2(sentence.out.find("from 0.0002 to 1") != std::string::npos, sentence.out.c_str());
    const std::string file = session(desk, pressureTransmitter());
    const Ran plain = runWords({"coefficients", file});
    QCOMPARE(plain.status, 0);
    QVERIFY2(plain.out.find("  b1 = 1.6001 mA/bar\n") != std::string::npos, plain.out.c_str());
    QVERIFY(runWords({"coefficients", file, "--form", "c"}).out.find("double pressure_from_current(double current)") != std::string::npos);
    QVERIFY(runWords({"coefficients", file, "--form", "csv"}).out.find("coefficient,b1,1.6001,mA/bar\n") != std::string::npos);
    const std::string to = desk.path("c.txt");
    QCOMPARE(runWords({"coefficients", file, "--to", to}).status, 0);
    QCOMPARE(QString::fromUtf8(bytesOf(to)), QString::fromStdString(plain.out));
    QVERIFY(runWords({"coefficients", file, "--phase", "as-left"}).out.find("From the readings as left") != std::string::npos);
    QCOMPARE(runWords({"coefficients"}).status, 2);
    QCOMPARE(runWords({"coefficients", file, "--form", "basic"}).status, 2);
    QCOMPARE(runWords({"coefficients", desk.file("no.spanwright", "{")}).status, 1);
    Record none = pressureTransmitter();
    none.readings = {};
    QCOMPARE(runWords({"coefficients", session(desk, none, "none.spanwright")}).status, 1);
}

QTEST_MAIN(TestConvert)
#include "tst_convert.moc"
