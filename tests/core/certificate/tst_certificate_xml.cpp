// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/CertificateXml.h"
#include "core/certificate/DigitalUnit.h"
#include "tests/support/Evaluated.h"
#include "tests/support/SampleRecord.h"

#include <QStringList>
#include <QTest>
#include <QXmlStreamReader>

using namespace spanwright;

namespace {

std::string xmlOf(const Record& record) {
    const Evaluation evaluation = test::evaluated(record);
    CertificateXmlParts parts;
    parts.statements = {"The results relate only to the item <described>."};
    parts.decisionRule = "guarded acceptance & w = U";
    parts.pdfName = "draft.pdf";
    parts.pdfBase64 = "JVBERi0=";
    return certificateXml(buildCertificate(record, evaluation, {"Spanwright 0.1.0", "2026-10-20", "sha256:00"}), parts);
}

/// The names of an element's children, or the texts of every element of a name.
struct Read {
    QMap<QString, QStringList> children; ///< of the first element of each name
    QMap<QString, QStringList> texts;
    QString error;
};

Read read(const std::string& xml) {
    Read result;
    QXmlStreamReader reader(QByteArray::fromStdString(xml));
    QStringList path;
    QSet<QString> closed;
    while (!reader.atEnd()) {
        switch (reader.readNext()) {
        case QXmlStreamReader::StartElement:
            if (!path.isEmpty() && !closed.contains(path.last()))
                result.children[path.last()] << reader.name().toString();
            path << reader.name().toString();
            break;
        case QXmlStreamReader::Characters:
            if (!reader.isWhitespace())
                result.texts[path.last()] << reader.text().toString();
            break;
        case QXmlStreamReader::EndElement: closed << path.takeLast(); break;
        default: break;
        }
    }
    result.error = reader.errorString();
    return result;
}

} // namespace

class CertificateXmlTest : public QObject {
    Q_OBJECT

  private slots:
    // Order and presence as in the public schema of digital calibration certificates, version 3.3.0 (read).
    void keepsTheOrderOfTheSchema() {
        const Read xml = read(xmlOf(test::pressureTransmitter()));
        QVERIFY2(xml.error.isEmpty(), qPrintable(xml.error));
        QCOMPARE(xml.children["digitalCalibrationCertificate"], QStringList({"administrativeData", "measurementResults", "document"}));
        QCOMPARE(xml.children["administrativeData"],
                 QStringList({"dccSoftware", "coreData", "items", "calibrationLaboratory", "respPersons", "customer", "statements"}));
        QCOMPARE(xml.children["coreData"],
                 QStringList({"countryCodeISO3166_1", "usedLangCodeISO639_1", "mandatoryLangCodeISO639_1", "uniqueIdentifier", "identifications",
                              "receiptDate", "beginPerformanceDate", "endPerformanceDate", "performanceLocation"}));
        QCOMPARE(xml.children["measurementResults"],
                 QStringList({"usedMethods", "measuringEquipments", "influenceConditions", "measurementResult", "measurementResult",
                              "measurementResult"}));
        QCOMPARE(xml.children["measurementResult"], QStringList({"name", "influenceConditions", "results"}));
        QCOMPARE(xml.children["respPerson"], QStringList({"person", "description", "role", "mainSigner"}));
        QCOMPARE(xml.texts["uniqueIdentifier"], QStringList("QC-2026-0418-draft"));
    }

    // The same digits as on paper, in SI units by moving the exponent, one conformity for each point.
    void carriesTheDigitsOfThePaper() {
        const Read xml = read(xmlOf(test::pressureTransmitter()));
        const QStringList lists = xml.texts["valueXMLList"];
        QCOMPARE(lists.size(), 9); // three conditions, three columns in each of two phases
        QVERIFY(lists[3].contains("4.9999E5"));
        QVERIFY(lists[4].contains("11.9913"));
        QVERIFY(lists[5].contains("-0.0085"));
        QVERIFY(xml.texts["unitXMLList"].contains("\\pascal") && xml.texts["unitXMLList"].contains("\\milli\\ampere"));
        QCOMPARE(xml.texts["conformityXMLList"][0].split(' ').size(), lists[5].split(' ').size());
        QCOMPARE(xml.texts["conformityXMLList"][0].count("fail"), 2);
        QCOMPARE(xml.texts["valueExpandedMUXMLList"][0].split(' ').size(), 22);
        QCOMPARE(xml.texts["coverageProbabilityXMLList"][0], QString("0.9545"));
        QCOMPARE(xml.texts["status"], QStringList({"beforeAdjustment", "afterAdjustment"}));
    }

    void escapesWhatWasTyped() {
        Record record = test::pressureTransmitter();
        record.job.customer = " A <b> & \"c\" \x01 ";
        const Read xml = read(xmlOf(record));
        QVERIFY2(xml.error.isEmpty(), qPrintable(xml.error));
        QVERIFY(xml.texts["content"].contains("A <b> & \"c\""));
    }

    void anEmptyRecordIsStillWellFormed() {
        const Read xml = read(xmlOf(Record()));
        QVERIFY2(xml.error.isEmpty(), qPrintable(xml.error));
    }

    // SI data model 2.2 (from memory of the published brochure): names of units and prefixes.
    void writesUnitsOfTheDataModel() {
        QCOMPARE(digitalUnit("mA").name, std::string("\\milli\\ampere"));
        QCOMPARE(digitalUnit("bar").name, std::string("\\pascal"));
        QCOMPARE(digitalUnit("bar").exponent, 5);
        QCOMPARE(digitalUnit("°C").name, std::string("\\degreecelsius"));
        QCOMPARE(digitalUnit("kN").name, std::string("\\kilo\\newton"));
        QCOMPARE(digitalUnit("m").name, std::string("\\metre"));
        QCOMPARE(digitalUnit("psi").name, std::string("|psi"));
        QCOMPARE(scaledDigits("-0.0011", 5), std::string("-0.0011E5"));
        QCOMPARE(scaledDigits("5.8e-07", 5), std::string("5.8E-2"));
        QCOMPARE(scaledDigits("4.0", 0), std::string("4.0"));
    }
};

QTEST_APPLESS_MAIN(CertificateXmlTest)
#include "tst_certificate_xml.moc"
