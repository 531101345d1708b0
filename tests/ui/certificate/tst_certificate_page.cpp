// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/SampleRecord.h"
#include "ui/certificate/CertificatePage.h"
#include "ui/certificate/ChecklistView.h"
#include "ui/certificate/PagePreview.h"
#include "ui/look/Look.h"

#include <QAction>
#include <QApplication>
#include <QFile>
#include <QLabel>
#include <QLineEdit>
#include <QPrinter>
#include <QPushButton>
#include <QScrollBar>
#include <QSignalSpy>
#include <QTemporaryDir>
#include <QTest>

using namespace spanwright;

namespace {

/// A page on a workbench, and what it asked for.
struct Desk {
    explicit Desk(const Record& record) : bench([] { return std::int64_t(1'792'000'000'000); }) {
        bench.setRecord(record);
        page = std::make_unique<CertificatePage>(bench, CertificateAsks{[this](QWidget*, const QString& suggestion) {
                                                                            suggested = suggestion;
                                                                            return path;
                                                                        },
                                                                        [this](QWidget*, QPrinter& printer) {
                                                                            printer.setOutputFileName(path);
                                                                            return !path.isEmpty();
                                                                        },
                                                                        [this](QWidget*, const QString&, const QString& text) { told = text; }});
        page->resize(1280, 800);
        page->show();
        QTRY_VERIFY_WITH_TIMEOUT(!bench.evaluating() && !find<PagePreview>("certificatePreview")->pages().pages.empty(), 5000);
    }
    template <class W>
    W* find(const char* name) const {
        return page->findChild<W*>(QLatin1String(name));
    }
    /// Row of the checklist that leads to a field; −1 when there is none.
    int rowOf(const QString& text) const {
        auto* list = find<ChecklistView>("certificateChecklist");
        for (int i = 0; i < list->count(); ++i)
            if (list->item(i)->text().contains(text))
                return i;
        return -1;
    }

    Workbench bench;
    QString path, suggested, told;
    std::unique_ptr<CertificatePage> page;
};

void typeInto(QLineEdit* edit, const QString& text) {
    edit->setFocus();
    edit->selectAll();
    QTest::keyClicks(edit, text);
    QTest::keyClick(edit, Qt::Key_Return);
}

} // namespace

class CertificatePageTest : public QObject {
    Q_OBJECT

  private slots:
    void initTestCase() {
        QVERIFY(folder_.isValid());
        setScheme(*qApp, SchemeName::Light);
    }

    void showsThePagesAndWhatIsMissing() {
        const Desk desk(test::pressureTransmitter());
        QVERIFY(desk.find<PagePreview>("certificatePreview")->pages().pages.size() >= 3);
        QVERIFY(desk.rowOf("Nothing is missing") >= 0);
        QVERIFY(desk.rowOf("Nobody has authorised") > 0);
        QVERIFY(desk.find<QLabel>("certificateState")->text().contains("draft"));
        const auto* sheets = desk.find<PageSheets>("certificateSheets");
        QVERIFY(sheets->accessibleDescription().contains("NV-20318"));
    }

    void anEntryLeadsToItsFieldByKeyboardAndMouse() {
        Record record = test::pressureTransmitter();
        record.item.serial.clear();
        const Desk desk(record);
        QSignalSpy spy(desk.page.get(), &CertificatePage::goTo);
        auto* list = desk.find<ChecklistView>("certificateChecklist");
        const int row = desk.rowOf("serial number");
        QVERIFY(row > 0);
        list->setFocus();
        list->setCurrentRow(row);
        QTest::keyClick(list, Qt::Key_Return);
        QCOMPARE(spy.count(), 1);
        QCOMPARE(spy[0][0].toString(), QString("job"));
        QCOMPARE(spy[0][1].toString(), QString("item.serial"));
        QTest::mouseClick(list->viewport(), Qt::LeftButton, {}, list->visualItemRect(list->item(row)).center());
        QCOMPARE(spy.count(), 2);
    }

    void savesThePdfUnderTheNumberOfTheCertificate() {
        Desk desk(test::pressureTransmitter());
        desk.path = folder_.filePath("draft.pdf");
        QTest::mouseClick(desk.find<QPushButton>("saveCertificate"), Qt::LeftButton);
        QCOMPARE(desk.suggested, QString("QC-2026-0418.pdf"));
        QFile file(desk.path);
        QVERIFY(file.open(QIODevice::ReadOnly) && file.read(5) == "%PDF-");
        QVERIFY(desk.told.isEmpty());
        desk.path = folder_.filePath("no such folder/draft.pdf");
        QTest::mouseClick(desk.find<QPushButton>("saveCertificate"), Qt::LeftButton);
        QVERIFY(!desk.told.isEmpty());
    }

    void printsThroughTheSamePages() {
        Desk desk(test::pressureTransmitter());
        desk.path = folder_.filePath("printed.pdf");
        QTest::mouseClick(desk.find<QPushButton>("printCertificate"), Qt::LeftButton);
        QFile file(desk.path);
        QVERIFY(file.open(QIODevice::ReadOnly) && file.read(5) == "%PDF-");
    }

    void signingOffChangesTheRecordAndCanBeUndone() {
        Desk desk(test::pressureTransmitter());
        typeInto(desk.find<QLineEdit>("signoffs.authorised"), "RA");
        typeInto(desk.find<QLineEdit>("signoffs.authorised.position"), "Head of laboratory");
        typeInto(desk.find<QLineEdit>("signoffs.authorised.date"), "2026-13-40");
        QCOMPARE(desk.bench.record().signOffs.size(), std::size_t(3));
        QVERIFY(desk.bench.record().signOffs[2].date.empty()); // not a date, and it stays where it was typed
        QCOMPARE(desk.find<QLineEdit>("signoffs.authorised.date")->text(), QString("2026-13-40"));
        typeInto(desk.find<QLineEdit>("signoffs.authorised.date"), "2026-10-15");
        QVERIFY((desk.bench.record().signOffs[2] == SignOff{SignOffRole::Authorised, "RA", "Head of laboratory", "2026-10-15"}));
        QTRY_VERIFY(desk.find<QLabel>("certificateState")->text().contains("All three"));
        desk.bench.undoStack().undo();
        QVERIFY(desk.bench.record().signOffs[2].date.empty());
        while (desk.bench.undoStack().canUndo())
            desk.bench.undoStack().undo();
        QVERIFY(desk.bench.record() == test::pressureTransmitter());
    }

    void everyInputAndActionHasAName() {
        const Desk desk(test::pressureTransmitter());
        for (const QLineEdit* edit : desk.page->findChildren<QLineEdit*>())
            QVERIFY2(!edit->accessibleName().isEmpty(), qPrintable(edit->objectName()));
        QCOMPARE(desk.page->actions().size(), 2);
        for (const QAction* action : desk.page->actions())
            QVERIFY(!action->objectName().isEmpty() && !action->shortcut().isEmpty());
        QVERIFY(!desk.find<PagePreview>("certificatePreview")->accessibleName().isEmpty());
    }

    void thePreviewScrollsByKeyboard() {
        const Desk desk(test::pressureTransmitter());
        auto* preview = desk.find<PagePreview>("certificatePreview");
        preview->setFocus();
        const int before = preview->verticalScrollBar()->value();
        QTest::keyClick(preview, Qt::Key_PageDown);
        QVERIFY(preview->verticalScrollBar()->value() > before);
        QCOMPARE(preview->horizontalScrollBar()->maximum(), 0);
    }

  private:
    QTemporaryDir folder_;
};

QTEST_MAIN(CertificatePageTest)
#include "tst_certificate_page.moc"
