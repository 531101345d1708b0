// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/KeyFigures.h"
#include "core/session/SessionFile.h"
#include "tests/support/ClimateLogger.h"
#include "tests/support/Paths.h"
#include "tests/support/Evaluated.h"
#include "tests/support/SampleRecord.h"

#include <QDir>
#include <QFile>
#include <QTest>

using namespace spanwright;
using namespace spanwright::test;

namespace {

QString samplePath(const QString& name) {
    return QString::fromStdString(sourceDir()) + "/sample-data/" + name;
}

QByteArray contents(const QString& name) {
    QFile file(samplePath(name));
    return file.open(QIODevice::ReadOnly) ? file.readAll() : QByteArray();
}

/// With SPANWRIGHT_WRITE_SAMPLES set, a sample that went stale is written anew instead of failing the test.
void compareOrWrite(const QString& name, const QByteArray& expected) {
    if (qEnvironmentVariableIsSet("SPANWRIGHT_WRITE_SAMPLES")) {
        QFile file(samplePath(name));
        QVERIFY(file.open(QIODevice::WriteOnly));
        QCOMPARE(file.write(expected), expected.size());
        return;
    }
    QCOMPARE(contents(name), expected);
}

} // namespace

/// The samples are what the program and the published scenario make of them, byte for byte.
class SampleDataTest : public QObject {
    Q_OBJECT

  private slots:
    void climateLoggerIsWhatItsModelMakes() { compareOrWrite("climate-logger.csv", QByteArray::fromStdString(climateLogger())); }

    void sessionsAreWhatTheProgramWrites_data() {
        QTest::addColumn<QString>("name");
        for (const char* name : {"pressure-transmitter", "temperature-probe", "load-cell", "flow-sensor"})
            QTest::newRow(name) << QString(name) + ".spanwright";
    }
    void sessionsAreWhatTheProgramWrites() {
        QFETCH(QString, name);
        const Record wanted = name.startsWith("pressure") ? pressureTransmitter() : name.startsWith("temperature") ? temperatureProbe()
                              : name.startsWith("load") ? loadCell() : flowSensorAsTyped();
        const Record record = name.startsWith("pressure") ? pressureTransmitterAsTaken() : asTaken(wanted);
        QVERIFY(record == wanted);
        const Evaluation now = evaluated(record);
        // The figures stored in the sample are compared as opening compares them; all else is compared byte for byte.
        const Result<Session> stored = readSession(contents(name).toStdString());
        const bool keep = stored.ok() && !qEnvironmentVariableIsSet("SPANWRIGHT_WRITE_SAMPLES");
        const StoredResults results = keep ? stored->results : StoredResults{SPANWRIGHT_VERSION, keyFigures(now)};
        compareOrWrite(name, QByteArray::fromStdString(writeSession(record, results)));
        const Result<Session> session = readSession(contents(name).toStdString());
        QVERIFY(session.ok());
        QVERIFY(session->warnings.empty());
        QVERIFY(differingFigures(session->results.figures, now).empty());
    }

    void everySampleIsDescribed() {
        const QByteArray readme = contents("README.md");
        for (const QString& name : QDir(samplePath("")).entryList(QDir::Files))
            if (name != "README.md")
                QVERIFY2(readme.contains("`" + name.toUtf8() + "`"), qPrintable(name));
    }

    void transmitterHasTheWholePlan() {
        const Record record = pressureTransmitter();
        QCOMPARE(record.readings->size(), std::size_t(76));
        QVERIFY(!nextPlanned(record.plan, *record.readings, Phase::AsFound));
        for (std::size_t i = 1; i < record.readings->size(); ++i)
            QVERIFY(record.readings->enteredAt()[i] > record.readings->enteredAt()[i - 1]);
    }
};

QTEST_APPLESS_MAIN(SampleDataTest)
#include "tst_sample_data.moc"
