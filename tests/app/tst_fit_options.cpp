// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/Paths.h"
#include "tests/support/RunCommand.h"

#include <QtTest>

#include <QJsonArray>

#include <cmath>

using namespace spanwright::test;

namespace {

/// ISO/TS 28037:2010, clause 7.4, with the covariance 0.036 of both errors of each reading.
const char* const Six = "x,y,ux,uy,uxy\n1.2,3.4,0.2,0.2,0.036\n1.9,4.4,0.2,0.2,0.036\n2.9,7.2,0.2,0.2,0.036\n4.0,8.5,0.2,0.4,0.036\n"
                        "4.7,10.8,0.2,0.4,0.036\n5.9,13.5,0.2,0.4,0.036\n";
const std::vector<std::string> Stated{"--u-reference", "ux", "--u-indication", "uy", "--method", "both-uncertain", "--covariance", "stated"};

std::vector<std::string> with(std::vector<std::string> words, const std::vector<std::string>& more) {
    words.insert(words.end(), more.begin(), more.end());
    return words;
}

double number(const QJsonValue& figures, std::initializer_list<const char*> path) {
    QJsonValue value = figures;
    for (const char* step : path)
        value = value.isArray() ? value.toArray().at(atoi(step)) : value.toObject().value(QLatin1String(step));
    return value.toDouble(std::nan(""));
}

QByteArray identity(int n) {
    QByteArray text;
    for (int i = 0; i < n; ++i)
        for (int j = 0; j < n; ++j)
            text += QByteArray(i == j ? "0.04" : "0") + (j + 1 < n ? "," : "\n");
    return text;
}

} // namespace

/// What decides how a function is fitted, on the command line.
class FitOptions : public QObject {
    Q_OBJECT

  private slots:
    /// Figures of R as in tst_correlated_fit.
    void aColumnOfCovariances() {
        Desk desk;
        const std::string file = desk.file("six.csv", Six);
        const QJsonObject figures = runWords(with(with({"figures", file, "--json"}, Stated), {"--u-covariance", "uxy"})).json();
        QVERIFY(std::fabs(number(figures, {"coefficients", "1", "value"}) / 2.169995466594958788 - 1) < 1e-13);
        QVERIFY(std::fabs(number(figures, {"chi_squared"}) / 6.482691314400689464 - 1) < 1e-12);
    }

    void aMatrixFromAFile() {
        Desk desk;
        const std::string file = desk.file("six.csv", Six), matrix = desk.file("u.csv", identity(12));
        const Ran ran = runWords(with({"figures", file, "--uncertainty-matrix", matrix, "--json"}, Stated));
        QCOMPARE(ran.json()["correlated"].toBool(), true);
        QVERIFY(ran.json()["split"].isNull());
        // The same uncertainties in columns.
        const std::string even = desk.file("even.csv", "x,y,ux,uy\n1.2,3.4,0.2,0.2\n1.9,4.4,0.2,0.2\n2.9,7.2,0.2,0.2\n4.0,8.5,0.2,0.2\n"
                                                       "4.7,10.8,0.2,0.2\n5.9,13.5,0.2,0.2\n");
        const QJsonObject columns = runWords(with({"figures", even, "--json"}, Stated)).json();
        for (const char* k : {"0", "1"})
            QVERIFY(std::fabs(number(ran.json(), {"coefficients", k, "value"}) / number(columns, {"coefficients", k, "value"}) - 1) < 1e-13);
        const Ran small = runWords(with({"figures", file, "--uncertainty-matrix", desk.file("small.csv", identity(5))}, Stated));
        QCOMPARE(small.status, 1);
        QVERIFY2(QString::fromStdString(small.err).contains("small.csv") && QString::fromStdString(small.err).contains("Give 6 rows"), small.err.c_str());
    }

    void aSharedErrorIsCarriedToTheBudgetUnlessChosen() {
        Desk desk;
        const std::string file = desk.file("six.csv", Six);
        QCOMPARE(runWords(with({"figures", file, "--shared-error", "both"}, Stated)).status, 2);
        QCOMPARE(runWords(with({"figures", file, "--shared-error", "fit", "--json"}, Stated)).status, 0);
    }

    void degreesStandSideBySide() {
        const QJsonObject figures =
            runWords({"figures", std::string(sourceDir()) + "/sample-data/load-cell.csv", "--run", "run", "--json"}).json();
        const QJsonObject degrees = figures["degrees"].toObject();
        QCOMPARE(degrees["steps"].toArray().size(), 5);
        QCOMPARE(degrees["by_e74"].toInt(), 2); // the load cell of the demonstration is a quadratic one
        QVERIFY(number(degrees, {"steps", "1", "p"}) < 1e-6);
        QVERIFY(number(degrees, {"steps", "1", "e74_ratio"}) > number(degrees, {"steps", "1", "e74_limit"}));
        QVERIFY(std::fabs(number(degrees, {"steps", "1", "residual_sd"}) -
                          number(runWords({"figures", std::string(sourceDir()) + "/sample-data/load-cell.csv", "--run", "run", "--function",
                                           "polynomial:2", "--json"}).json(), {"residual_sd"})) < 1e-18);
    }

