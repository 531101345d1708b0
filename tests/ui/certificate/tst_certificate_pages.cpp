// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/PrintedFunction.h"
#include "tests/support/Evaluated.h"
#include "tests/support/SampleRecord.h"
#include "ui/certificate/CertificateText.h"
#include "ui/certificate/writeCertificate.h"
#include "ui/words/CoefficientText.h"

#include <QFile>
#include <QImage>
#include <QPainter>
#include <QProcess>
#include <QRegularExpression>
#include <QTemporaryDir>
#include <QTest>

#include <cmath>

using namespace spanwright;
using test::evaluated;
using test::number;

namespace {

const CertificateContext context{"Spanwright 0", "2026-10-20", "sha256:0123456789abcdef0123456789abcdef"};

/// Long names, many set points, every optional part, two hundred excluded readings.
Record crowded() {
    Record record = test::pressureTransmitter();
    const std::string longName = "Interregional Waterworks Association for the Upper Valley and its Tributaries, Department of Instrumentation";
    record.job.customer = longName;
    record.job.laboratory = longName;
    record.job.certificateNumber = "QC-2026-0418-REPLACEMENT-OF-THE-SECOND-DRAFT-0001";
    record.item.description = "Pressuretransmitterwithaverylongdescriptionthathasnospacesatall" + longName;
    record.job.opinions = longName + ". " + longName + ".";
    record.job.replaces = "QC-2026-0400";
    record.job.replacesReason = "the serial number was wrong";
    for (int i = 0; i < 12; ++i)
        record.standards.push_back(record.standards[static_cast<std::size_t>(i % 2)]);
    ReadingColumns& readings = record.readings.edit();
    for (int i = 0; i < 400; ++i) {
        Reading reading = readings.row(readings.size() - 1);
        reading.id = record.nextReadingId++;
        reading.phase = Phase::AsFound;
        reading.run = 1 + i % 2;
        reading.direction = i % 4 < 2 ? Direction::Rising : Direction::Falling;
        reading.setPoint = Decimal{i / 4, 1, {}};
        reading.reference = Decimal{i / 4 * 1000 + i % 7, 4, {}};
        reading.indication = Decimal{4000 + i / 4 * 160 + i % 5, 3, {}};
        readings.append(reading);
        if (i % 2 == 0)
            record.exclusions.edit().add({reading.id, ExclusionReason::Other, longName, "TL", 0});
    }
    return record;
}

QStringList pagesOf(const QString& pdf) {
    QProcess process;
    process.start("pdftotext", {"-layout", "-enc", "UTF-8", pdf, "-"});
    if (!process.waitForFinished())
        return {};
    QStringList pages = QString::fromUtf8(process.readAllStandardOutput()).split(QChar('\f'));
    pages.removeLast();
    return pages;
}

QString simplified(const QStringList& pages) {
    return pages.join(QLatin1Char(' ')).simplified();
}

} // namespace

