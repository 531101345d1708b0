// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/KeyFigures.h"
#include "core/session/SessionFile.h"
#include "tests/support/SampleRecord.h"
#include "tests/support/StoryWindow.h"

#include <QApplication>
#include <QFile>
#include <QLabel>
#include <QLineEdit>
#include <QListWidget>
#include <QProcess>

using namespace spanwright;
using namespace spanwright::test;

namespace {

QString textOfPdf(const QString& path) {
    QProcess tool;
    tool.start("pdftotext", {"-layout", path, "-"});
    return tool.waitForFinished() ? QString::fromUtf8(tool.readAllStandardOutput()) : QString();
}

} // namespace

/// The supervisor opens a session, is led to what it lacks, fills it in, signs, and has the draft on paper.
class SupervisorTest : public QObject {
    Q_OBJECT

    QTemporaryDir home_;

    /// The sample without its customer, as a file.
    QString withoutCustomer() const {
        Record record = pressureTransmitterAsTaken();
        record.job.customer.clear();
        const QString path = home_.filePath("unfinished.spanwright");
        QFile::remove(path);
        return SessionFile::saveAs(path.toStdString(), record, {}).ok() ? path : QString();
    }

    static QListWidgetItem* entryAbout(const QListWidget& list, const QString& word) {
        for (int row = 0; row < list.count(); ++row)
            if (list.item(row)->text().contains(word, Qt::CaseInsensitive))
                return list.item(row);
        return nullptr;
    }

  private slots:
    void isLedToWhatIsMissingAndPrints() {
        StoryWindow story(home_.path());
        story.dialogs.open = withoutCustomer();
        story.act("file.open");
        QCOMPARE(story.record().readings->size(), std::size_t(76));
        story.act("view.certificate");
        auto* list = story.find<QListWidget>("certificateChecklist");
        QListWidgetItem* missing = entryAbout(*list, "customer");
        QVERIFY(missing);
        const QString draftBefore = story.find<QLabel>("certificateState")->text();
        QTest::mouseClick(list->viewport(), Qt::LeftButton, {}, list->visualItemRect(missing).center());

        QCOMPARE(story.window().stage(), Stage::Job);
        QCOMPARE(QApplication::focusWidget()->objectName(), QString("job.customer"));
        story.type("Brackwater Pumping Station");
        story.act("view.certificate");
        QCOMPARE(story.record().job.customer, std::string("Brackwater Pumping Station"));
        QVERIFY(!entryAbout(*list, "customer"));
        QVERIFY(story.find<QLabel>("certificateState")->text() != draftBefore);

        const QString pdf = home_.filePath("draft.pdf");
        story.dialogs.pdf = pdf;
        story.act("certificate.pdf");
        const QString text = textOfPdf(pdf);
        QVERIFY2(text.contains("Brackwater Pumping Station"), qPrintable(text.left(2000)));
        QVERIFY(text.contains("QC-2026-0418"));
        QVERIFY(text.contains("1 of "));
        QVERIFY(!text.contains("INCOMPLETE"));
        QVERIFY(text.contains("draft", Qt::CaseInsensitive));
    }

    void signsAndStillHasADraftUntilAllThreeDid() {
        StoryWindow story(home_.path());
        story.window().document().begin(pressureTransmitter());
        story.act("view.certificate");
        auto* state = story.find<QLabel>("certificateState");
        const QString asDraft = state->text();
        const auto sign = [&](const char* field, const QString& words) {
            auto* edit = story.find<QLineEdit>(field);
            edit->setFocus();
            story.type(words);
            story.press(Qt::Key_Tab);
        };
        sign("signoffs.authorised", "RA");
        sign("signoffs.authorised.position", "Head of laboratory");
        sign("signoffs.authorised.date", "2026-10-15");
        QCOMPARE(story.record().signOffs.size(), std::size_t(3));
        QVERIFY(state->text() != asDraft);
        QVERIFY(!state->text().contains("is valid"));
        story.act("edit.undo");
        story.act("edit.undo");
        story.act("edit.undo");
        QCOMPARE(story.record().signOffs.size(), std::size_t(2));
        QCOMPARE(state->text(), asDraft);
    }
};

QTEST_MAIN(SupervisorTest)
#include "tst_supervisor.moc"