    /// Of a function that gives the reference, too, the place is a reference value.
    void placesAreReferenceValues() {
        Desk desk;
        const std::string file = desk.file("line.csv", "x,y\n0,1\n1,3\n2,5.1\n3,7\n");
        for (const char* fit : {"indication", "reference"}) {
            const QJsonObject figures = runWords({"figures", file, "--fit", fit, "--at", "1.5", "--repeats", "4", "--json"}).json();
            QVERIFY(std::fabs(number(figures, {"at", "0", "reference"}) - 1.5) < 1e-12);
            QVERIFY(std::fabs(number(figures, {"at", "0", "indication"}) - 4.0) < 0.1);
            QVERIFY(number(figures, {"at", "0", "mean_of_repeats", "high"}) < number(figures, {"at", "0", "new_reading", "high"}));
            QVERIFY(number(figures, {"at", "0", "tolerance", "high"}) > number(figures, {"at", "0", "new_reading", "high"}));
        }
    }

    /// Stated uncertainties leave no spread for a tolerance band: null, with the reason, and not simply absent.
    void aToleranceBandNeedsASpread() {
        Desk desk;
        const Ran ran = runWords(with(with({"figures", desk.file("six.csv", Six), "--json"}, Stated), {"--at", "3"}));
        const QJsonObject at = ran.json()["at"].toArray()[0].toObject();
        QVERIFY(at.contains(QStringLiteral("tolerance")) && at["tolerance"].isNull());
        QVERIFY2(ran.out.find("at.tolerance") != std::string::npos && ran.out.find("taken as they are") != std::string::npos, ran.out.c_str());
    }

    /// U of a value read back is at the coverage of the budget, which stands beside it: 95.45 % unless a session says otherwise.
    void theCoverageOfUStandsBesideIt() {
        Desk desk;
        const QJsonObject read = runWords({"figures", desk.file("line.csv", "x,y\n0,1\n1,3\n2,5.1\n3,7\n"), "--read", "4", "--json"}).json()["read"].toArray()[0].toObject();
        QCOMPARE(number(read, {"coverage_probability"}), 0.9545);
        // Student's quantile of two degrees of freedom in closed form.
        const double p = (1 - 0.9545) / 2;
        QVERIFY(std::fabs(number(read, {"coverage_factor"}) - (1 - 2 * p) / std::sqrt(2 * p * (1 - p))) < 1e-9);
    }

    void anOptionThatChangesNothingIsSaid_data() {
        QTest::addColumn<QStringList>("options");
        QTest::addColumn<QString>("says");
        const auto row = [](const char* name, const QStringList& options, const char* says) { QTest::newRow(name) << options << QString::fromUtf8(says); };
        row("repeats of nothing", {"--repeats", "4"}, "--repeats changes nothing here");
        row("share of nothing", {"--tolerance-share", "0.9"}, "--tolerance-share changes nothing here");
        row("one way only", {"--function", "nernst", "--fit", "reference"}, "--fit changes nothing here: nernst always gives the indication");
        row("more outliers than readings", {"--outliers", "20"}, "--outliers 20: 4 were tried, as 6 readings");
        row("an error that nothing shares", {"--shared-error", "fit"}, "--shared-error changes nothing here");
        row("uncertainties without weights", {"--u-indication", "uy"}, "--weights stated takes it");
        row("an exact abscissa", {"--u-reference", "ux"}, "--method both-uncertain takes it");
        row("both ways", {"--u-reference", "ux", "--u-indication", "uy", "--method", "both-uncertain"}, "");
        row("weights from them", {"--u-indication", "uy", "--weights", "stated"}, "");
        row("repeats of a place", {"--at", "3", "--repeats", "4"}, "");
        row("outliers that are there", {"--outliers", "4"}, "");
    }
    void anOptionThatChangesNothingIsSaid() {
        QFETCH(QStringList, options);
        QFETCH(QString, says);
        Desk desk;
        const std::string file = desk.file("six.csv", Six);
        std::vector<std::string> words{"figures", file, "--reference", "x", "--indication", "y", "--json"};
        for (const QString& option : options)
            words.push_back(option.toStdString());
        const Ran ran = runWords(words);
        QVERIFY2(ran.status == 0, ran.err.c_str());
        QCOMPARE(std::count(ran.err.begin(), ran.err.end(), '\n'), says.isEmpty() ? 1 : 2); // the first says how the table was read
        QVERIFY2(QString::fromStdString(ran.err).contains(says), ran.err.c_str());
        QVERIFY(!ran.json().isEmpty());
    }