class CertificatePagesTest : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() { QVERIFY(folder_.isValid()); }

    void nothingIsDecidedWhereNoContributionIsKnown() {
        Record record = test::pressureTransmitter();
        record.standards.clear();
        record.budget.lines.clear();
        record.item.resolution.reset();
        record.item.referenceResolution.reset();
        for (const DerivedLine line : {DerivedLine::Repeatability, DerivedLine::RunToRun, DerivedLine::Hysteresis, DerivedLine::Fit})
            record.budget.omitted.push_back({line, "trial"});
        const Evaluation evaluation = evaluated(record);
        QVERIFY(!evaluation.phase(Phase::AsFound)->verdict.overall.has_value());
        const QString text = plainText(layOutCertificate(record, evaluation, context));
        QVERIFY(!text.contains(QRegularExpression("\\bpass\\b")));
        QVERIFY(text.contains("No statement of conformity: the uncertainty is not known."));
        QVERIFY(text.contains("No contribution is stated, so nothing is known about the uncertainty."));
        // The error keeps the digits that were read: 4.0027 − (4 + 1.6 · 0.0002).
        QVERIFY(text.contains("+0.002\n–\n–"));
        QVERIFY2(text.contains("y = 3.999 + 1.60010 x") || text.contains("y = 3.9994 + 1.6001 x"), qPrintable(text.mid(text.indexOf("y = "), 40)));
    }

    /// Far from zero, powers of x would cancel each other: the form printed says about which place its powers are.
    void aFunctionFarFromZeroIsPrintedAboutACentre() {
        Record record;
        record.item = test::pressureTransmitter().item;
        record.item.rangeLow = number("-20001");
        record.item.rangeHigh = number("-20000");
        for (int i = 0; i < 18; ++i) {
            Reading reading;
            reading.id = record.nextReadingId++;
            reading.reference = Decimal{-20'001'000 + i / 2 * 125, 3, {}};
            const double x = reading.reference->toDouble() + 20000;
            reading.indication = Decimal{static_cast<std::int64_t>(1e5 * (4 + std::exp(x))) + (i % 2 == 0 ? 1 : -1), 5, {}};
            reading.setPoint = reading.reference;
            record.readings.edit().append(reading);
        }
        record.choices.function = {FunctionFamily::Polynomial, 4};
        const Evaluation evaluation = evaluated(record);
        const QString text = plainText(layOutCertificate(record, evaluation, context));
        QVERIFY2(text.contains("(x + 20000.") && text.contains("\nc4\n"), qPrintable(text.mid(text.indexOf("y = "), 200)));
        const auto logger = printedFunction(record, *evaluation.phase(Phase::AsFound));
        QVERIFY(logger && coefficientText(record, *logger, CoefficientForm::Plain).contains("(x + 20000."));
    }

    void namesOfAnyLengthAreSignedInFull() {
        Record record = test::pressureTransmitter();
        for (SignOff& one : record.signOffs) {
            one.name = "Dr.-Ing. Maximiliane Theodora Featherstonehaugh-Cholmondeley of Upper Quillmere";
            one.position = "Head of the laboratory for pressure, temperature and electrical quantities";
        }
        const QString text = plainText(layOutCertificate(record, evaluated(record), context)).remove(QRegularExpression("\\s"));
        QVERIFY(text.contains("Dr.-Ing.MaximilianeTheodoraFeatherstonehaugh-CholmondeleyofUpperQuillmere"));
        QVERIFY(text.contains("Headofthelaboratoryforpressure,temperatureandelectricalquantities"));
    }

    void aNumberStaysWithItsUnit() {
        const TextStyle style{9, false, PageInk::Text};
        const QString said = QStringLiteral("loop resistor 250 Ω, k = 2, 0.075 % of span and trimmed by 0.0012 mA");
        for (double width = 20; width < 80; width += 1) {
            const std::vector<QString> lines = wrapped(said, style, width);
            QStringList joined;
            for (const QString& line : lines) {
                QVERIFY2(!QRegularExpression("\\d$").match(line).hasMatch() || line.endsWith(" 2"), qPrintable(line));
                QVERIFY2(!line.endsWith(QLatin1Char('=')), qPrintable(line));
                joined << line;
            }
            QCOMPARE(joined.join(QLatin1Char(' ')), said);
        }
    }

    void placesOfOneColumnHaveTheSameDecimals() {
        const Record record = test::pressureTransmitter();
        const QString text = plainText(layOutCertificate(record, evaluated(record), context));
        const QString figures = text.mid(text.indexOf("Performance figures as left"));
        QVERIFY2(figures.contains("0.0065\n0.041\n2.5\n") && figures.contains("0.0109\n0.068\n5.0\n"), qPrintable(figures.left(600)));
    }

    void everythingKeepsToTheMargins_data() {
        QTest::addColumn<int>("which");
        QTest::newRow("sample") << 0;
        QTest::newRow("crowded") << 1;
        QTest::newRow("empty") << 2;
        QTest::newRow("directions together") << 3;
    }
    void everythingKeepsToTheMargins() {
        QFETCH(int, which);
        Record record = which == 1 ? crowded() : which == 2 ? Record() : test::pressureTransmitter();
        if (which == 3)
            record.choices.separateDirections = false;
        const Pages pages = layOutCertificate(record, evaluated(record), context);
        QVERIFY(!pages.pages.empty());
        const QRectF inside = pages.content.adjusted(-0.01, -0.01, 0.01, 0.01);
        for (const Page& page : pages.pages) {
            QVERIFY(page.blocks.size() > 6); // a head, a foot, and something between
            for (const PageBlock& block : page.blocks) {
                if (std::holds_alternative<Watermark>(block.what))
                    continue;
                const auto* line = std::get_if<TextLine>(&block.what);
                const QString what = line ? line->text : QString("block %1").arg(block.what.index());
                QVERIFY2(inside.contains(block.mm.topLeft()) && inside.contains(block.mm.bottomRight()),
                         qPrintable(what + QString(" at %1, %2").arg(block.mm.right()).arg(block.mm.bottom())));
            }
        }
    }

    /// Text in a table never runs into the text of the next column.
    void textsDoNotCoverEachOther() {
        for (const Record& record : {test::pressureTransmitter(), crowded()}) {
            const Pages pages = layOutCertificate(record, evaluated(record), context);
            for (const Page& page : pages.pages) {
                std::vector<const PageBlock*> lines;
                for (const PageBlock& block : page.blocks)
                    if (std::holds_alternative<TextLine>(block.what))
                        lines.push_back(&block);
                for (std::size_t i = 0; i < lines.size(); ++i)
                    for (std::size_t j = i + 1; j < lines.size(); ++j) {
                        const auto &a = std::get<TextLine>(lines[i]->what), &b = std::get<TextLine>(lines[j]->what);
                        if (std::abs(a.baseline - b.baseline) > 1)
                            continue;
                        const QRectF common = lines[i]->mm.intersected(lines[j]->mm);
                        QVERIFY2(common.width() < 0.3, qPrintable(a.text + " | " + b.text));
                    }
            }
        }
    }

    void thePdfSaysWhatTheCertificateSays() {
        const Record record = test::pressureTransmitter();
        const QString path = folder_.filePath("sample.pdf");
        QVERIFY(writeCertificatePdf(record, evaluated(record), path, context, WithGaps::Refuse).ok());
        const QStringList pages = pagesOf(path);
        QVERIFY(pages.size() >= 3);
        for (qsizetype i = 0; i < pages.size(); ++i) {
            QCOMPARE(pages[i].count(QString("page %1 of %2").arg(i + 1).arg(pages.size())), 2);
            QVERIFY(pages[i].contains("Certificate QC-2026-0418"));
            QVERIFY(pages[i].contains("Quillmere Calibration Room"));
            QVERIFY(pages[i].contains("DRAFT"));
            QVERIFY(pages[i].contains("record 0123 4567 89ab cdef"));
        }
        const QString all = simplified(pages);
        for (const char* words :
             {"Calibration certificate", "Not valid until authorised", "Brackwater Pumping Station", "NV-20318", "0 to 10 bar", "QR-P-02",
              "HL-26-1190", "2027-03-17", "start 20.8 °C, end 21.4 °C", "Results as found", "Results as left",
              "rising 4.9999 11.9913 −0.0085 0.0042 2.01 −0.053 0.027 0.0120 95.3 fail", "Conformity as left: pass at every point",
              "guarded acceptance (w = U)", "Valid from −0.0011 to 10.0007 bar", "coverage probability of about 95.45 %",
              "The results relate only to the item described", "shall not be reproduced except in full",
              "correction = −error", "Calibrated by", "Checked by", "Authorised by", "End of certificate"})
            QVERIFY2(all.contains(words), words);
        QVERIFY(pages.last().contains("End of certificate"));
        QVERIFY(!all.contains("accredit", Qt::CaseInsensitive));
        QVERIFY(!all.contains("missing"));
    }

    void theHeadOfATableIsRepeatedOnEveryPage() {
        const Record record = crowded();
        const QString path = folder_.filePath("crowded.pdf");
        QVERIFY(writeCertificatePdf(record, evaluated(record), path, context, WithGaps::MarkIncomplete).ok());
        const QStringList pages = pagesOf(path);
        int withReadings = 0;
        for (const QString& page : pages) {
            if (!page.contains("conf. prob.") && page.contains(QRegularExpression("rising +\\d")))
                QVERIFY(page.contains("reason")); // the table of exclusions has its own head
            withReadings += page.contains("conf. prob.") ? 1 : 0;
        }
        QVERIFY(withReadings >= 3);
        QVERIFY(simplified(pages).contains("This certificate replaces certificate QC-2026-0400"));
        for (const QString& page : pages) // the whole number identifies every page, however long it is
            QVERIFY(page.contains("QC-2026-0418-REPLACEMENT-OF-THE-SECOND-DRAFT-0001"));
    }

    void refusesADraftWithGapsAndNamesThem() {
        Record record = test::pressureTransmitter();
        record.job.customer.clear();
        record.item.serial.clear();
        const QString path = folder_.filePath("refused.pdf");
        const auto refused = writeCertificatePdf(record, evaluated(record), path, context, WithGaps::Refuse);
        QVERIFY(!refused.ok());
        QCOMPARE(int(refused.error().code), int(ErrorCode::CertificateIncomplete));
        QCOMPARE(refused.error().facts.size(), std::size_t(2));
        QVERIFY(!QFile::exists(path));
        QVERIFY(writeCertificatePdf(record, evaluated(record), path, context, WithGaps::MarkIncomplete).ok());
        const QStringList pages = pagesOf(path);
        for (const QString& page : pages)
            QVERIFY(page.contains("INCOMPLETE DRAFT"));
        QVERIFY(pages.last().contains("The customer's name is missing."));
        QVERIFY(pages.last().contains("serial number"));
    }

    void leavesTheOldFileWhenItCannotWrite() {
        const Record record = test::pressureTransmitter();
        const auto written =
            writeCertificatePdf(record, evaluated(record), folder_.filePath("no such folder/a.pdf"), context, WithGaps::Refuse);
        QVERIFY(!written.ok());
        QCOMPARE(int(written.error().code), int(ErrorCode::FileNotWritable));
    }

    // The same page on paper and on the screen: it is in its place at any size.
    void paintsTheSamePageAtEverySize() {
        const Record record = test::pressureTransmitter();
        const Pages pages = layOutCertificate(record, evaluated(record), context);
        for (const int width : {420, 1680}) {
            QImage image(width, width * 297 / 210, QImage::Format_RGB32);
            image.fill(Qt::white);
            QPainter painter(&image);
            paintPage(painter, pages, 0, QRectF(QPointF(), QSizeF(image.size())));
            painter.end();
            const double perMm = width / 210.0;
            const auto darkest = [&](double x, double from, double to) {
                int grey = 255;
                for (int y = int(from * perMm); y <= int(to * perMm); ++y)
                    grey = std::min(grey, qGray(image.pixel(int(x * perMm), y)));
                return grey;
            };
            QVERIFY(darkest(100, 25.5, 26.5) < 190); // the rule under the head
            QVERIFY(darkest(8, 20, 270) > 220);      // the margin
        }
    }

    void everyGapAndStatementHasItsSentence() {
        const Record record = test::pressureTransmitter();
        const Evaluation evaluation = evaluated(record);
        QStringList seen;
        for (int i = 0; i <= int(lastGap); ++i) {
            const ChecklistItem item{static_cast<Gap>(i), GapLevel::Warn, "job", "", {{"phase", "as-found"}, {"index", "0"}}};
            const QString text = gapText(item, record, evaluation);
            QVERIFY2(text.size() > 8, qPrintable(QString::number(i)));
            QVERIFY2(!seen.contains(text), qPrintable(text));
            seen << text;
        }
        for (int i = 0; i <= int(lastStatement); ++i)
            QVERIFY(statementText({static_cast<Statement>(i), {{"coverage", "95"}, {"set_point", "5"}}}).endsWith('.'));
    }

    void showsDigitsAsTheyArePrinted() {
        const QLocale german(QLocale::German);
        QCOMPARE(digitsText("-0.0085"), QString::fromUtf8("−0.0085"));
        QCOMPARE(digitsText("0.0085", SignShown::Both), QString("+0.0085"));
        QCOMPARE(digitsText("0.000", SignShown::Both), QString("0.000"));
        QCOMPARE(digitsText("-5.78e-07", SignShown::Minus, german), QString::fromUtf8("−5,78×10⁻⁷"));
        QCOMPARE(digitsText(">99.9"), QString("> 99.9"));
        QCOMPARE(digitsText(""), QString::fromUtf8("–"));
    }

  private:
    QTemporaryDir folder_;
};

QTEST_MAIN(CertificatePagesTest)
#include "tst_certificate_pages.moc"
