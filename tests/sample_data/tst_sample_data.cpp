// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/ClimateLogger.h"
#include "tests/support/Paths.h"
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