    void jointIntervalsAreWider() {
        Desk desk;
        const QJsonObject figures = runWords({"figures", desk.file("line.csv", "x,y\n0,1\n1,3\n2,5.1\n3,7\n"), "--json"}).json();
        const double u = number(figures, {"coefficients", "1", "standard_uncertainty"}), b = number(figures, {"coefficients", "1", "value"});
        // Student's quantile at 0.0125 with two degrees of freedom, 6.205347 (closed form: (1 − 2p)/√(2p(1 − p))).
        QVERIFY(std::fabs((number(figures, {"coefficients", "1", "joint_high"}) - b) / u - 0.975 / std::sqrt(2 * 0.0125 * 0.9875)) < 1e-9);
    }

    void aRobustFitNamesWhatItWeighsDown() {
        Desk desk;
        const std::string file = desk.file("out.csv", "x,y\n0,0.01\n1,1.02\n2,1.99\n3,3\n4,4.01\n5,4.98\n6,6.02\n7,7.01\n8,12\n");
        const QJsonObject figures = runWords({"figures", file, "--method", "robust", "--robust", "bisquare", "--json"}).json();
        QCOMPARE(figures["robust"].toString(), QStringLiteral("bisquare"));
        QCOMPARE(number(figures, {"weighed_down", "0", "row"}), 9.0);
    }

    void refusalsNameRowsAndWhatToDo_data() {
        QTest::addColumn<QByteArray>("bytes");
        QTest::addColumn<QStringList>("options");
        QTest::addColumn<QString>("says");
        const auto row = [](const char* name, const char* bytes, const QStringList& options, const char* says) {
            QTest::newRow(name) << QByteArray(bytes) << options << QString::fromUtf8(says);
        };
        const char* const two = "x,y\n1,1\n2,2.1\n";
        row("too few readings", two, {"--function", "polynomial:2"}, "readings: 2, too few for this function, which needs 3");
        row("one set point", "x,y\n1,1\n1,1.1\n", {}, "all values are equal to 1");
        row("outside the domain", "x,y\n-1,1\n2,2\n3,3\n", {"--function", "logarithmic"}, "row 1 lie outside those for which this function exists (x > 0)");
        row("replicates that stand alone", two, {"--weights", "replicates"}, "those in row 1, 2 stand alone");
        row("no replicates for a variance function", two, {"--weights", "variance-function"}, "need 2 set points that were read more than once");
        row("proportional at zero", "x,y\n0,1\n1,3\n2,5\n", {"--weights", "proportional"}, "no value at level zero, in row 1");
        row("none stated", two, {"--weights", "stated"}, "row 1, 2 has none");
        row("zero stated", "x,y,u\n1,1,0.1\n2,2,0\n3,3,0.1\n", {"--weights", "stated", "--u-indication", "u"}, "uncertainty in row 2 is zero or negative");
        row("squares that vanish", "x,y\n1,1e-300\n2,2.1e-300\n3,0\n", {}, "the indications in row 1, 2 are below 1e-70 in magnitude");
        row("squares that overflow", "x,y\n1,1\n2e80,2\n3e80,3\n", {}, "the reference values in row 2, 3 are above 1e70");
        row("an uncertainty that vanishes", "x,y,u\n1,1,0.1\n2,2,1e-200\n3,3,0.1\n", {"--weights", "stated", "--u-indication", "u"},
            "the stated uncertainties in row 2 are below 1e-70");
        row("curve with both uncertain", Six, {"--method", "both-uncertain", "--function", "polynomial:2"}, "not “polynomial:2”");
        row("shared error scaled", two, {"--fit", "reference", "--shared-error", "fit"}, "");
    }
    void refusalsNameRowsAndWhatToDo() {
        QFETCH(QByteArray, bytes);
        QFETCH(QStringList, options);
        QFETCH(QString, says);
        Desk desk;
        std::vector<std::string> words{"figures", desk.file("a.csv", bytes)};
        for (const QString& option : options)
            words.push_back(option.toStdString());
        const Ran ran = runWords(words);
        if (says.isEmpty()) { // no standard states an uncertainty, so there is nothing to share
            QCOMPARE(ran.status, 0);
            return;
        }
        QCOMPARE(ran.status, 1);
        QVERIFY2(QString::fromStdString(ran.err).contains(says), ran.err.c_str());
    }
};

QTEST_APPLESS_MAIN(FitOptions)
#include "tst_fit_options.moc"
